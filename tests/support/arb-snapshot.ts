/**
 * Plausible but nasty snapshots: a board is made at random, worked and signed whole, its first runs flown, the next one briefed; then up
 * to six disturbances hit it. So a good share of gates still stands signed, and each rule has been broken alone somewhere.
 */
import fc from "fast-check";
import type { Gate, Instant, Item, Snapshot } from "#app/lib/gates/snapshot";
import type { RequiredBy, SystemKey, Validity } from "#app/lib/template/types";
import { Board } from "./board";
import { type Dice, diceFrom } from "./dice";
import { disturb } from "./disturbances";
import { measure, TICK, tick, torque } from "./parts";
import { sheetPart } from "./sheets";
import { signAll } from "./snapshots";

export interface Scene {
  snapshot: Snapshot;
  /** Never earlier than the newest record. */
  at: Instant;
}

export const SOME_SYSTEMS: SystemKey[] = ["oil", "fueleng", "ign", "bay"];

const VALIDITIES: (Validity | null)[] = [
  null,
  null,
  { hours: 336, afterRunHours: null },
  { hours: 24, afterRunHours: 24 },
  { hours: null, afterRunHours: 8 },
  { hours: 12, afterRunHours: null },
  { hours: 4, afterRunHours: 12 },
];
const POLICIES = [[["builder"], ["inspector"]], [["builder"], ["lead", "inspector"]], [["builder"]]] as const;

function addItems(dice: Dice, board: Board, gate: string, more: Partial<Item> = {}): void {
  const own: Item[] = [];
  const elsewhere = board.s.items.filter((i) => i.step === null && dice.chance(8));
  const count = dice.int(1, 4);
  const withStep = count >= 3 && dice.chance(45);
  for (let n = 0; n < count; n++) {
    const isStep = withStep && n === 0;
    const parts = isStep || n === count - 1 ? [tick] : [dice.chance(8) ? sheetPart : dice.one([tick, tick, measure(), torque()])];
    const follows = own.filter((i) => (withStep && i.step !== null && n < count - 1) || dice.chance(25)).map((i) => i.id);
    const item = board.item(`${gate}-${n + 1}`, gate, {
      parts,
      systems: isStep ? [] : dice.some(SOME_SYSTEMS, 30),
      follows: withStep && n === count - 1 ? own.filter((i) => i.step === null).map((i) => i.id) : follows,
      secondEyes: dice.chance(25),
      killer: dice.chance(25),
      validity: dice.chance(15) ? dice.one(VALIDITIES) : null,
      ...more,
    });
    if (dice.chance(20)) item.follows.push(...elsewhere.slice(0, 1).map((i) => i.id));
    if (isStep) item.step = { endedBy: dice.chance(85) ? `${gate}-${count}` : null };
    own.push(item);
  }
  const last = own.at(-1);
  const first = own[0];
  if (withStep && first && last && dice.chance(50)) {
    first.parts = [{ kind: "tally", mode: "out", expected: 6, words: { out: "out", in: "in" } }];
    last.parts = [{ kind: "tally", mode: "in", of: first.id, words: { out: "out", in: "in" } }];
  }
}

function addGates(dice: Dice, board: Board): void {
  const count = dice.int(2, 6);
  for (let n = 1; n <= count; n++) {
    const earlier = board.s.gates.map((g) => g.id);
    const after = dice.some(earlier, 12);
    const requiredBy: RequiredBy = dice.one([
      { kind: "runs-and-release" },
      { kind: "runs-and-release" },
      { kind: "runs" },
      { kind: "rung-and-release", rung: dice.one(board.s.rungs).key },
    ]);
    board.gate(`g${n}`, {
      needs: dice.some(earlier, 30),
      after,
      requiredBy,
      validity: dice.chance(40) ? dice.one(VALIDITIES) : null,
      policy: dice.one(POLICIES).map((place) => [...place]),
      hidden: dice.chance(8),
    });
    addItems(dice, board, `g${n}`);
  }
  if (dice.chance(25)) board.item("fi-1", dice.one(board.s.gates).id, { parts: [{ kind: "computed", rule: "extinguishers" }] });
}

/** The gates at the far end: walk-round, service, release. */
function addLateGates(dice: Dice, board: Board): void {
  const settled = board.s.runs.map((r) => r.rung);
  if (settled.length > 0 && dice.chance(60)) {
    const requiredBy: RequiredBy = { kind: "rung-and-release", rung: dice.one(board.s.rungs).key };
    board.gate("sv", { requiredBy, lookBack: { kind: "rung", rung: dice.one(settled) } });
    addItems(dice, board, "sv", { systems: [] });
  }
  if (dice.chance(70)) {
    board.gate("wr", { requiredBy: { kind: "runs" }, eachRun: true, policy: [["builder"], ["lead", "inspector"]] });
    addItems(dice, board, "wr");
    if (dice.chance(50)) board.item("wr-loose", "wr", { parts: [{ kind: "computed", rule: "loose-ends" }] });
  }
  if (dice.chance(60)) {
    const needs = board.s.gates.filter((g) => g.lookBack?.kind === "run").map((g) => g.id);
    board.gate("rl", { requiredBy: { kind: "release" }, policy: dice.chance(80) ? [] : [["builder"], ["inspector"]], needs });
    addItems(dice, board, "rl");
    board.item("rl-record", "rl", { parts: [{ kind: "computed", rule: "release-record" }] });
    if (dice.chance(50)) board.item("rl-openings", "rl", { parts: [{ kind: "computed", rule: "release-openings" }] });
  }
}

function signRelease(dice: Dice, board: Board, holdingIds: string[]): void {
  const own = board.s.gates.filter((g) => g.requiredBy.kind === "release" && g.lookBack === null && !g.hidden);
  const covers = { items: own.flatMap((g) => board.covers(g.id)), signatures: holdingIds };
  for (const [by, as] of [
    ["la", "lead"],
    ["di", "inspector"],
  ] as const) {
    if (dice.chance(90)) {
      const base = { ...board.record("release", { by, as }), as };
      board.s.releaseSignatures.push({ ...base, meaning: "released", rulesVersion: "1", covers, withdrawn: null });
    }
  }
}

/** A scene, and the board that made it, for whatever shall happen next. */
export function makeScene(dice: Dice): Scene & { board: Board } {
  const board = new Board().cast();
  board.tool("t1");
  board.tool("t2");
  board.extinguishers();
  board.value("redline", 45);
  board.value("oilPressureMin", 6, dice.chance(90) ? "manual p. 4" : null, { card: true });
  board.value("mass", 500, "weighed", { quantity: "mass", limit: false });
  if (dice.chance(20)) board.s.settings.stepWindow = 2 * TICK;
  const rungs = dice.int(1, 3);
  for (let n = 1; n <= rungs; n++) board.rung(String(n), 10 * (n + 1));
  addGates(dice, board);
  const [left] = dice.some(board.s.items, 4);
  board.notApplicable = (item) => item === left;
  signAll(board);
  const flown = dice.int(0, dice.chance(45) ? rungs : rungs - 1);
  for (let n = 1; n <= flown; n++) {
    board.wait();
    const run = board.run(String(n));
    board.brief(run);
    const postRun = board.completeRun(run);
    if (dice.chance(80)) board.item(`${postRun.id}-log`, postRun.id, { parts: [{ kind: "computed", rule: "log" }], killer: true });
  }
  const before = board.s.gates.length;
  addLateGates(dice, board);
  const late = board.s.gates.slice(before).map((g) => g.id);
  signAll(board, (gate) => late.includes(gate.id));
  if (flown < rungs) {
    const run = board.run(String(flown + 1));
    board.brief(run);
    if (dice.chance(30)) board.act(run, "go");
    if (dice.chance(12)) {
      const other = board.run(String(Math.max(1, flown)));
      board.brief(other);
      if (dice.chance(50)) board.act(other, "go");
    }
  } else {
    const kinds = (g: Gate) => g.requiredBy.kind !== "runs" && (g.requiredBy.kind !== "release" || g.lookBack !== null);
    const releasing = board.s.gates.filter((g) => kinds(g) && !g.hidden);
    signRelease(
      dice,
      board,
      board.s.signatures.filter((x) => releasing.some((g) => g.id === x.gate)).map((x) => x.id),
    );
  }
  if (dice.chance(75)) for (let n = dice.int(0, 6); n > 0; n--) disturb(dice, board);
  const at = board.now + dice.one([0, 0, 1, 4, 40]) * TICK;
  return { board, snapshot: board.s, at };
}

/** Scenes for the properties. */
export function arbScene(): fc.Arbitrary<Scene> {
  return fc.gen().map((g) => {
    const { snapshot, at } = makeScene(diceFrom(g));
    return { snapshot, at };
  });
}
/** The snapshot alone. */
export function arbSnapshot(): fc.Arbitrary<Snapshot> {
  return arbScene().map((scene) => scene.snapshot);
}
