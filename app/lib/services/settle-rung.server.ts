// An inspector accepts that a rung is left out; lead or inspector sets one back whose proof is no longer so.
import { rungEvents } from "#app/db/schema/rungs";
import { mayLeaveOut, maySetBack } from "#app/lib/gates/happening-verdicts";
import type { RungReason } from "#app/lib/schemas/run";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function acceptLeftOutRung(act: Act, input: RungReason): Promise<Outcome<{ rung: string }>> {
  return perform({ ...act, kind: "accept-left-out-rung", input }, async (d) => {
    const refusal = refusalOf(mayLeaveOut(d.e, { rung: input.rung, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record("inspector", { type: "rung-left-out", data: input });
    await d.tx.insert(rungEvents).values({ ...base, ...input, kind: "left-out" });
    return done({ rung: input.rung });
  });
}

export function setBackRung(act: Act, input: RungReason): Promise<Outcome<{ rung: string }>> {
  return perform({ ...act, kind: "set-back-rung", input }, async (d) => {
    const refusal = refusalOf(maySetBack(d.e, { rung: input.rung, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record(roleOf(d.member, "lead", "inspector"), { type: "rung-set-back", data: input });
    await d.tx.insert(rungEvents).values({ ...base, ...input, kind: "set-back" });
    return done({ rung: input.rung });
  });
}
