/** Item balloon inside the drawing; the number is said in the link's name. */
export function BalloonMark({ x, y, n }: { x: number; y: number; n: number | null }) {
  if (!n) return null;
  return (
    <g className="balloon-mark" transform={`translate(${round(x)} ${round(y)})`}>
      <circle r="11" />
      <text textAnchor="middle" y="5">
        {n}
      </text>
    </g>
  );
}

/** Coordinates to a tenth: shorter markup, the same on every machine. */
export const round = (n: number) => Math.round(n * 10) / 10;
