/**
 * May this member do this now? Acts on items and gates. Page, action and API ask the same function, so they say the same sentence.
 * Bad news (failing proof, withdrawal, opening) is taken from any member; good news only where the rules let it count.
 */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { numberMissing } from "#app/lib/gates/evidence";
import { currentProof, heldRole, isComputed, nameOf } from "#app/lib/gates/facts";
import { needsMember, needsRole, no, notFound, OK, refuse } from "#app/lib/gates/permit";
import type { BlockerCode, Verdict } from "#app/lib/gates/result";
import { doersOf, sameCovers } from "#app/lib/gates/signing";
import type { Cover, Proof, Role, SigningRole } from "#app/lib/gates/snapshot";

const subjectOf = (gate: string) => ({ subject: ["gate", gate] as ["gate", string], page: "gate" as const, id: gate });

/** @param a.told the maker was told that a new proof of a standing item in a signed gate makes its signatures lapse. */
export function mayProve(
  e: Evaluation,
  a: { item: string; member: string; as: Role; state: Proof["state"]; late: boolean; told?: boolean },
): Verdict {
  const item = e.facts.items.get(a.item);
  const gate = item && e.facts.gates.get(item.gate);
  if (!item || !gate) return notFound(e, "item");
  const at = subjectOf(gate.id);
  if (isComputed(item))
    return no(e, {
      ...at,
      code: "order",
      title: "Worked out, not ticked",
      sentence: "This item is computed from the record; nobody ticks it.",
      roles: ["lead"],
    });
  if (a.state === "failed") return needsMember(e, a.member) ?? OK;
  const role = needsRole(e, a.member, ["builder", "inspector"], "prove an item");
  if (role) return role;
  if (a.as !== "builder" && a.as !== "inspector")
    return no(e, {
      ...at,
      code: "not-your-role",
      title: "Not in this role",
      sentence: "Prove it as builder or as inspector.",
      roles: ["builder", "inspector"],
    });
  if (!heldRole(e.facts, a.member, a.as, e.at)) return needsRole(e, a.member, [a.as], "prove it so") ?? OK;
  if (a.state === "na")
    return item.killer && gate.eachRun
      ? no(e, {
          ...at,
          code: "na-not-allowed",
          title: "Asked before each run",
          sentence: "This item guards a life: it cannot be marked not applicable. Do it.",
          roles: ["builder"],
        })
      : OK;
  for (const part of item.parts) {
    const missing = numberMissing(e.facts, part);
    if (missing)
      return no(e, {
        ...at,
        code: "number-missing",
        title: "A number is missing",
        sentence: `Enter the maker's number first, with where it was read: ${missing}.`,
        roles: ["builder", "lead", "inspector"],
      });
  }
  const result = e.result.gates[gate.id];
  if (item.guarded) {
    if (a.late)
      return no(e, {
        ...at,
        code: "order",
        title: "Not as a late entry",
        sentence: "This item is guarded: it is proved when it is done, not afterwards. Do it again.",
        roles: ["builder"],
      });
    const waits = result?.blockers.filter((b) => b.code === "gate-waits") ?? [];
    if (waits.length) return refuse(...waits.map((b) => ({ ...b, sentence: `${b.sentence} Until then this item is guarded.` })));
  }
  if (result?.stands && e.result.items[item.id]?.stands && !a.told)
    return no(e, {
      ...at,
      code: "already",
      title: `${gate.name} stands signed`,
      sentence: "A new proof makes its signatures lapse. Say that you know, and it is taken.",
      roles: ["builder"],
    });
  return OK;
}

export function mayWithdrawProof(e: Evaluation, a: { proof: string; member: string }): Verdict {
  const proof = e.snapshot.proofs.find((p) => p.id === a.proof);
  if (!proof) return notFound(e, "proof");
  const outsider = needsMember(e, a.member);
  if (outsider) return outsider;
  return proof.withdrawn
    ? no(e, {
        code: "already",
        title: "Already withdrawn",
        sentence: `${nameOf(e.facts, proof.withdrawn.by)} withdrew it on ${e.facts.when(proof.withdrawn.recorded)}.`,
        roles: ["builder"],
      })
    : OK;
}

const ownWork = (e: Evaluation, proof: Proof, member: string, act: string, roles: [Role, ...Role[]]): Verdict | null =>
  proof.did === member || proof.by === member
    ? no(e, {
        code: "own-work",
        title: "Your own work",
        sentence: `You did or recorded this yourself: another person must ${act} it.`,
        roles,
        barred: [proof.did, proof.by],
      })
    : null;

function present(e: Evaluation, id: string): { proof: Proof; verdict: null } | { proof: null; verdict: Verdict } {
  const proof = e.snapshot.proofs.find((p) => p.id === id);
  if (!proof || !e.facts.items.has(proof.item)) return { proof: null, verdict: notFound(e, "proof") };
  if (currentProof(e.facts, proof.item)?.id !== id)
    return {
      proof: null,
      verdict: no(e, {
        code: "stale",
        title: "A newer proof is there",
        sentence: "This proof was replaced or withdrawn since you opened the page. Look at the item again.",
        roles: ["builder"],
      }),
    };
  return { proof, verdict: null };
}

export function mayConfirm(e: Evaluation, a: { proof: string; member: string; as: Role }): Verdict {
  const found = present(e, a.proof);
  if (found.verdict) return found.verdict;
  const roles: [Role, ...Role[]] = ["builder", "inspector", "lead"];
  const role = needsRole(e, a.member, roles, "confirm as the second person");
  if (role) return role;
  if (a.as === "crew")
    return no(e, { code: "not-your-role", title: "Not in this role", sentence: "Confirm as builder, inspector or lead.", roles });
  const held = needsRole(e, a.member, [a.as], "confirm so");
  if (held) return held;
  const own = ownWork(e, found.proof, a.member, "look and confirm", roles);
  if (own) return own;
  const item = e.facts.items.get(found.proof.item);
  if (found.proof.state !== "done" || !(item?.secondEyes || found.proof.late))
    return no(e, { code: "order", title: "No second person asked", sentence: "This proof needs no confirmation.", roles });
  if (!e.result.items[found.proof.item]?.blockers.some((b) => b.code === "needs-second-eyes"))
    return no(e, {
      code: "already",
      title: "Already confirmed, or not yet right",
      sentence: e.result.items[found.proof.item]?.blockers[0]?.sentence ?? "A second person has confirmed it already.",
      roles,
    });
  return OK;
}

export function mayAccept(e: Evaluation, a: { proof: string; member: string }): Verdict {
  const found = present(e, a.proof);
  if (found.verdict) return found.verdict;
  const role = needsRole(e, a.member, ["inspector"], "accept a reason for not applicable");
  if (role) return role;
  const own = ownWork(e, found.proof, a.member, "accept", ["inspector"]);
  if (own) return own;
  return found.proof.state === "na"
    ? OK
    : no(e, { code: "order", title: "Nothing to accept", sentence: "This proof is not marked not applicable.", roles: ["inspector"] });
}

const KEEPABLE: BlockerCode[] = ["system-opened-since", "after-gate", "follows", "needs-second-eyes"];

export function mayKeep(e: Evaluation, a: { proof: string; member: string }): Verdict {
  const found = present(e, a.proof);
  if (found.verdict) return found.verdict;
  const role = needsRole(e, a.member, ["inspector"], "keep a lapsed proof");
  if (role) return role;
  const own = ownWork(e, found.proof, a.member, "keep", ["inspector"]);
  if (own) return own;
  const item = e.facts.items.get(found.proof.item);
  if (item && e.facts.gates.get(item.gate)?.eachRun)
    return no(e, {
      code: "order",
      title: "Not before each run",
      sentence: "The walk-round is done anew before each run; its proofs cannot be kept.",
      roles: ["builder"],
    });
  const result = e.result.items[found.proof.item];
  if (result?.state !== "lapsed")
    return no(e, { code: "order", title: "Not lapsed", sentence: "Only a lapsed proof can be kept.", roles: ["inspector"] });
  const other = result.blockers.find((b) => !KEEPABLE.includes(b.code));
  if (other)
    return no(e, {
      code: "order",
      title: "A keep does not help here",
      sentence: `${other.sentence} Age, tools and changed items cannot be kept, nor a system that is still open.`,
      roles: ["builder"],
    });
  return OK;
}

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
  const act = place ? `countersign ${gate.name}` : `sign ${gate.name} first`;
  const wanted = (gate.policy[place] ?? gate.policy.at(-1)) as [SigningRole, ...SigningRole[]];
  // Who the person is comes before how the gate stands: a wrong role is told so whatever the gate's state.
  const countersigning = a.as !== "builder";
  const asked = countersigning
    ? (gate.policy.at(-1) as [SigningRole, ...SigningRole[]])
    : (gate.policy[0] as [SigningRole, ...SigningRole[]]);
  const role = needsRole(e, a.member, asked, countersigning ? `countersign ${gate.name}` : `sign ${gate.name} first`);
  if (role) return role;
  const held = needsRole(e, a.member, [a.as], countersigning ? `countersign ${gate.name}` : act);
  if (held) return held;
  const doers = doersOf(e.facts, result.covers);
  if (countersigning && doers.has(a.member))
    return no(e, {
      ...at,
      code: "own-work",
      title: "Your own work",
      sentence: `You did or recorded part of ${gate.name} yourself. Whoever countersigns did none of it: another ${a.as} must.`,
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
      sentence: "A proof was added or changed since you opened this sheet. Read it again, then sign.",
      roles: wanted,
    });
  return OK;
}

export function mayWithdrawSignature(e: Evaluation, a: { signature: string; member: string }): Verdict {
  const signature = e.snapshot.signatures.find((s) => s.id === a.signature);
  if (!signature) return notFound(e, "signature");
  if (signature.withdrawn)
    return no(e, { code: "already", title: "Already withdrawn", sentence: "This signature was withdrawn before.", roles: ["inspector"] });
  return signature.by === a.member ? OK : (needsRole(e, a.member, ["inspector"], "withdraw another person's signature") ?? OK);
}

/** The lead shapes the board freely until the first proof. */
export function mayShape(e: Evaluation, a: { member: string }): Verdict {
  return (
    needsRole(e, a.member, ["lead"], "change the board") ??
    (e.snapshot.proofs.length
      ? no(e, {
          code: "order",
          title: "Work has begun",
          sentence: "After the first proof, what asks for less waits for an inspector's acceptance.",
          roles: ["inspector"],
        })
      : OK)
  );
}

export const mayEnterNumber = (e: Evaluation, a: { item: string; member: string }): Verdict =>
  e.facts.items.has(a.item)
    ? (needsRole(e, a.member, ["builder", "lead", "inspector"], "enter a maker's number") ?? OK)
    : notFound(e, "item");
export const mayConfirmValue = (e: Evaluation, a: { member: string }): Verdict =>
  needsRole(e, a.member, ["lead", "builder", "inspector"], "enter ratings and limits") ?? OK;
export const mayOpen = (e: Evaluation, a: { member: string }): Verdict => needsMember(e, a.member) ?? OK;
export const mayCloseOpening = (e: Evaluation, a: { member: string }): Verdict =>
  needsRole(e, a.member, ["builder", "inspector"], "close an opening") ?? OK;
export const mayEditCrib = (e: Evaluation, a: { member: string }): Verdict =>
  needsRole(e, a.member, ["builder", "lead", "inspector"], "keep the crib") ?? OK;
export const mayInvite = (e: Evaluation, a: { member: string }): Verdict => needsRole(e, a.member, ["lead"], "invite people") ?? OK;
export const mayRaise = (e: Evaluation, a: { member: string }): Verdict => needsMember(e, a.member) ?? OK;
