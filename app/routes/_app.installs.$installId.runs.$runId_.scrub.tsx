import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { ReasonPage } from "#app/components/run/ReasonPage";
import { RunTitle } from "#app/components/run/RunTitle";
import { Notice } from "#app/components/ui/Notice";
import { mayScrub } from "#app/lib/gates/run-verdicts";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { reasonForm } from "#app/lib/schemas/run-forms";
import { scrubRun } from "#app/lib/services/scrub-run.server";
import { runOf } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { runView } from "#app/lib/views/run";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.scrub";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `Scrub run ${loaderData?.view.label ?? ""} · Bladecount` }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e, me } = context.get(installContext);
  const view = runView(e, params.runId, me, "");
  if (!view) throw new Response("Not found", { status: 404 });
  const verdict = mayScrub(e, { run: params.runId, member: me.id });
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
  const outcome = await scrubRun({ installId, actor: { userId: me.id }, commandId }, { run: params.runId, reason });
  if (!outcome.ok) return data({ result: submission.reply({ formErrors: [outcome.message] }) }, { status: outcome.status });
  return redirect(runOf(installId, params.runId), 303);
}

export default function ScrubRun({ loaderData, actionData }: Route.ComponentProps) {
  const { view, why, readers, commandId } = loaderData;
  const typed = actionData?.result.initialValue?.reason;
  const error = actionData?.result.error;
  return (
    <main id="main">
      <RunTitle title={`Scrub run ${view.label}`} state={view.when} rungs={view.ladder} gates={view.gates} here={view.id} />
      <ReasonPage
        commandId={commandId}
        label="Why"
        hint="In a few words, for the record."
        act="Scrub the run"
        note="the record keeps it, with the reason"
        why={why}
        back={{ href: view.href, label: "Back, the run stays planned" }}
        errors={{ reason: error?.reason ?? undefined, form: error?.[""] ?? undefined }}
        reason={typeof typed === "string" ? typed : undefined}
      >
        <Notice kind="plain" title="The run is given up for good.">
          Its rung stays as it is and can be planned again as another run. Nobody is mailed by this: send a no-go first if the crew is to
          know. {readers.length} people would get that mail.
        </Notice>
      </ReasonPage>
    </main>
  );
}
