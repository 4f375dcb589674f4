import { TextInput } from "#app/components/forms/TextInput";
import { RowForm } from "#app/components/happenings/RowForm";
import { StateRow } from "#app/components/ui/StateRow";
import type { FormReply } from "#app/lib/schemas/form-reply";
import type { OpeningRow } from "#app/lib/views/openings";

interface OpeningItemProps {
  row: OpeningRow;
  commandId: string;
  reply: FormReply | undefined;
}

const NUT = { open: "lapsed", closed: "done", mistake: "na", undisturbed: "na" } as const;
const WORD = { open: "open", closed: "closed", mistake: "by mistake", undisturbed: "nothing disturbed" } as const;

/** One opening: what, why, since when; it is closed here, and an inspector can mark it a mistake. */
export function OpeningItem({ row, commandId, reply }: OpeningItemProps) {
  const shared = { also: { opening: row.id }, about: row.title, commandId: `${commandId}-${row.id}`, reply };
  return (
    <StateRow id={row.anchor} nut={NUT[row.state]} word={WORD[row.state]} open={row.state === "open"}>
      <h3 className="text-lead leading-tight">{row.title}</h3>
      <p>{row.reason}</p>
      <p className="text-note text-ink-2">{row.opened}</p>
      {row.closed && <p className="text-note text-ink-2">closed {row.closed}</p>}
      {row.mistake && <p className="text-note text-ink-2">marked as recorded by mistake {row.mistake}</p>}
      {row.undisturbed && (
        <div className="mt-2 flex flex-col items-start gap-2">
          <p className="max-w-[66ch]">{row.undisturbed.says}</p>
          {row.undisturbed.may && (
            <RowForm
              {...shared}
              id={`${row.anchor}-undisturbed`}
              intent="undisturbed"
              may={row.undisturbed.may}
              act="Nothing was disturbed"
              note="you looked at it yourself"
            />
          )}
        </div>
      )}
      {row.state === "open" && (
        <div className="mt-3">
          <RowForm
            {...shared}
            id={`${row.anchor}-close`}
            intent="close"
            may={row.close}
            fields={(field) => (
              <TextInput {...field("note")} label="How it was closed" optional maxLength={2000} className="w-full max-w-[560px]" />
            )}
            act="Close it"
            note="put together; now prove it again"
            big
          />
        </div>
      )}
      {!row.mistake && row.state !== "undisturbed" && (
        <RowForm
          {...shared}
          id={`${row.anchor}-mistake`}
          intent="mistake"
          opens="It was recorded by mistake"
          says="It stays in the record and no longer stops the release. Proofs that lapsed by it come back one by one: an inspector keeps each on its gate’s page."
          may={row.mark}
          fields={(field) => (
            <TextInput {...field("reason")} label="What the mistake was" rows={2} maxLength={1000} className="w-full max-w-[560px]" />
          )}
          act="Mark as a mistake"
          note="stays in the record"
        />
      )}
    </StateRow>
  );
}
