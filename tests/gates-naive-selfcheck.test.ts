/** Hand-made examples of the gate rules, asked of the second evaluator and of the product's own: both must know them. */
import { describe, expect, test } from "vitest";
import { evaluateBoard } from "#app/lib/gates/evaluate";
import type { Snapshot } from "#app/lib/gates/snapshot";
import type { Board } from "./support/board";
import { essenceOf, type NaiveBoard, naive } from "./support/naive-evaluator";
import { HOUR, measure, TICK, torque } from "./support/parts";
import { makeBoard, signAll } from "./support/snapshots";

const ours = (snapshot: Snapshot, at: number): NaiveBoard => essenceOf(evaluateBoard(snapshot, at));
const EVALUATORS = [
  { name: "second", evaluate: naive },
  { name: "product's", evaluate: ours },
];
const BUILDER_ONLY = { policy: [["builder" as const]] };

/** Oil and fuel primed and signed, one item of each system, one of the bay, one of none. */
function primed(): Board {
  const items = { line: { systems: ["fueleng" as const] }, bay: { systems: ["bay" as const] }, paper: {} };
  const board = makeBoard({ fp: { items }, op: { needs: ["fp"], items: { oil: { systems: ["oil" as const] } } } });
  return signAll(board).wait();
}

/** Two gates, a walk-round, and a first run briefed by the whole crew. */
function briefed(): Board {
  const board = makeBoard({
    mf: { items: { bolts: { systems: ["mount"] } } },
    wr: { requiredBy: { kind: "runs" }, eachRun: true, items: { caps: {} } },
  });
  signAll(board).wait();
  board.brief(board.run("1"));
  return board;
}
const runOf = (board: Board) => board.s.runs[0] ?? board.run("1");

describe.each(EVALUATORS)("the $name evaluator", ({ evaluate }) => {
  const look = (board: Board, at = board.now) => evaluate(board.s, at);
  const runState = (board: Board, at = board.now) => look(board, at).runs[runOf(board).id];

  test("a fuel line opened after the prime was signed", () => {
    const board = primed();
    expect(look(board).gates).toMatchObject({ fp: { state: "signed" }, op: { state: "signed" } });
    board.open(["fueleng"]);
    const after = look(board);
    expect(after.items).toMatchObject({
      line: { state: "lapsed" },
      bay: { state: "lapsed" },
      paper: { state: "done" },
      oil: { state: "done" },
    });
    expect(after.gates).toMatchObject({ fp: { state: "lapsed" }, op: { state: "waiting", complete: true, stands: false } });
  });

  test("a kept proof counts from the keeping, once the opening is closed", () => {
    const board = primed();
    const opening = board.open(["fueleng"]);
    const [line, bay] = [board.current("line"), board.current("bay")];
    board.keep(line?.id ?? "");
    board.keep(bay?.id ?? "");
    expect(look(board).items.line?.state, "still open").toBe("lapsed");
    opening.closed = board.now;
    expect(look(board).items.line?.state, "kept at the instant of closing, not after").toBe("lapsed");
    board.wait();
    board.keep(line?.id ?? "");
    board.keep(bay?.id ?? "", { by: "cy", as: "builder" });
    expect(look(board).items).toMatchObject({ line: { state: "done" }, bay: { state: "lapsed" } });
    board.keep(bay?.id ?? "", { by: "ed", as: "inspector" });
    expect(look(board).gates.fp?.state, "the old signatures hold again").toBe("signed");
  });

  test("a tool is judged at the instant of use, and a bad check reaches back to the last good one", () => {
    const used = () => makeBoard({ mf: { ...BUILDER_ONLY, items: { bolts: { parts: [torque()] } } } });
    const board = used().wait(4);
    const [tool] = board.s.tools;
    const [check] = tool?.checks ?? [];
    if (!tool || !check) throw new Error("the board has a tool");
    signAll(board);
    check.due = board.now + TICK;
    expect(look(board, board.now + 9 * TICK).gates.mf?.state, "in date when used").toBe("signed");
    check.due = board.now;
    expect(look(board).items.bolts?.state, "ran out at that instant").toBe("lapsed");
    check.due = board.now + 99 * TICK;
    tool.checks.push({ id: "out", at: board.now + 2 * TICK, good: false, due: null, since: null });
    expect(look(board, board.now + 2 * TICK).items.bolts?.state).toBe("lapsed");
    tool.checks.push({ id: "between", at: board.now + TICK, good: true, due: board.now + 99 * TICK, since: null });
    expect(look(board, board.now + 2 * TICK).items.bolts?.state, "good in between").toBe("done");
  });

  test("what rests on plugs out: at most twelve hours, and not across plugs back", () => {
    const items = { out: { step: { endedBy: "back" } }, crank: { follows: ["out"] }, back: { follows: ["crank"] } };
    const at = (hours: number) => {
      const board = makeBoard({ op: { items } });
      board.proof("out");
      board.now += hours * HOUR;
      board.proof("crank");
      return board;
    };
    expect(look(at(12)).items.crank?.state).toBe("done");
    expect(look(at(12.25)).items.crank?.state).toBe("lapsed");
    const board = at(1).wait();
    board.proof("back");
    expect(look(board.wait()).items).toMatchObject({ crank: { state: "done" }, back: { state: "done" } });
    board.proof("crank");
    expect(look(board).items.crank?.state, "plugs are back in").toBe("lapsed");
    board.wait().proof("out");
    expect(look(board).items.back?.state, "plugs out again").toBe("lapsed");
  });

  test("a walk-round is spent by a run", () => {
    const board = briefed();
    expect(look(board).gates.wr?.state).toBe("signed");
    board.wait().completeRun(runOf(board));
    expect(look(board)).toMatchObject({ gates: { wr: { state: "lapsed" }, mf: { state: "signed" } }, rungs: { 1: { settled: true } } });
    expect(runState(board)?.state).toBe("reviewed");
    const keeper = board.current("caps")?.id ?? "";
    board.wait().keep(keeper);
    expect(look(board).gates.wr?.state, "each run gates cannot be kept").toBe("lapsed");
    board.wait().proof("caps");
    board.signGate("wr");
    expect(look(board).gates.wr?.state).toBe("signed");
  });

  test("second eyes are another person's, in a role held then", () => {
    const board = makeBoard({ mf: { items: { bolts: { secondEyes: true } } } });
    const proof = board.proof("bolts", { by: "cy", did: "bo" });
    for (const who of [
      { by: "bo", as: "builder" },
      { by: "cy", as: "builder" },
      { by: "fi", as: "builder" },
    ] as const)
      board.confirm(proof.id, who);
    expect(look(board).items.bolts).toEqual({ stands: false, state: "second eyes" });
    board.confirm(proof.id, { by: "la", as: "lead" });
    const role = board.s.members.find((m) => m.id === "la")?.roles[0];
    if (role) role.to = board.now + TICK;
    expect(look(board, board.now + 4 * TICK).items.bolts?.state, "losing the role later voids nothing").toBe("done");
  });

  test("the proof that happened last counts; of two at one instant the later recorded", () => {
    const board = makeBoard({ mf: { items: { gap: { parts: [measure()] } } } });
    const first = board.proof("gap");
    const bad = board.proof("gap", { evidence: [{ kind: "measure", values: [16] }] });
    expect(look(board).items.gap?.state, "a correction at the same instant").toBe("to do");
    board.withdraw(bad);
    expect(look(board).items.gap?.state, "an older one never comes back").toBe("to do");
    board.proof("gap", { counts: board.now - TICK, late: true });
    expect(look(board).items.gap?.state, "typed in late for an earlier instant").toBe("to do");
    board.wait();
    const late = board.proof("gap", { counts: first.counts + 1, late: true });
    expect(look(board).items.gap?.state).toBe("second eyes");
    board.confirm(late.id);
    expect(look(board).items.gap?.state).toBe("done");
  });

  test("not applicable waits for an inspector, and never for a killer item of a walk-round", () => {
    const board = makeBoard({
      mf: { items: { a: {} } },
      wr: { eachRun: true, requiredBy: { kind: "runs" }, items: { b: { killer: true } } },
    });
    const [a, b] = ["a", "b"].map((item) => board.proof(item, { state: "na", evidence: [] }).id);
    board.accept(b ?? "");
    expect(look(board).items).toMatchObject({ a: { state: "second eyes" }, b: { state: "to do" } });
    board.accept(a ?? "");
    board.open(["oil"]);
    expect(look(board).items.a).toEqual({ stands: true, state: "not applicable" });
    board.find("a").revision = 2;
    expect(look(board).items.a?.state).toBe("lapsed");
  });

  test("validity from the proof, and from the newest completed run where that is later", () => {
    const validity = { hours: 12, afterRunHours: 24 };
    const board = makeBoard({
      fp: { ...BUILDER_ONLY, validity, items: { prime: {}, own: { validity: { hours: 2, afterRunHours: null } } } },
    });
    board.rung("2");
    signAll(board);
    const proven = board.now;
    expect(look(board, proven + 2 * HOUR - 1).items).toMatchObject({ prime: { state: "done" }, own: { state: "done" } });
    expect(look(board, proven + 2 * HOUR).items).toMatchObject({ prime: { state: "done" }, own: { state: "lapsed" } });
    expect(look(board, proven + 12 * HOUR).items.prime?.state).toBe("lapsed");
    const run = board.wait(4).run("1");
    board.plan(run);
    board.completeRun(run);
    const ended = proven + 5 * TICK;
    expect(look(board, ended + 24 * HOUR - 1).items.prime?.state).toBe("done");
    expect(look(board, ended + 24 * HOUR).items.prime?.state).toBe("lapsed");
  });

  test("*after* asks for newer proofs where a system is shared, and passes through a hidden gate", () => {
    const fs = { items: { tank: { systems: ["fuelsup" as const] } } };
    const fp = { after: ["gone"], items: { flow: { systems: ["fuelsup" as const] }, oil: { systems: ["oil" as const] } } };
    const board = signAll(makeBoard({ fs, gone: { after: ["fs"], hidden: true, items: { x: {} } }, fp })).wait();
    expect(look(board).gates.fp?.state).toBe("signed");
    board.proof("tank");
    expect(look(board)).toMatchObject({
      items: { flow: { state: "lapsed" }, oil: { state: "done" } },
      gates: { fs: { state: "ready" }, fp: { state: "lapsed" } },
    });
    const again = board.current("tank");
    if (again) board.withdraw(again);
    expect(look(board).items.flow?.state, "taking the newer proof back makes nothing stand").toBe("lapsed");
    board.proof("tank");
    board.keep(board.current("flow")?.id ?? "");
    expect(look(board).items.flow?.state, "kept at the same instant").toBe("lapsed");
    board.wait().keep(board.current("flow")?.id ?? "");
    expect(look(board).items.flow?.state).toBe("done");
    board.signGate("fs");
    expect(look(board).gates.fp?.state).toBe("signed");
  });

  test("the countersigner is another person who did nothing that the list covers", () => {
    const board = makeBoard({ mf: { items: { bolts: {} } } });
    board.proof("bolts", { by: "bo", did: "di" });
    board.sign("mf", "di", "inspector");
    expect(look(board).gates.mf?.state, "the builder comes first").toBe("ready");
    board.sign("mf", "bo", "builder");
    board.sign("mf", "di", "inspector");
    expect(look(board).gates.mf?.state, "own work").toBe("half signed");
    const countersigned = board.sign("mf", "ed", "inspector");
    expect(look(board).gates.mf?.state).toBe("signed");
    board.withdraw(countersigned);
    expect(look(board).gates.mf?.state).toBe("half signed");
    board.wait().proof("bolts");
    expect(look(board).gates.mf?.state, "both lists are stale").toBe("ready");
  });

  test("grounding findings and loose ends stop their gate until a second person has seen to them", () => {
    const board = primed();
    const finding = board.finding("grounding", { system: "fueleng" });
    const end = board.looseEnd({ kind: "gate", gate: "op" });
    expect(look(board).gates).toMatchObject({ fp: { complete: false, state: "lapsed" }, op: { complete: false, state: "lapsed" } });
    finding.fixed = { ...board.record("fixed"), action: "tightened" };
    end.restored = board.record("restored");
    expect(look(board).gates).toMatchObject({ fp: { state: "lapsed" }, op: { state: "lapsed" } });
    finding.closed = board.record("closed", { by: "di", as: "inspector" });
    end.confirmed = board.record("confirmed", { by: "cy", as: "builder" });
    expect(look(board).gates).toMatchObject({ fp: { state: "signed" }, op: { state: "signed" } });
  });

  test("a run is clear with gates, crew and wind, and its clearance is the least of the caps", () => {
    expect(runState(briefed())).toEqual({ clear: true, state: "planned", clearanceRpm: 20 });
    const without = (change: (board: Board) => void) => {
      const board = briefed();
      change(board);
      return runState(board);
    };
    expect(without((b) => b.finding("limiting", { cap: 15 }))).toMatchObject({ clear: false, clearanceRpm: 15 });
    expect(without((b) => b.finding("watch"))).toMatchObject({ clear: true });
    expect(without((b) => b.answer(runOf(b), "fi", { answer: "no-go" }))).toMatchObject({ clear: false });
    expect(without((b) => b.answer(runOf(b), "fi", { queueEmpty: false }))).toMatchObject({ clear: false });
    expect(without((b) => b.act(runOf(b), "hold"))).toMatchObject({ clear: false, state: "held" });
    expect(without((b) => b.plan(runOf(b)))).toMatchObject({ clear: false });
    expect(without((b) => b.wind(runOf(b), { speed: 7.1 }))).toMatchObject({ clear: false });
    expect(without((b) => b.act(runOf(b), "go"))).toMatchObject({ clear: true, state: "called" });
    expect(without((b) => b.looseEnd({ kind: "rung", rung: "1" }))).toMatchObject({ clear: false });
    const board = briefed();
    board.act(runOf(board), "go", { ends: board.now + TICK });
    expect(runState(board, board.now + TICK - 1)?.state).toBe("called");
    expect(runState(board, board.now + TICK)?.state).toBe("held");
    expect(runState(board, board.now + 40 * TICK)?.clear, "another day").toBe(false);
  });

  test("from its due rung on a loose end cannot be accepted", () => {
    const board = briefed();
    board.rung("2");
    const accepted = [{ ...board.record("accepted", { by: "di", as: "inspector" }), rung: "1", reason: "not turned" }];
    const end = board.looseEnd({ kind: "rung", rung: "2" }, { accepted });
    expect(runState(board)?.clear).toBe(true);
    end.due = { kind: "rung", rung: "1" };
    expect(runState(board)?.clear).toBe(false);
  });

  test("a rung is settled by a completed run planned high enough, until it is set back", () => {
    const board = makeBoard({ mf: { items: { bolts: {} } } });
    const run = board.run("1");
    board.plan(run, { rpm: 19 });
    board.completeRun(run);
    expect(look(board).rungs["1"]?.settled, "planned too low").toBe(false);
    const again = board.wait().run("1");
    board.plan(again);
    board.completeRun(again);
    expect(look(board).rungs["1"]?.settled).toBe(true);
    const [rung] = board.s.rungs;
    rung?.setBack.push(board.wait().record("set-back", { by: "di", as: "inspector" }));
    expect(look(board).rungs["1"]?.settled).toBe(false);
  });

  test("a count that was found wrong never makes another count equal", () => {
    const words = { out: "out", in: "in" };
    const out = { step: { endedBy: "back" }, parts: [{ kind: "tally" as const, mode: "out" as const, words }] };
    const back = { parts: [{ kind: "tally" as const, mode: "in" as const, of: "out", words }] };
    const board = makeBoard({ op: { items: { out, back } } });
    const plugs = (out: number | null, back: number | null) => [{ kind: "tally" as const, places: [{ place: "plugs", out, in: back }] }];
    board.proof("out", { evidence: plugs(6, null) });
    const middle = board.wait().now;
    board.wait().proof("back", { evidence: plugs(null, 5) });
    expect(look(board).items.back?.state).toBe("to do");
    board.proof("out", { evidence: plugs(5, null), state: "failed", counts: middle, late: true, by: "cy" });
    expect(look(board).items.back?.stands).toBe(false);
  });

  test("the release asks for confirmed limits and two people, and lapses with a finding", () => {
    const board = makeBoard({ mf: { items: { bolts: {} } } });
    signAll(board);
    const run = board.wait().run("1");
    board.brief(run);
    board.completeRun(run);
    expect(look(board).release.state).toBe("ready");
    const covers = { items: [], signatures: board.s.signatures.map((x) => x.id) };
    const sign = (by: string, as: "lead" | "inspector") => {
      const base = { ...board.record("release", { by, as }), as, covers };
      board.s.releaseSignatures.push({ ...base, meaning: "released", rulesVersion: "1", withdrawn: null });
    };
    sign("la", "lead");
    expect(look(board).release.state).toBe("half signed");
    sign("di", "inspector");
    expect(look(board).release).toEqual({ stands: true, state: "released" });
    const limit = board.value("oilPressureMin", 6, null);
    expect(look(board).release.stands, "a limit that nobody has confirmed").toBe(false);
    limit.source = "manual p. 9";
    board.finding("watch");
    expect(look(board).release).toEqual({ stands: false, state: "lapsed" });
  });

  test("a circle of gates stands nowhere and ends", () => {
    const board = makeBoard({
      a: { needs: ["b"], items: { x: { follows: ["y"] } } },
      b: { needs: ["a"], items: { y: { follows: ["x"] } } },
    });
    signAll(board);
    expect(look(board)).toMatchObject({
      gates: { a: { stands: false }, b: { stands: false } },
      items: { x: { stands: false }, y: { stands: false } },
    });
  });
});
