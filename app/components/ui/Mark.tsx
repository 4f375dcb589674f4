import { useId } from "react";
import { bladePath } from "#app/components/ui/bladePath";

interface MarkProps {
  /** Width and height in px; 20 and under is drawn heavier. */
  size?: number;
  /** Names the picture; without it the mark is decoration. */
  title?: string;
  className?: string;
}

/** The mark: a tally of five, the slanting fifth stroke a propeller blade. */
export function Mark({ size = 32, title, className = "" }: MarkProps) {
  const mask = useId();
  const small = size <= 20;
  const blade = small ? bladePath(33, 8.4) : bladePath(34.5, 7.6);
  const place = small ? "translate(-.2 24) rotate(63)" : "translate(.6 25) rotate(62)";
  const strokes = (small ? [5, 11, 17, 23] : [6.2, 12.2, 18.2, 24.2]).map((x) => (small ? `M${x} 4.5V27.5` : `M${x} 5V27`)).join("");
  return (
    <svg
      className={`mark flex-none ${className}`}
      width={size}
      height={size}
      viewBox="0 0 32 32"
      role={title ? "img" : undefined}
      aria-label={title}
      aria-hidden={!title}
    >
      <mask id={mask}>
        <rect width="32" height="32" fill="white" />
        <path d={blade} transform={place} fill="black" stroke="black" strokeWidth={small ? 2.2 : 2.4} />
      </mask>
      <path d={strokes} mask={`url(#${mask})`} fill="none" stroke="currentColor" strokeWidth={small ? 3.4 : 2.9} />
      <path className="mark-blade" d={blade} transform={place} />
    </svg>
  );
}
