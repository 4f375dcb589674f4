import { Blade } from "#app/components/ui/Blade";
import type { DueLadderView } from "#app/lib/views/loose-ends";

const STEP = 34;

/** The runs as blades on a pipe; a heavy bar before the one by which it must be back. The words beside it say the same. */
export function DueLadder({ runs, bar }: DueLadderView) {
  const x = (i: number) => 26 + i * STEP;
  const end = x(runs.length) - 4;
  return (
    <svg viewBox={`0 0 ${end} 56`} className="pipe-small block h-auto w-full max-w-[230px]" aria-hidden="true">
      <path className="pipe-wall" d={`M0 46H${end}`} />
      <path className="pipe-bore" d={`M0 46H${end}`} />
      {runs.map((run, i) => (
        <g key={run.key} transform={`translate(${x(i)} 42)`}>
          <Blade length={38 * Math.max(0.4, run.share)} width={13} state={run.settled ? "reviewed" : run.due ? "next" : "planned"} />
        </g>
      ))}
      <path className="stroke-ink" strokeWidth="5" d={`M${x(bar) - STEP / 2} 34V56`} />
    </svg>
  );
}
