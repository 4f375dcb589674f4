import type { StrapDrawn } from "#app/lib/views/bench-drawing";

const r = (n: number) => Math.round(n * 10) / 10;
const deg = (rad: number) => `${Math.round((rad * 180) / Math.PI)}°`;
const LENGTH = 150;

/** The straps from above and from the side, at their angles: the nose points left, the straps run aft. */
export function StrapDrawing({ straps }: { straps: StrapDrawn[] }) {
  const label = straps
    .map((s) => `${s.name}: rises ${deg(s.elevation)}, ${deg(s.azimuth)} off the centreline, may take ${s.force}`)
    .join("; ");
  return (
    <figure className="bench-drawing">
      <svg viewBox="0 0 420 300" role="img" aria-label={label}>
        <text className="bench-num" x="8" y="18">
          from above
        </text>
        <path className="bench-hull" d="M96 82 C70 82 62 88 60 92 C62 96 70 102 96 102 L212 97 V87 Z" />
        <path className="bench-axis" d="M58 68V116" />
        <path className="bench-hair" strokeDasharray="9 4 2 4" d="M44 92H400" />
        {straps.map((s) => {
          const [dx, dy] = [LENGTH * Math.cos(s.azimuth), LENGTH * Math.sin(s.azimuth)];
          const side = s.azimuth === 0 ? 0 : Math.sign(s.azimuth) * 4;
          return <Strap key={`above ${s.name} ${s.azimuth}`} from={[190, 92 + side]} by={[dx, clamp(dy, -70, 74)]} text={deg(s.azimuth)} />;
        })}
        <text className="bench-num" x="8" y="204">
          from the side
        </text>
        <path className="bench-hull" d="M96 222 C70 222 62 228 60 233 C62 240 70 246 96 246 L212 240 V230 Z" />
        <path className="bench-axis" d="M58 206V260M10 276H410" />
        <circle className="bench-hull" cx="104" cy="266" r="9" />
        {[...new Map(straps.map((s) => [deg(s.elevation), s])).values()].map((s) => {
          // Drawn down to the ground from where it is made fast; a flat one stays just above it.
          const run = Math.min(200, 38 / Math.max(Math.tan(s.elevation), 0.19));
          return <Strap key={`side ${deg(s.elevation)}`} from={[170, 238]} by={[run, 38]} text={deg(s.elevation)} />;
        })}
      </svg>
      <figcaption>Angles as entered; lengths are not to scale.</figcaption>
    </figure>
  );
}

const clamp = (n: number, least: number, most: number) => Math.max(least, Math.min(most, n));

function Strap({ from: [x, y], by: [dx, dy], text }: { from: [number, number]; by: [number, number]; text: string }) {
  const [endX, endY] = [r(x + dx), r(y + dy)];
  return (
    <g>
      <path className="bench-strap" d={`M${x} ${y}L${endX} ${endY}`} />
      <circle className="bench-point" cx={endX} cy={endY} r="5" />
      <text className="bench-lab" x={endX + 10} y={endY > 270 ? endY - 10 : endY + 5}>
        {text}
      </text>
    </g>
  );
}
