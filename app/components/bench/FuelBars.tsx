import type { Drawing } from "#app/lib/views/bench-drawing";

type Fuel = Extract<Drawing, { kind: "fuel" }>;
const [LEFT, WIDTH, ROW, TOP] = [92, 420, 34, 26];

/** Each catch as a bar against the flow that is asked; a catch that does not count is hollow. */
export function FuelBars({ drawing: { required, bars } }: { drawing: Fuel }) {
  const room = WIDTH - LEFT - 12;
  const height = TOP + bars.length * ROW + 6;
  const asked = LEFT + required.share * room;
  return (
    <figure className="bench-drawing">
      <svg
        viewBox={`0 0 ${WIDTH} ${height}`}
        role="img"
        aria-label={`${required.text}; ${bars.map((b) => `${b.label} ${b.text}`).join("; ")}`}
      >
        {bars.map((bar, i) => (
          <g key={bar.label}>
            <text className="bench-lab" x={LEFT - 8} y={TOP + i * ROW + 20} textAnchor="end">
              {bar.label.length > 11 ? `${bar.label.slice(0, 10)}…` : bar.label}
            </text>
            <rect
              className={bar.counts ? "bench-bar" : "bench-bar-hollow"}
              x={LEFT}
              y={TOP + i * ROW + 3}
              width={bar.share * room}
              height={ROW - 10}
            />
            <text className={bar.counts ? "bench-on-bar" : "bench-lab"} x={LEFT + 8} y={TOP + i * ROW + 20}>
              {bar.text}
            </text>
          </g>
        ))}
        <path className="bench-cap" d={`M${asked} ${TOP - 4}V${height}`} />
        <text className="bench-lab" x={asked} y={16} textAnchor="middle">
          {required.text}
        </text>
        <path className="bench-axis" d={`M${LEFT} ${TOP - 4}V${height}`} />
      </svg>
      <figcaption>Every bar has to reach the line. Hollow: a catch that did not agree and does not count.</figcaption>
    </figure>
  );
}
