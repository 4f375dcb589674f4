import { Balloon } from "#app/components/ui/Balloon";
import { Fitting } from "#app/components/ui/Fitting";

export interface StopRow {
  n: number;
  title: string;
  sentence: string;
  who: string;
  place: { href: string; label: string };
}

/** What stops the run: each a sentence, who can clear it, and the way there. */
export function StopList({ stops, here }: { stops: StopRow[]; here?: string }) {
  return (
    <ol className="border-t border-line">
      {stops.map((s) => (
        <li
          key={s.n}
          className="grid grid-cols-[40px_minmax(0,1fr)] items-start gap-x-3 gap-y-1 border-b border-line py-3 tablet:grid-cols-[40px_minmax(0,1fr)_auto]"
        >
          <Balloon n={s.n} />
          <div>
            <h3 className="text-lead">{s.title}</h3>
            <p>{s.sentence}</p>
            <p className="text-ink-2">{s.who}</p>
          </div>
          {s.place.href !== here && (
            <Fitting
              href={s.place.href}
              label={`${s.place.label}: ${s.title}`}
              className="max-tablet:col-start-2 max-tablet:justify-self-start"
            >
              {s.place.label}
            </Fitting>
          )}
        </li>
      ))}
    </ol>
  );
}
