import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";

/** This board as a template of one's own. */
export function KeepTemplate({ commandId, reply }: { commandId: string; reply: FormReply | undefined }) {
  const { field, faults } = fieldsOf("keep", reply);
  return (
    <section aria-labelledby="keep-title" className="border-t-2 border-ink px-4 py-5 tablet:px-6">
      <h2 id="keep-title" className="text-h3">
        Keep it as a template of your own
      </h2>
      <p className="max-w-[72ch] pb-3 text-ink-2">
        For your next install: gates, items and numbers as starting points, without anybody’s records and without where a number was read.
      </p>
      <Form method="post" className="flex flex-wrap items-end gap-x-4 gap-y-3" preventScrollReset>
        <FormFaults faults={faults} />
        <HiddenIds commandId={commandId} intent="keep" />
        <TextInput {...field("name")} label="Name of the template" maxLength={60} className="min-w-0 max-w-[420px] flex-[1_1_14rem]" />
        <Fitting>Keep it</Fitting>
      </Form>
    </section>
  );
}
