import type { ReactNode } from "react";
import { YearRule } from "#app/components/crib/YearRule";
import { StateRow } from "#app/components/ui/StateRow";
import type { CribRow } from "#app/lib/views/crib";
import type { DueState } from "#app/lib/views/crib-dates";

interface CribItemProps {
  row: CribRow;
  ticks: { share: number; label: string | null }[];
  /** Withdrawn from use: no date, no nut that asks. */
  away?: boolean;
  /** Its newest check, with the photo of the certificate. */
  told?: { says: string; photo: string | null } | null;
  children?: ReactNode;
}

const NUT = { "in date": "done", "due soon": "done", out: "lapsed" } as const satisfies Record<DueState, string>;

/** A tool or extinguisher: state, how long it is in date, what hangs on it; its forms open in the row. */
export function CribItem({ row, ticks, away = false, told = null, children }: CribItemProps) {
  return (
    <StateRow id={row.anchor} nut={away ? "na" : NUT[row.state]} word={row.word}>
      <div className="grid gap-x-6 gap-y-2 wide:grid-cols-[minmax(0,1fr)_minmax(0,1.25fr)_minmax(0,.9fr)]">
        <div>
          <h3 className="text-lead">{row.name}</h3>
          {row.detail && <p className="text-ink-2">{row.detail}</p>}
          {told && <p className="mt-1 text-note text-ink-2">{told.says}</p>}
          {told?.photo && (
            <a href={`/files/${told.photo}`} className="mt-2 block">
              <img
                src={`/files/${told.photo}`}
                alt={`Certificate of ${row.name}`}
                width="150"
                height="100"
                loading="lazy"
                className="h-[100px] w-[150px] object-cover"
              />
            </a>
          )}
        </div>
        <div className="flex flex-col gap-2">
          {row.dues.map((due) => (
            <div key={due.name}>
              <p className="text-note">
                <b>{due.name}</b>: {due.word}
                {due.until && `, ${due.state === "out" ? "it ran to the end of" : "to the end of"} ${due.until}`}
              </p>
              <YearRule due={due} ticks={ticks} />
            </div>
          ))}
        </div>
        <p>{row.hangs}</p>
      </div>
      <div className="flex flex-wrap gap-x-8">{children}</div>
    </StateRow>
  );
}
