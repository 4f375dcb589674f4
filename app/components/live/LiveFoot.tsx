import { LiveAct } from "#app/components/live/LiveAct";
import { StopWords } from "#app/components/live/StopWords";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import type { LiveView } from "#app/lib/views/live";

const SAYS = { running: "The engine runs", called: "GO stands", ended: "Ended", other: "Not called" } as const;

/** STOP for everybody while it runs, and the one next thing for whoever leads the run. */
export function LiveFoot({ view, commandId, answered }: { view: LiveView; commandId: string; answered: boolean }) {
  const { state, may, leads } = view;
  const notYet = !may.start.ok ? may.start.why : answered ? undefined : "answer the start list first";
  return (
    <Foot says={SAYS[state]} note={state === "running" && leads ? "STOP ends nothing here: report the end when the propeller stands." : ""}>
      {(state === "running" || state === "called") && <StopWords parts={view.card.abort} />}
      {state === "called" && leads && (
        <LiveAct intent="start" commandId={commandId} words="Engine starts" note="uses the GO up" reason={notYet} />
      )}
      {state === "running" && may.end.ok && (
        <LiveAct intent="ended" commandId={commandId} words="Propeller stands" note="reports the run ended" />
      )}
      {state === "ended" && (
        <Fitting href={view.review} size="act" note="log, exceedances, what is left">
          Review the run
        </Fitting>
      )}
      {state === "other" && (
        <Fitting href={view.back} size="act">
          Back to the run
        </Fitting>
      )}
    </Foot>
  );
}
