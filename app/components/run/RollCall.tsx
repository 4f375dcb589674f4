import { cx } from "#app/components/ui/cx";
import { FloorPlan, type PlanStation } from "#app/components/ui/FloorPlan";

export interface RollRow {
  key: string;
  letter: string;
  role: string;
  name: string;
  answer: "go" | "no-go" | "none";
  word: string;
  note: string;
  you: boolean;
}

interface RollCallProps {
  title: string;
  entries: RollRow[];
  empty: string[];
  stations: PlanStation[];
  gear: "nose" | "tail";
  pusher: boolean;
  wind: string;
}

/** Who stands where and said what: as a list, and on the floor plan where the people stand. */
export function RollCall({ title, entries, empty, stations, gear, pusher, wind }: RollCallProps) {
  return (
    <section aria-labelledby="roll">
      <h2 id="roll" className="text-h3">
        {title}
      </h2>
      <ul className="mt-3">
        {entries.map((entry) => (
          <li
            key={entry.key}
            className="grid grid-cols-[44px_minmax(0,1fr)] items-center gap-x-3 border-t border-line py-2 tablet:grid-cols-[44px_minmax(0,1fr)_auto]"
          >
            <StationMark letter={entry.letter} answer={entry.answer} />
            <span>
              <b className="block">{entry.role}</b>
              {entry.name}
              {entry.you && ", you"}
            </span>
            <span className="leading-tight max-tablet:col-start-2 tablet:text-right">
              <b className={entry.answer === "go" ? "text-primer-ink" : entry.answer === "no-go" ? "text-stop-ink" : undefined}>
                {entry.word}
              </b>
              <span className="block text-note text-ink-2">{entry.note}</span>
            </span>
          </li>
        ))}
        {empty.map((words) => (
          <li key={words} className="grid min-h-hit grid-cols-[44px_minmax(0,1fr)] items-center gap-x-3 border-t border-line py-2">
            <StationMark letter="?" answer="none" />
            <b>{words}</b>
          </li>
        ))}
      </ul>
      <FloorPlan className="mt-4" stations={stations} gear={gear} pusher={pusher} wind={wind} />
      <p className="text-note text-ink-2">Not to scale. The site decides the distances; nobody stands in the propeller’s plane.</p>
    </section>
  );
}

/** The station's letter as on the floor plan: filled = go, dotted ring = no answer, struck through = no-go. */
export function StationMark({ letter, answer, large = false }: { letter: string; answer: RollRow["answer"]; large?: boolean }) {
  const size = large ? 62 : 44;
  return (
    <svg className={cx("station flex-none", `station-${answer}`)} viewBox="-28 -28 56 56" width={size} height={size} aria-hidden="true">
      {answer === "none" && <circle className="station-ring" r="24.5" />}
      <circle r="19" />
      <text className="station-letter" textAnchor="middle" y="6.5">
        {letter}
      </text>
      {answer === "no-go" && <path className="spade" style={{ strokeWidth: 5 }} d="M-17 17 17-17" />}
    </svg>
  );
}
