// SCRUB: a run that was not started is given up. Its rung stays as it was and can be planned again.
import { runActs } from "#app/db/schema/runs";
import { mayScrub } from "#app/lib/gates/run-verdicts";
import type { RunReason } from "#app/lib/schemas/run";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function scrubRun(act: Act, input: RunReason): Promise<Outcome<{ scrub: string }>> {
  return perform({ ...act, kind: "scrub-run", input }, async (d) => {
    const { run, reason } = input;
    const refusal = refusalOf(mayScrub(d.e, { run, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record("lead", { type: "run-scrubbed", data: { run, reason } });
    await d.tx.insert(runActs).values({ ...base, runId: run, act: "scrub", detail: { reason } });
    return done({ scrub: base.id });
  });
}
