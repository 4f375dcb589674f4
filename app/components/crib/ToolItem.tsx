import { CheckForm } from "#app/components/crib/CheckForm";
import { CribItem } from "#app/components/crib/CribItem";
import type { FormReply } from "#app/lib/schemas/form-reply";
import type { CheckShown, CribView, ToolRow } from "#app/lib/views/crib";

interface ToolItemProps {
  row: ToolRow;
  view: Pick<CribView, "ticks" | "days" | "may">;
  commandId: string;
  reply: (FormReply & { checking?: CheckShown }) | undefined;
}

export function ToolItem({ row, view, commandId, reply }: ToolItemProps) {
  const shared = { subject: { field: "tool", id: row.id, name: row.name }, commandId, reply } as const;
  const badForm = `${row.anchor}-bad`;
  const checking = reply?.checking?.form === badForm ? reply.checking : undefined;
  return (
    <CribItem row={row} ticks={view.ticks} told={row.last}>
      {view.may.ok && (
        <CheckForm
          {...shared}
          id={`${row.anchor}-good`}
          intent="good-check"
          opens="Enter a good check"
          on={{ label: "Day of the check", value: view.days.today }}
          due={{ label: "Last day in date", hint: "As its label or certificate says.", value: "" }}
          certificate
          note={{ label: "Who checked it", optional: true }}
          act="In tolerance"
          actNote={`${row.name}, in date to that day`}
        />
      )}
      <CheckForm
        {...shared}
        id={badForm}
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
        since={{
          label: "In doubt since",
          hint: row.doubtFrom
            ? `Empty: since its last good check, ${row.doubtFrom}. Type a day only if the doubt reaches further back.`
            : "It has had no good check: every proof with it is in doubt.",
        }}
        certificate
        checking={checking}
        note={{ label: "What was found", optional: false }}
        act="Out of tolerance"
        actNote={row.reach ? "what lapses is shown first" : "out of use until a good check"}
      />
    </CribItem>
  );
}
