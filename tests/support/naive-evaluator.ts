/**
 * The second opinion on the gate rules: a slow, obvious transcription over a snapshot, written apart from the product's evaluator and
 * compared with it by the properties. It answers the essence only: what stands, in which state, and the clearance.
 */
import { computeSheet } from "#app/lib/bench/sheet";
import type { BoardResult } from "#app/lib/gates/result";
import type { Cover, Gate, Instant, Item, Proof, Run, Signature, Snapshot } from "#app/lib/gates/snapshot";
import type { SigningRole } from "#app/lib/template/types";
import { allConfirmed, looseEndAccepted, noOpeningSinceRun } from "./naive-computed";
import { installValue, proofsInOrder } from "./naive-evidence";
import {
  bySeq,
  endOf,
  heldRole,
  isComputed,
  isPresent,
  isScrubbed,
  isSettled,
  isStarted,
  itemsOf,
  logIsDealtWith,
  newestAct,
  newestPlan,
  onlyWhatCounts,
  presentGates,
  requiredGates,
} from "./naive-facts";
import { type NaiveItem, naiveItem, prerequisitesOf } from "./naive-items";

export interface NaiveBoard {
  items: Record<string, NaiveItem>;
  gates: Record<string, { complete: boolean; ready: boolean; stands: boolean; state: string }>;
  rungs: Record<string, { settled: boolean }>;
  runs: Record<string, { clear: boolean; state: string; clearanceRpm: number }>;
  release: { stands: boolean; state: string };
}

// ---------------------------------------------------------------- signatures

export function coversNow(s: Snapshot, gate: Gate): Cover[] {
  return itemsOf(s, gate)
    .filter((i) => !isComputed(i))
    .map((i) => {
      const current = proofsInOrder(s, i.id).at(-1);
      return { item: i.id, revision: i.revision, proof: current && !current.withdrawn ? current.id : null };
    });
}

export function sameCovers(a: Cover[], b: Cover[]): boolean {
  const has = (list: Cover[], c: Cover) => list.some((x) => x.item === c.item && x.revision === c.revision && x.proof === c.proof);
  return a.every((c) => has(b, c)) && b.every((c) => has(a, c));
}

const fits = (s: Snapshot, x: Signature, place: SigningRole[]): boolean => place.includes(x.as) && heldRole(s, x.by, [x.as], x.recorded);

function coveredProofs(s: Snapshot, covers: Cover[]): Proof[] {
  return s.proofs.filter((p) => covers.some((c) => c.proof === p.id));
}

function maySecond(s: Snapshot, x: Signature, earlier: Signature[]): boolean {
  const worked = coveredProofs(s, x.covers).some((p) => p.did === x.by || p.by === x.by);
  return !worked && earlier.every((e) => e.by !== x.by && e.seq < x.seq);
}

/** The signatures that hold, in the order of the policy's places; shorter than the policy while one is missing. */
export function holding(s: Snapshot, gate: Gate): Signature[] {
  const today = coversNow(s, gate);
  const good = bySeq(s.signatures).filter(
    (x) => x.gate === gate.id && !x.withdrawn && x.gateRevision === gate.revision && sameCovers(x.covers, today),
  );
  const chosen: Signature[] = [];
  for (const place of gate.policy) {
    const next = good.find((x) => fits(s, x, place) && !chosen.includes(x) && (chosen.length === 0 || maySecond(s, x, chosen)));
    if (!next) break;
    chosen.push(next);
  }
  return chosen;
}

/** At some time the whole policy was signed over one list, whatever has become of it. */
function wasSigned(s: Snapshot, gate: Gate): boolean {
  if (gate.policy.length === 0) return false;
  const all = bySeq(s.signatures).filter((x) => x.gate === gate.id);
  const search = (chosen: Signature[]): boolean => {
    const place = gate.policy[chosen.length];
    if (!place) return true;
    const first = chosen[0];
    return all.some((x) => {
      const sameList = !first || sameCovers(first.covers, x.covers);
      return sameList && fits(s, x, place) && (!first || maySecond(s, x, chosen)) && search([...chosen, x]);
    });
  };
  return search([]);
}

// ---------------------------------------------------------------- gates

function isComplete(s: Snapshot, gate: Gate, at: Instant): boolean {
  const items = itemsOf(s, gate);
  if (!items.every((i) => naiveItem(s, i, at).stands)) return false;
  if (gate.lookBack) return true;
  const systems = items.flatMap((i) => i.systems);
  if (s.findings.some((f) => f.severity === "grounding" && !f.closed && systems.includes(f.system))) return false;
  return !s.looseEnds.some((l) => l.due.kind === "gate" && l.due.gate === gate.id && !l.confirmed);
}

const prerequisitesStand = (s: Snapshot, gate: Gate, at: Instant, path: string[]): boolean =>
  prerequisitesOf(s, gate).every((id) => {
    const other = s.gates.find((g) => g.id === id);
    return other !== undefined && gateStands(s, other, at, [...path, gate.id]);
  });

const isReady = (s: Snapshot, gate: Gate, at: Instant, path: string[] = []): boolean =>
  isComplete(s, gate, at) && prerequisitesStand(s, gate, at, path);

/** Stands signed: ready, and the policy's signatures hold. A gate in a circle does not. */
export function gateStands(s: Snapshot, gate: Gate, at: Instant, path: string[] = []): boolean {
  if (path.includes(gate.id)) return false;
  return holding(s, gate).length === gate.policy.length && isReady(s, gate, at, path);
}

function gateState(s: Snapshot, gate: Gate, at: Instant): string {
  if (gateStands(s, gate, at)) return "signed";
  if (isReady(s, gate, at)) return holding(s, gate).length > 0 ? "half signed" : "ready";
  if (!isComplete(s, gate, at) && wasSigned(s, gate)) return "lapsed";
  return prerequisitesStand(s, gate, at, []) ? "in work" : "waiting";
}

// ---------------------------------------------------------------- runs

function isReviewed(s: Snapshot, run: Run, at: Instant): boolean {
  if (endOf(run) === null || newestAct(run, "outcome") === null || !logIsDealtWith(run)) return false;
  const post = presentGates(s).filter((g) => g.lookBack?.kind === "run" && g.lookBack.run === run.id);
  return post.length > 0 && post.every((g) => gateStands(s, g, at));
}

function runState(s: Snapshot, run: Run, at: Instant): string {
  if (isScrubbed(run)) return "scrubbed";
  if (isStarted(run)) return endOf(run) === null ? "running" : isReviewed(s, run, at) ? "reviewed" : "ended";
  const last = newestAct(run, "go", "hold", "take-back");
  if (!last) return "planned";
  // GO is over with its window, with its card, and with whatever it stood on.
  const stillCalled = last.act === "go" && at < last.ends && last.version === newestPlan(run)?.version;
  return stillCalled && isClear(s, run, at) ? "called" : "held";
}

/** Cap of the restraint sheet at this place of the item's evidence; 0 where it does not stand, or there is none. */
function sheetCap(s: Snapshot, item: Item, part: number, at: Instant): number {
  const evidence = proofsInOrder(s, item.id).at(-1)?.evidence[part];
  if (naiveItem(s, item, at).state !== "done" || evidence?.kind !== "sheet") return 0;
  const computed = computeSheet("restraint", evidence.inputs);
  return computed.ok ? (computed.result.cap ?? Number.POSITIVE_INFINITY) : 0;
}

function clearanceOf(s: Snapshot, run: Run, at: Instant): number {
  const planned = newestPlan(run)?.rpm ?? s.rungs.find((r) => r.key === run.rung)?.rpm ?? 0;
  const caps = [planned, installValue(s, "redline") ?? 0];
  for (const f of s.findings) {
    if (f.closed) continue;
    if (f.severity === "limiting") caps.push(f.cap ?? 0);
    if (f.severity === "grounding") caps.push(0);
  }
  for (const item of requiredGates(s, run).flatMap((g) => itemsOf(s, g))) {
    for (const [i, part] of item.parts.entries()) {
      if (part.kind === "sheet" && part.sheet === "restraint") caps.push(sheetCap(s, item, i, at));
    }
  }
  return Math.min(...caps);
}

function crewIsReady(s: Snapshot, run: Run, at: Instant): boolean {
  const plan = newestPlan(run);
  const rule = s.rungs.find((r) => r.key === run.rung)?.crew;
  if (!plan || !rule) return false;
  const people = [...new Set(plan.positions.map((p) => p.member))];
  if (!people.every((m) => heldRole(s, m, ["lead", "builder", "inspector", "crew"], at)) || people.length < rule.people) return false;
  if (!rule.wanted.every((w) => plan.positions.filter((p) => p.position === w.position).length >= w.count)) return false;
  const mayBoth = (a: string, b: string) => rule.mayAlso.some(([x, y]) => (x === a && y === b) || (x === b && y === a));
  for (const one of plan.positions) {
    for (const other of plan.positions) {
      if (one !== other && one.member === other.member && !mayBoth(one.position, other.position)) return false;
    }
  }
  const lastHold = newestAct(run, "hold", "take-back");
  return people.every((member) => {
    const acked = run.acks.some((a) => a.by === member && a.version === plan.version);
    const answer = bySeq(run.answers)
      .filter((a) => a.by === member)
      .at(-1);
    const fresh = answer && answer.version === plan.version && (!lastHold || answer.seq > lastHold.seq);
    return acked && fresh && answer.answer === "go" && answer.queueEmpty;
  });
}

function windIsInside(run: Run, at: Instant): boolean {
  const plan = newestPlan(run);
  const wind = bySeq(run.winds).at(-1);
  return !!plan && !!wind && at < wind.dayEnds && wind.speed <= plan.windLimit && wind.gust <= plan.gustLimit && !wind.tail;
}

/**
 * Called or running. A run that was called keeps the others back until it is scrubbed or has run: else a HOLD, or the end of its GO,
 * would make another run clear, which bad news and time must never do.
 */
function isInTheWay(run: Run): boolean {
  if (isStarted(run)) return endOf(run) === null;
  return !isScrubbed(run) && newestAct(run, "go") !== null;
}

function isClear(s: Snapshot, run: Run, at: Instant): boolean {
  const rung = s.rungs.find((r) => r.key === run.rung);
  const plan = newestPlan(run);
  if (!rung || !plan || isStarted(run) || isScrubbed(run)) return false;
  const others = s.runs.filter((r) => r.id !== run.id);
  const cardValues = s.values.filter((v) => v.card || v.key === "redline");
  return (
    s.rungs.every((r) => r.order >= rung.order || isSettled(s, r.key)) &&
    others.every((r) => !isStarted(r) || isReviewed(s, r, at)) &&
    others.every((r) => !isInTheWay(r)) &&
    requiredGates(s, run).every((g) => gateStands(s, g, at)) &&
    s.findings.every((f) => f.severity !== "grounding" || f.closed) &&
    s.looseEnds.every((l) => l.confirmed || looseEndAccepted(s, l, run.rung)) &&
    s.values.some((v) => v.key === "redline") &&
    cardValues.every((v) => v.value !== null && v.source !== null) &&
    clearanceOf(s, run, at) >= plan.rpm &&
    crewIsReady(s, run, at) &&
    windIsInside(run, at)
  );
}

// ---------------------------------------------------------------- release

function naiveRelease(s: Snapshot, at: Instant): NaiveBoard["release"] {
  const required = presentGates(s).filter((g) => g.requiredBy.kind !== "runs");
  // "RL's proofs and the other gates' signature ids": post-run gates are required by the release alone too, but have signatures.
  const own = required.filter((g) => g.requiredBy.kind === "release" && g.lookBack === null);
  const conditions =
    s.rungs.every((r) => isSettled(s, r.key)) &&
    s.runs.every((r) => !isStarted(r) || isReviewed(s, r, at)) &&
    required.every((g) => gateStands(s, g, at)) &&
    s.findings.every((f) => f.closed) &&
    s.looseEnds.every((l) => l.confirmed) &&
    allConfirmed(s) &&
    noOpeningSinceRun(s);
  const covers = own.flatMap((g) => coversNow(s, g));
  const ids = required.filter((g) => !own.includes(g)).flatMap((g) => holding(s, g).map((x) => x.id));
  const sameIds = (a: string[], b: string[]) => a.length === b.length && a.every((id) => b.includes(id));
  const valid = s.releaseSignatures.filter((x) => heldRole(s, x.by, [x.as], x.recorded));
  const good = valid.filter((x) => !x.withdrawn && sameCovers(x.covers.items, covers) && sameIds(x.covers.signatures, ids));
  const both = (list: typeof good, equal: boolean) =>
    list.some((lead) =>
      list.some((inspector) => {
        const twoPeople = lead.as === "lead" && inspector.as === "inspector" && lead.by !== inspector.by;
        const equalCovers =
          sameCovers(lead.covers.items, inspector.covers.items) && sameIds(lead.covers.signatures, inspector.covers.signatures);
        return twoPeople && (!equal || equalCovers);
      }),
    );
  if (conditions && both(good, false)) return { stands: true, state: "released" };
  if (conditions) return { stands: false, state: good.length > 0 ? "half signed" : "ready" };
  if (both(valid, true)) return { stands: false, state: "lapsed" };
  return { stands: false, state: "not yet" };
}

/** Every answer of the rules at `at`, each worked out afresh. */
export function naive(given: Snapshot, at: Instant): NaiveBoard {
  const s = onlyWhatCounts(given);
  const board: NaiveBoard = { items: {}, gates: {}, rungs: {}, runs: {}, release: naiveRelease(s, at) };
  for (const gate of s.gates.filter((g) => isPresent(s, g))) {
    for (const item of itemsOf(s, gate)) board.items[item.id] = naiveItem(s, item, at);
    board.gates[gate.id] = {
      complete: isComplete(s, gate, at),
      ready: isReady(s, gate, at),
      stands: gateStands(s, gate, at),
      state: gateState(s, gate, at),
    };
  }
  for (const rung of s.rungs) board.rungs[rung.key] = { settled: isSettled(s, rung.key) };
  for (const run of s.runs) {
    board.runs[run.id] = { clear: isClear(s, run, at), state: runState(s, run, at), clearanceRpm: clearanceOf(s, run, at) };
  }
  return board;
}

/** The same essence of the product's answer, for comparison. */
export function essenceOf(board: BoardResult): NaiveBoard {
  const essence: NaiveBoard = {
    items: {},
    gates: {},
    rungs: {},
    runs: {},
    release: { stands: board.release.stands, state: board.release.state },
  };
  for (const { id, stands, state } of Object.values(board.items)) essence.items[id] = { stands, state };
  for (const { id, present, complete, ready, stands, state } of Object.values(board.gates)) {
    if (present) essence.gates[id] = { complete, ready, stands, state };
  }
  for (const { key, settled } of Object.values(board.rungs)) essence.rungs[key] = { settled };
  for (const { id, clear, state, clearance } of board.runs) if (id) essence.runs[id] = { clear, state, clearanceRpm: clearance.rpm };
  return essence;
}
