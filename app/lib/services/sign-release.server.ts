// The release's two signatures, a lead's and an inspector's, two people. Each covers the release gate's proofs and the other
// gates' signatures; a later opening, finding or loose end makes it lapse by itself.
import { releaseSignatures } from "#app/db/schema/signatures";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { maySignRelease } from "#app/lib/gates/signing-verdicts";
import { hashOf } from "#app/lib/record/chain";
import { meaningOfRelease, shownRelease } from "#app/lib/record/shown";
import type { SignRelease } from "#app/lib/schemas/signing";
import { pinRefusal } from "#app/lib/services/check-pin.server";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export async function signRelease(act: Act, { pin, ...input }: SignRelease): Promise<Outcome<{ signature: string }>> {
  const wrongPin = await pinRefusal(act, pin);
  if (wrongPin) return wrongPin;
  return perform({ ...act, kind: "sign-release", input }, async (d) => {
    const { as, covers } = input;
    const refusal = refusalOf(maySignRelease(d.e, { member: d.member.id, as, covers }));
    if (refusal) return refusal;
    const shownText = shownRelease(d.e, as);
    const row = { covers, meaning: meaningOfRelease(as), rulesVersion: RULES_VERSION, shownHash: hashOf(shownText) };
    const base = await d.record(as, { type: "release-signed", data: row });
    await d.tx.insert(releaseSignatures).values({ ...base, ...row, shownText });
    return done({ signature: base.id });
  });
}
