import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { MailReaders } from "#app/components/run/MailReaders";
import { ReasonPage } from "#app/components/run/ReasonPage";
import { RunTitle } from "#app/components/run/RunTitle";
import { Notice } from "#app/components/ui/Notice";
import { mayHold } from "#app/lib/gates/run-verdicts";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { reasonForm } from "#app/lib/schemas/run-forms";
import { callHold } from "#app/lib/services/call-hold.server";
import { runOf } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { runView } from "#app/lib/views/run";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.hold";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `HOLD, run ${loaderData?.view.label ?? ""} · Bladecount` }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e, me } = context.get(installContext);
  const view = runView(e, params.runId, me, "");
  if (!view) throw new Response("Not found", { status: 404 });
  const verdict = mayHold(e, { run: params.runId, member: me.id });
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
  const outcome = await callHold({ installId, actor: { userId: me.id }, commandId }, { run: params.runId, reason });
  if (!outcome.ok) return data({ result: submission.reply({ formErrors: [outcome.message] }) }, { status: outcome.status });
  return redirect(runOf(installId, params.runId), 303);
}

export default function CallHold({ loaderData, actionData }: Route.ComponentProps) {
  const { view, why, readers, commandId } = loaderData;
  const typed = actionData?.result.initialValue?.reason;
  const error = actionData?.result.error;
  return (
    <main id="main">
      <RunTitle title={`Call HOLD, run ${view.label}`} state={view.when} rungs={view.ladder} gates={view.gates} here={view.id} />
      <ReasonPage
        after={<MailReaders title="Who is told" readers={readers} what="HOLD mail" />}
        commandId={commandId}
        label="Why"
        hint="In a few words: they stand in the mail and in the record."
        act="HOLD"
        note={readers.length === 1 ? "1 person gets a mail" : `${readers.length} people get a mail`}
        stop
        why={why}
        back={{ href: view.href, label: "Back, GO stays as it is" }}
        errors={{ reason: error?.reason ?? undefined, form: error?.[""] ?? undefined }}
        reason={typeof typed === "string" ? typed : undefined}
      >
        <Notice kind="hold" title="Is the engine running? Shout STOP first, or cross your arms overhead.">
          HOLD is for the record and the mail: GO is over at once, nobody starts the engine, and everybody answers again before the next GO.
        </Notice>
      </ReasonPage>
    </main>
  );
}
