import { useId } from "react";
import { LineAsList } from "#app/components/line/LineAsList";
import { LyingLine } from "#app/components/line/LyingLine";
import { StandingLine } from "#app/components/line/StandingLine";
import type { LineProps } from "#app/components/line/types";
import { cx } from "#app/components/ui/cx";

/**
 * The Line: the board's picture and the product's signature. Lying and standing are both in the page; the style sheet
 * shows the one that fits, and the other is no tab stop. "As a list" takes the drawing's place, without JavaScript too.
 */
export function Line(props: LineProps) {
  const heading = useId();
  const { gates, walkRound, runs, stale = false, wall = false } = props;
  const count = gates.length + (walkRound ? 1 : 0);
  const label = `The Line: ${count} ${count === 1 ? "gate" : "gates"}, ${runs.length} ${runs.length === 1 ? "run" : "runs"}, release${stale ? ", as last seen" : ""}`;
  return (
    <section className={cx("line-band", stale && "line-stale", wall && "line-wall")} aria-labelledby={heading}>
      <div className="line-head">
        <h2 id={heading}>The Line</h2>
        {!wall && gates.length > 0 && (
          <details className="line-as">
            <summary>
              <span className="line-as-list">as a list</span>
              <span className="line-as-drawing">as a drawing</span>
            </summary>
            <LineAsList {...props} />
          </details>
        )}
      </div>
      {gates.length === 0 ? (
        <p className="line-empty">
          No gates yet. Answer the set-up questions, and the gates that this install needs appear here as valves on a pipe.
        </p>
      ) : (
        <>
          <div className="line-drawing line-lying">
            <LyingLine {...props} label={label} />
          </div>
          {!wall && (
            <div className="line-drawing line-standing">
              <StandingLine {...props} label={label} />
            </div>
          )}
        </>
      )}
    </section>
  );
}
