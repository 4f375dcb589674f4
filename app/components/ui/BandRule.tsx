import { type BandScale, bandScale } from "#app/components/ui/bandScale";

interface BandRuleProps {
  /** Ends of the band in the shown unit; null = open. */
  min: number | null;
  max: number | null;
  /** Null = nothing entered yet. */
  value: number | null;
  /** Read aloud: "24.0 N·m, in the band 22 to 26". */
  label: string;
  /** Ends and pitch of the rule; worked out from band and value when left off. */
  scale?: BandScale;
  className?: string;
}

const WIDTH = 360;
const r = (n: number) => Math.round(n * 10) / 10;

/** A steel rule with the band on it and the value's mark; out of the band the mark is orange and the words beside it say so. */
export function BandRule({ min, max, value, label, scale = bandScale(min, max, value), className }: BandRuleProps) {
  const { from, to, step } = scale;
  const x = (v: number) => r(14 + ((v - from) / (to - from || 1)) * (WIDTH - 28));
  const bandFrom = x(Math.max(from, min ?? from));
  const bandTo = x(Math.min(to, max ?? to));
  const out = value !== null && ((min !== null && value < min) || (max !== null && value > max));
  const at = value === null ? null : x(Math.min(to, Math.max(from, value)));
  const fine = Array.from({ length: Math.round(((to - from) / step) * 5) + 1 }, (_, i) => i);
  return (
    <svg
      className={`block h-auto w-full max-w-[360px] overflow-visible ${className ?? ""}`}
      viewBox={`0 0 ${WIDTH} 76`}
      role="img"
      aria-label={label}
    >
      <rect className="rule-band" x={bandFrom} y="28" width={Math.max(0, r(bandTo - bandFrom))} height="16" />
      <path className="rule-end" d={`${min === null ? "" : `M${bandFrom} 24V48`}${max === null ? "" : `M${bandTo} 24V48`}`} />
      <path className="rule-base" d={`M6 44H${WIDTH - 6}`} />
      <path className="rule-tick" d={fine.map((i) => `M${x(from + (i * step) / 5)} 44V${i % 5 === 0 ? 56 : 50}`).join("")} />
      {fine
        .filter((i) => i % 5 === 0)
        .map((i) => (
          <text key={i} className="rule-number" x={x(from + (i * step) / 5)} y="72" textAnchor="middle">
            {String(Number((from + (i * step) / 5).toFixed(6))).replace("-", "−")}
          </text>
        ))}
      {at !== null && (
        <path className={out ? "rule-value rule-value-out" : "rule-value"} d={`M${at} 46V22M${at - 7} 10H${at + 7}L${at} 23Z`} />
      )}
    </svg>
  );
}
