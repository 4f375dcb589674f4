import { data, redirect } from "react-router";
import { ReviewPage } from "#app/components/live/ReviewPage";
import { readForm } from "#app/lib/http/form.server";
import { actsOf, formAct } from "#app/lib/http/form-acts.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { liveForm, reviewForm } from "#app/lib/schemas/live-forms";
import type { Outcome } from "#app/lib/services/outcome";
import { stateOutcome } from "#app/lib/services/report-run.server";
import { acceptNoLog, answerExceedance, recordLogRead } from "#app/lib/services/review-run.server";
import { runOf } from "#app/lib/views/places";
import { reviewView } from "#app/lib/views/review";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.review";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `${loaderData?.view.title ?? "Run"}, review · Bladecount` }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e, me } = context.get(installContext);
  const view = reviewView(e, params.runId, me.id);
  if (!view) throw new Response("Not found", { status: 404 });
  return { view, commandId: newId() };
}

const form = reviewForm.or(liveForm);

export async function action({ context, params, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const run = params.runId;
  const acts = actsOf(install);
  const sent = await readForm(request);
  const acted = await formAct({
    sent,
    form: String(sent.get("intent") ?? ""),
    schema: form,
    serve: async (input): Promise<Outcome<unknown>> => {
      const act = acts(input.commandId);
      switch (input.intent) {
        case "log-read":
          return recordLogRead(act, { run, exceedances: input.exceedances });
        case "no-log":
          return acceptNoLog(act, { run, reason: input.reason });
        case "answer":
          return answerExceedance(act, { exceedance: input.exceedance, finding: input.finding, words: input.words });
        case "completed":
        case "cut short":
          return stateOutcome(act, { run, outcome: input.intent });
        default:
          throw data("This page does not know that form. Nothing was changed.", { status: 400 });
      }
    },
    anchor: () => "",
  });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${runOf(install.installId, run)}/review`, 303);
}

export const shouldRevalidate = () => true;

export default function Review({ loaderData, actionData }: Route.ComponentProps) {
  return <ReviewPage {...loaderData} reply={actionData} />;
}
