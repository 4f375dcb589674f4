/**
 * How long the gate evaluator takes, and that its cost grows with the items, not faster. Beside it a general rules engine with only four
 * of the rules (evidence in band, revision, openings, validity), one JSON rule asked once per item, as a measure of what is usual.
 */
import { Engine, type RuleProperties } from "json-rules-engine";
import { evaluateBoard } from "#app/lib/gates/evaluate";
import type { Item, Snapshot } from "#app/lib/gates/snapshot";
import { Board } from "../support/board";
import { measure } from "../support/parts";

export interface BenchRow {
  what: string;
  items: number;
  gates: number;
  /** Median of the repeats, ms. */
  ms: number;
  /** Microseconds per item. */
  perItem: number;
}

/** Gates in chains of ten, each item with a band, a system and a validity; every tenth follows its neighbour; all proven and signed. */
export function bigBoard(gates: number, items: number): Board {
  const board = new Board().cast();
  board.tool("wrench");
  board.extinguishers();
  board.value("redline", 45);
  board.rung("1");
  const systems = ["oil", "fueleng", "ign", "prop", "elec"] as const;
  for (let g = 0; g < gates; g++) {
    const needs = g % 10 === 0 ? [] : [`g${g - 1}`];
    board.gate(`g${g}`, { needs, validity: { hours: 336, afterRunHours: 720 } });
    for (let n = 0; n < items / gates; n++) {
      const follows = n % 10 === 9 ? [`g${g}-${n - 1}`] : [];
      board.item(`g${g}-${n}`, `g${g}`, { parts: [measure()], systems: [systems[n % 5] ?? "oil"], follows });
    }
  }
  for (let n = 0; n < 20; n++) board.open([systems[n % 5] ?? "oil"], { closed: board.now });
  workAll(board.wait());
  return board;
}

/** Every item proven in the order of its gate, every gate signed by two. The covers are written here: a search per item would take minutes. */
function workAll(board: Board): void {
  const byGate = new Map<string, Item[]>(board.s.gates.map((gate) => [gate.id, []]));
  for (const item of board.s.items) byGate.get(item.gate)?.push(item);
  for (const gate of board.s.gates) {
    const items = byGate.get(gate.id) ?? [];
    const start = board.now;
    const covers = items.map((item) => {
      board.now = item.follows.length > 0 ? start + 1 : start;
      return { item: item.id, revision: item.revision, proof: board.proof(item.id).id };
    });
    board.now = start + 1;
    board.sign(gate.id, "bo", "builder", { covers });
    board.sign(gate.id, "di", "inspector", { covers });
  }
}

async function median(repeats: number, once: () => unknown): Promise<number> {
  const times: number[] = [];
  for (let n = 0; n < repeats; n++) {
    const start = performance.now();
    await once();
    times.push(performance.now() - start);
  }
  return times.sort((a, b) => a - b)[Math.floor(times.length / 2)] ?? Number.NaN;
}

const RULE: RuleProperties = {
  conditions: {
    all: [
      { fact: "value", operator: "greaterThanInclusive", value: { fact: "min" } },
      { fact: "value", operator: "lessThanInclusive", value: { fact: "max" } },
      { fact: "madeFor", operator: "equal", value: { fact: "revision" } },
      { fact: "open", operator: "equal", value: 0 },
      { fact: "counts", operator: "greaterThan", value: { fact: "closed" } },
      { fact: "runsOut", operator: "greaterThan", value: { fact: "at" } },
    ],
  },
  event: { type: "stands" },
};

/** Facts of each item, prepared outside the clock, so that only the engine is timed. */
function factsOf(s: Snapshot, at: number) {
  const proofs = new Map(s.proofs.map((p) => [p.item, p]));
  const gates = new Map(s.gates.map((g) => [g.id, g]));
  return s.items.map((item) => {
    const proof = proofs.get(item.id);
    const [part] = item.parts;
    const [evidence] = proof?.evidence ?? [];
    const touching = s.openings.filter((o) => o.systems.some((system) => item.systems.includes(system)));
    const band = part?.kind === "measure" ? part.criterion.band : null;
    return {
      value: evidence?.kind === "measure" ? (evidence.values[0] ?? Number.NaN) : Number.NaN,
      min: band?.min ?? 0,
      max: band?.max ?? 0,
      madeFor: proof?.revision ?? 0,
      revision: item.revision,
      open: touching.filter((o) => o.closed === null).length,
      counts: proof?.counts ?? 0,
      closed: Math.max(0, ...touching.map((o) => o.closed ?? 0)),
      runsOut: (proof?.counts ?? 0) + (gates.get(item.gate)?.validity?.hours ?? 0) * 3_600_000,
      at,
    };
  });
}

async function countStanding(facts: ReturnType<typeof factsOf>): Promise<number> {
  const engine = new Engine([RULE]);
  let standing = 0;
  for (const fact of facts) standing += (await engine.run(fact)).events.length;
  return standing;
}

/** Measured rows, smallest board first. Throws where a board does not stand as built: then the times would mean nothing. */
export async function benchEvaluator(repeats = 9): Promise<BenchRow[]> {
  const rows: BenchRow[] = [];
  const add = (what: string, items: number, gates: number, ms: number) =>
    rows.push({ what, items, gates, ms, perItem: (ms * 1000) / items });
  for (const [items, gates] of [
    [1_000, 50],
    [10_000, 500],
  ] as const) {
    const { s, now } = bigBoard(gates, items);
    const signed = Object.values(evaluateBoard(s, now).gates).filter((g) => g.stands).length;
    if (signed !== gates) throw new Error(`${signed} of ${gates} gates stand`);
    await median(repeats, () => evaluateBoard(s, now));
    add("evaluateBoard", items, gates, await median(repeats, () => evaluateBoard(s, now)));
    const facts = factsOf(s, now);
    const standing = await countStanding(facts);
    if (standing !== items) throw new Error(`the rules engine finds ${standing} of ${items} items`);
    add("json-rules-engine, four rules", items, gates, await median(3, () => countStanding(facts)));
  }
  return rows;
}
