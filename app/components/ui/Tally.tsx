import { bladePath } from "#app/components/ui/bladePath";

interface TallyProps {
  count: number;
  /** Strokes still to come are dotted. */
  of?: number;
  /** Read aloud, "4 plugs out". */
  label: string;
  /** Height in px. */
  size?: number;
  className?: string;
}

const PITCH = 14;
const GROUP = 4 * PITCH + 18;

/** Tally strokes; each fifth is the slanting blade of the mark. Over 30 the figure beside it has to do. */
export function Tally({ count, of = count, label, size = 40, className }: TallyProps) {
  const total = Math.min(30, Math.max(of, count));
  const x = (i: number) => Math.floor(i / 5) * GROUP + 8 + (i % 5) * PITCH;
  const strokes = Array.from({ length: total }, (_, i) => i);
  const width = total === 0 ? 8 : Math.floor(total / 5) * GROUP + (total % 5) * PITCH + 2;
  return (
    <svg className={className} width={(width * size) / 40} height={size} viewBox={`0 0 ${width} 40`} role="img" aria-label={label}>
      {strokes.map((i) => {
        const look = i < count ? "tally-on" : "tally-off";
        if (i % 5 !== 4) return <path key={i} className={look} d={`M${x(i)} 4V36`} />;
        const start = x(i - 4);
        if (i >= count) return <path key={i} className={look} d={`M${start - 6} 32 ${start + 48} 10`} />;
        return <path key={i} className="tally-blade" transform={`translate(${start - 6} 33) rotate(66)`} d={bladePath(58, 12)} />;
      })}
    </svg>
  );
}
