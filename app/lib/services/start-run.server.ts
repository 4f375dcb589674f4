// Start uses GO up and makes the run's post-run gate. A start of an engine that never fired is taken back.
import { runActs } from "#app/db/schema/runs";
import { mayReport, mayStart } from "#app/lib/gates/run-verdicts";
import type { RunRef } from "#app/lib/schemas/run";
import { writeOpening } from "#app/lib/services/open-system.server";
import { done, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";
import { hidePostRunGate, makePostRunGate } from "#app/lib/services/post-run-gate.server";

export function startRun(act: Act, input: RunRef): Promise<Outcome<{ start: string; gate: string }>> {
  return perform({ ...act, kind: "start-run", input }, async (d) => {
    const refusal = refusalOf(mayStart(d.e, { run: input.run, member: d.member.id }));
    if (refusal) return refusal;
    const run = d.e.snapshot.runs.find((r) => r.id === input.run);
    if (!run) return notFound("That run");
    const { gate, made } = await makePostRunGate(d, run);
    const base = await d.record(roleOf(d.member, "lead", "crew"), {
      type: "run-started",
      data: { run: run.id, unstarted: false, gate, made: JSON.parse(JSON.stringify(made)) },
    });
    await d.tx.insert(runActs).values({ ...base, runId: run.id, act: "start", detail: { unstarted: false } });
    return done({ start: base.id, gate });
  });
}

/** The engine never fired: the run is held, and the try is recorded as an opening of the bay. */
export function takeBackStart(act: Act, input: RunRef): Promise<Outcome<{ run: string }>> {
  return perform({ ...act, kind: "take-back-start", input }, async (d) => {
    const refusal = refusalOf(mayReport(d.e, { run: input.run, member: d.member.id, report: "take-back" }));
    if (refusal) return refusal;
    const as = roleOf(d.member, "lead", "crew");
    const gate = await hidePostRunGate(d, input.run);
    const base = await d.record(as, { type: "start-taken-back", data: { run: input.run, gate } });
    await d.tx.insert(runActs).values({ ...base, runId: input.run, act: "take-back", detail: {} });
    const label = d.e.snapshot.runs.find((r) => r.id === input.run)?.label ?? "";
    await writeOpening(d, as, { systems: ["bay"], reason: `Run ${label}: cranked, did not fire`, closed: true });
    return done({ run: input.run });
  });
}
