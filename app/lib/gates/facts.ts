/**
 * The snapshot, indexed once: what every rule looks up. No judgement here beyond order, currency and who held which role.
 * Cost is linear in the number of records (sorting aside).
 */
import { type RunFacts, runFacts } from "#app/lib/gates/run-facts";
import type {
  Acceptance,
  Confirmation,
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
import { soundSnapshot } from "#app/lib/gates/sound";
import { when } from "#app/lib/gates/when";
import { allProofs, gatherWork, group, NO_PROOFS, NO_SIGNATURES, type WorkFacts } from "#app/lib/gates/work-facts";
import type { Value, ValueDef, ValueKey } from "#app/lib/template/types";

export interface Facts extends WorkFacts {
  snapshot: Snapshot;
  at: Instant;
  members: Map<string, Member>;
  confirmationsOf: Map<string, Confirmation[]>;
  acceptancesOf: Map<string, Acceptance[]>;
  keepsOf: Map<string, Keep[]>;
  openings: Map<SystemKey, { open: Opening | null; lastClosed: Opening | null }>;
  /** Checks by the instant they were made. */
  tools: Map<string, Tool>;
  values: Map<ValueKey, ValueDef & Value>;
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

/** @returns every look-up the rules need for the snapshot at `at`. Does not change its input. */
export function gatherFacts(given: Snapshot, at: Instant): Facts {
  const snapshot = soundSnapshot(given);
  const every = new Map(snapshot.gates.map((g) => [g.id, g]));
  const work = gatherWork(snapshot, every);

  const openings: Facts["openings"] = new Map();
  for (const opening of snapshot.openings.filter(disturbs))
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

  const runs = new Map(snapshot.runs.map((r) => [r.id, runFacts(r)]));
  const rungs = [...snapshot.rungs].sort((a, b) => a.order - b.order);
  const settledBy = new Map<string, string | null>();
  for (const rung of rungs) {
    const settling = [...runs.values()]
      .filter((r) => r.run.rung === rung.key && r.completedEnd !== null && rung.rpm !== null && (r.plan?.rpm ?? 0) >= rung.rpm)
      .filter((r) => rung.setBack.every((s) => (r.completedEnd as number) > s.recorded))
      .sort((a, b) => (b.completedEnd as number) - (a.completedEnd as number) || (a.run.id < b.run.id ? -1 : 1))[0];
    if (settling) settledBy.set(rung.key, settling.run.id);
    else if (rung.leftOut && rung.setBack.every((s) => s.recorded < (rung.leftOut?.recorded ?? 0))) settledBy.set(rung.key, null);
  }
  const nextRung = rungs.find((r) => !settledBy.has(r.key)) ?? null;
  const newest = (list: (number | null)[]) => list.reduce<number | null>((m, x) => (x !== null && (m === null || x > m) ? x : m), null);

  const said = new Map<Instant, string>();
  return {
    snapshot,
    at,
    ...work,
    openings,
    runs,
    rungs,
    settledBy,
    nextRung,
    members: new Map(snapshot.members.map((m) => [m.id, m])),
    confirmationsOf: group(snapshot.confirmations, (c) => c.proof),
    acceptancesOf: group(snapshot.acceptances, (c) => c.proof),
    keepsOf: group(snapshot.keeps, (c) => c.proof),
    tools: new Map(snapshot.tools.map((t) => [t.id, { ...t, checks: [...t.checks].sort((a, b) => a.at - b.at) }])),
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

/** In a sound snapshot. False where a second person confirmed that nothing was disturbed: it is no opening then. */
export const disturbs = (opening: Opening): boolean => !opening.undisturbed?.confirmed;

const earlier = (a: Opening | null, b: Opening): Opening => (!a || b.opened < a.opened || (b.opened === a.opened && b.seq < a.seq) ? b : a);

export const itemOf = (facts: Facts, id: string): Item | undefined => facts.itemFacts.get(id)?.item;

/** Visible items of all present gates. */
export const allItems = (facts: Facts): Item[] => [...facts.itemFacts.values()].map((i) => i.item);

export const itemsIn = (facts: Facts, gate: string): Item[] => facts.gateFacts.get(gate)?.items.map((i) => i.item) ?? [];

/** By (counts, seq). */
export function proofsOf(facts: Facts, item: string): readonly Proof[] {
  const own = facts.itemFacts.get(item);
  return own ? allProofs(own) : (facts.hiddenProofs.get(item) ?? NO_PROOFS);
}

/** By seq. */
export const signaturesOf = (facts: Facts, gate: string): readonly Signature[] => facts.gateFacts.get(gate)?.signatures ?? NO_SIGNATURES;

/** The proof that speaks for an item now: the one that happened last, unless it is withdrawn. An older one never comes back. */
export function currentProof(facts: Facts, item: string): Proof | null {
  const last = proofsOf(facts, item).at(-1);
  return last && !last.withdrawn ? last : null;
}

/** Whether the member held the role at that instant. */
export function heldRole(facts: Facts, member: string, role: Role, at: Instant): boolean {
  return facts.members.get(member)?.roles.some((r) => r.role === role && r.from <= at && (r.to === null || at < r.to)) ?? false;
}

export const heldAnyRole = (facts: Facts, member: string, at: Instant): boolean =>
  facts.members.get(member)?.roles.some((r) => r.from <= at && (r.to === null || at < r.to)) ?? false;

export const nameOf = (facts: Facts, member: string): string => facts.members.get(member)?.name ?? "a former member";
