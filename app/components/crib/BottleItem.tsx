import { CheckForm } from "#app/components/crib/CheckForm";
import { CribItem } from "#app/components/crib/CribItem";
import type { FormReply } from "#app/lib/schemas/form-reply";
import type { BottleRow, CribView } from "#app/lib/views/crib";

interface BottleItemProps {
  row: BottleRow;
  view: Pick<CribView, "ticks" | "days" | "may">;
  commandId: string;
  reply: FormReply | undefined;
}

export function BottleItem({ row, view, commandId, reply }: BottleItemProps) {
  const shared = { subject: { field: "extinguisher", id: row.id, name: row.name }, commandId, reply } as const;
  const note = { label: "Remark", optional: true };
  return (
    <CribItem row={row} ticks={view.ticks} away={row.withdrawn}>
      {!row.withdrawn && view.may.ok && (
        <>
          <CheckForm
            {...shared}
            id={`${row.anchor}-look`}
            intent="look"
            opens="Enter the monthly look"
            says="In its place, seal and pin there, gauge in the green or mass right, nozzle clear, no damage. The bottle’s own label comes first."
            due={{ label: "Good to the end of", hint: "A month on (NFPA 10).", value: view.days.look }}
            note={note}
            act="Looked at and good"
            actNote="today, by you"
          />
          <CheckForm
            {...shared}
            id={`${row.anchor}-service`}
            intent="service"
            opens="Enter the yearly service"
            due={{ label: "Good to the end of", hint: "As the service tag says; a year on (NFPA 10).", value: view.days.service }}
            note={{ label: "Who serviced it", optional: true }}
            act="Serviced"
            actNote="as its tag says"
          />
        </>
      )}
      {!row.withdrawn && (
        <CheckForm
          {...shared}
          id={`${row.anchor}-withdrawn`}
          intent="withdrawn"
          opens="Take it out of use"
          says="Discharged, low or damaged. It does not come back: add it again once it is filled. A GO that counts on it turns into HOLD, and the crew is told."
          note={{ label: "Why", optional: false }}
          act="Withdraw it"
          actNote={`${row.name} no longer counts`}
        />
      )}
    </CribItem>
  );
}
