import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { StopList } from "#app/components/run/StopList";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { ReviewView } from "#app/lib/views/review";

interface ReviewPageProps {
  view: ReviewView;
  commandId: string;
  reply: FormReply | undefined;
}

/** What an ended run still needs before the next one can be clear. */
export function ReviewPage({ view, commandId, reply }: ReviewPageProps) {
  const done = view.state === "reviewed";
  if (view.state === "not started")
    return (
      <main id="main">
        <TitlePipe title={view.title} state={view.state} fill={0.3} then="There is nothing to review before it has run." />
        <div className="flex px-4 py-6 tablet:px-6">
          <Fitting href={view.back} size="act">
            Back to the run
          </Fitting>
        </div>
      </main>
    );
  return (
    <main id="main">
      <TitlePipe
        title={view.title}
        state={view.state}
        fill={done ? 1 : 0.5}
        aside={<Fitting href={view.back}>The run</Fitting>}
        then="Outcome, engine log, every exceedance, and the post-run inspection: then the next run can be clear."
      />
      {done ? (
        <Notice kind="done" title="Reviewed." band>
          Nothing of this run is left open.
        </Notice>
      ) : (
        <section className="px-4 pt-4 tablet:px-6" aria-labelledby="left">
          <h2 id="left" className="text-h3">
            What is left
          </h2>
          <StopList stops={view.left} here={view.back} />
        </section>
      )}
      <Outcome view={view} commandId={commandId} reply={reply} />
      <EngineLog view={view} commandId={commandId} reply={reply} />
      {view.exceedances.length > 0 && (
        <section className="border-t-2 border-ink px-4 py-5 tablet:px-6" aria-labelledby="exceedances">
          <h2 id="exceedances" className="text-h3">
            Exceedances
          </h2>
          <ul className="mt-2 border-t border-line">
            {view.exceedances.map((x) => (
              <li key={x.id} className="border-b border-line py-4">
                <p className="text-lead">
                  <b>{x.sentence}</b>
                </p>
                {x.answered ? <p>answered</p> : <Answer view={view} x={x} commandId={commandId} reply={reply} />}
              </li>
            ))}
          </ul>
        </section>
      )}
    </main>
  );
}

function Outcome({ view, commandId, reply }: ReviewPageProps) {
  return (
    <section className="border-t-2 border-ink px-4 py-5 tablet:px-6" aria-labelledby="outcome">
      <h2 id="outcome" className="text-h3">
        Outcome
      </h2>
      {view.outcome ? (
        <p>
          This run was <b>{view.outcome}</b>.
        </p>
      ) : (
        <p>Completed when every step of the card was run as it stands there; else cut short.</p>
      )}
      <div className="mt-3 flex flex-wrap gap-3">
        {(["completed", "cut short"] as const)
          .filter((o) => o !== view.outcome)
          .map((outcome) => (
            <Form method="post" key={outcome} preventScrollReset>
              <FormFaults faults={fieldsOf(outcome, reply).faults} />
              <HiddenIds commandId={`${commandId}-${outcome.replace(" ", "")}`} intent={outcome} />
              <Fitting reason={view.may.outcome.ok || outcome === "cut short" ? undefined : view.may.outcome.why}>
                {outcome === "completed" ? "It was completed" : "It was cut short"}
              </Fitting>
            </Form>
          ))}
      </div>
    </section>
  );
}

function EngineLog({ view, commandId, reply }: ReviewPageProps) {
  const read = fieldsOf("log-read", reply);
  const missing = fieldsOf("no-log", reply);
  return (
    <section className="border-t-2 border-ink px-4 py-5 tablet:px-6" aria-labelledby="log">
      <h2 id="log" className="text-h3">
        Engine log
      </h2>
      {view.log && <p>The log is {view.log}.</p>}
      <div className="mt-3 grid gap-8 wide:grid-cols-2">
        <Form method="post" className="flex flex-col items-start gap-4" preventScrollReset>
          <FormFaults faults={read.faults} />
          <HiddenIds commandId={`${commandId}-log`} intent="log-read" />
          <TextInput
            {...read.field("exceedances")}
            label="What was outside its limit"
            hint="One a line: channel, limit, how far, how long, when. Left empty: I have read the log, and nothing was outside its limits."
            rows={4}
            maxLength={20_000}
            optional
            className="w-full"
          />
          <Fitting note="each line must be answered" reason={view.may.readLog.ok ? undefined : view.may.readLog.why}>
            I have read the log
          </Fitting>
        </Form>
        {view.log === null && (
          <Form method="post" className="flex flex-col items-start gap-4" preventScrollReset>
            <FormFaults faults={missing.faults} />
            <HiddenIds commandId={`${commandId}-nolog`} intent="no-log" />
            <TextInput
              {...missing.field("reason")}
              label="Why there is no log"
              hint="An inspector accepts it, with what was read off instead."
              rows={4}
              maxLength={1000}
              className="w-full"
            />
            <Fitting reason={view.may.noLog.ok ? undefined : view.may.noLog.why}>Accept that there is none</Fitting>
          </Form>
        )}
      </div>
    </section>
  );
}

function Answer({ view, x, commandId, reply }: ReviewPageProps & { x: ReviewView["exceedances"][number] }) {
  const { field, faults } = fieldsOf("answer", reply?.typed.exceedance === x.id ? reply : undefined);
  return (
    <Form method="post" className="mt-3 flex max-w-[760px] flex-col items-start gap-4" preventScrollReset>
      <FormFaults faults={faults} />
      <HiddenIds commandId={`${commandId}-${x.id}`} intent="answer" also={{ exceedance: x.id }} />
      <Select
        {...field("finding")}
        label="Answered by"
        empty="an inspector’s word alone"
        options={view.findings}
        hint="Raise a finding first where something is to be put right."
        className="w-full"
      />
      <TextInput {...field("words")} label="In words" rows={2} maxLength={1000} className="w-full" />
      <Fitting reason={x.may.ok || x.mayWithout.ok ? undefined : x.may.why}>Answer it</Fitting>
    </Form>
  );
}
