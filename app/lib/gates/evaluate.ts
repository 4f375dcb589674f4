/**
 * The gate evaluator: from everything recorded of one install to what stands now, and why not.
 * Pure: no I/O, clock, chance or hashing. The server runs it inside the transaction of every write that depends on it;
 * screens, mails, the API and the offline tablet use the same function.
 */
import { type Facts, gatherFacts } from "#app/lib/gates/facts";
import { gateLimits, inOrder, newestWork, plannedNext, prerequisites } from "#app/lib/gates/gate-limits";
import { absentGate, evaluateGate, hindrances } from "#app/lib/gates/gates";
import { evaluateItem, type GateLimits } from "#app/lib/gates/items";
import { evaluateRelease } from "#app/lib/gates/release";
import type { BoardResult, GateResult, ItemResult, RunResult } from "#app/lib/gates/result";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { evaluateRun } from "#app/lib/gates/runs";
import type { Gate, Instant, Item, Opening, Snapshot } from "#app/lib/gates/snapshot";
import { blocker, ownerOf } from "#app/lib/gates/who";

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
  const items = evaluateItems(facts, waitsFor);
  const gates = evaluateGates(facts, items, waitsFor);

  const board = { facts, items, gates };
  const runs: RunResult[] = [];
  for (const run of facts.runs.values()) {
    const rung = facts.rungs.find((r) => r.key === run.run.rung);
    if (rung) runs.push(evaluateRun(board, rung, run));
  }
  let next: RunResult | null = null;
  if (facts.nextRung) {
    const planned = plannedNext(facts).map((r) => runs.find((x) => x.id === r.run.id) as RunResult);
    next = planned.find((r) => r.state === "running" || r.go) ?? planned[0] ?? evaluateRun(board, facts.nextRung, null);
    if (next.id === null) runs.unshift(next);
  }

  return {
    snapshot,
    at,
    facts,
    result: {
      at,
      rulesVersion: RULES_VERSION,
      items: Object.fromEntries(items),
      gates: Object.fromEntries(gates),
      rungs: Object.fromEntries(
        facts.rungs.map((r) => [r.key, { key: r.key, settled: facts.settledBy.has(r.key), by: facts.settledBy.get(r.key) ?? null }]),
      ),
      runs,
      nextRung: facts.nextRung?.key ?? null,
      next,
      release: evaluateRelease(facts, items, gates),
    },
  };
}

function evaluateItems(facts: Facts, waitsFor: Map<string, string[]>): Map<string, ItemResult> {
  const work = new Map<string, Instant | null>();
  const newest = (gate: string) => {
    if (!work.has(gate)) work.set(gate, newestWork(facts, gate));
    return work.get(gate) as Instant | null;
  };
  const limits = new Map<string, GateLimits>();
  for (const gate of facts.gates.values()) limits.set(gate.id, gateLimits(facts, gate, waitsFor.get(gate.id) ?? [], newest));

  const results = new Map<string, ItemResult>();
  const judge = (gate: Gate, item: Item) =>
    results.set(item.id, evaluateItem({ facts, gate, limits: limits.get(gate.id) as GateLimits, results }, item));
  // Most items follow nothing and need no order; the others come after what they follow.
  const following: string[] = [];
  for (const gate of facts.gates.values())
    for (const item of facts.itemsOf.get(gate.id) ?? [])
      if (item.follows.length) following.push(item.id);
      else judge(gate, item);
  const { order, circle } = inOrder(following, (id) => facts.items.get(id)?.follows ?? []);
  for (const id of [...order, ...circle]) {
    const item = facts.items.get(id) as Item;
    judge(facts.gates.get(item.gate) as Gate, item);
  }
  // In a circle one item is judged before another that it follows has a result, and falls with it; the other must fall too.
  for (const id of circle) {
    const r = results.get(id);
    if (r?.stands)
      results.set(id, {
        ...r,
        stands: false,
        until: null,
        state: "lapsed",
        blockers: [
          blocker({
            code: "follows",
            subject: ["item", id],
            title: facts.items.get(id)?.words ?? "",
            sentence: "Items follow each other in a circle. A lead must take one step of it away in the template.",
            owner: ownerOf(facts, ["lead"]),
            page: "gate",
            id: facts.items.get(id)?.gate ?? null,
            item: id,
          }),
        ],
      });
  }
  return results;
}

function evaluateGates(facts: Facts, items: Map<string, ItemResult>, waitsFor: Map<string, string[]>): Map<string, GateResult> {
  const hinder = hindrances(facts);
  const results = new Map<string, GateResult>();
  const { order, circle } = inOrder([...facts.gates.keys()], (id) => waitsFor.get(id) ?? []);
  const judge = (id: string, inCircle: boolean) => {
    const gate = facts.gates.get(id) as Gate;
    const own = (facts.itemsOf.get(id) ?? []).map((i) => items.get(i.id) as ItemResult);
    results.set(id, evaluateGate(facts, gate, own, waitsFor.get(id) ?? [], results, hinder, inCircle));
  };
  for (const id of order) judge(id, false);
  for (const id of circle) judge(id, true);
  const all = new Map<string, GateResult>();
  for (const gate of facts.snapshot.gates) all.set(gate.id, results.get(gate.id) ?? absentGate(gate));
  return all;
}

/** The snapshot as it would be with one more opening: preview and truth come from the same evaluator. */
export const withOpening = (snapshot: Snapshot, opening: Opening): Snapshot => ({ ...snapshot, openings: [...snapshot.openings, opening] });
