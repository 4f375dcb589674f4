import { isHeld } from "#app/components/line/runLadder";
import type { LineRun } from "#app/components/line/types";
import { Blade } from "#app/components/ui/Blade";
import type { ValveState } from "#app/components/ui/states";
import { Valve } from "#app/components/ui/Valve";

interface MiniLineProps {
  /** Gates in order of flow, the walk-round last. */
  gates: { state: ValveState; part: number }[];
  runs: Pick<LineRun, "id" | "share" | "state" | "spade">[];
  released?: boolean;
  /** "9 of 16 gates signed": the row's words say the rest. Without it the drawing is decoration. */
  label?: string;
  className?: string;
}

const GATE = 25;
const RUN = 22;
const Y = 26;

/** A whole Line on one small pipe: gates in a row, blades, cap. Flow stops at the first shut valve. */
export function MiniLine({ gates, runs, released = false, label, className }: MiniLineProps) {
  const gateX = (i: number) => 18 + i * GATE;
  const runsFrom = gateX(gates.length) + 16;
  const runX = (i: number) => runsFrom + i * RUN;
  const end = runX(runs.length);
  const firstShut = gates.findIndex((gate) => gate.state !== "signed");
  const firstOpen = runs.findIndex((run) => run.state !== "reviewed" && run.state !== "scrubbed");
  const flowTo = firstShut >= 0 ? gateX(firstShut) - 8 : firstOpen >= 0 ? runX(firstOpen) - 12 : released ? end + 8 : end - 6;
  return (
    <svg
      className={`pipe-small block h-auto w-full ${className ?? ""}`}
      style={{ maxWidth: end + 34 }}
      viewBox={`0 0 ${end + 34} 50`}
      role={label ? "img" : undefined}
      aria-label={label}
      aria-hidden={!label}
    >
      <path className="pipe-wall" d={`M-4 ${Y}H${end + 8}`} />
      <path className="pipe-bore" d={`M-4 ${Y}H${end + 6}`} />
      {flowTo > 0 && <path className="pipe-flow" d={`M-4 ${Y}H${flowTo}`} />}
      {gates.map((gate, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: the place on the pipe is the identity
        <g key={i} transform={`translate(${gateX(i)} ${Y})`}>
          <Valve state={gate.state} part={gate.part} scale={0.5} lever={34} fed={i === firstShut} />
        </g>
      ))}
      {runs.map((run, i) => (
        <g key={run.id}>
          <g transform={`translate(${runX(i)} ${Y - 3})`}>
            <Blade length={24 * Math.max(0.25, run.share)} width={11} state={run.state} />
          </g>
          {isHeld(run) && <path className="spade" style={{ strokeWidth: 4 }} d={`M${runX(i) - 10} ${Y - 11}v22`} />}
        </g>
      ))}
      <path className={released ? "valve-body cap-full" : "valve-body"} d={`M${end + 10} ${Y - 8}h10l4 4v8l-4 4h-10z`} />
    </svg>
  );
}
