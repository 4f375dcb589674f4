import { LEVER_ANGLE, type ShownValve } from "#app/components/ui/states";

interface ValveProps {
  state: ShownValve;
  /** Share of the items that stand, 0 to 1; fills the lever while in work. */
  part?: number;
  /** Pressure stands at this valve: every gate that it needs passes. */
  fed?: boolean;
  scale?: number;
  /** On a standing pipe the lever points away from the text at the right. */
  standing?: boolean;
  /** Length of the lever from the stem, in drawing units. */
  lever?: number;
}

const BODY = "M-20-12 0 0-20 12ZM20-12 0 0 20 12Z";
const FED_HALF = "M-20-12 0 0-20 12Z";
const STEM = "M-6.5 0 -3.25-5.6H3.25L6.5 0 3.25 5.6H-3.25Z";

/** Quarter-turn valve seen from above, pipe along x, stem at 0,0: a group for use inside an svg. */
export function Valve({ state, part = 0, fed = false, scale = 1, standing = false, lever = 44 }: ValveProps) {
  const turn = standing ? " rotate(90) scale(1 -1)" : "";
  return (
    <g
      className={`valve valve-${state}`}
      transform={`scale(${scale})${turn}`}
      data-lever={state === "lapsed" ? "broken" : LEVER_ANGLE[state]}
    >
      {state === "ready" && <circle className="valve-ring" r="24" />}
      <path className="valve-body" d={BODY} />
      {fed && state !== "signed" && <path className="valve-fed" d={FED_HALF} />}
      {state === "lapsed" ? <BrokenLever length={lever} /> : <Lever state={state} part={part} length={lever} />}
      <path className="valve-stem" d={STEM} />
    </g>
  );
}

/** The lever fills from the stem: by the share done while in work, to just over half when half signed. */
function Lever({ state, part, length }: { state: Exclude<ShownValve, "lapsed">; part: number; length: number }) {
  const tip = length - 5;
  const filled = state === "in-work" ? Math.min(1, Math.max(0, part)) * (tip - 7) : state === "half-signed" ? tip * 0.62 - 6 : 0;
  return (
    <g transform={`rotate(${LEVER_ANGLE[state]})`}>
      <path className="lever" d={`M-5 0V${-tip}a5 5 0 0 1 10 0V0Z`} />
      {filled > 0 && <path className="lever-part" d={`M-5-6H5V${(-6 - filled).toFixed(1)}H-5Z`} />}
    </g>
  );
}

function BrokenLever({ length }: { length: number }) {
  return (
    <>
      <path className="lever" d="M-5 0V-12L5-16V0Z" />
      <path className="lever" transform="translate(6.5 -20) rotate(34)" d={`M-5 1 5-3V${-(length - 24)}a5 5 0 0 0-10 0Z`} />
      <path className="seal-mark" d="M-10-8 -2.5-14 6-14 15-20" />
    </>
  );
}
