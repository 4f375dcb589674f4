import { Form } from "react-router";
import { FieldErrors } from "#app/components/forms/Field";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { SeverityFields } from "#app/components/happenings/SeverityFields";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { type FieldProps, type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { FindingsView } from "#app/lib/views/findings";

interface RaiseFindingProps {
  view: FindingsView;
  commandId: string;
  reply: FormReply | undefined;
}

/** Anyone may raise a finding: words, system, how bad it is. */
export function RaiseFinding({ view, commandId, reply }: RaiseFindingProps) {
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
        <Select {...field("system")} label="System" empty="choose a system" options={view.systems} className="w-full max-w-[420px]" />
        <SeverityFields label="How bad is it?" field={field} />
        <Photo {...field("photo")} />
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

function Photo({ id, name, defaultValue, errors }: FieldProps) {
  return (
    <div className="field photo-field">
      <label htmlFor={id}>
        Photo <span className="field-optional">(may stay empty)</span>
      </label>
      <p className="field-hint" id={`${id}-hint`}>
        JPEG, PNG or WebP, up to 12 MB. Place and device are taken out of it.
      </p>
      <input
        id={id}
        name={name}
        type="file"
        accept="image/jpeg,image/png,image/webp"
        capture="environment"
        aria-describedby={`${id}-hint${errors?.length ? ` ${id}-error` : ""}`}
        aria-invalid={Boolean(errors?.length) || undefined}
      />
      {defaultValue && (
        <>
          <input type="hidden" name={name} value={defaultValue} />
          <p>The photo is here already.</p>
        </>
      )}
      <FieldErrors id={`${id}-error`} errors={errors} />
    </div>
  );
}
