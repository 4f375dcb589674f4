import type { ReactNode } from "react";
import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";

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
  note: { label: string; optional: boolean };
  commandId: string;
  reply: FormReply | undefined;
}

/** A check of a tool or extinguisher, opened in its row. */
export function CheckForm({ id, intent, subject, opens, act, actNote, says, on, due, note, commandId, reply }: CheckFormProps) {
  const { field, back, faults } = fieldsOf(id, reply);
  return (
    <details open={back} className="open:basis-full">
      <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
        {opens}
        <span className="sr-only">: {subject.name}</span>
      </summary>
      <Form method="post" className="flex flex-col items-start gap-3 pb-4" preventScrollReset>
        <FormFaults faults={faults} />
        <HiddenIds commandId={`${commandId}-${intent}`} intent={intent} also={{ [subject.field]: subject.id }} />
        {says && <div className="max-w-[66ch]">{says}</div>}
        <div className="flex flex-wrap items-start gap-x-4 gap-y-3">
          {on && <TextInput {...field("on", on.value)} type="date" label={on.label} />}
          {due && <TextInput {...field("due", due.value)} type="date" label={due.label} hint={due.hint} />}
        </div>
        <TextInput {...field("note")} label={note.label} optional={note.optional} maxLength={2000} className="w-full max-w-[560px]" />
        <Fitting note={actNote}>{act}</Fitting>
      </Form>
    </details>
  );
}
