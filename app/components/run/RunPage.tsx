import type { SubmissionResult } from "@conform-to/react";
import { Ahead, StandAt } from "#app/components/board/StandAt";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { AbortWords } from "#app/components/run/AbortWords";
import { ClearanceBlock } from "#app/components/run/ClearanceBlock";
import { HoldForm } from "#app/components/run/HoldForm";
import { MyAnswer, MyPlaces } from "#app/components/run/MyBrief";
import { RollCall } from "#app/components/run/RollCall";
import { RunCardView } from "#app/components/run/RunCardView";
import { RunFindings } from "#app/components/run/RunFindings";
import { RunFoot } from "#app/components/run/RunFoot";
import { RunTitle } from "#app/components/run/RunTitle";
import type { RunPageView } from "#app/components/run/runPageView";
import { StopList } from "#app/components/run/StopList";
import { WindForm } from "#app/components/run/WindForm";
import { Fitting } from "#app/components/ui/Fitting";
import { FloorPlan } from "#app/components/ui/FloorPlan";
import { Notice } from "#app/components/ui/Notice";
import type { StandAtView } from "#app/lib/views/stand-at";

export interface RunPageProps {
  view: RunPageView;
  /** The instant that the page shows, where it is not now. */
  later: StandAtView;
  /** How many people a mail about this run reaches. */
  told: number;
  commandId: string;
  lastResult?: SubmissionResult<string[]>;
}

/** A run before its start. Whoever is crew and nothing else sees the own place first, the rest under it. */
export function RunPage(props: RunPageProps) {
  const { view, later, lastResult } = props;
  const held = view.state === "held";
  const wrong = Object.entries(lastResult?.error ?? {}).flatMap(([name, list]) =>
    (list ?? []).map((message) => ({ field: name || null, message })),
  );
  const crewFirst = view.onlyCrew && view.mine !== null;
  return (
    <>
      <main id="main">
        <Ahead view={later} here={view.href} />
        <RunTitle
          title={held ? `HOLD, ${view.title.replace(/^Run/, "run")}` : view.title}
          state={view.when}
          rungs={view.ladder}
          gates={view.gates}
          here={view.id}
          held={held}
        />
        {view.notice && (
          <Notice kind={view.notice.kind} title={view.notice.title} band>
            {view.notice.text}
          </Notice>
        )}
        {wrong.length > 0 && (
          <div className="px-4 pt-4 tablet:px-6">
            <ErrorSummary errors={wrong} />
          </div>
        )}
        {later.when ? <Later view={view} /> : crewFirst ? <CrewFirst {...props} /> : <Whole {...props} />}
        <StandAt key={later.when} view={later} here={view.href} />
      </main>
      {!later.when && <RunFoot view={view} />}
    </>
  );
}

/** At a later instant nothing can be done: what would stop the run then, and how high it would be cleared. */
function Later({ view }: { view: RunPageView }) {
  return (
    <div className="grid gap-8 px-4 py-5 tablet:px-6 wide:grid-cols-2">
      <ClearanceBlock {...view.clearance} lower={null} />
      <Stops view={view} />
    </div>
  );
}

function CrewFirst(props: RunPageProps) {
  const { view, commandId, lastResult } = props;
  const { mine, card } = view;
  if (!mine || !card) return null;
  return (
    <div className="mx-auto flex max-w-[760px] flex-col gap-5 px-4 py-5 tablet:px-6">
      <MyPlaces {...mine} />
      <FloorPlan stations={view.roll.stations.filter((s) => s.you)} gear={view.gear} pusher={view.pusher} wind={view.wind.short} />
      <section className="flex flex-col gap-2">
        <h2 className="text-h3">Run {view.label} in short</h2>
        <p>
          {mine.inShort} Cleared to <b>{view.clearance.figure} rpm</b>, never above.
        </p>
      </section>
      {mine.acknowledge ? <RunCardView {...card} /> : <AbortWords parts={card.abort} />}
      <MyAnswer brief={mine} commandId={commandId} errors={lastResult?.error?.reason ?? undefined} />
      <CallHold {...props} />
      <details>
        <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
          The whole run: clearance, what stops it, roll call, wind
        </summary>
        <div className="flex flex-col gap-8 pt-3">
          <Cleared view={view} />
          <Stops view={view} />
          <RunFindings {...view.findings} />
          <RollCall {...view.roll} gear={view.gear} pusher={view.pusher} wind={view.wind.short} />
          {!mine.acknowledge && <RunCardView {...card} />}
        </div>
      </details>
      <Wind {...props} />
    </div>
  );
}

function Whole(props: RunPageProps) {
  const { view, commandId, lastResult } = props;
  const { mine, card, acts } = view;
  return (
    <div className="grid wide:grid-cols-2">
      <div className="flex flex-col gap-8 px-4 py-5 tablet:px-6">
        <Cleared view={view} />
        {card && <RunCardView {...card} />}
      </div>
      <div className="flex flex-col gap-8 border-ink px-4 py-5 max-wide:border-t-2 tablet:px-6 wide:border-l-2">
        <Stops view={view} />
        <RunFindings {...view.findings} />
        <RollCall {...view.roll} gear={view.gear} pusher={view.pusher} wind={view.wind.short} />
        {mine && (
          <div className="flex flex-col gap-4">
            <MyPlaces {...mine} />
            <MyAnswer brief={mine} commandId={commandId} errors={lastResult?.error?.reason ?? undefined} />
          </div>
        )}
        <Wind {...props} />
        <CallHold {...props} />
        {view.lead && (acts.plan.ok || acts.noGo.ok || acts.scrub.ok) && (
          <section className="flex flex-col gap-3 border-t border-line pt-4" aria-labelledby="lead-acts">
            <h2 id="lead-acts" className="text-h3">
              As lead
            </h2>
            <p className="flex flex-wrap gap-3">
              {acts.plan.ok && <Fitting href={`${view.href}/plan`}>Change the plan</Fitting>}
              {acts.noGo.ok && <Fitting href={`${view.href}/no-go`}>Send a no-go</Fitting>}
              {acts.scrub.ok && <Fitting href={`${view.href}/scrub`}>Scrub the run</Fitting>}
            </p>
          </section>
        )}
      </div>
    </div>
  );
}

function Cleared({ view }: { view: RunPageView }) {
  const { lower } = view.clearance;
  const may = view.lead && view.acts.plan.ok && lower !== null;
  return (
    <ClearanceBlock {...view.clearance} lower={may ? { text: lower.toLocaleString("en"), href: `${view.href}/plan?rpm=${lower}` } : null} />
  );
}

function Stops({ view }: { view: RunPageView }) {
  if (view.stops.length === 0) return null;
  return (
    <section aria-labelledby="stops">
      <h2 id="stops" className="mb-2 text-h3">
        {view.state === "ended" ? "Left to review" : "What stops this run"}
      </h2>
      <StopList stops={view.stops} here={view.href} />
    </section>
  );
}

function Wind({ view, commandId, lastResult }: RunPageProps) {
  if (["reviewed", "ended", "scrubbed"].includes(view.state)) return null;
  const error = lastResult?.error;
  const typed = lastResult?.initialValue as { speed?: string; gust?: string } | undefined;
  return (
    <WindForm
      newest={view.wind.newest}
      limit={view.wind.limit}
      may={view.acts.wind}
      commandId={commandId}
      errors={{ speed: error?.speed ?? undefined, gust: error?.gust ?? undefined, tail: error?.tail ?? undefined }}
      typed={{ speed: typed?.speed, gust: typed?.gust }}
    />
  );
}

/** While GO stands or the engine runs, any member may hold it from here. */
function CallHold({ view, told, commandId }: RunPageProps) {
  if (!view.acts.hold.ok || !["called", "running"].includes(view.state)) return null;
  return (
    <section aria-labelledby="call-hold" className="flex flex-col gap-3 border-t border-line pt-4">
      <h2 id="call-hold" className="text-h3">
        Something is not right
      </h2>
      <HoldForm action={`${view.href}/hold`} commandId={commandId} told={told} />
    </section>
  );
}
