/**
 * The gate evaluator: from everything recorded of one install to what stands now, and why not.
 * Pure: no I/O, clock, chance or hashing. The server runs it inside the transaction of every write that depends on it;
 * screens, mails, the API and the offline tablet use the same function.
 */
import { type Facts, gatherFacts, itemOf } from "#app/lib/gates/facts";
import { gateLimits, inOrder, newestWork, plannedNext, prerequisites } from "#app/lib/gates/gate-limits";
import { absentGate, evaluateGate, hindrances } from "#app/lib/gates/gates";
import { evaluateItem, type GateLimits } from "#app/lib/gates/items";
import { evaluateRelease } from "#app/lib/gates/release";
import type { BoardResult, GateResult, ItemResult, RunResult } from "#app/lib/gates/result";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { evaluateRun } from "#app/lib/gates/runs";
import type { Instant, Opening, Snapshot } from "#app/lib/gates/snapshot";
import { blocker, ownerOf } from "#app/lib/gates/who";
import type { GateFacts, ItemFacts } from "#app/lib/gates/work-facts";

/** A board and what it was worked out from; verdicts on acts take this. */
export interface Evaluation {
  snapshot: Snapshot;
  at: Instant;
  facts: Facts;
  result: BoardResult;
}

/**
 * @param snapshot all records of one install, in any order.
 * @param at milliseconds since the epoch, never earlier than the newest record: now, or the planned time of a run.
 * @returns states, blockers and `until` of every item, gate, rung, run and the release. Linear in items, edges and records.
 */
export function evaluateBoard(snapshot: Snapshot, at: Instant): BoardResult {
  return evaluate(snapshot, at).result;
}

export function evaluate(snapshot: Snapshot, at: Instant): Evaluation {
  const facts = gatherFacts(snapshot, at);
  const waitsFor = prerequisites(facts);
  evaluateItems(facts, waitsFor);
  const gates = evaluateGates(facts, waitsFor);

  const board = { facts, gates };
  const runs: RunResult[] = [];
  for (const run of facts.runs.values()) {
    const rung = facts.rungs.find((r) => r.key === run.run.rung);
    if (rung) runs.push(evaluateRun(board, rung, run));
  }
  let next: RunResult | null = null;
  if (facts.nextRung) {
    const planned = plannedNext(facts).map((r) => runs.find((x) => x.id === r.run.id) as RunResult);
    next = planned.find((r) => r.state === "running" || r.go || r.goLost) ?? planned[0] ?? evaluateRun(board, facts.nextRung, null);
    if (next.id === null) runs.unshift(next);
  }

  return {
    snapshot,
    at,
    facts,
    result: {
      at,
      rulesVersion: RULES_VERSION,
      items: itemResults(facts),
      gates: Object.fromEntries(gates),
      rungs: Object.fromEntries(
        facts.rungs.map((r) => [r.key, { key: r.key, settled: facts.settledBy.has(r.key), by: facts.settledBy.get(r.key) ?? null }]),
      ),
      runs,
      nextRung: facts.nextRung?.key ?? null,
      next,
      release: evaluateRelease(facts, gates),
    },
  };
}

/** Judges every item, each after those that it follows, and leaves the answer with its facts. */
function evaluateItems(facts: Facts, waitsFor: Map<string, string[]>): void {
  const work = new Map<string, Instant | null>();
  const newest = (gate: string) => {
    if (!work.has(gate)) work.set(gate, newestWork(facts, gate));
    return work.get(gate) as Instant | null;
  };
  const limits = new Map<string, GateLimits>();
  // Most items follow nothing and need no order; the others come after what they follow.
  const following: string[] = [];
  for (const [id, of] of facts.gateFacts) {
    const own = gateLimits(facts, of.gate, waitsFor.get(id) ?? [], newest);
    limits.set(id, own);
    for (const item of of.items)
      if (item.item.follows.length) following.push(item.item.id);
      else item.result = evaluateItem(facts, own, item);
  }
  const { order, circle } = inOrder(following, (id) => itemOf(facts, id)?.follows ?? []);
  for (const id of [...order, ...circle]) {
    const item = facts.itemFacts.get(id) as ItemFacts;
    item.result = evaluateItem(facts, limits.get(item.of.gate.id) as GateLimits, item);
  }
  // In a circle one item is judged before another that it follows has a result, and falls with it; the other must fall too.
  for (const id of circle) {
    const { item, result } = facts.itemFacts.get(id) as ItemFacts;
    if (!result?.stands) continue;
    const inCircle = blocker({
      code: "follows",
      subject: ["item", id],
      title: item.words,
      sentence: "Items follow each other in a circle. A lead must take one step of it away in the template.",
      owner: ownerOf(facts, ["lead"]),
      page: "gate",
      id: item.gate,
      item: id,
    });
    (facts.itemFacts.get(id) as ItemFacts).result = { ...result, stands: false, until: null, state: "lapsed", blockers: [inCircle] };
  }
}

function evaluateGates(facts: Facts, waitsFor: Map<string, string[]>): Map<string, GateResult> {
  const hinder = hindrances(facts);
  const results = new Map<string, GateResult>();
  const { order, circle } = inOrder([...facts.gates.keys()], (id) => waitsFor.get(id) ?? []);
  const judge = (id: string, inCircle: boolean) =>
    results.set(id, evaluateGate(facts, facts.gateFacts.get(id) as GateFacts, waitsFor.get(id) ?? [], results, hinder, inCircle));
  for (const id of order) judge(id, false);
  for (const id of circle) judge(id, true);
  const all = new Map<string, GateResult>();
  for (const gate of facts.snapshot.gates) all.set(gate.id, results.get(gate.id) ?? absentGate(gate));
  return all;
}

/** Results by item id. */
function itemResults(facts: Facts): Record<string, ItemResult> {
  const all: Record<string, ItemResult> = {};
  for (const [id, item] of facts.itemFacts) all[id] = item.result as ItemResult;
  return all;
}

/** The snapshot as it would be with one more opening: preview and truth come from the same evaluator. */
export const withOpening = (snapshot: Snapshot, opening: Opening): Snapshot => ({ ...snapshot, openings: [...snapshot.openings, opening] });
