// The snapshot's build-up: rungs and runs with everything recorded about each. One query a table.
import { and, asc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { groupBy } from "#app/db/queries/group-by";
import { recorded } from "#app/db/queries/snapshot-records.server";
import { exceedanceAnswers, exceedances } from "#app/db/schema/exceedances";
import { rungEvents, rungs } from "#app/db/schema/rungs";
import { acks, answers, planVersions, runActs, runs, winds } from "#app/db/schema/runs";
import type { RunAct, Snapshot } from "#app/lib/gates/snapshot";

export async function loadRuns(reader: Reader, installId: string): Promise<Pick<Snapshot, "rungs" | "runs">> {
  const [rungRows, rungEventRows, runRows, plans, acked, answered, blew, acts, over, overAnswers] = await Promise.all([
    reader
      .select()
      .from(rungs)
      .where(and(eq(rungs.installId, installId), eq(rungs.hidden, false)))
      .orderBy(asc(rungs.position)),
    reader.select().from(rungEvents).where(eq(rungEvents.installId, installId)).orderBy(asc(rungEvents.seq)),
    reader.select().from(runs).where(eq(runs.installId, installId)).orderBy(asc(runs.label)),
    reader.select().from(planVersions).where(eq(planVersions.installId, installId)).orderBy(asc(planVersions.seq)),
    reader.select().from(acks).where(eq(acks.installId, installId)).orderBy(asc(acks.seq)),
    reader.select().from(answers).where(eq(answers.installId, installId)).orderBy(asc(answers.seq)),
    reader.select().from(winds).where(eq(winds.installId, installId)).orderBy(asc(winds.seq)),
    reader.select().from(runActs).where(eq(runActs.installId, installId)).orderBy(asc(runActs.seq)),
    reader.select().from(exceedances).where(eq(exceedances.installId, installId)).orderBy(asc(exceedances.seq)),
    reader.select().from(exceedanceAnswers).where(eq(exceedanceAnswers.installId, installId)),
  ]);
  const byRun = <T extends { runId: string }>(rows: T[]) => groupBy(rows, (r) => r.runId);
  const [plansOf, acksOf, answersOf, windsOf, actsOf, overOf] = [
    byRun(plans),
    byRun(acked),
    byRun(answered),
    byRun(blew),
    byRun(acts),
    byRun(over),
  ];
  const answerOf = new Map(overAnswers.map((a) => [a.exceedanceId, a.id]));
  return {
    rungs: rungRows.map(({ installId: _, position, ...rung }) => {
      const events = rungEventRows.filter((e) => e.rung === rung.key);
      const leftOut = events.filter((e) => e.kind === "left-out").at(-1);
      return {
        ...rung,
        order: position,
        leftOut: leftOut ? { ...recorded(leftOut), reason: leftOut.reason } : null,
        setBack: events.filter((e) => e.kind === "set-back").map(recorded),
      };
    }),
    runs: runRows.map(({ id, rung, label, plannedStart }) => ({
      id,
      rung,
      label,
      plannedStart,
      plans: (plansOf.get(id) ?? []).map(({ version, recorded: at, rpm, card, positions, windLimit, gustLimit, requiredGates }) => ({
        version,
        recorded: at,
        rpm,
        card,
        positions,
        windLimit,
        gustLimit,
        requiredGates,
      })),
      acks: (acksOf.get(id) ?? []).map((a) => ({ ...recorded(a), version: a.version })),
      answers: (answersOf.get(id) ?? []).map((a) => ({
        ...recorded(a),
        version: a.version,
        answer: a.answer,
        reason: a.reason,
        queueEmpty: a.queueEmpty,
      })),
      winds: (windsOf.get(id) ?? []).map((w) => ({ ...recorded(w), speed: w.speed, gust: w.gust, tail: w.tail, dayEnds: w.dayEnds })),
      acts: (actsOf.get(id) ?? []).map((a) => ({ ...recorded(a), act: a.act, ...a.detail }) as RunAct),
      exceedances: (overOf.get(id) ?? []).map((x) => ({ id: x.id, sentence: x.sentence, answered: answerOf.get(x.id) ?? null })),
    })),
  };
}
