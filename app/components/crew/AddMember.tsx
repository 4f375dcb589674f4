import { Form } from "react-router";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import { ROLE_DOES } from "#app/lib/views/crew";

const ROLES = (["crew", "builder", "inspector", "lead"] as const).map((role) => ({ value: role, label: role, note: ROLE_DOES[role] }));

/** Lets somebody in who has an account, with one role; another role is added the same way. */
export function AddMember({ commandId, reply }: { commandId: string; reply: FormReply | undefined }) {
  const { field, faults } = fieldsOf("add", reply);
  return (
    <Form method="post" className="flex max-w-[860px] flex-col items-start gap-4" preventScrollReset>
      <FormFaults faults={faults} />
      <HiddenIds commandId={commandId} intent="add" />
      <TextInput
        {...field("email")}
        type="email"
        label="Mail address"
        hint="The one with which they sign in. To give a member another role, enter their address again."
        autoComplete="off"
        className="w-full max-w-[520px]"
      />
      <ChoiceGroup {...field("role")} label="What they do here" options={ROLES} />
      <Fitting size="act" className="tablet:min-w-80" note="they see this install at once">
        Add to the crew
      </Fitting>
    </Form>
  );
}
