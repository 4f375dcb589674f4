import { Airframe } from "#app/components/ui/Airframe";
import { type PlanPosition, placeStations } from "#app/components/ui/planStations";

export interface PlanStation {
  position: PlanPosition;
  /** One letter, as in the roll call. */
  letter: string;
  /** "Fire guard, Joss Amaral". */
  label: string;
  answer: "go" | "no-go" | "none";
  you?: boolean;
}

interface FloorPlanProps {
  stations: PlanStation[];
  gear: "nose" | "tail";
  pusher?: boolean;
  /** "340°, 6 kt, limit 12 kt". */
  wind?: string;
  /** "line for onlookers, 30 m". */
  line?: string;
  className?: string;
}

const ANSWER = { go: "go", "no-go": "no-go", none: "no answer" };

/** The aircraft from above, nose into wind, with each station where its person stands. Not to scale: the site decides the distances. */
export function FloorPlan({ stations, gear, pusher = false, wind, line = "line for onlookers", className }: FloorPlanProps) {
  const plane = pusher ? 300 : 98;
  const said = stations.map((s) => `${s.label}: ${ANSWER[s.answer]}${s.you ? ", you" : ""}`).join("; ");
  return (
    <svg
      className={`floor-plan ${className ?? ""}`}
      viewBox="0 -36 572 484"
      role="img"
      aria-label={`Floor plan, propeller ${pusher ? "behind" : "in front"}, nose into wind. ${said}`}
    >
      <path className="plan-plane" d={`M8 ${plane}H564`} />
      <text className="g-note" x="8" y={plane - 8}>
        propeller’s plane
      </text>
      <path className="plan-line" d="M8 384H564" />
      <text className="g-note" x="564" y="408" textAnchor="end">
        {line}
      </text>
      {wind && (
        <>
          <path className="plan-wind" d="M180 -30V6M172 -4 180 7 188 -4" />
          <text className="g-note" x="202" y="-6">
            wind {wind}
          </text>
        </>
      )}
      <g transform="translate(286 196)">
        <Airframe gear={gear} pusher={pusher} />
      </g>
      {placeStations(stations, pusher).map(({ station, x, y, key }) => (
        <g key={key} className={`station station-${station.answer}`} transform={`translate(${x} ${y})`}>
          {station.answer === "none" && <circle className="station-ring" r="25" />}
          <circle r="19" />
          {station.answer === "no-go" && <path className="spade" style={{ strokeWidth: 5 }} d="M-19 19 19-19" />}
          <text className="station-letter" textAnchor="middle" y="6.5">
            {station.letter}
          </text>
          {(station.you || station.answer === "no-go") && (
            <text className="station-word" textAnchor={x > 286 ? "end" : "start"} x={x > 286 ? -32 : 32} y="6">
              {station.you ? "you" : "no-go"}
            </text>
          )}
        </g>
      ))}
    </svg>
  );
}
