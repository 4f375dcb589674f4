// The signer or an inspector takes a signature back. It stays in the record; what it signed stands no longer.
import { releaseSignatureWithdrawals, signatureWithdrawals } from "#app/db/schema/signatures";
import { mayWithdrawReleaseSignature, mayWithdrawSignature } from "#app/lib/gates/signing-verdicts";
import type { WithdrawSignature } from "#app/lib/schemas/signing";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function withdrawSignature(act: Act, input: WithdrawSignature): Promise<Outcome<{ withdrawal: string }>> {
  return perform({ ...act, kind: "withdraw-signature", input }, async (d) => {
    const { signature, reason } = input;
    const refusal = refusalOf(mayWithdrawSignature(d.e, { signature, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record(roleOf(d.member, "inspector", "builder", "lead"), {
      type: "signature-withdrawn",
      data: { signature, reason },
    });
    await d.tx.insert(signatureWithdrawals).values({ ...base, signatureId: signature, reason });
    return done({ withdrawal: base.id });
  });
}

export function withdrawReleaseSignature(act: Act, input: WithdrawSignature): Promise<Outcome<{ withdrawal: string }>> {
  return perform({ ...act, kind: "withdraw-release-signature", input }, async (d) => {
    const { signature, reason } = input;
    const refusal = refusalOf(mayWithdrawReleaseSignature(d.e, { signature, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record(roleOf(d.member, "inspector", "lead"), {
      type: "release-signature-withdrawn",
      data: { signature, reason },
    });
    await d.tx.insert(releaseSignatureWithdrawals).values({ ...base, signatureId: signature, reason });
    return done({ withdrawal: base.id });
  });
}
