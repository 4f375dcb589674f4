// Takes a proof back. The proof stays in the record; the item is to do again, and no older proof comes back.
import { proofWithdrawals } from "#app/db/schema/proofs";
import { mayWithdrawProof } from "#app/lib/gates/verdicts";
import type { WithdrawProof } from "#app/lib/schemas/proof";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function withdrawProof(act: Act, input: WithdrawProof): Promise<Outcome<{ withdrawal: string }>> {
  return perform({ ...act, kind: "withdraw-proof", input }, async (d) => {
    const { proof, reason } = input;
    const refusal = refusalOf(mayWithdrawProof(d.e, { proof, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record(roleOf(d.member, "builder", "inspector", "lead"), { type: "proof-withdrawn", data: { proof, reason } });
    await d.tx.insert(proofWithdrawals).values({ ...base, proofId: proof, reason });
    return done({ withdrawal: base.id });
  });
}
