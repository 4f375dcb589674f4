import { Balloon } from "#app/components/ui/Balloon";
import { Fitting } from "#app/components/ui/Fitting";

export interface Stop {
  n: number;
  title: string;
  sentence: string;
  who: string;
  place: { href: string; label: string };
  linkLabel: string;
}

interface StopListProps {
  stops: Stop[];
  /** Said where nothing stops it. */
  nothing: string;
  /** Shown at once; the rest is one press away. */
  most?: number;
}

/** What stops us, soonest cleared first; its balloons are those at the valves of the Line. */
export function StopList({ stops, nothing, most = 2 }: StopListProps) {
  if (stops.length === 0) return <p className="stops-none">{nothing}</p>;
  const shown = stops.length === most + 1 ? stops : stops.slice(0, most);
  const rest = stops.slice(shown.length);
  return (
    <>
      <ol className="stops">
        {shown.map((stop) => (
          <StopRow key={stop.n} stop={stop} />
        ))}
      </ol>
      {rest.length > 0 && (
        <details className="stops-more">
          <summary>
            {rest.length} more:{" "}
            {rest
              .slice(0, 4)
              .map((s) => s.place.label)
              .filter(unique)
              .join(", ")}
            {rest.length > 4 ? " and others" : ""}
          </summary>
          <ol className="stops" start={shown.length + 1}>
            {rest.map((stop) => (
              <StopRow key={stop.n} stop={stop} />
            ))}
          </ol>
        </details>
      )}
    </>
  );
}

const unique = (label: string, i: number, all: string[]) => all.indexOf(label) === i;

function StopRow({ stop }: { stop: Stop }) {
  return (
    <li>
      <Balloon n={stop.n} />
      <h2>{stop.title}</h2>
      <p>
        {stop.sentence} {stop.who && <span className="stops-who">{stop.who}</span>}
      </p>
      <Fitting href={stop.place.href} label={stop.linkLabel}>
        {stop.place.label}
      </Fitting>
    </li>
  );
}
