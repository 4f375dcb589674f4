import type { TrailStep } from "#app/lib/views/findings";

const HEX = "M-20 0 -10-17.3H10L20 0 10 17.3H-10Z";
const X = [22, 150, 278];

/** Raised, fixed, closed: three nuts on a pipe, filled as far as it has come; who and when stand below each. */
export function Trail({ steps }: { steps: TrailStep[] }) {
  const reached = steps.filter((s) => s.done).length;
  return (
    <div className="max-w-[760px]">
      <svg viewBox="0 0 384 44" preserveAspectRatio="xMinYMid meet" className="pipe-small block h-[44px] w-full" aria-hidden="true">
        <path className="pipe-wall" d={`M${X[0]} 22H${X[2]}`} />
        <path className="pipe-bore" d={`M${X[0]} 22H${X[2]}`} />
        {reached > 1 && <path className="pipe-flow" d={`M${X[0]} 22H${X[reached - 1]}`} />}
        {steps.map((step, i) => (
          <g key={step.name} transform={`translate(${X[i]} 22)`} className={step.done ? "nut-done" : undefined}>
            <path className="nut-hex" d={HEX} />
            <circle className="nut-bolt" r="8.5" />
          </g>
        ))}
      </svg>
      <ol className="grid grid-cols-3 gap-x-3 leading-snug">
        {steps.map((step) => (
          <li key={step.name}>
            <b className={step.done ? "text-primer-ink" : undefined}>{step.name}</b>
            <span className="block">{step.who}</span>
            <span className="block text-note text-ink-2">{step.when}</span>
          </li>
        ))}
      </ol>
    </div>
  );
}
