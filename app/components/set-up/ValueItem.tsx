import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { StateRow } from "#app/components/ui/StateRow";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { ValueRow } from "#app/lib/views/set-up";

interface ValueItemProps {
  row: ValueRow;
  commandId: string;
  reply: FormReply | undefined;
  /** The next one to read: its form is open. */
  next: boolean;
  may: boolean;
}

const ASK = { confirmed: "Change it", default: "Say where it was read", missing: "Enter it" } as const;

/** A rating or limit: what it is, its figure, where it was read; the form opens in the row. */
export function ValueItem({ row, commandId, reply, next, may }: ValueItemProps) {
  const { field, back, faults } = fieldsOf(row.anchor, reply);
  const named = (word: string) => (
    <>
      {word}
      <span className="sr-only">: {row.label}</span>
    </>
  );
  return (
    <StateRow id={row.anchor} nut={row.state === "confirmed" ? "done" : "todo"} word={row.word} open={next || back}>
      <div className="grid gap-x-6 gap-y-1 tablet:grid-cols-[minmax(0,1.15fr)_minmax(0,.7fr)_minmax(0,1.3fr)]">
        <div>
          <h3 className={row.state === "confirmed" ? "text-lead font-medium" : "text-lead"}>{row.label}</h3>
          <p className="text-note text-ink-2">{row.help}</p>
        </div>
        <p>
          {row.value === null ? (
            <span className="text-ink-2">not entered{row.unit && `, in ${row.unit}`}</span>
          ) : (
            <Figure value={row.value} unit={row.unit} className="text-h3 font-bold" />
          )}
        </p>
        <p className={row.state === "confirmed" ? undefined : "text-ink-2"}>{row.source}</p>
      </div>
      {may && (
        <details open={next || back}>
          <summary className="min-h-hit py-3 font-semibold text-fitting-ink">{named(ASK[row.state])}</summary>
          <Form method="post" className="flex flex-col items-start gap-3 pb-2" preventScrollReset>
            <FormFaults faults={faults} />
            <HiddenIds commandId={commandId} also={{ key: row.key }} />
            {row.note && <p className="max-w-[62ch]">{row.note}</p>}
            <div className="flex w-full flex-wrap items-start gap-x-4 gap-y-3">
              <NumberInput {...field("value", row.typed)} label="Value" unit={row.unit} size={8} />
              <TextInput
                {...field("source", row.typedSource)}
                label="Where it was read: paper, issue, page"
                maxLength={200}
                className="min-w-0 flex-[1_1_18rem] max-w-[560px]"
              />
            </div>
            <Fitting size="act" className="tablet:min-w-80" note={`${row.label}, into the record`}>
              I read it there
            </Fitting>
          </Form>
        </details>
      )}
    </StateRow>
  );
}
