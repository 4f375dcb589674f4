/**
 * Gates, items, proofs and signatures of a snapshot, each tied to what it belongs to, so that no rule has to look them up by id:
 * one look-up for each record, none after that. No judgement here beyond order and currency.
 */
import type { ItemResult } from "#app/lib/gates/result";
import type { Gate, Item, Proof, Signature, Snapshot } from "#app/lib/gates/snapshot";

export interface Edges {
  needs: string[];
  after: string[];
  /** Union of both, without doubles. */
  all: string[];
}

/** A visible item of a present gate with all that is recorded of it, so that no rule has to look it up by its id. */
export interface ItemFacts {
  item: Item;
  of: GateFacts;
  /** Nobody ticks it: it is worked out. Known once it is judged: looking at its parts before would be one more walk through memory. */
  computed: boolean;
  /** The proof that happened last, withdrawn or not; null = none. */
  newest: Proof | null;
  /** Those before it, by (counts, seq). */
  earlier: readonly Proof[];
  /** The proof that speaks for it now: the newest, unless it is withdrawn. An older one never comes back. */
  current: Proof | null;
  /** Visible steps that this item ends. */
  ends: readonly ItemFacts[];
  /** What this evaluation made of it; null until it is judged. */
  result: ItemResult | null;
}

/** A present gate: not hidden, with at least one visible item. */
export interface GateFacts {
  gate: Gate;
  items: ItemFacts[];
  /** By seq. */
  signatures: readonly Signature[];
  edges: Edges;
}

export interface WorkFacts {
  /** Present gates only: not hidden, with at least one item. */
  gates: Map<string, Gate>;
  /** The same gates with their items, signatures and edges. */
  gateFacts: Map<string, GateFacts>;
  /** Visible items of present gates. */
  itemFacts: Map<string, ItemFacts>;
  /** Proofs of items that are not on the board: a hidden item may still have counted, or have ended a step. By (counts, seq). */
  hiddenProofs: Map<string, Proof[]>;
}

export const group = <T>(rows: T[], key: (row: T) => string): Map<string, T[]> => {
  const map = new Map<string, T[]>();
  for (const row of rows) {
    const k = key(row);
    const list = map.get(k);
    if (list) list.push(row);
    else map.set(k, [row]);
  }
  return map;
};

export function isComputed(item: Item): boolean {
  for (const part of item.parts) if (part.kind === "computed") return true;
  return false;
}

/** Ids of the present gates that an edge leads to: an absent gate passes it on to what it needs or comes after itself. */
function passThrough(targets: string[], present: Map<string, Gate>, every: Map<string, Gate>): string[] {
  if (targets.length === 0 || (targets.length === 1 && present.has(targets[0] as string))) return targets;
  const found = new Set<string>();
  const seen = new Set<string>();
  const stack = [...targets].reverse();
  while (stack.length) {
    const id = stack.pop() as string;
    if (seen.has(id)) continue;
    seen.add(id);
    if (present.has(id)) found.add(id);
    else {
      const gate = every.get(id);
      if (gate) stack.push(...gate.after, ...gate.needs);
    }
  }
  return [...found];
}

const inOrderOfHappening = (a: Proof, b: Proof): number => a.counts - b.counts || a.seq - b.seq;

export const NO_PROOFS: readonly Proof[] = [];
const NO_STEPS: readonly ItemFacts[] = [];
export const NO_SIGNATURES: readonly Signature[] = [];
const NO_EDGES: Edges = { needs: [], after: [], all: [] };

/** By (counts, seq). */
export const allProofs = ({ newest, earlier }: ItemFacts): readonly Proof[] => (newest ? [...earlier, newest] : NO_PROOFS);

/** Gates, items, proofs and signatures, each tied to what it belongs to: one look-up for each record, none after that. */
export function gatherWork(snapshot: Snapshot, every: Map<string, Gate>): WorkFacts {
  const gateFacts = new Map<string, GateFacts>();
  for (const gate of snapshot.gates)
    if (!gate.hidden) gateFacts.set(gate.id, { gate, items: [], signatures: NO_SIGNATURES, edges: NO_EDGES });

  const itemFacts = new Map<string, ItemFacts>();
  const steps: ItemFacts[] = [];
  let of: GateFacts | undefined;
  for (const item of snapshot.items) {
    if (item.hidden) continue;
    // The items of a gate mostly come one after the other.
    if (of?.gate.id !== item.gate) of = gateFacts.get(item.gate);
    if (!of) continue;
    const facts: ItemFacts = {
      item,
      of,
      computed: false,
      newest: null,
      earlier: NO_PROOFS,
      current: null,
      ends: NO_STEPS,
      result: null,
    };
    of.items.push(facts);
    itemFacts.set(item.id, facts);
    if (item.step?.endedBy) steps.push(facts);
  }

  const gates = new Map<string, Gate>();
  for (const [id, facts] of gateFacts)
    if (facts.items.length) gates.set(id, facts.gate);
    else gateFacts.delete(id);
  for (const facts of gateFacts.values()) {
    if (!facts.gate.needs.length && !facts.gate.after.length) continue;
    const needs = passThrough(facts.gate.needs, gates, every);
    const after = passThrough(facts.gate.after, gates, every);
    facts.edges = { needs, after, all: after.length ? [...new Set([...needs, ...after])] : needs };
  }

  const several: ItemFacts[] = [];
  const hidden: Proof[] = [];
  for (const given of snapshot.proofs) {
    const proof = given.counts > given.recorded ? { ...given, counts: given.recorded } : given;
    const facts = itemFacts.get(proof.item);
    if (!facts) {
      hidden.push(proof);
      continue;
    }
    if (facts.newest === null) {
      facts.newest = proof;
      facts.current = proof.withdrawn ? null : proof;
    } else if (facts.earlier === NO_PROOFS) {
      facts.earlier = [proof];
      several.push(facts);
    } else (facts.earlier as Proof[]).push(proof);
  }
  for (const facts of several) {
    const list = facts.earlier as Proof[];
    list.push(facts.newest as Proof);
    list.sort(inOrderOfHappening);
    const newest = list.pop() as Proof;
    facts.newest = newest;
    facts.current = newest.withdrawn ? null : newest;
  }
  for (const step of steps) {
    const ender = itemFacts.get(step.item.step?.endedBy as string);
    if (ender) ender.ends = [...ender.ends, step];
  }
  for (const [gate, signatures] of group(snapshot.signatures, (s) => s.gate)) {
    const facts = gateFacts.get(gate);
    if (facts) facts.signatures = signatures.sort((a, b) => a.seq - b.seq);
  }
  const hiddenProofs = group(hidden, (p) => p.item);
  for (const list of hiddenProofs.values()) list.sort(inOrderOfHappening);
  return { gates, gateFacts, itemFacts, hiddenProofs };
}
