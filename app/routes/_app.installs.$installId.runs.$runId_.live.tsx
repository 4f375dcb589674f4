import { data, redirect } from "react-router";
import { LiveCard } from "#app/components/live/LiveCard";
import { readForm } from "#app/lib/http/form.server";
import { actsOf, formAct } from "#app/lib/http/form-acts.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { liveForm } from "#app/lib/schemas/live-forms";
import type { Outcome } from "#app/lib/services/outcome";
import { endRun, stateOutcome } from "#app/lib/services/report-run.server";
import { startRun, takeBackStart } from "#app/lib/services/start-run.server";
import { boardAnswer, tagOf } from "#app/lib/views/board-answer";
import { liveView } from "#app/lib/views/live";
import { runOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.live";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `${loaderData?.view.title ?? "Run"}, live card · Bladecount` }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e, me, head, installId } = context.get(installContext);
  const view = liveView(e, params.runId, me.id);
  if (!view) throw new Response("Not found", { status: 404 });
  const watch = { address: `/api/v1/installs/${installId}/board`, tag: tagOf(boardAnswer(e, head)) };
  return { view, commandId: newId(), watch, now: e.at };
}

export async function action({ context, params, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const run = params.runId;
  const acts = actsOf(install);
  const acted = await formAct({
    sent: await readForm(request),
    form: "live",
    schema: liveForm,
    serve: async ({ intent, commandId }): Promise<Outcome<unknown>> => {
      const act = acts(commandId);
      if (intent === "start") return startRun(act, { run });
      if (intent === "take-back") return takeBackStart(act, { run });
      if (intent === "ended") return endRun(act, { run, at: null });
      return stateOutcome(act, { run, outcome: intent });
    },
    anchor: () => "",
  });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${runOf(install.installId, run)}/live`, 303);
}

/** After a refusal too: what was shown may be what has changed. */
export const shouldRevalidate = () => true;

export default function Live({ loaderData, actionData }: Route.ComponentProps) {
  return <LiveCard {...loaderData} reply={actionData} />;
}
