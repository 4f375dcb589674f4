import type { DueView } from "#app/lib/views/crib-dates";

interface YearRuleProps {
  due: DueView;
  ticks: { share: number; label: string | null }[];
}

const LEFT = 8;
const WIDE = 344;
const Y = 20;

/** How long it is still in date, along the year to come; a broken line of paint where it is not. The words beside it say the same. */
export function YearRule({ due, ticks }: YearRuleProps) {
  const x = (share: number) => LEFT + share * WIDE;
  return (
    <svg viewBox="0 0 360 42" className="block h-auto w-full max-w-[420px]" aria-hidden="true">
      {due.state === "out" ? (
        <path className="seal-mark" d={`M${LEFT} ${Y - 5}l9-7 10 5 8-8`} />
      ) : (
        <>
          <path d={`M${LEFT} ${Y - 13}H${x(due.share)}V${Y}H${LEFT}Z`} className="fill-flow" />
          <path d={`M${x(due.share)} ${Y - 17}V${Y}`} className="stroke-ink" strokeWidth="3" />
        </>
      )}
      <path d={`M${LEFT} ${Y}H${LEFT + WIDE}`} className="stroke-ink" strokeWidth="2" />
      {ticks.map(({ share, label }) => (
        <g key={share}>
          <path d={`M${x(share)} ${Y}v${label ? 7 : 4}`} className="stroke-ink" strokeWidth="1.5" />
          {label && (
            <text x={x(share)} y={Y + 20} textAnchor="middle" className="fill-ink-2 text-[13px]">
              {label}
            </text>
          )}
        </g>
      ))}
    </svg>
  );
}
