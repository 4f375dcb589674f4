import { cx } from "#app/components/ui/cx";
import type { ShownValve } from "#app/components/ui/states";
import { Valve } from "#app/components/ui/Valve";

interface ValveSignProps {
  state: ShownValve;
  part?: number;
  fed?: boolean;
  /** Width in px; height follows. */
  size?: number;
  className?: string;
}

/** A valve on a short piece of pipe, as a picture of its own. The word for the state stands beside it, so it is hidden from screen readers. */
export function ValveSign({ state, part, fed = state === "signed", size = 52, className }: ValveSignProps) {
  return (
    <svg className={cx("flex-none", className)} width={size} height={Math.round(size * 0.86)} viewBox="-34 -48 88 76" aria-hidden="true">
      <path className="pipe-wall" d="M-48 0H58" />
      <path className="pipe-bore" d="M-48 0H58" />
      {state === "signed" ? <path className="pipe-flow" d="M-50 0H60" /> : fed && <path className="pipe-flow" d="M-50 0H-20" />}
      <Valve state={state} part={part} fed={fed} />
    </svg>
  );
}
