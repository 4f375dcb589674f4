import type { Drawing } from "#app/lib/views/bench-drawing";

type Crank = Extract<Drawing, { kind: "crank" }>;
const [LEFT, WIDTH] = [12, 420];

/** Bursts on a line of time; the mark above is oil pressure. */
export function CrankBursts({ drawing: { bursts, end, endText } }: { drawing: Crank }) {
  const x = (seconds: number) => Math.round((LEFT + (seconds / end) * (WIDTH - 2 * LEFT)) * 10) / 10;
  const seen = bursts.find((b) => b.pressure !== null)?.pressure ?? null;
  return (
    <figure className="bench-drawing">
      <svg
        viewBox={`0 0 ${WIDTH} 96`}
        role="img"
        aria-label={`${bursts.length} bursts in ${endText}${seen === null ? "" : ", pressure seen"}`}
      >
        {bursts.map((burst, n) => (
          <g key={burst.from}>
            <rect className="bench-bar" x={x(burst.from)} y="30" width={Math.max(3, x(burst.to) - x(burst.from))} height="34" />
            <text className="bench-num" x={(x(burst.from) + x(burst.to)) / 2} y="84" textAnchor="middle">
              {n + 1}
            </text>
          </g>
        ))}
        {seen !== null && <path className="bench-cap" d={`M${x(seen)} 16V66M${x(seen) - 6} 10h12l-6 9z`} />}
        <path className="bench-axis" d={`M${LEFT} 66H${WIDTH - LEFT}`} />
        <text className="bench-num" x={WIDTH - LEFT} y="22" textAnchor="end">
          now, {endText}
        </text>
      </svg>
      <figcaption>Bars: starter on. The mark with a head: oil pressure.</figcaption>
    </figure>
  );
}
