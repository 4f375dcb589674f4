/** Signatures: what they cover, whether they hold, and which of them fill the places of a gate's policy. */
import { type Facts, heldRole, proofsOf } from "#app/lib/gates/facts";
import type { Cover, Gate, Signature } from "#app/lib/gates/snapshot";
import type { GateFacts } from "#app/lib/gates/work-facts";

/** What a signer would cover now: each item but computed ones, its revision and its current proof, standing or not. */
export function coversNow(gate: GateFacts): Cover[] {
  const covers: Cover[] = [];
  for (const { item, computed, current } of gate.items)
    if (!computed) covers.push({ item: item.id, revision: item.revision, proof: current?.id ?? null });
  return covers;
}

const equal = (a: Cover, b: Cover): boolean => a.item === b.item && a.revision === b.revision && a.proof === b.proof;

/** Same items, revisions and proofs, in any order. */
export function sameCovers(a: Cover[], b: Cover[]): boolean {
  if (a.length !== b.length) return false;
  let n = 0;
  while (n < a.length && equal(a[n] as Cover, b[n] as Cover)) n++;
  if (n === a.length) return true;
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
    const proof = proofsOf(facts, cover.item).find((p) => p.id === cover.proof);
    if (proof) people.add(proof.did).add(proof.by);
  }
  return people;
}

/** Whether the signer did or recorded a proof that the signature covers. */
type DidWork = (signature: Signature) => boolean;

/**
 * The signatures that fill the policy's places, in order: each later than the one before, by another person,
 * and from the second place on by somebody who did none of the work covered.
 * @param signatures by seq; @returns as many as fit, from the first place on.
 */
export function fillPolicy(facts: Facts, gate: Gate, signatures: Signature[], didWork: DidWork): Signature[] {
  const filled: Signature[] = [];
  for (const signature of signatures) {
    const place = gate.policy[filled.length];
    if (!place) break;
    if (!place.includes(signature.as) || !heldRole(facts, signature.by, signature.as, signature.recorded)) continue;
    if (filled.length && (filled.some((f) => f.by === signature.by) || didWork(signature))) continue;
    filled.push(signature);
  }
  return filled;
}

/**
 * The signatures that hold and fill the policy's places, in its order: they cover today's list at the gate's present revision,
 * and nobody withdrew them.
 */
export function holding(facts: Facts, of: GateFacts, covers: Cover[]): Signature[] {
  const { gate, items, signatures } = of;
  const hold: Signature[] = [];
  for (const s of signatures) if (!s.withdrawn && s.gateRevision === gate.revision && sameCovers(s.covers, covers)) hold.push(s);
  // What they cover is what stands there now, so the people are found without a search for each proof.
  const didWork: DidWork = ({ by }) => items.some(({ current }) => current !== null && (current.did === by || current.by === by));
  return fillPolicy(facts, gate, hold, didWork);
}

/** Whether the whole policy was signed at some time, over one and the same list. */
export function wasSigned(facts: Facts, { gate, signatures }: GateFacts): boolean {
  if (!gate.policy.length) return false;
  return signatures.some((one) => {
    const alike = signatures.filter((s) => s.gateRevision === one.gateRevision && sameCovers(s.covers, one.covers));
    return fillPolicy(facts, gate, alike, (s) => doersOf(facts, s.covers).has(s.by)).length === gate.policy.length;
  });
}
