// The release's two signatures, a lead's and an inspector's, two people. Each covers the release gate's proofs and the other
// gates' signatures; a later opening, finding or loose end makes it lapse by itself.
import { releaseSignatures } from "#app/db/schema/signatures";
import { heldRole } from "#app/lib/gates/facts";
import { needsRole } from "#app/lib/gates/permit";
import { sameRelease } from "#app/lib/gates/release";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { hashOf } from "#app/lib/record/chain";
import { meaningOfRelease, shownRelease } from "#app/lib/record/shown";
import type { SignRelease } from "#app/lib/schemas/signing";
import { pinRefusal } from "#app/lib/services/check-pin.server";
import { done, type Outcome, type Refusal, refusalOf, refuse, refuseBy } from "#app/lib/services/outcome";
import { stale } from "#app/lib/services/parts.server";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

export async function signRelease(act: Act, { pin, ...input }: SignRelease): Promise<Outcome<{ signature: string }>> {
  const wrongPin = await pinRefusal(act, pin);
  if (wrongPin) return wrongPin;
  return perform({ ...act, kind: "sign-release", input }, async (d) => {
    const refusal = forbidden(d, input);
    if (refusal) return refusal;
    const { as, covers } = input;
    const shownText = shownRelease(d.e, as);
    const row = { covers, meaning: meaningOfRelease(as), rulesVersion: RULES_VERSION, shownHash: hashOf(shownText) };
    const base = await d.record(as, { type: "release-signed", data: row });
    await d.tx.insert(releaseSignatures).values({ ...base, ...row, shownText });
    return done({ signature: base.id });
  });
}

function forbidden(d: Doing, { as, covers }: Omit<SignRelease, "pin">): Refusal | null {
  const { release } = d.e.result;
  if (!heldRole(d.e.facts, d.member.id, as, d.now))
    return refusalOf(needsRole(d.e, d.member.id, [as], "sign the release so") ?? { ok: true });
  if (release.stands) return refuse(409, "already", "The release stands signed. Nothing is left to sign.");
  if (release.state !== "half signed" && !release.blockers.every((b) => b.code === "release-signatures")) return refuseBy(release.blockers);
  const holding = d.e.snapshot.releaseSignatures.filter((s) => release.holding.includes(s.id));
  if (holding.some((s) => s.by === d.member.id))
    return refuse(403, "own-work", "You signed the release already. Another person signs beside you.", release.blockers);
  if (holding.some((s) => s.as === as))
    return refuse(409, "order", `The ${as}'s signature is there. The other one is missing.`, release.blockers);
  return sameRelease({ covers }, release.covers) ? null : stale("Something changed since you opened this sheet. Read it again, then sign.");
}
