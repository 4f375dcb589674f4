/**
 * The rules for gates' items and proofs once more, line by line, for the second evaluator. No caches: every question is answered
 * from the snapshot by plain loops; `path` guards against circles only.
 */
import type { Gate, Instant, Item, Proof, Role, Snapshot } from "#app/lib/gates/snapshot";
import { computedHolds } from "./naive-computed";
import { evidenceMeets, proofsInOrder } from "./naive-evidence";
import {
  endOf,
  heldRole,
  isCompleted,
  isComputed,
  isSettled,
  itemsOf,
  nextRequired,
  presentGates,
  settlingRuns,
  throughAbsent,
} from "./naive-facts";

export type NaiveItem = { stands: boolean; state: "to do" | "done" | "not applicable" | "second eyes" | "lapsed" };

const HOUR = 3_600_000;
const shares = (a: Item, b: Item): boolean => a.systems.some((system) => b.systems.includes(system));

// ---------------------------------------------------------------- rules 2 to 5

function toolStands(s: Snapshot, id: string, used: Instant): boolean {
  const checks = s.tools.find((t) => t.id === id)?.checks ?? [];
  const before = checks.filter((c) => c.at <= used).map((c) => c.at);
  if (before.length === 0) return false;
  const newest = checks.filter((c) => c.at === Math.max(...before));
  if (!newest.every((c) => c.good && (c.due === null || used < c.due))) return false;
  const goodBetween = (bad: Instant) => checks.some((g) => g.good && used <= g.at && g.at < bad);
  return !checks.some((bad) => !bad.good && used <= bad.at && (!goodBetween(bad.at) || (bad.since !== null && bad.since <= used)));
}

function anotherPerson(s: Snapshot, proof: Proof, record: { by: string; as: Role; recorded: Instant }, roles: Role[]): boolean {
  const another = record.by !== proof.did && record.by !== proof.by;
  return another && roles.includes(record.as) && heldRole(s, record.by, [record.as], record.recorded);
}
const isConfirmed = (s: Snapshot, proof: Proof): boolean =>
  s.confirmations.some((c) => c.proof === proof.id && anotherPerson(s, proof, c, ["builder", "lead", "inspector"]));
const isAccepted = (s: Snapshot, proof: Proof): boolean =>
  s.acceptances.some((a) => a.proof === proof.id && anotherPerson(s, proof, a, ["inspector"]));

function naIsAllowed(s: Snapshot, item: Item): boolean {
  return !(item.killer && s.gates.find((g) => g.id === item.gate)?.eachRun);
}

/** Rules 1 to 5 of one proof (2 and 5 where not applicable): what is asked of a step. */
function meetsOneToFive(s: Snapshot, item: Item, proof: Proof): boolean {
  if (proof.state === "na") return naIsAllowed(s, item) && proof.revision === item.revision && isAccepted(s, proof);
  return (
    evidenceMeets(s, item, proof) &&
    proof.revision === item.revision &&
    proof.tools.every((t) => toolStands(s, t, proof.counts)) &&
    (!(item.secondEyes || proof.late) || isConfirmed(s, proof))
  );
}

// ---------------------------------------------------------------- rules 6 to 8

/** For openings, and as the later side of *after*, a kept proof counts from the newest keep. */
function keptInstant(s: Snapshot, gate: Gate, proof: Proof): Instant {
  if (gate.eachRun) return proof.counts;
  const keeps = s.keeps.filter((k) => k.proof === proof.id && anotherPerson(s, proof, k, ["inspector"]));
  return Math.max(proof.counts, ...keeps.map((k) => k.recorded));
}

function openingsLeaveIt(s: Snapshot, item: Item, from: Instant): boolean {
  const touching = s.openings.filter((o) => [...o.systems, "bay"].some((system) => (item.systems as string[]).includes(system)));
  return touching.every((o) => o.closed !== null && o.closed < from);
}

function isValidStill(s: Snapshot, gate: Gate, item: Item, proof: Proof, at: Instant): boolean {
  if (gate.requiredBy.kind !== "runs" && s.rungs.every((r) => isSettled(s, r.key))) return true;
  const validity = item.validity ?? gate.validity;
  if (!validity) return true;
  const ends = s.runs.filter(isCompleted).map(endOf);
  const later = ends.filter((e): e is Instant => e !== null && e > proof.counts);
  if (validity.afterRunHours !== null && later.length > 0) return at < Math.max(...later) + validity.afterRunHours * HOUR;
  return validity.hours === null || at < proof.counts + validity.hours * HOUR;
}

function restsOnStep(s: Snapshot, step: Item, proof: Proof): boolean {
  const older = proofsInOrder(s, step.id).filter((p) => p.counts < proof.counts);
  const rest = older.at(-1);
  if (!rest || rest.withdrawn || !meetsOneToFive(s, step, rest)) return false;
  if (rest.state === "na") return true;
  if (proof.counts - rest.counts > s.settings.stepWindow) return false;
  // Between the two, in the order in which things happened.
  const ending = s.proofs.filter((e) => e.item === step.step?.endedBy);
  const inOrder = [...ending, rest, proof].sort((a, b) => a.counts - b.counts || a.seq - b.seq);
  return inOrder.indexOf(proof) - inOrder.indexOf(rest) === 1;
}

function followsHold(s: Snapshot, item: Item, proof: Proof, at: Instant, path: string[]): boolean {
  for (const id of item.follows) {
    const other = s.items.find((i) => i.id === id && !i.hidden);
    if (!other || s.gates.find((g) => g.id === other.gate)?.hidden) continue;
    if (other.step) {
      if (!restsOnStep(s, other, proof)) return false;
      continue;
    }
    if (path.includes(id)) return false;
    const found = naiveItem(s, other, at, [...path, item.id]);
    if (!found.stands) return false;
    const older = proofsInOrder(s, id).at(-1);
    if (found.state !== "not applicable" && older && older.counts >= proof.counts) return false;
  }
  return true;
}

function endsItsSteps(s: Snapshot, item: Item, proof: Proof): boolean {
  const steps = presentGates(s)
    .flatMap((g) => itemsOf(s, g))
    .filter((i) => i.step?.endedBy === item.id);
  return steps.every((step) => s.proofs.filter((p) => p.item === step.id).every((p) => p.counts < proof.counts));
}

function afterHolds(s: Snapshot, gate: Gate, item: Item, proof: Proof): boolean {
  const mine = keptInstant(s, gate, proof);
  for (const there of throughAbsent(s, gate.after).map((id) => s.gates.find((g) => g.id === id))) {
    for (const other of there ? itemsOf(s, there) : []) {
      if (other.step || isComputed(other) || !shares(item, other)) continue;
      const current = proofsInOrder(s, other.id).at(-1);
      // Withdrawn or not: taking the newer proof back must not make the older one here stand.
      if (current && current.state !== "na" && current.counts >= mine) return false;
    }
  }
  return true;
}

/** The run that a look-back gate looks back on has ended at this instant; null = not yet. */
export function lookedBackEnd(s: Snapshot, gate: Gate): Instant | null {
  const { lookBack } = gate;
  if (!lookBack) return null;
  const run = lookBack.kind === "run" ? s.runs.find((r) => r.id === lookBack.run) : settlingRuns(s, lookBack.rung).at(-1);
  return run ? endOf(run) : null;
}

function marksHold(s: Snapshot, gate: Gate, proof: Proof): boolean {
  const newerThan = (instants: (Instant | null)[]) => instants.every((i) => i === null || i < proof.counts);
  const allIn = (gates: Gate[]): Instant[] => [
    ...s.proofs.filter((p) => gates.some((g) => itemsOf(s, g).some((i) => i.id === p.item))).map((p) => p.counts),
    ...s.signatures.filter((x) => gates.some((g) => g.id === x.gate)).map((x) => x.recorded),
  ];
  const runEnds = s.runs.map(endOf);
  if (gate.eachRun) {
    const before = prerequisitesOf(s, gate).flatMap((id) => s.gates.filter((g) => g.id === id));
    const postRun = presentGates(s).filter((g) => g.lookBack !== null && g.id !== gate.id);
    const setBacks = s.rungs.flatMap((r) => r.setBack.map((b) => b.recorded));
    if (!newerThan([...allIn(before), ...allIn(postRun), ...runEnds, ...setBacks])) return false;
  }
  if (gate.lookBack) return newerThan([lookedBackEnd(s, gate)]);
  return gate.requiredBy.kind !== "release" || newerThan(runEnds);
}

/** Gates that must stand signed first, edges passed through absent ones; *each run* adds all others that the next run requires. */
export function prerequisitesOf(s: Snapshot, gate: Gate): string[] {
  const own = throughAbsent(s, [...gate.needs, ...gate.after]);
  const others = gate.eachRun ? nextRequired(s).map((g) => g.id) : [];
  return [...new Set([...own, ...others.filter((id) => id !== gate.id)])];
}

// ---------------------------------------------------------------- an item
/** State of one item at `at`: rules 1 to 8, in their order. */
export function naiveItem(s: Snapshot, item: Item, at: Instant, path: string[] = []): NaiveItem {
  const gate = s.gates.find((g) => g.id === item.gate);
  if (!gate) return { stands: false, state: "to do" };
  if (isComputed(item)) return computedHolds(s, gate, item, at) ? { stands: true, state: "done" } : { stands: false, state: "to do" };
  const proof = proofsInOrder(s, item.id).at(-1);
  if (!proof || proof.withdrawn || proof.state === "failed") return { stands: false, state: "to do" };
  const sameRevision = proof.revision === item.revision;
  if (proof.state === "na") {
    if (!naIsAllowed(s, item)) return { stands: false, state: "to do" };
    if (!sameRevision) return { stands: false, state: "lapsed" };
    return isAccepted(s, proof) ? { stands: true, state: "not applicable" } : { stands: false, state: "second eyes" };
  }
  if (!evidenceMeets(s, item, proof)) return { stands: false, state: "to do" };
  if (gate.lookBack && lookedBackEnd(s, gate) === null) return { stands: false, state: "to do" };
  const rules = [
    () => sameRevision,
    () => proof.tools.every((t) => toolStands(s, t, proof.counts)),
    () => item.step !== null || gate.lookBack !== null || openingsLeaveIt(s, item, keptInstant(s, gate, proof)),
    () => item.step !== null || gate.lookBack !== null || isValidStill(s, gate, item, proof, at),
    () => item.step !== null || followsHold(s, item, proof, at, path),
    () => item.step !== null || endsItsSteps(s, item, proof),
    () => item.step !== null || afterHolds(s, gate, item, proof),
    () => item.step !== null || marksHold(s, gate, proof),
  ];
  if (!rules.every((rule) => rule())) return { stands: false, state: "lapsed" };
  if ((item.secondEyes || proof.late) && !isConfirmed(s, proof)) return { stands: false, state: "second eyes" };
  return { stands: true, state: "done" };
}
