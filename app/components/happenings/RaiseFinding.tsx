import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { PhotoInput } from "#app/components/forms/PhotoInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { SeverityFields } from "#app/components/happenings/SeverityFields";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { FindingsView } from "#app/lib/views/findings";
import type { CameFrom } from "#app/lib/views/record-links";

interface RaiseFindingProps {
  view: FindingsView;
  came: CameFrom;
  commandId: string;
  reply: FormReply | undefined;
}

/** Anyone may raise a finding: words, system, how bad it is. */
export function RaiseFinding({ view, came, commandId, reply }: RaiseFindingProps) {
  const { field, faults } = fieldsOf("raise", reply);
  return (
    <section aria-labelledby="new" className="border-t-2 border-ink px-4 py-5 tablet:px-6">
      <h2 id="new" className="scroll-mt-4 text-h3">
        New finding
      </h2>
      <p className="max-w-[66ch] text-ink-2">What you see wrong. Anyone may raise one; only an inspector closes or lowers it.</p>
      <Form method="post" encType="multipart/form-data" className="mt-4 flex max-w-[860px] flex-col items-start gap-4" preventScrollReset>
        <FormFaults faults={faults} />
        <HiddenIds commandId={commandId} intent="raise" />
        {view.goWarning && (
          <Notice kind="hold" title={view.goWarning}>
            Is the engine running? Shout STOP first.
          </Notice>
        )}
        <TextInput
          {...field("words")}
          label="What you see"
          hint="Where, how much, since when: cooler hose rubs on the mount above 2,100 rpm."
          rows={2}
          maxLength={1000}
          className="w-full"
        />
        {came.where && <p>The record will say: seen {came.where}.</p>}
        <Select
          {...field("system", came.systems[0])}
          label="System"
          empty="choose a system"
          options={view.systems}
          className="w-full max-w-[420px]"
        />
        <SeverityFields label="How bad is it?" field={field} />
        <PhotoInput {...field("photos")} label="Photos" most={6} />
        <Fitting
          size="act"
          className="tablet:min-w-96"
          note="it counts at once, and stands in the record"
          reason={view.may.ok ? undefined : view.may.why}
        >
          Raise the finding
        </Fitting>
      </Form>
    </section>
  );
}
