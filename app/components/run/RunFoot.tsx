import type { RunPageView } from "#app/components/run/runPageView";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";

/** The one next thing on this run for this person. */
export function RunFoot({ view }: { view: RunPageView }) {
  const { mine, acts, foot, state } = view;
  if (state === "called" || state === "running")
    return (
      <Foot {...foot}>
        <Fitting href={`${view.href}/live`} size="act" note={state === "running" ? "the engine runs" : "start list, clocks, steps"}>
          Live card
        </Fitting>
        {acts.hold.ok && (
          <Fitting href={`${view.href}/hold`} size="act" variant="stop" note="says why, tells the crew">
            HOLD
          </Fitting>
        )}
      </Foot>
    );
  if (state === "ended" || state === "reviewed")
    return (
      <Foot {...foot}>
        <Fitting href={`${view.href}/review`} size="act" note="outcome, log, exceedances">
          Review
        </Fitting>
      </Foot>
    );
  if (state !== "planned" && state !== "held") return <Foot {...foot} />;
  if (view.lead)
    return (
      <Foot {...foot}>
        {acts.go.ok ? (
          <Fitting href={`${view.href}/go`} size="act" note="lead’s PIN comes next">
            Call GO
          </Fitting>
        ) : (
          <Fitting size="act" reason={view.stops.length ? "when nothing stops it" : acts.go.why}>
            Call GO
          </Fitting>
        )}
      </Foot>
    );
  if (!mine) return <Foot {...foot} />;
  if (mine.said.answer === "go") return <Foot says={mine.said.words} note={foot.says} />;
  return (
    <Foot says={mine.acknowledge ? "The card waits for you" : "Are you go?"} note={foot.says}>
      <Fitting href="#my-answer" size="act" note={mine.acknowledge ? `version ${mine.version}, then answer` : "or no-go, with its reason"}>
        {mine.acknowledge ? "Read the run card" : "Answer the roll call"}
      </Fitting>
    </Foot>
  );
}
