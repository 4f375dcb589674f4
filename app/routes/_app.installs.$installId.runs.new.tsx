import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { PlanForm } from "#app/components/run/PlanForm";
import { RunTitle } from "#app/components/run/RunTitle";
import { localOf } from "#app/lib/gates/local-time";
import { mayPlan, planRules } from "#app/lib/gates/plan-verdicts";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { planForm } from "#app/lib/schemas/run-forms";
import { planRun } from "#app/lib/services/plan-run.server";
import { lineOf } from "#app/lib/views/board-line";
import { boardOf, runOf } from "#app/lib/views/places";
import { planView } from "#app/lib/views/plan";
import { gatesShare, lowerFirst } from "#app/lib/views/run-words";
import type { Route } from "./+types/_app.installs.$installId.runs.new";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `Plan run ${loaderData?.view.label ?? ""} · Bladecount` }];

const DAY = 86_400_000;

export function loader({ context, url }: Route.LoaderArgs) {
  const { e, me, snapshot, now, installId } = context.get(installContext);
  const rung = e.facts.rungs.find((r) => r.key === url.searchParams.get("rung")) ?? e.facts.nextRung;
  if (!rung) throw new Response("Not found", { status: 404 });
  const verdict = mayPlan(e, { run: null, rung: rung.key, member: me.id });
  return {
    view: planView(e, rung, null),
    why: verdict.ok ? null : (verdict.blockers[0]?.sentence ?? ""),
    when: { date: localOf(now + DAY, snapshot.install.timeZone).date, time: "09:30" },
    ladder: lineOf(e, new Map()).runs,
    gates: gatesShare(e),
    back: `${boardOf(installId)}/build-up`,
    commandId: newId(),
  };
}

export async function action({ context, request, url }: Route.ActionArgs) {
  const { e, me, installId } = context.get(installContext);
  const rung = e.facts.rungs.find((r) => r.key === url.searchParams.get("rung")) ?? e.facts.nextRung;
  if (!rung) throw new Response("Not found", { status: 404 });
  const submission = parseWithZod(await readForm(request), { schema: planForm(planRules(e, rung), e.snapshot.install.timeZone) });
  if (submission.status !== "success") return data({ result: submission.reply() }, { status: 400 });
  const { commandId, ...plan } = submission.value;
  const outcome = await planRun({ installId, actor: { userId: me.id }, commandId }, { run: null, rung: rung.key, ...plan });
  if (!outcome.ok) return data({ result: submission.reply({ formErrors: [outcome.message] }) }, { status: outcome.status });
  return redirect(runOf(installId, outcome.value.run), 303);
}

export default function NewRun({ loaderData, actionData }: Route.ComponentProps) {
  const { view, why, when, ladder, gates, back, commandId } = loaderData;
  return (
    <main id="main">
      <RunTitle title={`Plan run ${view.label}`} state={lowerFirst(view.rungName)} rungs={ladder} gates={gates} />
      {why ? (
        <p className="px-4 py-5 text-lead tablet:px-6">{why}</p>
      ) : (
        <PlanForm
          view={view}
          when={when}
          place=""
          commandId={commandId}
          lastResult={actionData?.result}
          act={`Plan run ${view.label}`}
          note="nobody is told yet; the crew reads the card and answers"
          back={back}
        />
      )}
    </main>
  );
}
