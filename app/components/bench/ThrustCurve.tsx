import type { ThrustChart } from "#app/lib/views/bench-drawing";

const [LEFT, RIGHT, TOP, BOTTOM, WIDTH, HEIGHT] = [78, 12, 26, 44, 420, 270];
const r = (n: number) => Math.round(n * 10) / 10;

/** Demand over engine speed against what the rig holds; the cap is where they meet, or sooner by nosing over. */
export function ThrustCurve({ chart }: { chart: ThrustChart }) {
  const x = (rpm: number) => r(LEFT + (rpm / chart.mostRpm) * (WIDTH - LEFT - RIGHT));
  const y = (share: number) => r(HEIGHT - BOTTOM - Math.min(1, share) * (HEIGHT - TOP - BOTTOM));
  const curve = chart.demand.map(({ rpm, share }, i) => `${i ? "L" : "M"}${x(rpm)} ${y(share)}`).join("");
  const floor = HEIGHT - BOTTOM;
  const holds = y(chart.holding.share);
  const capIn = chart.cap <= chart.mostRpm;
  const [cap, planned] = [x(Math.min(chart.cap, chart.mostRpm)), x(chart.planned)];
  const over = chart.planned > chart.cap;
  const label = `Demand on the rig grows with the square of engine speed; ${chart.holding.text}; cap ${Math.floor(chart.cap)} rpm by ${chart.capBy}, planned ${Math.round(chart.planned)} rpm.`;
  return (
    <figure className="bench-drawing">
      <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} role="img" aria-label={label}>
        {chart.forces.map(({ share, text }) => (
          <g key={text}>
            <path className="bench-hair" d={`M${LEFT} ${y(share)}H${WIDTH - RIGHT}`} />
            <text className="bench-num" x={LEFT - 6} y={y(share) + 4} textAnchor="end">
              {text}
            </text>
          </g>
        ))}
        <path className="bench-safe" d={`M${LEFT} ${floor}V${TOP}H${cap}V${floor}Z`} />
        <path className="bench-axis" d={`M${LEFT} ${TOP}V${floor}H${WIDTH - RIGHT}`} />
        <path className="bench-hold" d={`M${LEFT} ${holds}H${WIDTH - RIGHT}`} />
        <text className="bench-lab" x={LEFT + 6} y={holds - 6}>
          {chart.holding.text}
        </text>
        <path className="bench-curve" d={curve} />
        {capIn && <path className="bench-cap" d={`M${cap} ${TOP}V${floor}`} />}
        <path
          className={over ? "bench-plan bench-plan-over" : "bench-plan"}
          d={`M${planned} ${TOP + 14}V${floor}M${planned - 6} ${TOP + 14}h12l-6 9z`}
        />
        <Under at={cap} text={`cap ${Math.floor(chart.cap + 1e-6)}`} row={0} />
        <Under at={planned} text={`planned ${Math.round(chart.planned)}`} row={1} />
        <text className="bench-num" x={WIDTH - RIGHT} y={16} textAnchor="end">
          engine rpm
        </text>
      </svg>
      <figcaption>
        Demand (curve) against what the rig holds (heavy line). Inside the shaded speeds it holds; {chart.capBy} would give first.
      </figcaption>
    </figure>
  );
}

/** Two rows, so that cap and plan never run into each other. */
function Under({ at, text, row }: { at: number; text: string; row: 0 | 1 }) {
  const anchor = at > WIDTH - 70 ? "end" : at < LEFT + 50 ? "start" : "middle";
  return (
    <text className="bench-lab" x={anchor === "end" ? WIDTH - RIGHT : at} y={HEIGHT - BOTTOM + 18 + 19 * row} textAnchor={anchor}>
      {text}
    </text>
  );
}
