/** Signatures: what they cover, whether they hold, and which of them fill the places of a gate's policy. */
import { type Facts, heldRole, isComputed } from "#app/lib/gates/facts";
import type { ItemResult } from "#app/lib/gates/result";
import type { Cover, Gate, Item, Signature } from "#app/lib/gates/snapshot";

/** What a signer would cover now: each item but computed ones, its revision and its current proof, standing or not. */
export function coversNow(items: Item[], results: ItemResult[]): Cover[] {
  const covers: Cover[] = [];
  for (let n = 0; n < items.length; n++) {
    const item = items[n] as Item;
    if (!isComputed(item)) covers.push({ item: item.id, revision: item.revision, proof: (results[n] as ItemResult).proof });
  }
  return covers;
}

const equal = (a: Cover, b: Cover): boolean => a.item === b.item && a.revision === b.revision && a.proof === b.proof;

/** Same items, revisions and proofs, in any order. */
export function sameCovers(a: Cover[], b: Cover[]): boolean {
  if (a.length !== b.length) return false;
  if (a.every((cover, n) => equal(cover, b[n] as Cover))) return true;
  const byItem = new Map(b.map((cover) => [cover.item, cover]));
  return (
    new Set(a.map((cover) => cover.item)).size === a.length &&
    a.every((cover) => equal(cover, byItem.get(cover.item) ?? { item: "", revision: 0, proof: null }))
  );
}

/** People who did or recorded a proof that the list covers: none of them may countersign it. */
export function doersOf(facts: Facts, covers: Cover[]): Set<string> {
  const people = new Set<string>();
  for (const cover of covers) {
    if (!cover.proof) continue;
    const proof = facts.proofsOf.get(cover.item)?.find((p) => p.id === cover.proof);
    if (proof) people.add(proof.did).add(proof.by);
  }
  return people;
}

/**
 * The signatures that fill the policy's places, in order: each later than the one before, by another person,
 * and from the second place on by somebody who did none of the work covered.
 * @param signatures by seq; @returns as many as fit, from the first place on.
 */
export function fillPolicy(facts: Facts, gate: Gate, signatures: Signature[]): Signature[] {
  const filled: Signature[] = [];
  for (const signature of signatures) {
    const place = gate.policy[filled.length];
    if (!place) break;
    if (!place.includes(signature.as) || !heldRole(facts, signature.by, signature.as, signature.recorded)) continue;
    if (filled.length && (filled.some((f) => f.by === signature.by) || doersOf(facts, signature.covers).has(signature.by))) continue;
    filled.push(signature);
  }
  return filled;
}

/** Signatures that hold: they cover today's list at the gate's present revision, and nobody withdrew them. */
export function holding(facts: Facts, gate: Gate, covers: Cover[]): Signature[] {
  return (facts.signaturesOf.get(gate.id) ?? []).filter(
    (s) => !s.withdrawn && s.gateRevision === gate.revision && sameCovers(s.covers, covers),
  );
}

/** Whether the whole policy was signed at some time, over one and the same list. */
export function wasSigned(facts: Facts, gate: Gate): boolean {
  if (!gate.policy.length) return false;
  const all = facts.signaturesOf.get(gate.id) ?? [];
  return all.some((one) => {
    const alike = all.filter((s) => s.gateRevision === one.gateRevision && sameCovers(s.covers, one.covers));
    return fillPolicy(facts, gate, alike).length === gate.policy.length;
  });
}
