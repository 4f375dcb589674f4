import { cx } from "#app/components/ui/cx";
import { NUT_WORD, type NutState } from "#app/components/ui/states";

interface ItemNutProps {
  state: NutState;
  /** Width and height in px. */
  size?: number;
  /** Say the state's word to screen readers; leave it off where the word is written beside the nut. */
  spoken?: boolean;
  className?: string;
}

const HEX = "M-20 0 -10-17.3H10L20 0 10 17.3H-10Z";

/** A nut seen from above with witness paint across nut and plate: the line straight, the proof stands; broken, it has lapsed. */
export function ItemNut({ state, size = 64, spoken = false, className }: ItemNutProps) {
  return (
    <svg
      className={cx(`flex-none nut-${state}`, className)}
      width={size}
      height={size}
      viewBox="-32 -32 64 64"
      role={spoken ? "img" : undefined}
      aria-label={spoken ? NUT_WORD[state] : undefined}
      aria-hidden={!spoken}
    >
      {state === "lapsed" ? (
        <>
          <g transform="rotate(24)">
            <path className="nut-hex" d={HEX} />
            <circle className="nut-bolt" r="8.5" />
            <path className="nut-broken" d="M-4 4 12-12" />
          </g>
          <path className="nut-broken" d="M19-19 28-28" />
        </>
      ) : (
        <>
          <path className="nut-hex" d={HEX} />
          {state === "second-eyes" && <path className="nut-half" d="M0-17.3V17.3H-10L-20 0-10-17.3Z" />}
          {state === "na" ? <path className="nut-bar" d="M-10 0H10" /> : <circle className="nut-bolt" r="8.5" />}
          {(state === "done" || state === "second-eyes") && <path className="nut-witness" d="M-5 5 27-27" />}
        </>
      )}
    </svg>
  );
}
