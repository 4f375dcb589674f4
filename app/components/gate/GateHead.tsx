import { Anchor } from "#app/components/ui/Anchor";
import { VALVE_WORD, type ValveState } from "#app/components/ui/states";
import { Valve } from "#app/components/ui/Valve";

interface Feed {
  id: string;
  name: string;
  state: ValveState;
  href: string;
}

interface GateHeadProps {
  name: string;
  state: string;
  valve: ValveState;
  part: number;
  feeds: Feed[];
  onward: { href: string; label: string }[];
}

const ROW = 50;
const MOST = 4;

/** The gate on its pipe: the gates that feed it at the left, its name and state as labels, what comes then at the right. */
export function GateHead({ name, state, valve, part, feeds, onward }: GateHeadProps) {
  const signed = feeds.filter((f) => f.state === "signed").length;
  const fed = signed === feeds.length;
  const shown = feeds.length <= MOST ? feeds : [];
  const rows = Math.max(1, shown.length);
  const height = Math.max(168, 34 + rows * ROW);
  return (
    <div className="gate-head" style={{ "--head": `${height}px` }}>
      <svg className="gate-head-inlet" width="420" height={height} viewBox={`0 0 420 ${height}`} aria-hidden="true">
        <Inlet feeds={shown} fed={fed} height={height} />
        <path className="pipe-wall pipe-title" d={`M${shown.length ? 263 : 250} ${height / 2}H430`} />
        <path className="pipe-bore pipe-title" d={`M${shown.length ? 268 : 250} ${height / 2}H430`} />
        {fed && (
          <path className="pipe-flow pipe-title" d={`M${shown.length ? 258 : 250} ${height / 2}H${valve === "signed" ? 430 : 330}`} />
        )}
        <g transform={`translate(350 ${height / 2})`}>
          <Valve state={valve} part={part} fed={fed} scale={1.9} lever={31} />
        </g>
      </svg>
      <div className={valve === "signed" ? "gate-head-pipe gate-head-full" : "gate-head-pipe"} aria-hidden="true">
        <i className={fed ? "gate-head-fed" : undefined} />
        <svg viewBox="-48 -62 96 124" aria-hidden="true">
          <Valve state={valve} part={part} scale={1.9} lever={31} fed={fed} />
        </svg>
      </div>
      <h1>
        <span className="gate-head-name">{name}</span> <span className="gate-head-state">{state}</span>
      </h1>
      {shown.length > 0 && (
        <ul className="gate-head-feeds" aria-label="It waits for">
          {shown.map((feed, i) => (
            <li key={feed.id} style={{ "--y": `${rowY(i, rows, height) - 30}px` }}>
              <Anchor href={feed.href}>
                {feed.name}
                <span className="sr-only">, {VALVE_WORD[feed.state]}</span>
              </Anchor>
            </li>
          ))}
        </ul>
      )}
      {feeds.length > MOST && (
        <p className="gate-head-count">
          <b>
            {signed} of {feeds.length}
          </b>{" "}
          gates before it stand
        </p>
      )}
      {onward.length > 0 && (
        <p className="gate-head-then">
          <span>then</span>
          {onward.slice(0, 3).map((place) => (
            <Anchor key={place.href} href={place.href}>
              {place.label}
            </Anchor>
          ))}
          {onward.length > 3 && <span>and {onward.length - 3} more</span>}
        </p>
      )}
    </div>
  );
}

const rowY = (i: number, rows: number, height: number): number => height / 2 + (i - (rows - 1) / 2) * ROW;

/** Pipes of the gates before it, joined to one; full as far as each stands, and the join only when all do. */
function Inlet({ feeds, fed, height }: { feeds: Feed[]; fed: boolean; height: number }) {
  const mid = height / 2;
  if (!feeds.length) return <path className="pipe-blank" d={`M250 ${mid - 22}V${mid + 22}`} />;
  const y = (i: number) => rowY(i, feeds.length, height);
  const d = (i: number) => (y(i) === mid ? `M-10 ${mid}H262` : `M-10 ${y(i)}H${262 - 13}q13 0 13 ${y(i) < mid ? 13 : -13}V${mid}`);
  return (
    <>
      {feeds.map((f, i) => (
        <path key={f.id} className="pipe-wall" d={d(i)} />
      ))}
      {feeds.map((f, i) => (
        <path key={f.id} className="pipe-bore" d={d(i)} />
      ))}
      {feeds.map((f, i) =>
        f.state === "signed" ? (
          <path key={f.id} className="pipe-flow" d={fed ? d(i) : `M-10 ${y(i)}H240`} />
        ) : (
          <path key={f.id} className="pipe-flow" d={`M-10 ${y(i)}H20`} />
        ),
      )}
      {feeds.map((f, i) => (
        <g key={f.id} transform={`translate(34 ${y(i)})`}>
          <Valve state={f.state} scale={0.72} lever={38} fed />
        </g>
      ))}
    </>
  );
}
