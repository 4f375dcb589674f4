import { CheckForm } from "#app/components/crib/CheckForm";
import { CribItem } from "#app/components/crib/CribItem";
import type { FormReply } from "#app/lib/schemas/form-reply";
import type { CribView, ToolRow } from "#app/lib/views/crib";

interface ToolItemProps {
  row: ToolRow;
  view: Pick<CribView, "ticks" | "days" | "may">;
  commandId: string;
  reply: FormReply | undefined;
}

export function ToolItem({ row, view, commandId, reply }: ToolItemProps) {
  const shared = { subject: { field: "tool", id: row.id, name: row.name }, commandId, reply } as const;
  return (
    <CribItem row={row} ticks={view.ticks}>
      {view.may.ok && (
        <CheckForm
          {...shared}
          id={`${row.anchor}-good`}
          intent="good-check"
          opens="Enter a good check"
          on={{ label: "Day of the check", value: view.days.today }}
          due={{ label: "Last day in date", hint: "As its label or certificate says.", value: "" }}
          note={{ label: "Who checked it, certificate", optional: true }}
          act="In tolerance"
          actNote={`${row.name}, in date to that day`}
        />
      )}
      <CheckForm
        {...shared}
        id={`${row.anchor}-bad`}
        intent="bad-check"
        opens="It was found out of tolerance"
        says={
          row.reach ? (
            <p>
              <b>These proofs lapse: {row.reach}.</b> The tool was in doubt since its last good check. They are done again with a good tool;
              a GO that rests on them turns into HOLD, and the crew is told.
            </p>
          ) : (
            <p>No proof that stands now was made with it since its last good check. It cannot be used until a good check is entered.</p>
          )
        }
        on={{ label: "Day on which it was found", value: view.days.today }}
        note={{ label: "What was found", optional: false }}
        act="Out of tolerance"
        actNote={row.reach ? `lapses ${row.reach}` : "out of use until a good check"}
      />
    </CribItem>
  );
}
