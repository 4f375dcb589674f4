import type { ReactNode } from "react";
import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";
import { type FieldProps, type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { May } from "#app/lib/views/may";

interface RowFormProps {
  /** Id of the form on the page, and the prefix of its fields. */
  id: string;
  intent: string;
  also: Record<string, string>;
  commandId: string;
  reply: FormReply | undefined;
  may: May;
  /** Words of the line that opens it; without it the form stands open. */
  opens?: string;
  /** Which row it is about, for who hears it alone. */
  about: string;
  says?: ReactNode;
  fields?: (field: (name: string, otherwise?: string) => FieldProps) => ReactNode;
  act: string;
  note?: string;
  big?: boolean;
  /** A second act of the same form, a gap apart. */
  other?: { intent: string; act: string; note: string };
}

/** An act of one row with its reason or words; where it may not be done, the reason stands on it. */
export function RowForm(props: RowFormProps) {
  const { id, intent, also, commandId, reply, may, opens, about, says, fields, act, note, big = false, other } = props;
  const { field, back, faults } = fieldsOf(id, reply);
  const size = big ? "act" : "normal";
  const form = (
    <Form method="post" id={id} className="flex min-w-0 flex-col items-start gap-3" preventScrollReset>
      <FormFaults faults={faults} />
      <HiddenIds commandId={`${commandId}-${intent}`} also={also} />
      {says && <div className="max-w-[66ch]">{says}</div>}
      {may.ok && fields?.(field)}
      <div className="flex w-full flex-wrap gap-x-10 gap-y-3">
        <Fitting
          size={size}
          name="intent"
          value={intent}
          note={note}
          reason={may.ok ? undefined : may.why}
          label={`${act}: ${about}. ${may.ok ? (note ?? "") : may.why}`}
        >
          {act}
        </Fitting>
        {other && may.ok && (
          <Fitting
            size={size}
            variant="outline"
            name="intent"
            value={other.intent}
            note={other.note}
            label={`${other.act}: ${about}. ${other.note}`}
          >
            {other.act}
          </Fitting>
        )}
      </div>
    </Form>
  );
  if (!opens) return form;
  return (
    <details open={back}>
      <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
        {opens}
        <span className="sr-only">: {about}</span>
      </summary>
      <div className="pb-4">{form}</div>
    </details>
  );
}
