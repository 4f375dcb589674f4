import { data, redirect } from "react-router";
import { BenchPage } from "#app/components/bench/BenchPage";
import { db } from "#app/db/client.server";
import { keptOf } from "#app/db/queries/bench-inputs.server";
import { isBenchKey } from "#app/lib/bench/bench";
import type { BenchKey } from "#app/lib/bench/bench-def";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { keepBenchInputs } from "#app/lib/services/keep-bench-inputs.server";
import { benchView } from "#app/lib/views/bench";
import { typedForm, workOut, worthKeeping } from "#app/lib/views/bench-work";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.bench_.$sheet";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `${loaderData?.view.title ?? "Bench"} · Bladecount` }];

function sheetOf(params: { sheet: string }) {
  if (!isBenchKey(params.sheet)) throw data("There is no such calculator on the bench.", { status: 404 });
  return params.sheet;
}

export async function loader({ context, params, request }: Route.LoaderArgs) {
  const { e, me, now, installId } = context.get(installContext);
  const key = sheetOf(params);
  const asked = new URL(request.url).searchParams;
  const kept = asked.has("fresh") ? null : await keptOf(db(), installId, key);
  return { view: benchView({ e, key, units: me.units, now, sent: typedForm(key, asked), kept }) };
}

export async function action({ context, params, request }: Route.ActionArgs) {
  const { e, me, installId } = context.get(installContext);
  const key = sheetOf(params);
  const inputs = typedForm(key, await readForm(request));
  const worked = inputs && workOut(e, key, inputs);
  if (!inputs || !worked?.ok)
    return data({ refusal: "These inputs give no result, so they were not kept. Put them right and work it out first." }, { status: 422 });
  const outcome = await keepBenchInputs({ installId, userId: me.id, sheet: key, inputs: worthKeeping(e, key, inputs) });
  if (!outcome.ok) return data({ refusal: outcome.message }, { status: outcome.status });
  return redirect(`${boardOf(installId)}/bench/${key}`, 303);
}

export default function Sheet({ loaderData, actionData }: Route.ComponentProps) {
  const { view } = loaderData;
  return (
    <BenchPage key={`${view.key} ${view.sent ? "sent" : "kept"}`} view={view} sign={SIGN[view.key]} refusal={actionData?.refusal ?? null} />
  );
}

const SIGN: Record<BenchKey, "propeller" | "strap" | "fire" | "general"> = {
  "fuel-flow": "fire",
  restraint: "strap",
  torque: "general",
  crank: "propeller",
  compression: "propeller",
  "tip-speed": "propeller",
  atmosphere: "general",
  "static-power": "propeller",
  battery: "propeller",
  "wire-drop": "general",
};
