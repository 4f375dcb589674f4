/**
 * The snapshot, indexed once: what every rule looks up. No judgement here beyond order, currency and who held which role.
 * Cost is linear in the number of records (sorting aside).
 */
import { type RunFacts, runFacts } from "#app/lib/gates/run-facts";
import type {
  Acceptance,
  Confirmation,
  Gate,
  Instant,
  Item,
  Keep,
  Member,
  Opening,
  Proof,
  Role,
  Rung,
  Signature,
  Snapshot,
  SystemKey,
  Tool,
} from "#app/lib/gates/snapshot";
import { when } from "#app/lib/gates/when";
import type { Value, ValueDef, ValueKey } from "#app/lib/template/types";

export interface Edges {
  needs: string[];
  after: string[];
  /** Union of both, without doubles. */
  all: string[];
}

export interface Facts {
  snapshot: Snapshot;
  at: Instant;
  members: Map<string, Member>;
  /** Present gates only: not hidden, with at least one item. */
  gates: Map<string, Gate>;
  /** Visible items of present gates. */
  items: Map<string, Item>;
  itemsOf: Map<string, Item[]>;
  /** By (counts, seq). */
  proofsOf: Map<string, Proof[]>;
  confirmationsOf: Map<string, Confirmation[]>;
  acceptancesOf: Map<string, Acceptance[]>;
  keepsOf: Map<string, Keep[]>;
  /** By seq. */
  signaturesOf: Map<string, Signature[]>;
  openings: Map<SystemKey, { open: Opening | null; lastClosed: Opening | null }>;
  tools: Map<string, Tool>;
  values: Map<ValueKey, ValueDef & Value>;
  /** Visible steps that an item ends. */
  endsSteps: Map<string, Item[]>;
  edges: Map<string, Edges>;
  /** By order. */
  rungs: Rung[];
  runs: Map<string, RunFacts>;
  settledBy: Map<string, string | null>;
  /** Key of the first rung that is neither settled nor left out. */
  nextRung: Rung | null;
  allSettled: boolean;
  /** Newest end of any run, and of a completed one. */
  newestEnd: Instant | null;
  newestCompletedEnd: Instant | null;
  when: (instant: Instant) => string;
}

const group = <T>(rows: T[], key: (row: T) => string): Map<string, T[]> => {
  const map = new Map<string, T[]>();
  for (const row of rows) {
    const k = key(row);
    const list = map.get(k);
    if (list) list.push(row);
    else map.set(k, [row]);
  }
  return map;
};

/** Ids of the present gates that an edge leads to: an absent gate passes it on to what it needs or comes after itself. */
function passThrough(targets: string[], present: Map<string, Gate>, every: Map<string, Gate>): string[] {
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

const compare = (a: number, b: number): number => (a < b ? -1 : a > b ? 1 : 0);
const joined = (m: Member): Instant => m.roles.reduce((first, r) => Math.min(first, r.from), Number.POSITIVE_INFINITY);

/** Records in the order in which they were made, so that the order in which they arrive cannot show in any answer. */
function inSequence(s: Snapshot): Snapshot {
  const bySeq = <T extends { seq: number }>(rows: T[]) => [...rows].sort((a, b) => a.seq - b.seq);
  const byId = <T extends { id: string }>(rows: T[]) => [...rows].sort((a, b) => (a.id < b.id ? -1 : 1));
  return {
    ...s,
    members: [...s.members].sort((a, b) => compare(joined(a), joined(b)) || (a.id < b.id ? -1 : 1)),
    extinguishers: byId(s.extinguishers),
    runs: byId(s.runs),
    findings: bySeq(s.findings),
    looseEnds: bySeq(s.looseEnds),
    openings: bySeq(s.openings),
    values: [...s.values].sort((a, b) => Number(b.key === "redline") - Number(a.key === "redline") || (a.key < b.key ? -1 : 1)),
  };
}

/** @returns every look-up the rules need for the snapshot at `at`. Does not change its input. */
export function gatherFacts(given: Snapshot, at: Instant): Facts {
  const snapshot = inSequence(given);
  const every = new Map(snapshot.gates.map((g) => [g.id, g]));
  const itemsOf = group(
    snapshot.items.filter((i) => !i.hidden && every.get(i.gate)?.hidden === false),
    (i) => i.gate,
  );
  const gates = new Map(snapshot.gates.filter((g) => itemsOf.has(g.id)).map((g) => [g.id, g]));
  const items = new Map<string, Item>();
  for (const list of itemsOf.values()) for (const item of list) items.set(item.id, item);

  const proofsOf = group(snapshot.proofs, (p) => p.item);
  for (const list of proofsOf.values()) if (list.length > 1) list.sort((a, b) => a.counts - b.counts || a.seq - b.seq);
  const signaturesOf = group(snapshot.signatures, (s) => s.gate);
  for (const list of signaturesOf.values()) list.sort((a, b) => a.seq - b.seq);

  const openings: Facts["openings"] = new Map();
  for (const opening of snapshot.openings)
    for (const system of new Set<SystemKey>([...opening.systems, "bay"])) {
      const slot = openings.get(system) ?? { open: null, lastClosed: null };
      openings.set(system, slot);
      if (opening.closed === null) slot.open = earlier(slot.open, opening);
      else if (
        !slot.lastClosed ||
        opening.closed > (slot.lastClosed.closed as number) ||
        (opening.closed === slot.lastClosed.closed && opening.seq > slot.lastClosed.seq)
      )
        slot.lastClosed = opening;
    }

  const endsSteps = new Map<string, Item[]>();
  for (const item of items.values())
    if (item.step?.endedBy) endsSteps.set(item.step.endedBy, [...(endsSteps.get(item.step.endedBy) ?? []), item]);

  const edges = new Map<string, Edges>();
  for (const gate of gates.values()) {
    const needs = passThrough(gate.needs, gates, every);
    const after = passThrough(gate.after, gates, every);
    edges.set(gate.id, { needs, after, all: [...new Set([...needs, ...after])] });
  }

  const runs = new Map(snapshot.runs.map((r) => [r.id, runFacts(r)]));
  const rungs = [...snapshot.rungs].sort((a, b) => a.order - b.order);
  const settledBy = new Map<string, string | null>();
  for (const rung of rungs) {
    const settling = [...runs.values()]
      .filter((r) => r.run.rung === rung.key && r.completedEnd !== null && rung.rpm !== null && (r.plan?.rpm ?? 0) >= rung.rpm)
      .filter((r) => rung.setBack.every((s) => (r.completedEnd as number) > s.recorded))
      .sort((a, b) => (b.completedEnd as number) - (a.completedEnd as number) || (a.run.id < b.run.id ? -1 : 1))[0];
    if (settling) settledBy.set(rung.key, settling.run.id);
    else if (rung.leftOut) settledBy.set(rung.key, null);
  }
  const nextRung = rungs.find((r) => !settledBy.has(r.key)) ?? null;
  const newest = (list: (number | null)[]) => list.reduce<number | null>((m, x) => (x !== null && (m === null || x > m) ? x : m), null);

  const said = new Map<Instant, string>();
  return {
    snapshot,
    at,
    gates,
    items,
    itemsOf,
    proofsOf,
    signaturesOf,
    openings,
    endsSteps,
    edges,
    runs,
    rungs,
    settledBy,
    nextRung,
    members: new Map(snapshot.members.map((m) => [m.id, m])),
    confirmationsOf: group(snapshot.confirmations, (c) => c.proof),
    acceptancesOf: group(snapshot.acceptances, (c) => c.proof),
    keepsOf: group(snapshot.keeps, (c) => c.proof),
    tools: new Map(snapshot.tools.map((t) => [t.id, t])),
    values: new Map(snapshot.values.map((v) => [v.key, v])),
    allSettled: rungs.length > 0 && nextRung === null,
    newestEnd: newest([...runs.values()].map((r) => r.endedAt)),
    newestCompletedEnd: newest([...runs.values()].map((r) => r.completedEnd)),
    when: (instant) => {
      const minute = Math.floor(instant / 60_000);
      const text = said.get(minute) ?? when(instant, snapshot.install.timeZone);
      said.set(minute, text);
      return text;
    },
  };
}

const earlier = (a: Opening | null, b: Opening): Opening => (!a || b.opened < a.opened || (b.opened === a.opened && b.seq < a.seq) ? b : a);

/** The proof that speaks for an item now: the one that happened last, unless it is withdrawn. An older one never comes back. */
export function currentProof(facts: Facts, item: string): Proof | null {
  const last = facts.proofsOf.get(item)?.at(-1);
  return last && !last.withdrawn ? last : null;
}

export function isComputed(item: Item): boolean {
  for (const part of item.parts) if (part.kind === "computed") return true;
  return false;
}

/** Whether the member held the role at that instant. */
export function heldRole(facts: Facts, member: string, role: Role, at: Instant): boolean {
  return facts.members.get(member)?.roles.some((r) => r.role === role && r.from <= at && (r.to === null || at < r.to)) ?? false;
}

export const heldAnyRole = (facts: Facts, member: string, at: Instant): boolean =>
  facts.members.get(member)?.roles.some((r) => r.from <= at && (r.to === null || at < r.to)) ?? false;

export const nameOf = (facts: Facts, member: string): string => facts.members.get(member)?.name ?? "a former member";
