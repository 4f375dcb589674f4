/**
 * May this member do this now? Acts on items and their proofs. Page, action and API ask the same function, so they say the same
 * sentence. Bad news (failing proof, withdrawal) is taken from any member; good news only where the rules let it count.
 */

import type { Evaluation } from "#app/lib/gates/evaluate";
import { numberMissing } from "#app/lib/gates/evidence";
import { currentProof, heldRole, itemOf, nameOf, proofsOf } from "#app/lib/gates/facts";
import { needsMember, needsRole, no, notFound, OK, refuse } from "#app/lib/gates/permit";
import type { BlockerCode, Verdict } from "#app/lib/gates/result";
import type { Proof, Role } from "#app/lib/gates/snapshot";
import { isComputed } from "#app/lib/gates/work-facts";

const subjectOf = (gate: string) => ({ subject: ["gate", gate] as ["gate", string], page: "gate" as const, id: gate });

/**
 * @param a.seen id of the proof that the maker saw, null = none: somebody else may have been faster. Left out: not asked.
 * @param a.told the maker was told that a new proof of a standing item in a signed gate makes its signatures lapse.
 */
export function mayProve(
  e: Evaluation,
  a: { item: string; member: string; as: Role; state: Proof["state"]; late: boolean; told?: boolean; seen?: string | null },
): Verdict {
  const item = itemOf(e.facts, a.item);
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
  const faster = somebodyFaster(e, item.id, a.seen);
  if (faster) return faster;
  const signed = e.result.gates[gate.id]?.stands && e.result.items[item.id]?.stands;
  const toldFirst: Verdict | null =
    signed && !a.told
      ? no(e, {
          ...at,
          code: "already",
          title: `${gate.name} stands signed`,
          sentence: "A new proof makes its signatures lapse. Say that you know, and it is taken.",
          roles: ["builder"],
        })
      : null;
  if (a.state === "na")
    return item.killer && gate.eachRun
      ? no(e, {
          ...at,
          code: "na-not-allowed",
          title: "Asked before each run",
          sentence: "This item guards a life: it cannot be marked not applicable. Do it.",
          roles: ["builder"],
        })
      : (toldFirst ?? OK);
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
  return toldFirst ?? OK;
}

/** Two tablets at one item: the second one is told who was first, and looks before it writes over it. */
function somebodyFaster(e: Evaluation, item: string, seen: string | null | undefined): Verdict | null {
  const current = currentProof(e.facts, item);
  if (seen === undefined || (current?.id ?? null) === seen) return null;
  const last = proofsOf(e.facts, item).at(-1);
  const what = current
    ? `${nameOf(e.facts, current.by)} recorded ${current.state === "failed" ? "that it is not right" : "it"} on ${e.facts.when(current.recorded)}`
    : `${nameOf(e.facts, last?.withdrawn?.by ?? "")} took its proof back${last?.withdrawn ? ` on ${e.facts.when(last.withdrawn.recorded)}` : ""}`;
  return no(e, {
    subject: ["item", item],
    page: "gate",
    id: itemOf(e.facts, item)?.gate ?? null,
    code: "stale",
    title: "Somebody was faster",
    sentence: `${what}, after this page was opened. Look at it first; if yours is still wanted, record it again.`,
    roles: ["builder", "inspector"],
  });
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
  if (!proof || !itemOf(e.facts, proof.item)) return { proof: null, verdict: notFound(e, "proof") };
  if (currentProof(e.facts, proof.item)?.id !== id)
    return {
      proof: null,
      verdict: no(e, {
        code: "stale",
        title: "A newer proof is there",
        sentence: `${changedBy(e, proof)} since you opened the page. Look at the item again.`,
        roles: ["builder"],
      }),
    };
  return { proof, verdict: null };
}

/** Who replaced or withdrew a proof, and when. */
function changedBy(e: Evaluation, proof: Proof): string {
  if (proof.withdrawn) return `${nameOf(e.facts, proof.withdrawn.by)} withdrew this proof on ${e.facts.when(proof.withdrawn.recorded)}`;
  const last = proofsOf(e.facts, proof.item).at(-1);
  return last ? `${nameOf(e.facts, last.by)} recorded a newer proof on ${e.facts.when(last.recorded)}` : "This proof was replaced";
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
  const item = itemOf(e.facts, found.proof.item);
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

/** What a keep puts right: an opening since, or a gate worked on since that this one comes after. */
const KEPT: BlockerCode[] = ["system-opened-since", "after-gate"];
/** What may stand beside it, for it is put right by another act. */
const BESIDE: BlockerCode[] = ["follows", "needs-second-eyes"];

export function mayKeep(e: Evaluation, a: { proof: string; member: string }): Verdict {
  const found = present(e, a.proof);
  if (found.verdict) return found.verdict;
  const role = needsRole(e, a.member, ["inspector"], "keep a lapsed proof");
  if (role) return role;
  const own = ownWork(e, found.proof, a.member, "keep", ["inspector"]);
  if (own) return own;
  const item = itemOf(e.facts, found.proof.item);
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
  const other =
    result.blockers.find((b) => !KEPT.includes(b.code) && !BESIDE.includes(b.code)) ??
    (result.blockers.some((b) => KEPT.includes(b.code)) ? undefined : result.blockers[0]);
  if (other)
    return no(e, {
      code: "order",
      title: "A keep does not help here",
      sentence: `${other.sentence} Age, tools and changed items cannot be kept, nor a system that is still open.`,
      roles: ["builder"],
    });
  return OK;
}
