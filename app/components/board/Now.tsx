import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";

export interface NowAct {
  label: string;
  note: string;
  href: string;
}

interface NowProps {
  acts: NowAct[];
  /** Said where this person has nothing to do. */
  nothing: string;
  /** What anyone may write down at any time. */
  records: { label: string; href: string }[];
}

const BIG = 2;

/** What this person can do now: two acts large, the others as links, and bad news always. */
export function Now({ acts, nothing, records }: NowProps) {
  return (
    <section className="now" aria-labelledby="now-title">
      <h2 id="now-title">What you can do now</h2>
      <div className="now-acts">
        {acts.length === 0 && <p className="now-nothing">{nothing}</p>}
        {acts.slice(0, BIG).map((act) => (
          <Fitting key={act.href + act.label} href={act.href} size="act" note={act.note}>
            {act.label}
          </Fitting>
        ))}
        {records.length > 0 && (
          <div className="now-records">
            {records.map((record) => (
              <Fitting key={record.href} href={record.href}>
                {record.label}
              </Fitting>
            ))}
          </div>
        )}
      </div>
      {acts.length > BIG && (
        <ul className="now-more">
          {acts.slice(BIG).map((act) => (
            <li key={act.href + act.label}>
              <Anchor href={act.href}>{act.label}</Anchor> <span>{act.note}</span>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
