// An inspector accepts the reason why an item does not apply.
import { acceptances } from "#app/db/schema/proofs";
import { mayAccept } from "#app/lib/gates/verdicts";
import type { AcceptNotApplicable } from "#app/lib/schemas/proof";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function acceptNotApplicable(act: Act, input: AcceptNotApplicable): Promise<Outcome<{ acceptance: string }>> {
  return perform({ ...act, kind: "accept-not-applicable", input }, async (d) => {
    const { proof, reason } = input;
    const refusal = refusalOf(mayAccept(d.e, { proof, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record("inspector", { type: "not-applicable-accepted", data: { proof, reason } });
    await d.tx.insert(acceptances).values({ ...base, proofId: proof, reason });
    return done({ acceptance: base.id });
  });
}
