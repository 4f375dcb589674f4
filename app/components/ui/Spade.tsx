interface SpadeProps {
  /** Drawing units from end to end. */
  length?: number;
  /** Thickness in drawing units. */
  width?: number;
}

/** HOLD: a bar slipped across the pipe, upright, middle at 0,0. A group for use inside an svg. */
export function Spade({ length = 44, width = 8 }: SpadeProps) {
  return <path className="spade" strokeWidth={width} style={{ strokeWidth: width }} d={`M0 ${-length / 2}V${length / 2}`} />;
}

/** The spade on a short pipe, as a picture of its own: HOLD, grounding. */
export function SpadeSign({ size = 60, className }: { size?: number; className?: string }) {
  return (
    <svg className={className} width={size} height={size} viewBox="-30 -30 60 60" aria-hidden="true">
      <path className="pipe-wall" d="M-30 0H30" />
      <path className="pipe-bore" d="M-30 0H30" />
      <path className="pipe-flow" d="M-30 0H0" />
      <Spade />
    </svg>
  );
}
