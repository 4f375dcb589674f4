// What is reported of a started run: its end and its outcome; and an engine run that nobody started here, recorded afterwards.
import { runActs, runs } from "#app/db/schema/runs";
import { mayRaise } from "#app/lib/gates/happening-verdicts";
import { mayReport } from "#app/lib/gates/run-verdicts";
import { newId } from "#app/lib/ids";
import type { EndRun, RungReason, StateOutcome } from "#app/lib/schemas/run";
import { done, invalid, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";
import { makePostRunGate } from "#app/lib/services/post-run-gate.server";

export function endRun(act: Act, input: EndRun): Promise<Outcome<{ run: string; at: number }>> {
  return perform({ ...act, kind: "end-run", input }, async (d) => {
    const refusal = refusalOf(mayReport(d.e, { run: input.run, member: d.member.id, report: "ended" }));
    if (refusal) return refusal;
    const start = d.e.facts.runs.get(input.run)?.start?.recorded ?? 0;
    const at = input.at ?? d.now;
    if (at > d.now || at < start) return invalid("The run ended after its start and before now. Enter the time again.");
    await writeEnd(d, input.run, at);
    return done({ run: input.run, at });
  });
}

async function writeEnd(d: Doing, run: string, at: number): Promise<void> {
  const base = await d.record(roleOf(d.member, "lead", "crew"), { type: "run-ended", data: { run, at } });
  await d.tx.insert(runActs).values({ ...base, runId: run, act: "ended", detail: { at } });
}

export function stateOutcome(act: Act, input: StateOutcome): Promise<Outcome<{ run: string }>> {
  return perform({ ...act, kind: "state-outcome", input }, async (d) => {
    const refusal = refusalOf(mayReport(d.e, { run: input.run, member: d.member.id, report: "outcome", outcome: input.outcome }));
    if (refusal) return refusal;
    await writeOutcome(d, input);
    return done({ run: input.run });
  });
}

async function writeOutcome(d: Doing, { run, outcome }: StateOutcome): Promise<void> {
  const base = await d.record(roleOf(d.member, "lead", "crew"), { type: "outcome-stated", data: { run, outcome } });
  await d.tx.insert(runActs).values({ ...base, runId: run, act: "outcome", detail: { outcome } });
}

/** The engine ran and nobody had started it here: bad news from any member, as a run cut short. It has to be reviewed like any other. */
export function recordUnstartedRun(act: Act, input: RungReason): Promise<Outcome<{ run: string }>> {
  return perform({ ...act, kind: "record-unstarted-run", input }, async (d) => {
    const refusal = refusalOf(mayRaise(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const rung = d.e.facts.rungs.find((r) => r.key === input.rung);
    if (!rung) return notFound("That rung");
    const before = d.e.snapshot.runs.filter((r) => r.label.startsWith(`${rung.key}x`)).length;
    const run = {
      id: newId(),
      installId: d.installId,
      rung: rung.key,
      label: `${rung.key}x${before ? before + 1 : ""}`,
      place: "",
      plannedStart: null,
    };
    await d.tx.insert(runs).values(run);
    const { gate, made } = await makePostRunGate(d, { ...run, plans: [], acks: [], answers: [], winds: [], acts: [], exceedances: [] });
    const base = await d.record(roleOf(d.member, "lead", "crew"), {
      type: "run-started",
      data: { run: run.id, unstarted: true, gate, made: JSON.parse(JSON.stringify({ run, reason: input.reason, made })) },
    });
    await d.tx.insert(runActs).values({ ...base, runId: run.id, act: "start", detail: { unstarted: true } });
    await writeEnd(d, run.id, d.now);
    await writeOutcome(d, { run: run.id, outcome: "cut short" });
    return done({ run: run.id });
  });
}
