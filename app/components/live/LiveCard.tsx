import { Form, useNavigation } from "react-router";
import { useBoardWatch } from "#app/components/board/useBoardWatch";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { LiveSteps } from "#app/components/live/LiveSteps";
import { OilClock } from "#app/components/live/OilClock";
import { StartList } from "#app/components/live/StartList";
import { useLiveState, useNow } from "#app/components/live/useLiveState";
import { AbortWords } from "#app/components/run/AbortWords";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { LiveView } from "#app/lib/views/live";

interface LiveCardProps {
  view: LiveView;
  commandId: string;
  /** Address of the board's answer: others follow by it. */
  board: string;
  /** The server's time when the page was drawn. */
  now: number;
  reply: FormReply | undefined;
}

/** Held by the run lead at the aircraft: the start by challenge and answer, oil pressure, each step with its clock, the end. */
export function LiveCard({ view, commandId, board, now: drawn, reply }: LiveCardProps) {
  const [state, change] = useLiveState(view.run);
  const now = useNow(view.state === "running", drawn);
  const busy = useNavigation().state !== "idle";
  useBoardWatch(board, "");
  const { faults } = fieldsOf("live", reply);
  const all = state.answered.length >= view.card.begin.length;
  const act = (intent: string, words: string, note: string, options: { stop?: boolean; small?: boolean; reason?: string } = {}) => (
    <Form method="post">
      <HiddenIds commandId={`${commandId}-${intent.replace(" ", "")}`} intent={intent} />
      <Fitting
        size={options.small ? "normal" : "act"}
        variant={options.stop ? "stop" : options.small ? "outline" : "filled"}
        note={note}
        reason={options.reason}
        busy={busy}
      >
        {words}
      </Fitting>
    </Form>
  );
  return (
    <>
      <main id="main">
        <TitlePipe
          title={view.title}
          state={
            view.state === "running"
              ? `running since ${view.started}`
              : view.state === "called"
                ? "GO stands"
                : (view.outcome ?? "live card")
          }
          fill={view.state === "running" ? 1 : 0.9}
          then={
            <>
              Cleared to <Figure value={view.cleared} unit="rpm" className="font-bold" />, never above.
            </>
          }
        />
        <CautionSlab title="A propeller is live, always.">
          Anybody may shout STOP, or cross the arms overhead. The maker’s manual and the run lead’s word come before this card.
        </CautionSlab>
        <div className="px-4 pt-4 tablet:px-6">
          <FormFaults faults={faults} />
        </div>
        {view.follows && (
          <Notice kind="plain" title="You follow this run." band>
            The run lead holds the card. Whatever you see wrong: shout STOP first.
          </Notice>
        )}
        {view.state === "called" && (
          <>
            <StartList
              items={view.card.begin}
              answered={state.answered}
              onAnswer={(n) => change({ answered: [...new Set([...state.answered, n])] })}
            />
            {view.stops.length > 0 && (
              <section className="px-4 py-4 tablet:px-6" aria-labelledby="stops">
                <h2 id="stops" className="text-h3">
                  What stops the start
                </h2>
                <ul className="mt-2 border-t border-line">
                  {view.stops.map((s) => (
                    <li key={s.title} className="border-b border-line py-2">
                      <b>{s.title}.</b> {s.sentence}
                    </li>
                  ))}
                </ul>
              </section>
            )}
          </>
        )}
        {view.state === "running" && view.startedAt !== null && (
          <>
            {view.oil && <OilClock fired={view.startedAt} marks={state.oil} now={now} onMark={(oil) => change({ oil })} />}
            <LiveSteps steps={view.steps} state={state} now={now} started={view.startedAt} onChange={change} />
          </>
        )}
        <div className="px-4 py-4 tablet:px-6">
          <AbortWords parts={view.card.abort} />
        </div>
        {(view.state === "ended" || view.state === "running") && (
          <section className="border-t-2 border-ink px-4 py-4 tablet:px-6" aria-labelledby="end">
            <h2 id="end" className="text-h3">
              {view.state === "running" ? "When the propeller stands" : "The run has ended"}
            </h2>
            <p className="max-w-[72ch]">{view.card.end.join("; ")}.</p>
            <div className="mt-3 flex flex-wrap gap-3">
              {view.state === "running" &&
                state.oil.above === null &&
                state.step === 0 &&
                view.may.takeBack.ok &&
                act("take-back", "It never fired", "takes the start back", { small: true })}
              {view.state === "ended" && view.outcome === null && view.may.outcome.ok && (
                <>
                  {act("completed", "Completed", "every step of the card was run", { small: true })}
                  {act("cut short", "Cut short", "the rung stays to be done", { small: true })}
                </>
              )}
              {view.state === "ended" && view.post && <Fitting href={view.post.href}>{view.post.label}</Fitting>}
            </div>
          </section>
        )}
      </main>
      <Foot
        says={
          view.state === "running"
            ? "The engine runs"
            : view.state === "called"
              ? "GO stands"
              : view.state === "ended"
                ? "Ended"
                : "Not called"
        }
        note={view.state === "running" ? "STOP never ends the run here: report it ended when the propeller stands." : ""}
      >
        {view.state === "called" &&
          act("start", "Engine starts", "uses the GO up", {
            reason: !view.may.start.ok ? view.may.start.why : all ? undefined : "answer the start list first",
          })}
        {view.state === "running" && view.may.end.ok && act("ended", "Propeller stands", "reports the run ended", { stop: true })}
        {view.state === "ended" && (
          <Fitting href={view.review} size="act" note="log, exceedances, what is left">
            Review the run
          </Fitting>
        )}
        {view.state === "other" && (
          <Fitting href={view.back} size="act">
            Back to the run
          </Fitting>
        )}
      </Foot>
    </>
  );
}
