// The second person who saw this very proof says so.
import { confirmations } from "#app/db/schema/proofs";
import { mayConfirm } from "#app/lib/gates/verdicts";
import type { ConfirmProof } from "#app/lib/schemas/proof";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function confirmProof(act: Act, input: ConfirmProof): Promise<Outcome<{ confirmation: string }>> {
  return perform({ ...act, kind: "confirm-proof", input }, async (d) => {
    const { proof, as } = input;
    const refusal = refusalOf(mayConfirm(d.e, { proof, member: d.member.id, as }));
    if (refusal) return refusal;
    const base = await d.record(as, { type: "proof-confirmed", data: { proof } });
    await d.tx.insert(confirmations).values({ ...base, proofId: proof });
    return done({ confirmation: base.id });
  });
}
