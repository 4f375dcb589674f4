import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect, useNavigation } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { PinStub } from "#app/components/gate/PinStub";
import { MailReaders } from "#app/components/run/MailReaders";
import { StopList } from "#app/components/run/StopList";
import { WireTag } from "#app/components/run/WireTag";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { useLive } from "#app/components/ui/useLive";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { refused } from "#app/lib/http/respond.server";
import { newId } from "#app/lib/ids";
import { goForm } from "#app/lib/schemas/run-forms";
import { callGo } from "#app/lib/services/call-go.server";
import { goView } from "#app/lib/views/go";
import { runOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.go";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `Call GO, run ${loaderData?.view.label ?? ""} · Bladecount` }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e, me } = context.get(installContext);
  const view = goView(e, params.runId, me);
  if (!view) throw new Response("Not found", { status: 404 });
  return { view, commandId: newId() };
}

export async function action({ context, params, request }: Route.ActionArgs) {
  const { installId, me } = context.get(installContext);
  const submission = parseWithZod(await readForm(request), { schema: goForm });
  const result = () => submission.reply({ hideFields: ["pin"] });
  if (submission.status !== "success")
    return data({ error: Object.values(result().error ?? {}).flat()[0] ?? "Enter your PIN." }, { status: 400 });
  const { commandId, version, pin } = submission.value;
  const outcome = await callGo({ installId, actor: { userId: me.id }, commandId }, { run: params.runId, version, pin });
  if (!outcome.ok) return refused(outcome, { error: outcome.message });
  return redirect(runOf(installId, params.runId), 303);
}

/** After a refusal the tag shows what stops it now. */
export const shouldRevalidate = () => true;

export default function CallGo({ loaderData, actionData }: Route.ComponentProps) {
  const { view, commandId } = loaderData;
  const busy = useNavigation().state === "submitting";
  const live = useLive();
  const error = actionData?.error;
  const people = view.readers.length === 1 ? "mails 1 person now" : `mails ${view.readers.length} people now`;
  return (
    <WireTag
      kicker={view.kicker}
      title="Call GO"
      says={
        <>
          {view.why === null ? (
            <>
              I, <b>{view.me}</b>, lead, call run {view.label}
            </>
          ) : (
            <>Run {view.label} cannot be called now. It is planned</>
          )}{" "}
          for <b>{view.when}</b>, not above <Figure value={view.figure} unit="rpm" className="font-bold" />, {view.also}.{" "}
          {view.ends && (
            <>
              GO ends <b>{view.ends}</b>.
            </>
          )}
        </>
      }
      stub={
        <div className="flex h-full flex-col justify-between gap-6">
          <Form method="post" id="call-go">
            <HiddenIds commandId={commandId} version={view.version} />
          </Form>
          {/* Where GO cannot be called there is nothing to type: keys would say otherwise. */}
          {view.why === null ? (
            <PinStub
              key={commandId}
              form="call-go"
              pin="Lead’s PIN"
              label="Call GO"
              note={people}
              errors={error ? [String(error)] : undefined}
              busy={busy}
              live={live}
            />
          ) : (
            <Fitting size="act" note={people} reason={view.why} centred>
              Call GO
            </Fitting>
          )}
        </div>
      }
    >
      {error && <ErrorSummary errors={[{ field: "pin", message: String(error) }]} title="GO was not called, nobody was mailed" />}
      {view.stops.length > 0 && (
        <section>
          <h2 className="mb-2 text-lead">What stops it</h2>
          <StopList stops={view.stops} />
        </section>
      )}
      <MailReaders title="Who gets what, when you press" readers={view.readers} what="GO mail with the run card" />
      <ul className="list-disc pl-6">
        {view.endsBy.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
      <p className="text-note text-ink-2">GO does not replace the maker’s manuals, the local rules or a licensed person’s judgement.</p>
      <p>
        <Fitting href={view.href} className="w-fit">
          Back, no mail goes out
        </Fitting>
      </p>
    </WireTag>
  );
}
