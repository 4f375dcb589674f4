/**
 * The rules for gates' items and proofs once more, line by line, for the second evaluator. No caches: every question is answered
 * from the snapshot by plain loops; `path` guards against circles only.
 */
import type { Gate, Instant, Item, Proof, Role, Run, RunAct, Snapshot } from "#app/lib/gates/snapshot";
import type { ComputedRule } from "#app/lib/template/types";
import { evidenceMeets, proofsInOrder } from "./naive-evidence";

export type NaiveItem = { stands: boolean; state: "to do" | "done" | "not applicable" | "second eyes" | "lapsed" };

const HOUR = 3_600_000;
export const FIVE_POUNDS = 5 * 0.45359237;

export const bySeq = <T extends { seq: number }>(list: T[]): T[] => [...list].sort((a, b) => a.seq - b.seq);

export function heldRole(s: Snapshot, member: string, roles: Role[], at: Instant): boolean {
  const roleNow = s.members.find((m) => m.id === member)?.roles.filter((r) => r.from <= at && (r.to === null || at < r.to)) ?? [];
  return roleNow.some((r) => roles.includes(r.role));
}

// ---------------------------------------------------------------- what is on the board

export const itemsOf = (s: Snapshot, gate: Gate): Item[] => s.items.filter((i) => i.gate === gate.id && !i.hidden);
export const isPresent = (s: Snapshot, gate: Gate): boolean => !gate.hidden && itemsOf(s, gate).length > 0;
export const presentGates = (s: Snapshot): Gate[] => s.gates.filter((g) => isPresent(s, g));
export const isComputed = (item: Item): boolean => item.parts.some((p) => p.kind === "computed");
const shares = (a: Item, b: Item): boolean => a.systems.some((system) => b.systems.includes(system));

/** Gates at the far end of these edges: an absent gate passes them on to whatever it needs or comes after. */
export function throughAbsent(s: Snapshot, ids: string[], path: string[] = []): string[] {
  const found: string[] = [];
  for (const id of ids) {
    const gate = s.gates.find((g) => g.id === id);
    if (!gate || path.includes(id)) continue;
    if (isPresent(s, gate)) found.push(id);
    else found.push(...throughAbsent(s, [...gate.needs, ...gate.after], [...path, id]));
  }
  return [...new Set(found)];
}

// ---------------------------------------------------------------- runs, as far as proofs ask for them

type Act<K extends RunAct["act"]> = Extract<RunAct, { act: K }>;

export function newestAct<K extends RunAct["act"]>(run: Run, ...kinds: K[]): Act<K> | null {
  return (
    (bySeq(run.acts)
      .filter((a) => (kinds as string[]).includes(a.act))
      .at(-1) as Act<K> | undefined) ?? null
  );
}
export const isStarted = (run: Run): boolean => newestAct(run, "start", "take-back")?.act === "start";
export const endOf = (run: Run): Instant | null => (isStarted(run) ? (newestAct(run, "ended")?.at ?? null) : null);
export const isScrubbed = (run: Run): boolean => !isStarted(run) && newestAct(run, "scrub") !== null;
export const newestPlan = (run: Run) => [...run.plans].sort((a, b) => a.version - b.version).at(-1) ?? null;

export function settlingRuns(s: Snapshot, key: string): Run[] {
  const rung = s.rungs.find((r) => r.key === key);
  if (!rung) return [];
  return s.runs
    .filter((run) => {
      const [plan, end] = [newestPlan(run), endOf(run)];
      if (run.rung !== key || plan === null || end === null || rung.rpm === null) return false;
      const completed = newestAct(run, "outcome")?.outcome === "completed";
      return completed && plan.rpm >= rung.rpm && rung.setBack.every((b) => end > b.recorded);
    })
    .sort((a, b) => (endOf(a) ?? 0) - (endOf(b) ?? 0));
}
export function isSettled(s: Snapshot, key: string): boolean {
  return s.rungs.some((r) => r.key === key && r.leftOut !== null) || settlingRuns(s, key).length > 0;
}
export const nextRung = (s: Snapshot) => [...s.rungs].sort((a, b) => a.order - b.order).find((r) => !isSettled(s, r.key)) ?? null;

export function defaultGates(s: Snapshot, rung: string | null): Gate[] {
  return presentGates(s).filter(
    ({ requiredBy: r }) => r.kind === "runs-and-release" || r.kind === "runs" || (r.kind === "rung-and-release" && r.rung === rung),
  );
}
export function requiredGates(s: Snapshot, run: Run): Gate[] {
  const plan = newestPlan(run);
  return plan === null ? defaultGates(s, run.rung) : presentGates(s).filter((g) => plan.requiredGates.includes(g.id));
}
/** What the next run requires: the plans of the runs of the next rung that are neither ended nor scrubbed, else the default. */
export function nextRequired(s: Snapshot): Gate[] {
  const rung = nextRung(s);
  const open = s.runs.filter((r) => rung !== null && r.rung === rung.key && endOf(r) === null && !isScrubbed(r) && newestPlan(r) !== null);
  return open.length > 0 ? open.flatMap((run) => requiredGates(s, run)) : defaultGates(s, rung?.key ?? null);
}
export const logIsDealtWith = (run: Run): boolean =>
  run.acts.some((a) => a.act === "log-read" || (a.act === "no-log" && a.as === "inspector")) &&
  run.exceedances.every((e) => e.answered !== null);

// ---------------------------------------------------------------- rules 2 to 5

function toolStands(s: Snapshot, id: string, used: Instant): boolean {
  const checks = s.tools.find((t) => t.id === id)?.checks ?? [];
  const before = checks.filter((c) => c.at <= used).map((c) => c.at);
  if (before.length === 0) return false;
  const newest = checks.filter((c) => c.at === Math.max(...before));
  if (!newest.every((c) => c.good && (c.due === null || used < c.due))) return false;
  const goodBetween = (bad: Instant) => checks.some((g) => g.good && used <= g.at && g.at < bad);
  return !checks.some((bad) => !bad.good && used <= bad.at && !goodBetween(bad.at));
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
  const ends = s.runs.filter((r) => newestAct(r, "outcome")?.outcome === "completed").map(endOf);
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
  return !s.proofs.some((e) => e.item === step.step?.endedBy && rest.counts < e.counts && e.counts < proof.counts);
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
      if (current && !current.withdrawn && current.state !== "na" && current.counts >= mine) return false;
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
    if (!newerThan([...allIn(before), ...allIn(postRun), ...runEnds])) return false;
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

function ruleHolds(s: Snapshot, rule: ComputedRule, gate: Gate, at: Instant): boolean {
  switch (rule) {
    case "extinguishers":
      return extinguishersHold(s, at);
    case "loose-ends":
      return s.looseEnds.every((l) => l.confirmed !== null || looseEndAccepted(s, l, nextRung(s)?.key ?? null));
    case "log": {
      const look = gate.lookBack;
      const run = look?.kind === "run" ? s.runs.find((r) => r.id === look.run) : look ? settlingRuns(s, look.rung).at(-1) : undefined;
      return run !== undefined && endOf(run) !== null && logIsDealtWith(run);
    }
    case "release-record":
      return s.findings.every((f) => f.closed) && s.looseEnds.every((l) => l.confirmed) && allConfirmed(s);
    case "release-openings":
      return noOpeningSinceRun(s);
  }
}
const computedHolds = (s: Snapshot, gate: Gate, item: Item, at: Instant): boolean =>
  item.parts.every((part) => part.kind !== "computed" || ruleHolds(s, part.rule, gate, at));

function extinguishersHold(s: Snapshot, at: Instant): boolean {
  const fit = s.extinguishers.filter(
    (e) =>
      !e.withdrawn && e.classB && e.agent !== "water" && e.lookDue !== null && at < e.lookDue && e.serviceDue !== null && at < e.serviceDue,
  );
  return fit.length >= 2 && fit.some((e) => e.agent === "clean" || (e.agent === "co2" && e.charge >= FIVE_POUNDS));
}

/** Accepted for this rung; from its due rung on it cannot be. */
export function looseEndAccepted(s: Snapshot, end: Snapshot["looseEnds"][number], rungKey: string | null): boolean {
  const { due } = end;
  const order = (key: string | null) => s.rungs.find((r) => r.key === key)?.order ?? Number.POSITIVE_INFINITY;
  if (due.kind === "rung" && order(rungKey) >= order(due.rung)) return false;
  return end.accepted.some((a) => a.rung === rungKey && a.as === "inspector");
}

export function allConfirmed(s: Snapshot): boolean {
  const limits = s.values.filter((v) => v.limit).every((v) => v.value !== null && v.source !== null);
  const killers = presentGates(s)
    .flatMap((g) => itemsOf(s, g))
    .filter((i) => i.killer);
  const bands = killers.flatMap((i) => i.parts).flatMap((p) => (p.kind === "measure" || p.kind === "torque" ? [p.criterion] : []));
  return limits && bands.every((c) => c.source !== null);
}

const AFTER_RUN_SYSTEMS: string[] = ["fuelsup", "fueleng", "oil", "oilfill", "coolant", "drive", "prop"];

export function noOpeningSinceRun(s: Snapshot): boolean {
  const newest = Math.max(...s.runs.map((r) => endOf(r) ?? Number.NEGATIVE_INFINITY));
  const count = s.openings.filter((o) => o.mistake === null && o.systems.some((system) => AFTER_RUN_SYSTEMS.includes(system)));
  return count.every((o) => o.closed !== null && o.closed < newest);
}

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
