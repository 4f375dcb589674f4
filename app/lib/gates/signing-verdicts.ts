/** May this member sign this now, or take a signature back? Gates and the release: two people, each over the list that they were shown. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemOf, nameOf, proofsOf } from "#app/lib/gates/facts";
import { needsRole, no, notFound, OK, refuse } from "#app/lib/gates/permit";
import { sameRelease } from "#app/lib/gates/release";
import type { ReleaseResult, Verdict } from "#app/lib/gates/result";
import { doersOf, sameCovers } from "#app/lib/gates/signing";
import type { Cover, SigningRole } from "#app/lib/gates/snapshot";

const subjectOf = (gate: string) => ({ subject: ["gate", gate] as ["gate", string], page: "gate" as const, id: gate });

/** @param a.covers what the signer was shown; null asks only whether they may sign now. */
export function maySign(e: Evaluation, a: { gate: string; member: string; as: SigningRole; covers: Cover[] | null }): Verdict {
  const gate = e.facts.gates.get(a.gate);
  const result = e.result.gates[a.gate];
  if (!gate || !result?.present) return notFound(e, "gate");
  const at = subjectOf(gate.id);
  if (!gate.policy.length)
    return no(e, {
      ...at,
      code: "order",
      title: "No signatures of its own",
      sentence: `${gate.name} is covered by the two signatures of the release.`,
      roles: ["lead"],
    });
  const place = result.holding.length;
  const wanted = (gate.policy[place] ?? gate.policy.at(-1)) as [SigningRole, ...SigningRole[]];
  // The place that this role would fill: the next one if it fits there, else the first that it fits at all.
  const fits = gate.policy.findIndex((roles, n) => n >= place && roles.includes(a.as));
  const mine = fits >= 0 ? fits : gate.policy.findIndex((roles) => roles.includes(a.as));
  // Who the person is comes before how the gate stands: a wrong role is told so whatever the gate's state.
  const countersigning = mine > 0 || (mine < 0 && a.as !== "builder");
  const asked = (gate.policy[mine] ?? (countersigning ? gate.policy.at(-1) : gate.policy[0])) as [SigningRole, ...SigningRole[]];
  const act = countersigning ? `countersign ${gate.name}` : `sign ${gate.name} first`;
  const role = needsRole(e, a.member, asked, act) ?? needsRole(e, a.member, mine < 0 ? asked : [a.as], act);
  if (role) return role;
  const doers = doersOf(e.facts, result.covers);
  if (countersigning && doers.has(a.member))
    return no(e, {
      ...at,
      code: "own-work",
      title: "Your own work",
      sentence: `You did or recorded part of ${gate.name} yourself. Whoever countersigns did none of it: another ${asked.join(" or ")} must.`,
      roles: wanted,
      barred: [...doers],
    });
  if (result.stands)
    return no(e, {
      ...at,
      code: "already",
      title: `${gate.name} stands signed`,
      sentence: "It has all its signatures. Nothing is left to sign.",
      roles: wanted,
    });
  if (!result.ready) return refuse(...result.blockers.filter((b) => b.code !== "not-signed"));
  if (!wanted.includes(a.as)) {
    const first = place === 0;
    return no(e, {
      ...at,
      code: "order",
      title: first ? "The builder signs first" : "Already signed by a builder",
      sentence: first
        ? `${gate.name} waits for the ${wanted.join(" or ")}'s signature; you countersign after it.`
        : `The first signature is there. ${gate.name} waits for the ${wanted.join(" or ")}.`,
      roles: wanted,
    });
  }
  const firstSigner = e.snapshot.signatures.find((s) => s.id === result.holding[0])?.by;
  if (place && firstSigner === a.member)
    return no(e, {
      ...at,
      code: "own-work",
      title: "You signed first",
      sentence: "Two people sign a gate: another person must countersign.",
      roles: wanted,
      barred: [a.member],
    });
  if (a.covers && !sameCovers(a.covers, result.covers))
    return no(e, {
      ...at,
      code: "stale",
      title: "The gate has changed",
      sentence: `${whatChanged(e, a.covers, result.covers)} since you opened this sheet. Read it again, then sign.`,
      roles: wanted,
    });
  return OK;
}

/** Who did what to the gate after the sheet was drawn: the newest such act. */
function whatChanged(e: Evaluation, shown: Cover[], today: Cover[]): string {
  const seen = new Map(shown.map((c) => [c.item, c]));
  const changed = today.filter((c) => seen.get(c.item)?.proof !== c.proof || seen.get(c.item)?.revision !== c.revision);
  const acts = changed.flatMap((c) => {
    const item = itemOf(e.facts, c.item);
    const last = proofsOf(e.facts, c.item).at(-1);
    if (!item || !last) return [];
    const act = last.withdrawn ? { ...last.withdrawn, did: "withdrew the proof of" } : { ...last, did: "proved" };
    return [{ at: act.recorded, words: `${nameOf(e.facts, act.by)} ${act.did} ${item.key} on ${e.facts.when(act.recorded)}` }];
  });
  const [newest] = acts.sort((a, b) => b.at - a.at);
  return newest?.words ?? "The items of this gate were changed";
}

/** @param a.covers what the signer was shown; null asks only whether they may sign now. */
export function maySignRelease(
  e: Evaluation,
  a: { member: string; as: "lead" | "inspector"; covers: ReleaseResult["covers"] | null },
): Verdict {
  const { release } = e.result;
  const at = { subject: ["release", e.snapshot.install.id] as ["release", string], page: "build-up" as const };
  const roles: ["lead", "inspector"] = ["lead", "inspector"];
  const role = needsRole(e, a.member, [a.as], `sign the release as ${a.as}`);
  if (role) return role;
  if (release.stands)
    return no(e, {
      ...at,
      code: "already",
      title: "The release stands signed",
      sentence: "It has both signatures. Nothing is left to sign.",
      roles,
    });
  if (release.state !== "ready" && release.state !== "half signed") return refuse(...release.blockers);
  const holding = e.snapshot.releaseSignatures.filter((s) => release.holding.includes(s.id));
  if (holding.some((s) => s.by === a.member))
    return no(e, {
      ...at,
      code: "own-work",
      title: "You signed already",
      sentence: "Two people sign the release: another person must sign beside you.",
      roles: [holding.some((s) => s.as === "lead") ? "inspector" : "lead"],
      barred: [a.member],
    });
  if (holding.some((s) => s.as === a.as))
    return no(e, {
      ...at,
      code: "order",
      title: "This signature is there",
      sentence: `The ${a.as}'s signature is there. The ${a.as === "lead" ? "inspector" : "lead"}'s is missing.`,
      roles: [a.as === "lead" ? "inspector" : "lead"],
    });
  if (a.covers && !sameRelease({ covers: a.covers }, release.covers))
    return no(e, {
      ...at,
      code: "stale",
      title: "The release has changed",
      sentence: "Something changed since you opened this sheet. Read it again, then sign.",
      roles,
    });
  return OK;
}

type Signed = { by: string; withdrawn: unknown } | undefined;

function mayTakeBack(e: Evaluation, signature: Signed, member: string): Verdict {
  if (!signature) return notFound(e, "signature");
  if (signature.withdrawn)
    return no(e, { code: "already", title: "Already withdrawn", sentence: "This signature was withdrawn before.", roles: ["inspector"] });
  return signature.by === member ? OK : (needsRole(e, member, ["inspector"], "withdraw another person's signature") ?? OK);
}

export const mayWithdrawSignature = (e: Evaluation, a: { signature: string; member: string }): Verdict =>
  mayTakeBack(
    e,
    e.snapshot.signatures.find((s) => s.id === a.signature),
    a.member,
  );
export const mayWithdrawReleaseSignature = (e: Evaluation, a: { signature: string; member: string }): Verdict =>
  mayTakeBack(
    e,
    e.snapshot.releaseSignatures.find((s) => s.id === a.signature),
    a.member,
  );
