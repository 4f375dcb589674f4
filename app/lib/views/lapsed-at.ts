/**
 * Since when a lapsed gate has been so, where its causes are of a kind that has an instant: an opening, a validity that ran out, a
 * proof withdrawn or found not right. Pure; instants in ms since 1970 UTC.
 */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { disturbs } from "#app/lib/gates/facts";
import { validUntil } from "#app/lib/gates/proofs";
import type { Gate, Instant, Item } from "#app/lib/gates/snapshot";

/** @returns the first instant at which one of its items ceased to stand; null where one of the causes has none. */
export function lapsedAt(e: Evaluation, gate: Gate): Instant | null {
  const since = e.snapshot.items
    .filter((i) => i.gate === gate.id && e.result.items[i.id]?.stands === false)
    .map((i) => itemSince(e, i, gate));
  const known = since.filter((at) => at !== null);
  return known.length && known.length === since.length ? Math.min(...known) : null;
}

function itemSince(e: Evaluation, item: Item, gate: Gate): Instant | null {
  const result = e.result.items[item.id];
  const proofs = e.snapshot.proofs.filter((p) => p.item === item.id);
  const proof = proofs.find((p) => p.id === result?.proof);
  switch (result?.blockers[0]?.code) {
    case "item-withdrawn": {
      const withdrawn = proofs.flatMap((p) => p.withdrawn?.recorded ?? []);
      return withdrawn.length ? Math.max(...withdrawn) : null;
    }
    case "item-failed":
      return proof?.counts ?? null;
    case "ran-out":
      return proof ? validUntil(e.facts, item, gate, proof) : null;
    case "system-open":
    case "system-opened-since": {
      const after = e.facts.snapshot.openings.filter(
        (o) => disturbs(o) && proof && o.opened > proof.counts && o.systems.some((s) => item.systems.includes(s)),
      );
      return after.length ? Math.min(...after.map((o) => o.opened)) : null;
    }
    default:
      return null;
  }
}
