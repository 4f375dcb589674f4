// SCRUB: a run that was not started is given up, and the crew is told. Its rung stays as it was and can be planned again.
import { runActs } from "#app/db/schema/runs";
import { mayScrub } from "#app/lib/gates/run-verdicts";
import type { RunReason } from "#app/lib/schemas/run";
import { notifyCrew } from "#app/lib/services/notify-crew.server";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function scrubRun(act: Act, input: RunReason): Promise<Outcome<{ scrub: string }>> {
  return perform({ ...act, kind: "scrub-run", input }, async (d) => {
    const { run, reason } = input;
    const refusal = refusalOf(mayScrub(d.e, { run, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record("lead", { type: "run-scrubbed", data: { run, reason } });
    await d.tx.insert(runActs).values({ ...base, runId: run, act: "scrub", detail: { reason } });
    await notifyCrew(d.tx, {
      kind: "scrub",
      actId: base.id,
      e: d.e,
      runId: run,
      by: d.member.id,
      reason,
      auto: false,
      goEnds: null,
      stops: [],
      head: d.writer.head(),
    });
    return done({ scrub: base.id });
  });
}
