import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { RunPage } from "#app/components/run/RunPage";
import { db } from "#app/db/client.server";
import { placeOfRun } from "#app/db/queries/run-place.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { runPageForm } from "#app/lib/schemas/run-forms";
import { acknowledgeBrief, answerRollCall, recordWind } from "#app/lib/services/roll-call.server";
import { runOf } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { runView } from "#app/lib/views/run";
import { standAt } from "#app/lib/views/stand-at";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `${loaderData?.view.title ?? "Run"} · Bladecount` }];

export async function loader({ context, params, request }: Route.LoaderArgs) {
  const { e: now, me, installId } = context.get(installContext);
  const planned = now.facts.runs.get(params.runId)?.run.plannedStart ?? null;
  const { e, view: later } = standAt(now, new URL(request.url).searchParams, planned);
  const view = runView(e, params.runId, me, await placeOfRun(db(), installId, params.runId));
  if (!view) throw new Response("Not found", { status: 404 });
  return { view, later, told: mailReaders(e, params.runId).length, commandId: newId() };
}

export async function action({ context, params, request }: Route.ActionArgs) {
  const { installId, me } = context.get(installContext);
  const run = params.runId;
  const submission = parseWithZod(await readForm(request), { schema: runPageForm });
  if (submission.status !== "success") return data({ result: submission.reply() }, { status: 400 });
  const { commandId, ...form } = submission.value;
  const act = { installId, actor: { userId: me.id }, commandId };
  const outcome =
    form.intent === "acknowledge"
      ? await acknowledgeBrief(act, { run, version: form.version })
      : form.intent === "wind"
        ? await recordWind(act, { run, speed: form.speed, gust: form.gust, tail: form.tail === "yes" })
        : // A form that the server answers has nothing left in a queue.
          await answerRollCall(act, {
            run,
            version: form.version,
            answer: form.intent,
            reason: form.intent === "no-go" ? form.reason : "",
            queueEmpty: true,
          });
  if (!outcome.ok) return data({ result: submission.reply({ formErrors: [outcome.message] }) }, { status: outcome.status });
  return redirect(runOf(installId, run), 303);
}

/** After a refusal too: what was shown may be what has changed. */
export const shouldRevalidate = () => true;

export default function Run({ loaderData, actionData }: Route.ComponentProps) {
  return <RunPage {...loaderData} lastResult={actionData?.result} />;
}
