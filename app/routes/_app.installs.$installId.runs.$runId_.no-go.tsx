import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { MailReaders } from "#app/components/run/MailReaders";
import { ReasonPage } from "#app/components/run/ReasonPage";
import { RunTitle } from "#app/components/run/RunTitle";
import { StopList } from "#app/components/run/StopList";
import { mayCallNoGo } from "#app/lib/gates/run-verdicts";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { reasonForm } from "#app/lib/schemas/run-forms";
import { callNoGo } from "#app/lib/services/call-no-go.server";
import { runOf } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { runView } from "#app/lib/views/run";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.no-go";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `No-go, run ${loaderData?.view.label ?? ""} · Bladecount` }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e, me } = context.get(installContext);
  const view = runView(e, params.runId, me, "");
  if (!view) throw new Response("Not found", { status: 404 });
  const verdict = mayCallNoGo(e, { run: params.runId, member: me.id });
  return {
    view,
    why: verdict.ok ? null : (verdict.blockers[0]?.sentence ?? ""),
    readers: mailReaders(e, params.runId),
    commandId: newId(),
  };
}

export async function action({ context, params, request }: Route.ActionArgs) {
  const { installId, me } = context.get(installContext);
  const submission = parseWithZod(await readForm(request), { schema: reasonForm });
  if (submission.status !== "success") return data({ result: submission.reply() }, { status: 400 });
  const { commandId, reason } = submission.value;
  const outcome = await callNoGo({ installId, actor: { userId: me.id }, commandId }, { run: params.runId, reason });
  if (!outcome.ok) return data({ result: submission.reply({ formErrors: [outcome.message] }) }, { status: outcome.status });
  return redirect(runOf(installId, params.runId), 303);
}

export default function CallNoGo({ loaderData, actionData }: Route.ComponentProps) {
  const { view, why, readers, commandId } = loaderData;
  const typed = actionData?.result.initialValue?.reason;
  const error = actionData?.result.error;
  return (
    <main id="main">
      <RunTitle title={`Send a no-go for run ${view.label}`} state={view.when} rungs={view.ladder} gates={view.gates} here={view.id} />
      <ReasonPage
        commandId={commandId}
        label="Note to the crew"
        hint="Why, and when the next try may be. Answers and state of the run stay as they are."
        act="Send the no-go"
        note={readers.length === 1 ? "1 person gets a mail" : `${readers.length} people get a mail`}
        why={why}
        back={{ href: view.href, label: "Back, no mail goes out" }}
        errors={{ reason: error?.reason ?? undefined, form: error?.[""] ?? undefined }}
        reason={typeof typed === "string" ? typed : undefined}
      >
        <section>
          <h2 className="mb-2 text-h3">What the mail says stops it</h2>
          {view.stops.length ? (
            <StopList stops={view.stops} here={view.href} />
          ) : (
            <p>Nothing on the board stops it: the reason below is all that the crew reads.</p>
          )}
        </section>
        <MailReaders title="Who gets it" readers={readers} what="no-go mail" />
      </ReasonPage>
    </main>
  );
}
