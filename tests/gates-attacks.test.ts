/**
 * Attacks on the gate rules: snapshots and acts made to coax a yes where the rules say no, or a no that nobody can clear.
 * Each test states the claim it holds the evaluator to, and the part of the rules that it comes from.
 */
import fc from "fast-check";
import { describe, expect, test, vi } from "vitest";
import { evaluate, evaluateBoard } from "#app/lib/gates/evaluate";
import {
  mayAcceptLooseEnd,
  mayAnswerExceedance,
  mayClose,
  mayConfirmRestored,
  mayFix,
  mayGrade,
  mayLeaveOut,
  mayRestore,
  maySetBack,
} from "#app/lib/gates/happening-verdicts";
import type { Verdict } from "#app/lib/gates/result";
import { goEnds, mayAnswer, mayCallGo, mayHold, mayReport, mayScrub, mayStart } from "#app/lib/gates/run-verdicts";
import { maySign, maySignRelease, mayWithdrawSignature } from "#app/lib/gates/signing-verdicts";
import type { Run, SigningRole, Snapshot } from "#app/lib/gates/snapshot";
import { mayAccept, mayConfirm, mayKeep, mayProve } from "#app/lib/gates/verdicts";
import type { Part } from "#app/lib/template/types";
import { arbScene } from "./support/arb-snapshot";
import type { Board } from "./support/board";
import { HOUR, TICK, tick, torque } from "./support/parts";
import { runsOf } from "./support/property-runs";
import { restraintEvidence, sheetPart } from "./support/sheets";
import { makeBoard, signAll } from "./support/snapshots";

vi.setConfig({ testTimeout: 60_000 });

const at = (board: Board, when = board.now) => evaluateBoard(board.s, when);
const now = (board: Board, when = board.now) => evaluate(board.s, when);
const codes = (v: Verdict) => (v.ok ? [] : v.blockers.map((b) => b.code));
const runOf = (board: Board, run: Run, when = board.now) => at(board, when).runs.find((r) => r.id === run.id);
const LAST = <T>(list: T[]): T => list.at(-1) as T;

/** One signed gate, one run of rung 1 that is planned, briefed and clear. */
function briefed(gates: Parameters<typeof makeBoard>[0] = { G: { items: { a: { systems: ["oil"] } } } }) {
  const board = signAll(makeBoard(gates));
  const run = board.run("1");
  board.wait().brief(run);
  return { board, run };
}
const remove = (board: Board, id: string) => {
  for (const r of board.s.members.find((m) => m.id === id)?.roles ?? []) r.to = board.now;
};
const answerAll = (board: Board, run: Run) => {
  for (const m of ["la", "cy", "fi"]) board.answer(run, m);
};

// ================================================================ evidence (rule 1)

describe("evidence kinds: tally, sheet", () => {
  const out: Part = { kind: "tally", mode: "out", words: { out: "out", in: "in" } };
  const back = (of: string): Part => ({ kind: "tally", mode: "in", of, words: { out: "out", in: "in" } });
  const places = (mode: "out" | "in", counts: [string, number][]) => ({
    kind: "tally" as const,
    places: counts.map(([place, n]) => ({ place, out: mode === "out" ? n : null, in: mode === "in" ? n : null })),
  });
  function counted(taken: [string, number][], returned: [string, number][]) {
    const board = makeBoard({ G: { items: { o: { parts: [out] }, i: { parts: [back("o")] } } } });
    board.proof("o", { evidence: [places("out", taken)] });
    board.wait().proof("i", { evidence: [places("in", returned)] });
    return at(board).items.i?.stands;
  }
  test('"in" equals the newest "out": a place counted twice does not stand in for one that was not counted', () => {
    const taken: [string, number][] = [
      ["caps", 2],
      ["rags in the intake", 3],
    ];
    expect(
      counted(taken, [
        ["caps", 2],
        ["rags in the intake", 3],
      ]),
    ).toBe(true);
    expect(
      counted(taken, [
        ["rags in the intake", 3],
        ["caps", 2],
      ]),
    ).toBe(true);
    expect(
      counted(taken, [
        ["caps", 2],
        ["rags in the intake", 2],
      ]),
    ).toBe(false);
    expect(
      counted(taken, [
        ["caps", 2],
        ["caps", 2],
      ]),
      "the rags were never counted back",
    ).toBe(false);
  });
  test('"in" equals the newest "out": two places of one name are both counted back, and neither hides the other', () => {
    expect(
      counted(
        [
          ["bay", 1],
          ["bay", 4],
        ],
        [
          ["bay", 4],
          ["bay", 4],
        ],
      ),
      "8 back of 5 is no equal count",
    ).toBe(false);
  });
  test('"in" looks at the newest "out", withdrawn or failed ones included', () => {
    const board = makeBoard({ G: { items: { o: { parts: [out] }, i: { parts: [back("o")] } } } });
    board.proof("o", { evidence: [places("out", [["caps", 2]])] });
    board.wait().proof("i", { evidence: [places("in", [["caps", 2]])] });
    board.wait().proof("o", { evidence: [places("out", [["caps", 3]])] });
    expect(at(board).items.i?.stands).toBe(false);
    board.withdraw(LAST(board.s.proofs));
    expect(at(board).items.i?.stands, "the older count never comes back").toBe(false);
  });

  const rig = () => {
    const board = makeBoard({ T: { items: { s: { parts: [sheetPart] } } } });
    board.value("mass", 500, "weighed", { quantity: "mass", limit: false });
    return board;
  };
  test("the install's values that a sheet took are part of its criterion: inputs that say otherwise do not meet it", () => {
    const board = rig();
    board.proof("s", { evidence: [restraintEvidence(3000, 500)] });
    expect(at(board).items.s?.stands).toBe(true);
    const forged = restraintEvidence(3000, 500);
    if (forged.kind === "sheet") forged.inputs.mass = 50;
    board.wait().proof("s", { evidence: [forged] });
    expect(at(board).items.s?.stands, "computed with 50 kg where the install, and the sheet's own list, say 500 kg").toBe(false);
  });
  test("a value that the sheet takes and that was entered only later outdates the sheet", () => {
    const board = makeBoard({ T: { items: { s: { parts: [sheetPart] } } } });
    const early = restraintEvidence(3000, 50);
    if (early.kind === "sheet") early.took = {};
    board.proof("s", { evidence: [early] });
    board.value("mass", 500, "weighed", { quantity: "mass", limit: false });
    expect(at(board).items.s?.stands, "computed with 50 kg, weighed since as 500 kg").toBe(false);
  });
});

// ================================================================ proofs (rules 3 to 8)

describe("the instant that counts", () => {
  test("a proof stamped after it was recorded counts at the earlier end: a fast clock does not outlive an opening", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["oil"] } } } });
    board.proof("a", { counts: board.now + 10 * HOUR });
    const opening = board.wait().open(["oil"]);
    opening.closed = board.wait().now;
    expect(at(board).items.a?.stands).toBe(false);
  });
  test("a tool is in date before its due instant, not at it; a bad check at the instant of use takes the proof", () => {
    const board = makeBoard({ G: { items: { a: { parts: [torque()] } } } });
    const tool = LAST(board.s.tools);
    board.wait(4).proof("a");
    const check = tool.checks[0] as (typeof tool.checks)[number];
    check.due = board.now + 1;
    expect(at(board).items.a?.stands).toBe(true);
    check.due = board.now;
    expect(at(board).items.a?.stands).toBe(false);
    check.due = board.now + HOUR;
    tool.checks.push({ id: "bad", at: board.now, good: false, due: null, since: null });
    expect(at(board).items.a?.stands).toBe(false);
  });
  test("a tool that is not in the crib, or was found bad before and not checked good since, proves nothing", () => {
    const board = makeBoard({ G: { items: { a: { parts: [torque()] } } } });
    board.wait(4).proof("a", { tools: ["borrowed"] });
    expect(at(board).items.a?.stands).toBe(false);
    board.s.tools[0]?.checks.push({ id: "bad", at: board.wait().now, good: false, due: null, since: null });
    board.wait().proof("a");
    expect(at(board).items.a?.stands).toBe(false);
  });
  test("one of two tools in doubt is enough to take the proof", () => {
    const board = makeBoard({ G: { items: { a: { parts: [torque()] } } } });
    const second = board.tool("second");
    board.wait().proof("a", { tools: ["wrench", "second"] });
    expect(at(board).items.a?.stands).toBe(true);
    second.checks.push({ id: "bad", at: board.wait(9).now, good: false, due: null, since: null });
    expect(at(board).items.a?.stands).toBe(false);
  });
});

describe("second person", () => {
  test("a confirmation given in a role not held at that instant counts for nothing; losing the role later voids nothing", () => {
    const board = makeBoard({ G: { items: { a: { secondEyes: true } } } });
    const cy = board.s.members.find((m) => m.id === "cy");
    const proof = board.proof("a");
    board.wait(2).confirm(proof.id);
    const role = cy?.roles[0] as NonNullable<typeof cy>["roles"][number];
    role.to = board.now;
    expect(at(board).items.a?.stands, "removed at that very instant").toBe(false);
    role.to = board.now + 1;
    board.wait(9);
    expect(at(board).items.a?.stands, "removed after it").toBe(true);
    role.from = board.now - 7 * TICK;
    expect(at(board).items.a?.stands, "joined only after it").toBe(false);
  });
  test("an acceptance by whoever recorded the not-applicable, or by a former inspector, counts for nothing", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    const na = board.proof("a", { state: "na", evidence: [null], by: "di", did: "bo" });
    board.accept(na.id, { by: "di", as: "inspector" });
    expect(at(board).items.a?.stands).toBe(false);
    remove(board, "ed");
    board.accept(na.id, { by: "ed", as: "inspector" });
    expect(at(board).items.a?.stands).toBe(false);
    board.accept(na.id, { by: "la", as: "inspector" });
    expect(at(board).items.a?.stands, "a lead who calls himself inspector").toBe(false);
  });
  test("a confirmation, acceptance or keep of an older proof does not pass to the newer one", () => {
    const board = makeBoard({ G: { items: { a: { secondEyes: true, systems: ["oil"] }, n: {} } } });
    board.confirm(board.proof("a").id);
    board.accept(board.proof("n", { state: "na", evidence: [null] }).id);
    board.wait().proof("a");
    board.proof("n", { state: "na", evidence: [null] });
    expect([at(board).items.a?.state, at(board).items.n?.state]).toEqual(["second eyes", "second eyes"]);
  });
  test("a late entry needs its second person even where the item itself asks for none", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    const late = board.wait(9).proof("a", { late: true, counts: board.now - 4 * TICK });
    expect(at(board).items.a?.state).toBe("second eyes");
    board.confirm(late.id, { by: "bo", as: "builder" });
    expect(at(board).items.a?.state).toBe("second eyes");
    board.confirm(late.id);
    expect(at(board).items.a?.stands).toBe(true);
  });
});

describe("keep", () => {
  test("helps neither age, tools, revisions, marks nor each-run gates", () => {
    const board = makeBoard({
      G: { items: { old: { validity: { hours: 1, afterRunHours: null }, systems: ["oil"] }, rev: {}, t: { parts: [torque()] } } },
      W: { eachRun: true, requiredBy: { kind: "runs" }, items: { w: { systems: ["oil"] } } },
    });
    board.wait();
    for (const id of ["old", "rev", "t", "w"]) board.proof(id);
    board.find("rev").revision = 2;
    board.s.tools[0]?.checks.push({ id: "bad", at: board.wait(4).now, good: false, due: null, since: null });
    board.open(["oil"], { closed: board.now });
    board.wait();
    for (const id of ["old", "rev", "t", "w"]) {
      const e = now(board);
      expect(mayKeep(e, { proof: board.current(id)?.id ?? "", member: "di" }).ok, id).toBe(false);
      board.keep(board.current(id)?.id ?? "");
      expect(at(board).items[id]?.stands, id).toBe(false);
    }
  });
  test("does not outlive the next opening, and none is taken while the system is open", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["oil"] } } } });
    const proof = board.proof("a");
    const first = board.wait().open(["oil"]);
    expect(mayKeep(now(board), { proof: proof.id, member: "di" }).ok).toBe(false);
    board.keep(proof.id);
    first.closed = board.wait().now;
    expect(at(board).items.a?.stands, "kept before it was closed").toBe(false);
    board.wait().keep(proof.id);
    expect(at(board).items.a?.stands).toBe(true);
    board.wait().open(["oil"], { closed: board.now });
    expect(at(board).items.a?.stands).toBe(false);
  });
  test("is no cure where only what the item follows is at fault, and the refusal says so", () => {
    const board = makeBoard({ G: { items: { a: {}, b: { follows: ["a"] } } } });
    const b = board.proof("b");
    board.wait().proof("a");
    expect(at(board).items.b?.state).toBe("lapsed");
    expect(mayKeep(now(board), { proof: b.id, member: "di" }).ok, "a keep counts for rule 6 and `after` only").toBe(false);
  });
});

describe("steps and what follows", () => {
  const cranking = () =>
    makeBoard({ G: { items: { out: { step: { endedBy: "back" } }, crank: { follows: ["out"] }, back: { follows: ["crank"] } } } });
  test("the window is 12 h to the instant, not more", () => {
    for (const [ms, stands] of [
      [12 * HOUR, true],
      [12 * HOUR + 1, false],
    ] as const) {
      const board = cranking();
      board.proof("out");
      board.proof("crank", { counts: board.now + ms, recorded: board.now + ms });
      expect(at(board, board.now + ms).items.crank?.stands, String(ms)).toBe(stands);
    }
  });
  test("a step ended and recorded as ended in the same minute that it was done is over for what is done after", () => {
    const board = cranking();
    board.proof("out");
    board.proof("back");
    board.wait().proof("crank");
    expect(at(board).items.crank?.stands, "plugs back was recorded after plugs out, and before the cranking").toBe(false);
  });
  test("an ending that was withdrawn or found not right ended the step all the same", () => {
    for (const state of ["done", "failed"] as const) {
      const board = cranking();
      board.proof("out");
      const back = board.wait().proof("back", { state });
      if (state === "done") board.withdraw(back);
      board.wait().proof("crank");
      expect(at(board).items.crank?.stands, state).toBe(false);
    }
  });
  test("a step whose newest older proof is withdrawn is not saved by the one before it", () => {
    const board = cranking();
    board.proof("out");
    const again = board.wait().proof("out");
    board.wait().proof("crank");
    expect(at(board).items.crank?.stands).toBe(true);
    board.withdraw(again);
    expect(at(board).items.crank?.stands).toBe(false);
  });
});

describe("openings", () => {
  test("one that names no system opens the bay; one is closed strictly before a proof counts again", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["bay", "bay"] } } } });
    board.proof("a");
    const opening = board.wait().open([]);
    expect(at(board).items.a?.stands).toBe(false);
    opening.closed = board.wait().now;
    board.proof("a");
    expect(at(board).items.a?.stands, "at the closing itself").toBe(false);
    board.wait().proof("a");
    expect(at(board).items.a?.stands).toBe(true);
  });
  test("of two openings the one still open counts, whatever was closed since", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["oil"] } } } });
    board.open(["oil"]);
    board.wait().open(["oil"], { closed: board.now });
    board.wait().proof("a");
    expect(at(board).items.a?.blockers.map((b) => b.code)).toEqual(["system-open"]);
  });
});

// ================================================================ two people, whatever the path

describe("two people: what is read from the record is judged like what is done", () => {
  test("a loose end is restored when a second person confirms, not when its restorer does", () => {
    const { board, run } = briefed();
    const end = board.wait().looseEnd({ kind: "rung", rung: "1" }, { by: "bo" });
    end.restored = board.record("restored", { by: "bo", as: "builder" });
    end.confirmed = board.record("confirmed", { by: "bo", as: "builder" });
    expect(runOf(board, run)?.clear).toBe(false);
    end.confirmed = board.record("confirmed", { by: "cy", as: "builder" });
    expect(runOf(board, run)?.clear).toBe(true);
  });
  test("a grounding finding is closed by an inspector who did not fix it", () => {
    for (const closed of [
      { by: "bo", as: "builder" },
      { by: "di", as: "inspector" },
    ] as const) {
      const { board, run } = briefed();
      const finding = board.wait().finding("grounding", { system: "oil" });
      finding.fixed = { ...board.record("fixed", closed), action: "tightened" };
      finding.closed = board.record("closed", closed);
      expect(runOf(board, run)?.clear, closed.by).toBe(false);
    }
  });
  test("a loose end is accepted by an inspector other than whoever made it, holding the role then", () => {
    const { board, run } = briefed();
    const end = board.wait().looseEnd({ kind: "gate", gate: "none" }, { by: "di", as: "inspector" });
    end.accepted.push({ ...board.record("ok", { by: "di", as: "inspector" }), rung: "1", reason: "short" });
    expect(runOf(board, run)?.clear, "made and accepted by one person").toBe(false);
    end.accepted = [{ ...board.record("ok", { by: "bo", as: "inspector" }), rung: "1", reason: "short" }];
    expect(runOf(board, run)?.clear, "accepted as inspector by one who is none").toBe(false);
    end.accepted = [{ ...board.record("ok", { by: "ed", as: "inspector" }), rung: "1", reason: "short" }];
    expect(runOf(board, run)?.clear).toBe(true);
  });
  test("a rung is left out when an inspector accepted it", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    LAST(board.s.rungs).leftOut = { ...board.record("left", { by: "la", as: "lead" }), reason: "no need" };
    expect(at(board).rungs["1"]?.settled).toBe(false);
    LAST(board.s.rungs).leftOut = { ...board.record("left", { by: "di", as: "inspector" }), reason: "run before" };
    expect(at(board).rungs["1"]?.settled).toBe(true);
  });
  test("a loose end cannot be accepted from its due rung on, though it was accepted before that rung came", () => {
    const { board, run } = briefed();
    const end = board.wait().looseEnd({ kind: "rung", rung: "1" });
    end.accepted.push({ ...board.record("ok", { by: "di", as: "inspector" }), rung: "1", reason: "short" });
    expect(runOf(board, run)?.clear).toBe(false);
    expect(mayAcceptLooseEnd(now(board), { looseEnd: end.id, member: "di", rung: "1" }).ok).toBe(false);
  });
});

// ================================================================ signatures

describe("signatures", () => {
  const one = () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    board.proof("a");
    return board.wait();
  };
  test("a signature in a role that was not held then, or is claimed only, fills no place", () => {
    const board = one();
    board.sign("G");
    board.wait().sign("G", "la", "inspector");
    expect(at(board).gates.G?.stands, "a lead who is no inspector").toBe(false);
    remove(board, "di");
    board.sign("G", "di", "inspector");
    expect(at(board).gates.G?.stands, "removed at that instant").toBe(false);
    board.sign("G", "ed", "inspector");
    remove(board.wait(), "ed");
    expect(at(board.wait()).gates.G?.stands, "removed after it: voids nothing").toBe(true);
  });
  test("the countersignature comes after the builder's: one that was there before a new first one does not count", () => {
    const board = one();
    const first = board.sign("G");
    board.wait().sign("G", "di", "inspector");
    expect(at(board).gates.G?.stands).toBe(true);
    board.withdraw(first, { by: "bo", as: "builder" });
    board.wait().sign("G", "cy");
    expect(at(board).gates.G?.state).toBe("half signed");
    expect(maySign(now(board), { gate: "G", member: "di", as: "inspector", covers: board.covers("G") }).ok).toBe(true);
  });
  test("another revision of the gate or of an item, a new item or a hidden one: the list is not today's", () => {
    const changes: ((b: Board) => void)[] = [
      (b) => {
        (b.s.gates[0] as { revision: number }).revision = 2;
      },
      (b) => b.item("late", "G"),
      (b) => {
        b.find("b").hidden = true;
      },
      (b) => {
        b.find("a").revision = 2;
        Object.assign(b.current("a") ?? {}, { revision: 2 });
      },
    ];
    for (const change of changes) {
      const board = signAll(makeBoard({ G: { items: { a: {}, b: {} } } }));
      expect(at(board).gates.G?.stands).toBe(true);
      change(board);
      expect(at(board).gates.G?.stands, String(change)).toBe(false);
    }
  });
  test("covers with a proof named twice, or one left out, are not today's list", () => {
    const board = makeBoard({ G: { items: { a: {}, b: {} } } });
    board.proof("a");
    board.proof("b");
    const [a, b] = board.wait().covers("G");
    for (const covers of [[a, a], [a], [a, b, b], []] as const) {
      const list = covers.flatMap((c) => (c ? [c] : []));
      expect(codes(maySign(now(board), { gate: "G", member: "bo", as: "builder", covers: list }))).toEqual(["stale"]);
    }
  });
  test("whoever countersigns did none of it, where the second place is a builder's too", () => {
    const board = makeBoard({ G: { policy: [["builder"], ["builder"]], items: { a: {} } } });
    board.proof("a", { by: "cy", did: "cy" });
    board.wait().sign("G", "bo");
    expect(at(board.wait()).gates.G?.state).toBe("half signed");
    expect(maySign(now(board), { gate: "G", member: "cy", as: "builder", covers: board.covers("G") }).ok).toBe(false);
    expect(maySign(now(board), { gate: "G", member: "la", as: "builder", covers: board.covers("G") }).ok).toBe(true);
  });
  test("whoever the first place names may sign there, whatever the role is called", () => {
    const board = makeBoard({ G: { policy: [["builder", "lead"], ["inspector"]], items: { a: {} } } });
    board.proof("a");
    const list = board.wait().covers("G");
    expect(codes(maySign(now(board), { gate: "G", member: "la", as: "lead", covers: list }))).toEqual([]);
  });
  test("a lead who built part of it cannot countersign as lead; the recorder of another's work cannot either", () => {
    const board = makeBoard({ G: { policy: [["builder"], ["lead", "inspector"]], items: { a: {}, b: {} } } });
    board.proof("a", { by: "la", did: "la" });
    board.proof("b", { by: "di", did: "bo" });
    board.wait().sign("G", "bo");
    for (const [member, as] of [
      ["la", "lead"],
      ["di", "inspector"],
    ] as const) {
      expect(maySign(now(board), { gate: "G", member, as, covers: board.covers("G") }).ok, member).toBe(false);
      board.sign("G", member, as);
      expect(at(board).gates.G?.stands, member).toBe(false);
    }
  });
  test("only the signer or an inspector takes a signature back", () => {
    const board = one();
    const s = board.sign("G");
    for (const [member, ok] of [
      ["bo", true],
      ["di", true],
      ["la", false],
      ["cy", false],
    ] as const)
      expect(mayWithdrawSignature(now(board), { signature: s.id, member }).ok, member).toBe(ok);
  });
});

// ================================================================ gates and marks

describe("marks", () => {
  test("not applicable needs only its revision and an inspector: a gate that looks back on a rung left out is no dead end", () => {
    const board = makeBoard({
      S: { lookBack: { kind: "rung", rung: "1" }, requiredBy: { kind: "release" }, items: { s: {} } },
    });
    LAST(board.s.rungs).leftOut = { ...board.record("left", { by: "di", as: "inspector" }), reason: "run before" };
    const na = board.wait().proof("s", { state: "na", evidence: [null], note: "rung left out" });
    board.accept(na.id);
    expect(at(board).items.s).toMatchObject({ state: "not applicable", stands: true });
  });
  test("what a look-back gate says of a rung that was left out is true", () => {
    const board = makeBoard({ S: { lookBack: { kind: "rung", rung: "1" }, requiredBy: { kind: "release" }, items: { s: {} } } });
    LAST(board.s.rungs).leftOut = { ...board.record("left", { by: "di", as: "inspector" }), reason: "run before" };
    board.wait().proof("s");
    const [first] = at(board).items.s?.blockers ?? [];
    expect(first?.sentence, "no run of this rung will ever end").not.toContain("not ended yet");
  });
  test("each run: newer than work in the gates that the run being readied requires, an earlier rung's run again included", () => {
    const board = makeBoard({
      X: { requiredBy: { kind: "rung-and-release", rung: "1" }, items: { x: {} } },
      W: { eachRun: true, requiredBy: { kind: "runs" }, items: { w: {} } },
    });
    board.rung("2", 30);
    signAll(board);
    const first = board.run("1");
    board.wait().brief(first);
    board.completeRun(first);
    board.wait().work(board.s.gates.find((g) => g.id === "W") as Snapshot["gates"][number]);
    const again = board.run("1");
    board.wait().brief(again);
    expect(runOf(board, again)?.clear, "walked round after all work").toBe(true);
    board.wait().work(board.s.gates.find((g) => g.id === "X") as Snapshot["gates"][number]);
    expect(runOf(board, again)?.requiredGates).toContain("X");
    expect(runOf(board, again)?.clear, "X was worked on after the walk-round").toBe(false);
  });
  test("each run: a start spends it, and a walk-round at the very end of the run is no new one", () => {
    const { board, run } = briefed({
      G: { items: { a: {} } },
      W: { eachRun: true, requiredBy: { kind: "runs" }, items: { w: {} } },
    });
    board.act(run, "go");
    board.act(run, "start");
    board.wait().act(run, "ended");
    board.proof("w");
    expect(at(board).items.w?.stands).toBe(false);
  });
  test("guarded: no passing late entry, none while a prerequisite does not stand; a failing one always", () => {
    const board = makeBoard({ A: { items: { a: {} } }, B: { needs: ["A"], items: { crank: { guarded: true } } } });
    const ask = (state: "done" | "failed", late: boolean) =>
      mayProve(now(board), { item: "crank", member: "bo", as: "builder", state, late }).ok;
    expect([ask("done", false), ask("done", true), ask("failed", false), ask("failed", true)]).toEqual([false, false, true, true]);
    signAll(board, (g) => g.id === "A");
    expect([ask("done", false), ask("done", true)]).toEqual([true, false]);
  });
  test("a gate added after the plan is required at once: the run is not clear without it", () => {
    const { board, run } = briefed();
    expect(runOf(board, run)?.clear).toBe(true);
    board.gate("N");
    board.item("n", "N");
    expect(runOf(board, run)?.clear, "adding a gate counts at once; leaving it out of a run is an inspector's to accept").toBe(false);
  });
  test("release: proofs of its own gates are newer than the end of every run, cut short ones and unstarted ones included", () => {
    const board = makeBoard({ R: { requiredBy: { kind: "release" }, policy: [], items: { r: {} } } });
    board.proof("r");
    expect(at(board).gates.R?.stands).toBe(true);
    const run = board.run("1");
    board.wait().act(run, "start", { unstarted: true });
    board.act(run, "ended");
    board.act(run, "outcome", { outcome: "cut short" });
    expect(at(board).gates.R?.stands).toBe(false);
  });
});

// ================================================================ runs

describe("runs: clear, until, GO", () => {
  test("clear until the first instant at which time alone ends it: a review that rests on what runs out ends with it", () => {
    const board = makeBoard({ V: { requiredBy: { kind: "release" }, items: { v: {} } } });
    board.rung("2", 30);
    const first = board.run("1");
    board.wait().brief(first);
    const post = board.completeRun(first);
    board.find("v").validity = { hours: 2, afterRunHours: null };
    board.wait().work(board.s.gates[0] as Snapshot["gates"][number]);
    post.needs = ["V"];
    const second = board.run("2");
    board.wait().brief(second);
    const judged = runOf(board, second);
    expect(judged?.clear).toBe(true);
    const until = judged?.until ?? Number.POSITIVE_INFINITY;
    expect(runOf(board, second, until - 1)?.clear, "until is the first instant at which it ends, not later").toBe(true);
  });
  test("redline and card limits are confirmed with a source: a board without any redline is not clear, however low the plan", () => {
    const { board, run } = briefed();
    board.s.values.splice(0);
    (run.plans[0] as { rpm: number }).rpm = 0;
    expect(runOf(board, run)?.clear).toBe(false);
  });
  test("GO is over when what it stood on ends earlier than it was called for, before anybody writes HOLD", () => {
    const { board, run } = briefed({
      G: { items: { a: {} } },
      F: { requiredBy: { kind: "runs" }, policy: [], items: { fi: { parts: [{ kind: "computed", rule: "extinguishers" }] } } },
    });
    board.act(run, "go", { ends: board.now + 4 * HOUR });
    expect(runOf(board, run)).toMatchObject({ state: "called", clear: true });
    for (const x of board.s.extinguishers) x.lookDue = board.now + HOUR;
    expect(runOf(board, run), "another bottle, in date for one hour more: no HOLD is due yet").toMatchObject({ clear: true });
    const then = runOf(board, run, board.now + HOUR);
    expect(then?.clear).toBe(false);
    expect(then?.state, "GO ends at the earlier of its window and until").toBe("held");
  });
  test("GO stands on the plan version it was called for, not on a later one", () => {
    const { board, run } = briefed();
    board.act(run, "go");
    board.brief(run, { rpm: 44 });
    expect(mayStart(now(board), { run: run.id, member: "la" }).ok, "GO was for version 1, this is version 2").toBe(false);
  });
  test("GO ends at its instant, not after; answers and wind of exactly 60 min do, of more do not", () => {
    const { board, run } = briefed();
    const start = board.now;
    board.act(run, "go", { ends: start + 2 * HOUR });
    expect(mayStart(now(board, start + HOUR), { run: run.id, member: "la" }).ok).toBe(true);
    expect(codes(mayStart(now(board, start + HOUR + 1), { run: run.id, member: "la" }))).toEqual(["answer-old", "wind-old"]);
    expect(codes(mayStart(now(board, start + 2 * HOUR), { run: run.id, member: "la" }))).toContain("go-over");
  });
  test("GO is refused with the blockers of the planned instant where the run does not stand until then", () => {
    const { board, run } = briefed();
    run.plannedStart = run.winds[0]?.dayEnds ?? 0;
    expect(codes(mayCallGo(now(board), { run: run.id, member: "la" }))).toEqual(["wind-missing"]);
    run.plannedStart -= 1;
    expect(mayCallGo(now(board), { run: run.id, member: "la" }).ok).toBe(true);
    expect(goEnds(now(board), run.id)).toBe(run.plannedStart + 1);
  });
  test("only a lead of now calls GO", () => {
    const { board, run } = briefed();
    for (const member of ["bo", "di", "fi"]) expect(codes(mayCallGo(now(board), { run: run.id, member }))).toEqual(["not-your-role"]);
    const la = board.s.members.find((m) => m.id === "la");
    la?.roles.forEach((r) => {
      if (r.role === "lead") r.to = board.now;
    });
    expect(codes(mayCallGo(now(board), { run: run.id, member: "la" }))).toEqual(["not-your-role"]);
  });
  test("an answer of the instant of a HOLD counts only if it was recorded after it; one from a queue never", () => {
    const { board, run } = briefed();
    answerAll(board, run);
    board.act(run, "hold", {}, { by: "fi", as: "crew" });
    expect(runOf(board, run)?.clear).toBe(false);
    answerAll(board, run);
    expect(runOf(board, run)?.clear).toBe(true);
    board.answer(run, "fi", { queueEmpty: false });
    expect(runOf(board, run)?.clear).toBe(false);
  });
  test("a start taken back leaves the run held: the crew answers again before another GO", () => {
    const { board, run } = briefed();
    board.act(run, "go");
    board.act(run, "start");
    board.act(run, "take-back");
    board.wait();
    const judged = runOf(board, run);
    expect(judged?.state).toBe("held");
    expect(
      judged?.blockers.map((b) => b.code),
      "answers given before the try do not speak for the next one",
    ).toContain("no-answer");
  });
  test("a removed member in a position keeps it from being clear, and has no say on the run any more", () => {
    const { board, run } = briefed();
    board.act(run, "go");
    board.act(run, "start");
    remove(board, "cy");
    for (const report of ["ended", "take-back"] as const)
      expect(mayReport(now(board), { run: run.id, member: "cy", report }).ok, report).toBe(false);
  });
  test("any member may HOLD, a running run too; a run once started cannot be scrubbed", () => {
    const { board, run } = briefed();
    board.act(run, "go");
    board.act(run, "start");
    expect(mayHold(now(board), { run: run.id, member: "fi" }).ok).toBe(true);
    expect(mayHold(now(board), { run: run.id, member: "stranger" }).ok).toBe(false);
    expect(mayScrub(now(board), { run: run.id, member: "la" }).ok).toBe(false);
  });
  test("two attempts side by side: never both called, never one while the other runs", () => {
    const { board, run } = briefed();
    const other = board.run("1");
    board.brief(other);
    board.act(run, "go");
    expect(codes(mayCallGo(now(board), { run: other.id, member: "la" }))).toEqual(["other-run"]);
    board.act(run, "start");
    expect(runOf(board, other)?.clear).toBe(false);
    board.act(run, "take-back");
    expect(runOf(board, other)?.clear).toBe(false);
  });
});

describe("runs: what they settle", () => {
  test("an engine run that nobody started here is a run cut short: it renews nothing, whatever outcome is stated after", () => {
    const board = makeBoard({ G: { validity: { hours: 4, afterRunHours: 720 }, items: { a: {} } } });
    board.proof("a");
    const proved = board.now;
    const run = board.run("1", { plannedStart: null });
    board.wait().act(run, "start", { unstarted: true });
    board.act(run, "ended");
    board.act(run, "outcome", { outcome: "cut short" });
    expect(at(board).items.a?.until).toBe(proved + 4 * HOUR);
    board.act(run, "outcome", { outcome: "completed" });
    expect(at(board).items.a?.until).toBe(proved + 4 * HOUR);
  });
  test("no outcome is stated of a run that nobody started here: it is cut short from the first", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    const run = board.run("1", { plannedStart: null });
    board.act(run, "start", { unstarted: true });
    board.act(run, "ended");
    board.act(run, "outcome", { outcome: "cut short" });
    expect(mayReport(now(board), { run: run.id, member: "la", report: "outcome" }).ok).toBe(false);
  });
  test("a rung that was left out is set back like one that was run: engine or propeller changed", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    const rung = LAST(board.s.rungs);
    rung.leftOut = { ...board.record("left", { by: "di", as: "inspector" }), reason: "run before" };
    expect(maySetBack(now(board.wait()), { rung: "1", member: "la" }).ok).toBe(true);
    rung.setBack.push(board.record("back", { by: "la", as: "lead" }));
    expect(at(board).rungs["1"]?.settled, "bad news is always taken").toBe(false);
  });
  test("a run that ends at the instant of a set-back does not settle; one after it does", () => {
    const { board, run } = briefed();
    board.completeRun(run);
    const end = run.acts.find((a) => a.act === "ended")?.recorded ?? 0;
    LAST(board.s.rungs).setBack.push({ ...board.record("back", { by: "la", as: "lead" }), recorded: end });
    expect(at(board).rungs["1"]?.settled).toBe(false);
    (LAST(board.s.rungs).setBack[0] as { recorded: number }).recorded = end - 1;
    expect(at(board).rungs["1"]?.settled).toBe(true);
  });
  test("a rung without a speed is settled by no run", () => {
    const { board, run } = briefed();
    LAST(board.s.rungs).rpm = null;
    board.completeRun(run);
    expect(at(board).rungs["1"]?.settled).toBe(false);
  });
  test("every gate that looks back on a run stands before it is reviewed", () => {
    const { board, run } = briefed();
    board.completeRun(run);
    expect(runOf(board, run)?.state).toBe("reviewed");
    board.gate("po-more", { requiredBy: { kind: "release" }, lookBack: { kind: "run", run: run.id } });
    board.item("po-more-1", "po-more");
    expect(runOf(board, run)?.state).toBe("ended");
  });
  test("each exceedance is answered by a record of its own", () => {
    const { board, run } = briefed();
    const old = board.finding("watch", { words: "scratched paint" });
    old.closed = board.record("closed", { by: "di", as: "inspector" });
    board.wait();
    run.exceedances.push({ id: "x1", sentence: "Overspeed", answered: null });
    board.completeRun(run);
    expect(
      mayAnswerExceedance(now(board), { exceedance: "x1", member: "bo", finding: old.id }).ok,
      "a finding that was closed before the run answers nothing that the run did",
    ).toBe(false);
  });
  test("a second start forgets the end and the outcome of nothing: take-back, then a real run, is judged by the real one", () => {
    const { board, run } = briefed();
    board.act(run, "go");
    board.act(run, "start");
    board.act(run, "take-back");
    expect(at(board).rungs["1"]?.settled).toBe(false);
    expect(mayReport(now(board), { run: run.id, member: "la", report: "ended" }).ok).toBe(false);
    expect(mayReport(now(board), { run: run.id, member: "la", report: "outcome" }).ok).toBe(false);
    board.act(run, "ended", {});
    board.act(run, "outcome", {});
    expect(at(board).rungs["1"]?.settled, "an end without a start ends nothing").toBe(false);
    expect(runOf(board, run)?.state).toBe("held");
  });
});

describe("release", () => {
  function released() {
    const { board, run } = briefed();
    board.completeRun(run);
    const sign = (by: string, as: "lead" | "inspector") => {
      const covers = at(board).release.covers;
      board.s.releaseSignatures.push({ ...board.record("rel", { by, as }), as, meaning: "", rulesVersion: "1", covers, withdrawn: null });
    };
    return { board, run, sign };
  }
  test("a lead and an inspector, two people; one who is both does not sign twice", () => {
    const { board, sign } = released();
    board.s.members.find((m) => m.id === "la")?.roles.push({ role: "inspector", from: 0, to: null });
    sign("la", "lead");
    expect(maySignRelease(now(board), { member: "la", as: "inspector", covers: at(board).release.covers }).ok).toBe(false);
    sign("la", "inspector");
    expect(at(board).release.stands).toBe(false);
    sign("di", "inspector");
    expect(at(board).release.stands).toBe(true);
    expect(maySignRelease(now(board), { member: "ed", as: "inspector", covers: at(board).release.covers }).ok).toBe(false);
  });
  test("an opening closed since the end of the newest run lapses it; only an inspector's word on a mistake saves it", () => {
    const { board, sign } = released();
    sign("la", "lead");
    sign("di", "inspector");
    const opening = board.wait().open(["prop"], { closed: board.now });
    expect(at(board).release.state).toBe("lapsed");
    opening.mistake = { ...board.record("mistake", { by: "la", as: "lead" }), reason: "other aircraft" };
    expect(at(board).release.state, "a lead's word").toBe("lapsed");
    opening.mistake = { ...board.record("mistake", { by: "di", as: "inspector" }), reason: "other aircraft" };
    expect(at(board).release.state).toBe("released");
  });
  test("a signature of a gate signed anew is another one: the release is signed again", () => {
    const { board, sign } = released();
    sign("la", "lead");
    sign("di", "inspector");
    expect(at(board).release.state).toBe("released");
    board.withdraw(board.s.signatures[0] as { withdrawn: null });
    board.wait().signGate("G");
    expect(at(board).gates.G?.stands).toBe(true);
    expect(at(board).release.stands).toBe(false);
  });
});

// ================================================================ findings, rungs

describe("bad news never makes anything newly stand, nor raises a clearance", () => {
  test("a rung set back: the walk-round does not stand because the next run asks for less", () => {
    const board = makeBoard({
      G: { items: { a: {} } },
      X: { requiredBy: { kind: "rung-and-release", rung: "2" }, items: { x: {} } },
      W: { eachRun: true, requiredBy: { kind: "runs" }, items: { w: {} } },
    });
    board.rung("2", 30);
    signAll(board, (g) => g.id === "G");
    const run = board.run("1");
    board.wait().brief(run);
    board.completeRun(run);
    board.wait().work(board.s.gates.find((g) => g.id === "W") as Snapshot["gates"][number]);
    expect(at(board).gates.W, "it waits for X, which run 2 requires").toMatchObject({ stands: false, state: "waiting" });
    board.wait().s.rungs[0]?.setBack.push(board.record("back", { by: "la", as: "lead" }));
    expect(at(board).gates.W?.stands).toBe(false);
  });
  test("a limiting finding made grounding: the board does not clear to more than before", () => {
    const { board, run } = briefed();
    const finding = board.finding("limiting", { cap: 12 });
    expect(runOf(board, run)?.clearance.rpm).toBe(12);
    Object.assign(finding, { severity: "grounding", cap: null });
    expect(runOf(board, run)?.clearance.rpm).toBeLessThanOrEqual(12);
  });
});

describe("findings and rungs", () => {
  test("only an inspector lowers a finding: no cap makes a limiting one as sharp as a grounding one", () => {
    const { board } = briefed();
    const finding = board.finding("grounding", { system: "oil" });
    for (const cap of [0, 10, -1, -0.5, null])
      expect(mayGrade(now(board), { finding: finding.id, member: "fi", severity: "limiting", cap }).ok, String(cap)).toBe(false);
  });
  test("a limiting finding without a cap clears to nothing", () => {
    const { board, run } = briefed();
    board.finding("limiting", { cap: null });
    expect(runOf(board, run)).toMatchObject({ clear: false, clearance: { rpm: 0 } });
  });
  test("a rung already settled is not left out; an inspector alone may", () => {
    const { board, run } = briefed();
    expect(mayLeaveOut(now(board), { rung: "1", member: "la" }).ok).toBe(false);
    board.completeRun(run);
    expect(mayLeaveOut(now(board), { rung: "1", member: "di" }).ok).toBe(false);
  });
});

// ================================================================ nobody is sent to do what they may not do

describe("each blocker names a member who can clear it", () => {
  test("a grounding finding: every member named may take the next step", () => {
    const { board, run } = briefed();
    const finding = board.finding("grounding", { system: "oil" });
    const named = (code: string) => runOf(board, run)?.blockers.find((b) => b.code === code)?.owner.members ?? [];
    for (const member of named("grounding")) expect(mayFix(now(board), { finding: finding.id, member }).ok, member).toBe(true);
    finding.fixed = { ...board.record("fixed"), action: "tightened" };
    for (const member of named("grounding")) expect(mayClose(now(board), { finding: finding.id, member }).ok, member).toBe(true);
  });
  test("the release's findings and loose ends: at least one member named may take the next step", () => {
    const { board, run } = briefed();
    board.completeRun(run);
    board.s.members = board.s.members.filter((m) => ["bo", "di", "la"].includes(m.id));
    const finding = board.finding("watch");
    const end = board.looseEnd({ kind: "rung", rung: "1" });
    const named = (code: string) => at(board).release.blockers.find((b) => b.code === code)?.owner.members ?? [];
    expect(
      named("finding-open").filter((member) => mayFix(now(board), { finding: finding.id, member }).ok),
      "to fix",
    ).not.toEqual([]);
    expect(
      named("loose-end").filter((member) => mayRestore(now(board), { looseEnd: end.id, member }).ok),
      "to restore",
    ).not.toEqual([]);
    end.restored = board.record("restored", { by: "bo", as: "builder" });
    board.s.members = board.s.members.map((m) => (m.id === "la" ? { ...m, roles: m.roles.filter((r) => r.role === "lead") } : m));
    expect(
      named("loose-end").filter((member) => mayConfirmRestored(now(board), { looseEnd: end.id, member }).ok),
      "to confirm: the only builder restored it himself",
    ).not.toEqual([]);
  });
  test("in any scene, whoever is named for a signature, a confirmation or an acceptance may give it", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at: when }) => {
        const e = evaluate(snapshot, when);
        const wrong: string[] = [];
        for (const gate of Object.values(e.result.gates))
          for (const b of gate.blockers.filter((x) => x.code === "not-signed"))
            for (const member of b.owner.members) {
              const may = (["builder", "lead", "inspector"] as SigningRole[]).some(
                (as) => maySign(e, { gate: gate.id, member, as, covers: gate.covers }).ok,
              );
              if (!may) wrong.push(`${member} cannot sign ${gate.id}`);
            }
        for (const item of Object.values(e.result.items))
          for (const b of item.blockers) {
            const proof = item.proof ?? "";
            for (const member of b.owner.members) {
              if (b.code === "needs-second-eyes") {
                const roles = ["builder", "lead", "inspector"] as const;
                if (!roles.some((as) => mayConfirm(e, { proof, member, as }).ok)) wrong.push(`${member} cannot confirm ${item.id}`);
              }
              if (b.code === "needs-acceptance" && !mayAccept(e, { proof, member }).ok) wrong.push(`${member} cannot accept ${item.id}`);
            }
          }
        expect(wrong).toEqual([]);
      }),
      runsOf(200),
    );
  });
});

// ================================================================ verdicts agree with what the evaluator makes of the act

describe("an act that is allowed has its effect, and a refusal says why", () => {
  const record = (snapshot: Snapshot, when: number, by: string) => {
    const rows = [snapshot.proofs, snapshot.signatures, snapshot.confirmations, snapshot.keeps, snapshot.acceptances, snapshot.openings];
    const inRuns = snapshot.runs.flatMap((r) => [...r.acts, ...r.answers, ...r.acks, ...r.winds].map((x) => x.seq));
    const seq = 1 + Math.max(0, ...rows.flatMap((l: { seq: number }[]) => l.map((x) => x.seq)), ...inRuns);
    return { id: "attack", seq, recorded: when, by };
  };
  const members = ["la", "bo", "cy", "di", "ed", "fi", "nobody"];
  const roles = ["builder", "lead", "inspector"] as SigningRole[];

  test("a signature that may be given holds; where it may not, adding it never makes the gate stand", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at: when }) => {
        const e = evaluate(snapshot, when);
        for (const gate of snapshot.gates)
          for (const by of members)
            for (const as of roles) {
              const was = e.result.gates[gate.id];
              if (!was?.present || !was.ready) continue;
              const verdict = maySign(e, { gate: gate.id, member: by, as, covers: was.covers });
              if (!verdict.ok && verdict.blockers.length === 0) expect(verdict).toBe("a refusal with a reason");
              const signature = { ...record(snapshot, when, by), as, gate: gate.id, gateRevision: gate.revision, covers: was.covers };
              const more = { ...signature, meaning: "", rulesVersion: "1", withdrawn: null };
              const after = evaluateBoard({ ...snapshot, signatures: [...snapshot.signatures, more] }, when).gates[gate.id];
              const grew = (after?.holding.length ?? 0) > was.holding.length;
              if (grew !== verdict.ok) expect(`${by} as ${as} on ${gate.id}: ${verdict.ok} but grew ${grew}`).toBe("agreed");
            }
      }),
      runsOf(25),
    );
  });

  test("a keep that may be given brings its item back, or leaves only what a second person must see", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at: when }) => {
        const e = evaluate(snapshot, when);
        for (const item of Object.values(e.result.items))
          for (const by of ["di", "ed"]) {
            if (!item.proof || item.state !== "lapsed" || !mayKeep(e, { proof: item.proof, member: by }).ok) continue;
            const keep = { ...record(snapshot, when, by), as: "inspector" as const, proof: item.proof, reason: "so" };
            const after = evaluateBoard({ ...snapshot, keeps: [...snapshot.keeps, keep] }, when + 1).items[item.id];
            const left = after?.blockers.map((b) => b.code).filter((c) => c !== "needs-second-eyes" && c !== "follows") ?? [];
            // Kept in the very instant of the closing counts as not newer: the clock has gone on by the next try.
            const sameInstant = snapshot.openings.some((o) => o.closed === when) || snapshot.proofs.some((p) => p.counts === when);
            if (!sameInstant) expect(left, item.id).toEqual([]);
          }
      }),
      runsOf(150),
    );
  });

  test("GO and start are allowed only on a run that is clear, with an end that lies ahead; every refusal has a reason", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at: when }) => {
        const e = evaluate(snapshot, when);
        for (const run of snapshot.runs)
          for (const member of members) {
            const judged = e.result.runs.find((r) => r.id === run.id);
            const go = mayCallGo(e, { run: run.id, member });
            const start = mayStart(e, { run: run.id, member });
            for (const v of [go, start, mayAnswer(e, { run: run.id, member, version: 1, answer: "go" })])
              if (!v.ok) expect(v.blockers.length).toBeGreaterThan(0);
            if (go.ok) {
              expect(judged?.clear).toBe(true);
              expect(goEnds(e, run.id)).toBeGreaterThan(when);
            }
            if (start.ok) expect(judged).toMatchObject({ clear: true, state: "called", startBlockers: [] });
          }
      }),
      runsOf(150),
    );
  });
});

// ================================================================ a no that nobody can clear

describe("no dead end", () => {
  test("counts that were taken out under one name twice can be counted back as they were", () => {
    const board = makeBoard({
      G: {
        items: {
          o: { parts: [{ kind: "tally", mode: "out", words: { out: "out", in: "in" } }] },
          i: { parts: [{ kind: "tally", mode: "in", of: "o", words: { out: "out", in: "in" } }] },
        },
      },
    });
    const places = (mode: "out" | "in") =>
      [1, 4].map((n) => ({ place: "bay", out: mode === "out" ? n : null, in: mode === "in" ? n : null }));
    board.proof("o", { evidence: [{ kind: "tally", places: places("out") }] });
    board.wait().proof("i", { evidence: [{ kind: "tally", places: places("in") }] });
    expect(at(board).items.i?.stands).toBe(true);
  });
  test("a gate that may be signed stands at last, with one lead who builds and one inspector alone", () => {
    const board = makeBoard({
      A: { items: { a: {} } },
      B: { needs: ["A"], policy: [["builder"], ["lead", "inspector"]], items: { b: {} } },
    });
    board.s.members = board.s.members.filter((m) => ["la", "di"].includes(m.id));
    for (const [item, gate] of [
      ["a", "A"],
      ["b", "B"],
    ] as const) {
      board.proof(item, { by: "la", did: "la" });
      for (const [member, as] of [
        ["la", "builder"],
        ["di", "inspector"],
      ] as const) {
        expect(maySign(now(board.wait()), { gate, member, as, covers: board.covers(gate) })).toEqual({ ok: true });
        board.sign(gate, member, as);
      }
      expect(at(board).gates[gate]?.stands).toBe(true);
    }
  });
  test("an inspector who is the only one and did part of the work is told whom to invite", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    board.s.members = board.s.members.filter((m) => ["bo", "di"].includes(m.id));
    board.proof("a", { by: "di", did: "di" });
    board.wait().sign("G");
    expect(at(board).gates.G?.blockers[0]?.owner).toMatchObject({ members: [], next: expect.stringContaining("invite") });
  });
});

describe("odd boards", () => {
  test("a gate whose every item is hidden is not on the board, and passes on what it needs", () => {
    const board = makeBoard({
      A: { items: { a: {} } },
      H: { needs: ["A"], items: { h: { hidden: true } } },
      C: { needs: ["H", "H"], items: { c: {} } },
    });
    board.proof("c");
    board.wait().sign("C");
    board.sign("C", "di", "inspector");
    expect(at(board).gates.C).toMatchObject({ stands: false, prerequisites: ["A"] });
  });
  test("a circle that closes through a hidden gate never stands, and what only waits for the circle is not said to be in it", () => {
    const board = makeBoard({
      A: { needs: ["H"], items: { a: {} } },
      H: { needs: ["B"], hidden: true, items: { h: {} } },
      B: { needs: ["A"], items: { b: {} } },
      D: { needs: ["A"], items: { d: {} } },
    });
    signAll(board);
    const { gates } = at(board);
    expect([gates.A?.stands, gates.B?.stands, gates.D?.stands]).toEqual([false, false, false]);
    expect(gates.D?.blockers[0]?.sentence, "A waits for B, not for D").not.toContain("wait for each other");
  });
  test("an item that follows itself, and two that follow each other, never stand", () => {
    const board = makeBoard({ G: { items: { s: { follows: ["s"] }, x: { follows: ["y"] }, y: { follows: ["x"] } } } });
    for (const id of ["s", "x", "y"]) board.wait().proof(id);
    expect(Object.values(at(board).items).map((i) => i.stands)).toEqual([false, false, false]);
  });
  test("a computed part beside a tick is never carried by somebody's tick", () => {
    const board = makeBoard({ G: { items: { a: { parts: [tick, { kind: "computed", rule: "extinguishers" }] } } } });
    board.s.extinguishers.splice(0);
    board.proof("a");
    expect(at(board).items.a?.stands).toBe(false);
    expect(mayProve(now(board), { item: "a", member: "bo", as: "builder", state: "done", late: false }).ok).toBe(false);
  });
});
