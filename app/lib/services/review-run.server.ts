// The review of an ended run: its log read, or an inspector's word why there is none; each exceedance answered.
import { exceedanceAnswers, exceedances } from "#app/db/schema/exceedances";
import { runActs } from "#app/db/schema/runs";
import { mayAnswerExceedance, mayReadLog } from "#app/lib/gates/happening-verdicts";
import type { AnswerExceedance, RecordLogRead, RunReason } from "#app/lib/schemas/run";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

/** The log was read; what it shows outside the limits is listed, each to be answered. */
export function recordLogRead(act: Act, input: RecordLogRead): Promise<Outcome<{ exceedances: string[] }>> {
  return perform({ ...act, kind: "record-log-read", input }, async (d) => {
    const { run } = input;
    const refusal = refusalOf(mayReadLog(d.e, { run, member: d.member.id, missing: false }));
    if (refusal) return refusal;
    const as = roleOf(d.member, "lead", "builder", "inspector");
    const base = await d.record(as, { type: "log-read", data: { run } });
    await d.tx.insert(runActs).values({ ...base, runId: run, act: "log-read", detail: {} });
    const ids: string[] = [];
    for (const sentence of input.exceedances) {
      const row = await d.record(as, { type: "exceedance", data: { run, sentence } });
      await d.tx.insert(exceedances).values({ ...row, runId: run, sentence });
      ids.push(row.id);
    }
    return done({ exceedances: ids });
  });
}

export function acceptNoLog(act: Act, input: RunReason): Promise<Outcome<{ run: string }>> {
  return perform({ ...act, kind: "accept-no-log", input }, async (d) => {
    const { run, reason } = input;
    const refusal = refusalOf(mayReadLog(d.e, { run, member: d.member.id, missing: true }));
    if (refusal) return refusal;
    const base = await d.record("inspector", { type: "log-missing-accepted", data: { run, reason } });
    await d.tx.insert(runActs).values({ ...base, runId: run, act: "no-log", detail: { reason } });
    return done({ run });
  });
}

export function answerExceedance(act: Act, input: AnswerExceedance): Promise<Outcome<{ answer: string }>> {
  return perform({ ...act, kind: "answer-exceedance", input }, async (d) => {
    const { exceedance, finding, words } = input;
    const refusal = refusalOf(mayAnswerExceedance(d.e, { exceedance, finding, member: d.member.id }));
    if (refusal) return refusal;
    const as = finding === null ? "inspector" : roleOf(d.member, "builder", "inspector", "lead");
    const base = await d.record(as, { type: "exceedance-answered", data: { exceedance, finding, words } });
    await d.tx.insert(exceedanceAnswers).values({ ...base, exceedanceId: exceedance, findingId: finding, words });
    return done({ answer: base.id });
  });
}
