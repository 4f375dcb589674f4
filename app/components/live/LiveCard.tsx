import { useBoardWatch } from "#app/components/board/useBoardWatch";
import { FormFaults } from "#app/components/forms/FormFaults";
import { LiveAct } from "#app/components/live/LiveAct";
import { LiveFoot } from "#app/components/live/LiveFoot";
import { LiveSteps } from "#app/components/live/LiveSteps";
import { OilClock } from "#app/components/live/OilClock";
import { StartList } from "#app/components/live/StartList";
import { useLiveState, useNow } from "#app/components/live/useLiveState";
import { AbortWords } from "#app/components/run/AbortWords";
import { RunCardView } from "#app/components/run/RunCardView";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { LiveView } from "#app/lib/views/live";

interface LiveCardProps {
  view: LiveView;
  commandId: string;
  /** The board's answer, by which others follow: its address, and the tag of the one that the page was drawn from. */
  watch: { address: string; tag: string };
  /** The server's time when the page was drawn. */
  now: number;
  reply: FormReply | undefined;
}

/**
 * Held by the run lead at the aircraft: the start by challenge and answer, oil pressure, each step with its clock, the end.
 * Its clocks belong to the device that holds the card: any other one shows the card and the time, and never a clock that nobody there
 * has pressed.
 */
export function LiveCard({ view, commandId, watch, now: drawn, reply }: LiveCardProps) {
  const [state, change] = useLiveState(view.run);
  const now = useNow(view.state === "running", drawn);
  useBoardWatch(watch.address, watch.tag);
  const answered = state.answered.length >= view.card.begin.length;
  const holds = view.leads && (answered || state.takenOver);
  const { running, ended } = { running: view.state === "running", ended: view.state === "ended" };
  return (
    <>
      <main id="main">
        <TitlePipe
          title={view.title}
          state={view.says}
          fill={running ? 1 : 0.9}
          then={
            <>
              Cleared to <Figure value={view.cleared} unit="rpm" className="font-bold" />, never above.
            </>
          }
        />
        <CautionSlab title="A propeller is live, always.">
          Anybody may shout STOP, or cross the arms overhead. The maker’s manual and the run lead’s word come before this card.
        </CautionSlab>
        <div className="px-4 pt-4 empty:hidden tablet:px-6">
          <FormFaults faults={fieldsOf("live", reply).faults} />
        </div>
        {view.state === "called" && (
          <>
            <StartList
              items={view.card.begin}
              answered={state.answered}
              onAnswer={view.leads ? (n) => change({ answered: [...new Set([...state.answered, n])] }) : null}
            />
            <Stops stops={view.stops} />
          </>
        )}
        {view.state === "other" && (
          <Notice kind="plain" title="There is no GO." band>
            The lead calls GO on the page of the run; the start list is read out here then.
          </Notice>
        )}
        {running && !holds && (
          <Notice
            kind="plain"
            title={view.leads ? "Another device holds the card." : "You follow this run."}
            band
            action={
              view.leads && (
                <Fitting type="button" onClick={() => change({ takenOver: true })}>
                  Hold it here
                </Fitting>
              )
            }
          >
            {view.leads ? "Its clocks run there." : "The run lead holds the card."} Whatever you see wrong: shout STOP first.
          </Notice>
        )}
        {running && holds && view.startedAt !== null && (
          <>
            {view.oil && !state.takenOver && (
              <OilClock fired={view.startedAt} marks={state.oil} now={now} onMark={(oil) => change({ oil })} />
            )}
            <LiveSteps steps={view.steps} state={state} now={now} started={view.startedAt} onChange={change} />
          </>
        )}
        {(running || ended) && (
          <section className="border-b-2 border-ink px-4 py-4 tablet:px-6" aria-labelledby="end">
            <h2 id="end" className="text-h3">
              {running ? "When the propeller stands" : "The run has ended"}
            </h2>
            <p className="max-w-[72ch]">{view.card.end.join("; ")}.</p>
            <div className="mt-3 flex flex-wrap gap-3 empty:hidden">
              {running && state.oil.above === null && state.step === 0 && view.may.takeBack.ok && (
                <LiveAct intent="take-back" commandId={commandId} words="It never fired" note="takes the start back" small />
              )}
              {ended && view.outcome === null && view.may.outcome.ok && (
                <>
                  <LiveAct intent="completed" commandId={commandId} words="Completed" note="every step of the card was run" small />
                  <LiveAct intent="cut short" commandId={commandId} words="Cut short" note="the rung stays to be done" small />
                </>
              )}
              {ended && view.post && <Fitting href={view.post.href}>{view.post.label}</Fitting>}
            </div>
          </section>
        )}
        {!ended && (
          <div className="flex flex-col gap-6 px-4 py-4 tablet:px-6">
            {holds && running ? <AbortWords parts={view.card.abort} /> : <RunCardView {...view.card} />}
          </div>
        )}
      </main>
      <LiveFoot view={view} commandId={commandId} answered={answered} />
    </>
  );
}

function Stops({ stops }: { stops: LiveView["stops"] }) {
  if (!stops.length) return null;
  return (
    <section className="px-4 py-4 tablet:px-6" aria-labelledby="stops">
      <h2 id="stops" className="text-h3">
        What stops the start
      </h2>
      <ul className="mt-2 border-t border-line">
        {stops.map((s) => (
          <li key={s.title} className="border-b border-line py-2">
            <b>{s.title}.</b> {s.sentence}
          </li>
        ))}
      </ul>
    </section>
  );
}
