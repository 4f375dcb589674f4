// The acts on a run that need nothing but a reason: HOLD, no-go, SCRUB. What their sheets show, and what happens when one is sent.
import { data, redirect } from "react-router";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Verdict } from "#app/lib/gates/result";
import { readForm } from "#app/lib/http/form.server";
import { actsOf, formAct } from "#app/lib/http/form-acts.server";
import type { InstallContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import type { RunReason } from "#app/lib/schemas/run";
import { reasonForm } from "#app/lib/schemas/run-forms";
import type { Outcome } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";
import { runOf } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { runView } from "#app/lib/views/run";

/** Throws 404 where the install has no such run. */
export function reasonSheet({ e, me }: InstallContext, run: string, may: (e: Evaluation, a: { run: string; member: string }) => Verdict) {
  const view = runView(e, run, me, "");
  if (!view) throw new Response("Not found", { status: 404 });
  const { id, label, state, when, ladder, gates, stops, href } = view;
  const verdict = may(e, { run, member: me.id });
  return {
    run: { id, label, state, when, ladder, gates, stops, href },
    why: verdict.ok ? null : (verdict.blockers[0]?.sentence ?? ""),
    readers: mailReaders(e, run),
    commandId: newId(),
  };
}

/** Back on the run's page when it was done; else the sheet again, with what was typed. */
export async function actWithReason<T>(
  install: InstallContext,
  request: Request,
  run: string,
  service: (act: Act, input: RunReason) => Promise<Outcome<T>>,
) {
  const acts = actsOf(install);
  const acted = await formAct({
    sent: await readForm(request),
    form: "sheet",
    schema: reasonForm,
    serve: ({ commandId, reason }) => service(acts(commandId), { run, reason }),
    anchor: () => "",
  });
  return acted.done ? redirect(runOf(install.installId, run), 303) : data(acted.reply, { status: acted.status });
}
