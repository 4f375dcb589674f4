// An inspector states, with a reason, that a lapsed proof is still true.
import { keeps } from "#app/db/schema/proofs";
import { mayKeep } from "#app/lib/gates/verdicts";
import type { KeepProof } from "#app/lib/schemas/proof";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function keepProof(act: Act, input: KeepProof): Promise<Outcome<{ keep: string }>> {
  return perform({ ...act, kind: "keep-proof", input }, async (d) => {
    const { proof, reason } = input;
    const refusal = refusalOf(mayKeep(d.e, { proof, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record("inspector", { type: "proof-kept", data: { proof, reason } });
    await d.tx.insert(keeps).values({ ...base, proofId: proof, reason });
    return done({ keep: base.id });
  });
}
