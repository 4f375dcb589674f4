import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { PlanForm } from "#app/components/run/PlanForm";
import { RunTitle } from "#app/components/run/RunTitle";
import { db } from "#app/db/client.server";
import { placeOfRun } from "#app/db/queries/run-place.server";
import { localOf } from "#app/lib/gates/local-time";
import { mayPlan, planRules } from "#app/lib/gates/plan-verdicts";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { planForm } from "#app/lib/schemas/run-forms";
import { planRun } from "#app/lib/services/plan-run.server";
import { lineOf } from "#app/lib/views/board-line";
import { runOf } from "#app/lib/views/places";
import { planView } from "#app/lib/views/plan";
import { gatesShare } from "#app/lib/views/run-words";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.plan";

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Change the plan of run ${loaderData?.view.label ?? ""} · Bladecount` },
];

export async function loader({ context, params, url }: Route.LoaderArgs) {
  const { e, me, snapshot, now, installId } = context.get(installContext);
  const run = e.facts.runs.get(params.runId);
  const rung = e.facts.rungs.find((r) => r.key === run?.run.rung);
  if (!run || !rung) throw new Response("Not found", { status: 404 });
  const verdict = mayPlan(e, { run: run.run.id, rung: rung.key, member: me.id });
  const view = planView(e, rung, run.run);
  const lower = url.searchParams.get("rpm");
  return {
    view: lower && /^\d{2,5}$/.test(lower) ? { ...view, start: { ...view.start, rpm: lower } } : view,
    why: verdict.ok ? null : (verdict.blockers[0]?.sentence ?? ""),
    version: run.plan?.version ?? 0,
    called: e.result.runs.some((r) => r.id === run.run.id && r.go),
    when: localOf(run.run.plannedStart ?? now, snapshot.install.timeZone),
    place: await placeOfRun(db(), installId, run.run.id),
    ladder: lineOf(e, new Map()).runs,
    gates: gatesShare(e),
    here: run.run.id,
    back: runOf(installId, run.run.id),
    commandId: newId(),
  };
}

export async function action({ context, request, params }: Route.ActionArgs) {
  const { e, me, installId } = context.get(installContext);
  const run = e.facts.runs.get(params.runId);
  const rung = e.facts.rungs.find((r) => r.key === run?.run.rung);
  if (!run || !rung) throw new Response("Not found", { status: 404 });
  const submission = parseWithZod(await readForm(request), { schema: planForm(planRules(e, rung), e.snapshot.install.timeZone) });
  if (submission.status !== "success") return data({ result: submission.reply() }, { status: 400 });
  const { commandId, ...plan } = submission.value;
  const outcome = await planRun({ installId, actor: { userId: me.id }, commandId }, { run: run.run.id, rung: rung.key, ...plan });
  if (!outcome.ok) return data({ result: submission.reply({ formErrors: [outcome.message] }) }, { status: outcome.status });
  return redirect(runOf(installId, outcome.value.run), 303);
}

export default function ChangePlan({ loaderData, actionData }: Route.ComponentProps) {
  const { view, why, version, called, when, place, ladder, gates, here, back, commandId } = loaderData;
  return (
    <main id="main">
      <RunTitle
        title={`Change the plan of run ${view.label}`}
        state={`run card version ${version} now`}
        rungs={ladder}
        gates={gates}
        here={here}
      />
      {why ? (
        <p className="px-4 py-5 text-lead tablet:px-6">{why}</p>
      ) : (
        <PlanForm
          view={view}
          when={when}
          place={place}
          commandId={commandId}
          lastResult={actionData?.result}
          act="Change the plan"
          note={
            called
              ? "GO stands: another speed, wind limit or crew turns it into HOLD and mails the crew"
              : "another speed, wind limit or crew is a new version: everybody reads and answers again"
          }
          back={back}
        />
      )}
    </main>
  );
}
