import { Form } from "react-router";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { ROLE_DOES } from "#app/lib/schemas/account";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";

const ROLES = (["crew", "builder", "inspector", "lead"] as const).map((role) => ({ value: role, label: role, note: ROLE_DOES[role] }));

/** Asks somebody by mail to join with one role. */
export function Invite({ commandId, reply }: { commandId: string; reply: FormReply | undefined }) {
  const { field, faults } = fieldsOf("invite", reply);
  return (
    <Form method="post" className="flex max-w-[860px] flex-col items-start gap-4" preventScrollReset>
      <FormFaults faults={faults} />
      <HiddenIds commandId={commandId} intent="invite" />
      <TextInput
        {...field("email")}
        type="email"
        label="Mail address"
        hint="They get a mail with a link, good for 7 days. They join when they accept it; without an account they make one first."
        autoComplete="off"
        className="w-full max-w-[520px]"
      />
      <ChoiceGroup {...field("role")} label="What they do here" options={ROLES} />
      <Fitting size="act" className="tablet:min-w-80" note="the mail goes out at once">
        Invite
      </Fitting>
    </Form>
  );
}
