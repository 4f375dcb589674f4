import type { ReactNode } from "react";
import { Blade } from "#app/components/ui/Blade";
import { cx } from "#app/components/ui/cx";
import { Spade } from "#app/components/ui/Spade";
import type { RunState } from "#app/components/ui/states";

export interface LadderRung {
  id: string;
  /** "1", "2b". */
  key: string;
  share: number;
  state: RunState;
  spade: boolean;
}

interface RunTitleProps {
  title: ReactNode;
  state: ReactNode;
  rungs: LadderRung[];
  /** The run that this page is about. */
  here?: string;
  /** Share of the gates before the next run that stand signed: the flow comes no further than they let it. */
  gates: number;
  held?: boolean;
}

const PITCH = 76;
const TOP = 104;

/** The run's name on the pipe, with the whole ladder of blades at its right: the flow goes as far as the reviewed runs. */
export function RunTitle({ title, state, rungs, here, gates, held = false }: RunTitleProps) {
  const width = PITCH * rungs.length;
  const ahead = rungs.findIndex((r) => r.state !== "reviewed" && r.state !== "scrubbed");
  const reached = ahead < 0 ? rungs.length : ahead;
  return (
    <div className={cx("title-pipe overflow-hidden", held && "title-pipe-held")}>
      <h1>
        <span className="title-pipe-name">{title}</span> <span className="title-pipe-state">{state}</span>
      </h1>
      <div className="title-pipe-bar" aria-hidden="true">
        <i
          className="w-[calc(66.6%*var(--gates))] wide:w-[calc((100%-var(--rest))*var(--gates))]"
          style={{ "--rest": `${width - reached * PITCH + 4}px`, "--gates": gates }}
        />
        {held && <i className="left-2/3! w-2 bg-stop-edge! wide:hidden" />}
        <svg
          className="absolute top-[-106px]! right-6 left-auto! hidden h-auto! w-auto! wide:block"
          width={width}
          height="160"
          viewBox={`0 0 ${width} 160`}
          aria-hidden="true"
        >
          {rungs.map((rung, i) => {
            const x = i * PITCH + PITCH / 2;
            const mine = rung.id === here;
            return (
              <g key={rung.id}>
                <g transform={`translate(${x} ${TOP})`}>
                  <Blade
                    length={Math.max(24, 68 * Math.min(1, rung.share))}
                    width={mine ? 22 : 17}
                    state={mine && rung.state === "planned" ? "next" : rung.state}
                  />
                </g>
                {rung.spade && (
                  <g transform={`translate(${x - 26} ${TOP + 12})`}>
                    <Spade />
                  </g>
                )}
                <text className="run-number" x={x} y={TOP + 50} textAnchor="middle" style={mine ? undefined : { fontWeight: 400 }}>
                  {rung.key}
                </text>
              </g>
            );
          })}
        </svg>
      </div>
    </div>
  );
}
