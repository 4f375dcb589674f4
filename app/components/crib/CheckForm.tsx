import type { ReactNode } from "react";
import { Form } from "react-router";
import { CheckLapses } from "#app/components/crib/CheckLapses";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { PhotoInput } from "#app/components/forms/PhotoInput";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { CheckShown } from "#app/lib/views/crib";

export interface CheckFormProps {
  /** Id of the form on the page, and the prefix of its fields. */
  id: string;
  intent: "good-check" | "bad-check" | "look" | "service" | "withdrawn";
  /** The row that it is about. */
  subject: { field: "tool" | "extinguisher"; id: string; name: string };
  /** Words of the line that opens it. */
  opens: string;
  act: string;
  actNote: string;
  /** Said above the fields: what follows from it. */
  says?: ReactNode;
  on?: { label: string; value: string };
  due?: { label: string; hint: string; value: string };
  /** First day of doubt. */
  since?: { label: string; hint: string };
  /** Number and photo of the certificate are asked. */
  certificate?: boolean;
  /** What it makes lapse, shown before the second press. */
  checking?: CheckShown;
  note: { label: string; optional: boolean };
  commandId: string;
  reply: FormReply | undefined;
}

/** A check of a tool or extinguisher, opened in its row. */
export function CheckForm({
  id,
  intent,
  subject,
  opens,
  act,
  actNote,
  says,
  on,
  due,
  since,
  certificate = false,
  checking,
  note,
  commandId,
  reply,
}: CheckFormProps) {
  const { field, back, faults } = fieldsOf(id, reply);
  const seen: Record<string, string> = checking ? { seen: checking.seen } : {};
  return (
    <details open={back} className="open:basis-full">
      <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
        {opens}
        <span className="sr-only">: {subject.name}</span>
      </summary>
      <Form
        method="post"
        encType={certificate ? "multipart/form-data" : undefined}
        className="flex flex-col items-start gap-3 pb-4"
        preventScrollReset
      >
        <FormFaults faults={faults} />
        <HiddenIds commandId={`${commandId}-${intent}`} intent={intent} also={{ [subject.field]: subject.id, ...seen }} />
        {says && !checking && <div className="max-w-[66ch]">{says}</div>}
        <div className="flex flex-wrap items-start gap-x-4 gap-y-3">
          {on && <TextInput {...field("on", on.value)} type="date" label={on.label} />}
          {due && <TextInput {...field("due", due.value)} type="date" label={due.label} hint={due.hint} />}
          {since && <TextInput {...field("since")} type="date" label={since.label} optional hint={since.hint} className="max-w-[420px]" />}
        </div>
        {certificate && (
          <>
            <TextInput
              {...field("certificate")}
              label="Certificate number"
              optional
              figures
              maxLength={80}
              className="w-full max-w-[360px]"
            />
            <PhotoInput {...field("photo")} label="Photo of the certificate" />
          </>
        )}
        <TextInput {...field("note")} label={note.label} optional={note.optional} maxLength={2000} className="w-full max-w-[560px]" />
        {checking && <CheckLapses lapses={checking.lapses} />}
        <Fitting note={checking ? "you have read what lapses" : actNote}>{act}</Fitting>
      </Form>
    </details>
  );
}
