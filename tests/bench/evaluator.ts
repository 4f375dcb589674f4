/**
 * How long the gate evaluator takes, and that its cost grows with the items, not faster. Beside it a general rules engine with the
 * same rules as JSON, one for each of the eight of a proof and the three of a gate; once with what they compare prepared outside the
 * clock, once from the snapshot on, as the evaluator starts.
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

/** A server has long run: what is measured is compiled code, on both sides. */
const WARM_UP = 600;

async function median(repeats: number, once: () => unknown): Promise<number> {
  for (const end = performance.now() + WARM_UP; performance.now() < end; ) await once();
  const times: number[] = [];
  for (let n = 0; n < repeats; n++) {
    const start = performance.now();
    await once();
    times.push(performance.now() - start);
  }
  return times.sort((a, b) => a - b)[Math.floor(times.length / 2)] ?? Number.NaN;
}

/** One rule for each of the eight asked of a proof, so that each failure has its name, as in the evaluator. */
const rule = (name: string, fact: string, operator: string, value: unknown): RuleProperties => ({
  conditions: { all: [{ fact, operator, value }] },
  event: { type: name },
});
const other = (fact: string) => ({ fact });
const ITEM_RULES: RuleProperties[] = [
  {
    conditions: {
      all: [
        { fact: "value", operator: "greaterThanInclusive", value: other("min") },
        { fact: "value", operator: "lessThanInclusive", value: other("max") },
      ],
    },
    event: { type: "evidence" },
  },
  rule("revision", "madeFor", "equal", other("revision")),
  rule("tools", "toolsBad", "equal", 0),
  rule("second person", "seconds", "greaterThanInclusive", other("secondsAsked")),
  rule("acceptance", "acceptances", "greaterThanInclusive", other("acceptancesAsked")),
  {
    conditions: {
      all: [
        { fact: "open", operator: "equal", value: 0 },
        { fact: "counts", operator: "greaterThan", value: other("closed") },
      ],
    },
    event: { type: "openings" },
  },
  rule("validity", "runsOut", "greaterThan", other("at")),
  rule("order", "counts", "greaterThan", other("follows")),
];
const GATE_RULES: RuleProperties[] = [
  rule("complete", "standing", "equal", other("of")),
  rule("ready", "waits", "equal", 0),
  rule("signed", "holding", "equal", other("places")),
];

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
      gate: item.gate,
      value: evidence?.kind === "measure" ? (evidence.values[0] ?? Number.NaN) : Number.NaN,
      min: band?.min ?? 0,
      max: band?.max ?? 0,
      madeFor: proof?.revision ?? 0,
      revision: item.revision,
      toolsBad: 0,
      seconds: 0,
      secondsAsked: Number(item.secondEyes || (proof?.late ?? false)),
      acceptances: 0,
      acceptancesAsked: Number(proof?.state === "na"),
      open: touching.filter((o) => o.closed === null).length,
      counts: proof?.counts ?? 0,
      closed: Math.max(0, ...touching.map((o) => o.closed ?? 0)),
      follows: Math.max(0, ...item.follows.map((id) => proofs.get(id)?.counts ?? 0)),
      runsOut: (proof?.counts ?? 0) + (gates.get(item.gate)?.validity?.hours ?? 0) * 3_600_000,
      at,
    };
  });
}

/** Gates that the rules engine finds signed: items first, then gates in the order in which they wait for each other. */
async function countSigned(s: Snapshot, facts: ReturnType<typeof factsOf>): Promise<number> {
  const items = new Engine(ITEM_RULES);
  const gates = new Engine(GATE_RULES);
  const standing = new Map<string, number>();
  const of = new Map<string, number>();
  for (const { gate, ...fact } of facts) {
    const { events } = await items.run(fact);
    of.set(gate, (of.get(gate) ?? 0) + 1);
    if (events.length === ITEM_RULES.length) standing.set(gate, (standing.get(gate) ?? 0) + 1);
  }
  const signed = new Set<string>();
  for (const gate of s.gates) {
    const { events } = await gates.run({
      standing: standing.get(gate.id) ?? 0,
      of: of.get(gate.id) ?? 0,
      waits: gate.needs.filter((id) => !signed.has(id)).length,
      holding: gate.policy.length,
      places: gate.policy.length,
    });
    if (events.length === GATE_RULES.length) signed.add(gate.id);
  }
  return signed.size;
}

/** Measured rows, smallest board first. Throws where a board does not stand as built: then the times would mean nothing. */
export async function benchEvaluator(repeats = 9): Promise<BenchRow[]> {
  const rows: BenchRow[] = [];
  const add = (what: string, items: number, gates: number, ms: number) =>
    rows.push({ what, items, gates, ms, perItem: (ms * 1000) / items });
  for (const [items, gates] of [
    [100, 10],
    [1_000, 50],
    [10_000, 500],
  ] as const) {
    const { s, now } = bigBoard(gates, items);
    const signed = Object.values(evaluateBoard(s, now).gates).filter((g) => g.stands).length;
    if (signed !== gates) throw new Error(`${signed} of ${gates} gates stand`);
    add("evaluateBoard", items, gates, await median(repeats, () => evaluateBoard(s, now)));
    const facts = factsOf(s, now);
    const found = await countSigned(s, facts);
    if (found !== gates) throw new Error(`the rules engine finds ${found} of ${gates} gates signed`);
    add("json-rules-engine, facts prepared beforehand", items, gates, await median(3, () => countSigned(s, facts)));
    // What evaluateBoard does too: from the snapshot to the answer.
    add("json-rules-engine, from the snapshot", items, gates, await median(3, () => countSigned(s, factsOf(s, now))));
  }
  return rows;
}
