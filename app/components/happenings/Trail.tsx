import { cx } from "#app/components/ui/cx";
import type { TrailStep } from "#app/lib/views/findings";

const HEX = "M-20 0 -10-17.3H10L20 0 10 17.3H-10Z";

/** Raised, fixed, closed: three nuts on a pipe, filled as far as it has come; who and when stand below each. */
export function Trail({ steps }: { steps: TrailStep[] }) {
  return (
    <ol className="grid max-w-[760px] grid-cols-3 leading-snug">
      {steps.map((step, i) => (
        <li key={step.name}>
          <div className="flex items-center">
            <svg width="44" height="40" viewBox="-22 -20 44 40" className={cx("flex-none", step.done && "nut-done")} aria-hidden="true">
              <path className="nut-hex" d={HEX} />
              <circle className="nut-bolt" r="8.5" />
            </svg>
            {i < steps.length - 1 && (
              <span className={cx("h-3 flex-1 border-y-2 border-pipe", steps[i + 1]?.done ? "bg-flow" : "bg-bore")} />
            )}
          </div>
          <div className="pr-3">
            <b className={step.done ? "text-primer-ink" : undefined}>{step.name}</b>
            <span className="block">{step.who}</span>
            <span className="block text-note text-ink-2">{step.when}</span>
          </div>
        </li>
      ))}
    </ol>
  );
}
