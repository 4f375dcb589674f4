import type { ReactNode } from "react";
import { cx } from "#app/components/ui/cx";
import { Spade } from "#app/components/ui/Spade";
import type { ShownValve } from "#app/components/ui/states";
import { Valve } from "#app/components/ui/Valve";

interface TitlePipeProps {
  /** Name, above the pipe. */
  title: ReactNode;
  /** State, below the pipe. */
  state: ReactNode;
  /** How far things stand, 0 to 1: the pipe is filled that far. With a valve or spade it is filled up to that. */
  fill?: number;
  valve?: ShownValve;
  /** Share done, fills the valve's lever. */
  part?: number;
  /** HOLD: a spade in place of the valve, title in the stop ink. */
  held?: boolean;
  /** At the right, above the pipe: one or two links or fittings. */
  aside?: ReactNode;
  /** Small print under the state. */
  then?: ReactNode;
  /** Heading level; each page has one h1. */
  level?: 1 | 2;
  id?: string;
  className?: string;
}

/** Every page's title is a label on a pipe: name above, state below, green as far as things stand. */
export function TitlePipe({ title, state, fill = 1, valve, part, held = false, aside, then, level = 1, id, className }: TitlePipeProps) {
  const Heading = level === 1 ? "h1" : "h2";
  const sign = held || valve;
  const passes = valve === "signed" && !held;
  const share = Math.min(1, Math.max(0, fill));
  return (
    <div className={cx("title-pipe", sign ? "title-pipe-valve" : undefined, held && "title-pipe-held", className)}>
      <Heading id={id}>
        <span className="title-pipe-name">{title}</span> <span className="title-pipe-state">{state}</span>
      </Heading>
      <div className="title-pipe-bar" aria-hidden="true">
        <i
          style={{ width: sign ? (passes ? "100%" : undefined) : `${(share * 100).toFixed(1)}%` }}
          className={sign && !passes ? "to-valve" : undefined}
        />
        {sign && (
          <svg viewBox="-48 -62 96 124" aria-hidden="true">
            {held ? <Spade length={88} width={15} /> : valve && <Valve state={valve} part={part} scale={1.9} lever={31} fed />}
          </svg>
        )}
      </div>
      {then && <p className="title-pipe-then">{then}</p>}
      {aside && <div className="title-pipe-aside">{aside}</div>}
    </div>
  );
}
