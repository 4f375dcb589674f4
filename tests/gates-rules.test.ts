/** The rules of a proof, a gate, a run and the release, one example each, written from the rules themselves. */
import { describe, expect, test } from "vitest";
import { evaluateBoard, withOpening } from "#app/lib/gates/evaluate";
import type { Board } from "./support/board.ts";
import { HOUR, measure, TICK, torque } from "./support/parts.ts";
import { makeBoard, signAll } from "./support/snapshots.ts";

const at = (board: Board) => evaluateBoard(board.s, board.now);
const item = (board: Board, id: string) => at(board).items[id];
const codes = (board: Board, id: string) => item(board, id)?.blockers.map((b) => b.code);

describe("an item's proof", () => {
  test("nothing proved: to do, and says who can do it", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    expect(item(board, "a")).toMatchObject({ state: "to do", stands: false, proof: null });
    expect(item(board, "a")?.blockers[0]).toMatchObject({ code: "item-to-do", owner: { members: expect.arrayContaining(["bo", "la"]) } });
  });

  test("a number outside its band does not meet it; the ends do", () => {
    const board = makeBoard({ G: { items: { a: { parts: [measure(5, 15)] } } } });
    for (const [value, stands] of [
      [4.999, false],
      [5, true],
      [15, true],
      [15.001, false],
    ] as const) {
      board.wait();
      board.proof("a", { evidence: [{ kind: "measure", values: [value] }] });
      expect(item(board, "a")?.stands, String(value)).toBe(stands);
    }
    expect(codes(board, "a")).toEqual(["out-of-band"]);
  });

  test("nothing meets a criterion without its number", () => {
    const board = makeBoard({ G: { items: { a: { parts: [measure(null, null)] } } } });
    board.proof("a");
    expect(codes(board, "a")).toEqual(["number-missing"]);
  });

  test("a band end taken from a limit of the install moves with it", () => {
    const part = measure(null, null);
    if (part.kind === "measure") part.criterion.limit = { key: "ecuVoltsMin", end: "min" };
    const board = makeBoard({ G: { items: { a: { parts: [part] } } } });
    board.proof("a");
    expect(codes(board, "a")).toEqual(["number-missing"]);
    const value = board.value("ecuVoltsMin", 9);
    expect(item(board, "a")?.stands).toBe(true);
    value.value = 11;
    expect(codes(board, "a")).toEqual(["out-of-band"]);
  });

  test("withdrawn: to do, and the older one never comes back", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    board.proof("a");
    const second = board.wait().proof("a");
    board.withdraw(second);
    expect(item(board, "a")).toMatchObject({ state: "to do", proof: null });
  });

  test("a tool past its date when used, or found out of tolerance later, takes the proof with it", () => {
    const board = makeBoard({ G: { items: { a: { parts: [torque()] } } } });
    const tool = board.s.tools[0];
    board.wait(2).proof("a");
    expect(item(board, "a")?.stands).toBe(true);
    tool?.checks.push({ id: "bad", at: board.wait(4).now, good: false, due: null, since: null });
    expect(codes(board, "a")).toEqual(["tool-doubtful"]);
    tool?.checks.splice(1, 1);
    (tool?.checks[0] as { due: number }).due = board.now - 5 * TICK;
    expect(codes(board, "a")).toEqual(["tool-out-of-date"]);
  });

  test("a good check between use and the bad one keeps the proof", () => {
    const board = makeBoard({ G: { items: { a: { parts: [torque()] } } } });
    board.wait(2).proof("a");
    board.s.tools[0]?.checks.push(
      { id: "good", at: board.wait().now, good: true, due: board.now + HOUR, since: null },
      { id: "bad", at: board.wait().now, good: false, due: null, since: null },
    );
    expect(item(board, "a")?.stands).toBe(true);
  });

  test("a bad check that says since when reaches over a good check, never less far than without", () => {
    const board = makeBoard({ G: { items: { a: { parts: [torque()] } } } });
    const used = board.wait(2).proof("a").counts;
    const checks = board.s.tools[0]?.checks ?? [];
    checks.push({ id: "good", at: board.wait().now, good: true, due: board.now + HOUR, since: null });
    const bad = { id: "bad", at: board.wait().now, good: false, due: null, since: used as number | null };
    checks.push(bad);
    expect(codes(board, "a")).toEqual(["tool-doubtful"]);
    bad.since = used + 1;
    expect(item(board, "a")?.stands).toBe(true);
    checks.splice(1, 1);
    expect(codes(board, "a")).toEqual(["tool-doubtful"]);
  });

  test("second pair of eyes: another builder, lead or inspector; not the doer, not the recorder, not crew", () => {
    for (const [who, stands] of [
      [{ by: "bo", as: "builder" }, false],
      [{ by: "cy", as: "builder" }, false],
      [{ by: "fi", as: "crew" }, false],
      [{ by: "la", as: "lead" }, true],
      [{ by: "di", as: "inspector" }, true],
    ] as const) {
      const board = makeBoard({ G: { items: { a: { secondEyes: true } } } });
      const proof = board.proof("a", { did: "cy" });
      board.confirm(proof.id, who);
      expect(item(board, "a")?.state, who.by).toBe(stands ? "done" : "second eyes");
    }
  });

  test("not applicable counts once an inspector accepted it; a killer item before each run never", () => {
    const board = makeBoard({ G: { items: { a: {} } }, W: { eachRun: true, items: { k: { killer: true } } } });
    const na = board.proof("a", { state: "na", evidence: [null], note: "no such part" });
    expect(item(board, "a")?.state).toBe("second eyes");
    board.accept(na.id);
    expect(item(board, "a")?.state).toBe("not applicable");
    const killer = board.proof("k", { state: "na", evidence: [null], note: "no" });
    board.accept(killer.id);
    expect(codes(board, "k")).toEqual(["na-not-allowed"]);
  });

  test("an opening that disturbed nothing counts until a second person has confirmed that, after it was closed", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["oil"] } } } });
    board.wait().proof("a");
    const opening = board.wait().open(["oil"], { by: "bo", closed: board.now, undisturbed: { confirmed: null } });
    expect(codes(board, "a")).toEqual(["system-opened-since"]);
    for (const [who, stands] of [
      [{ by: "bo", as: "builder" }, false],
      [{ by: "fi", as: "crew" }, false],
      [{ by: "cy", as: "inspector" }, false],
      [{ by: "cy", as: "builder" }, true],
      [{ by: "la", as: "lead" }, true],
      [{ by: "di", as: "inspector" }, true],
    ] as const) {
      opening.undisturbed = { confirmed: board.wait().record("seen", who) };
      expect(item(board, "a")?.stands, `${who.by} as ${who.as}`).toBe(stands);
    }
    opening.closed = board.wait().now;
    expect(codes(board, "a")).toEqual(["system-opened-since"]);
    opening.closed = null;
    expect(codes(board, "a")).toEqual(["system-open"]);
  });

  test("an opening of its system lapses it, open or closed since; every opening opens the bay; a keep brings it back", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["oil"] }, b: { systems: ["bay"] }, c: { systems: ["prop"] } } } });
    for (const id of ["a", "b", "c"]) board.proof(id);
    const opening = board.wait().open(["oil"]);
    expect(codes(board, "a")).toEqual(["system-open"]);
    expect(codes(board, "b")).toEqual(["system-open"]);
    expect(item(board, "c")?.stands).toBe(true);
    opening.closed = board.wait().now;
    expect(codes(board, "a")).toEqual(["system-opened-since"]);
    board.keep(board.current("a")?.id ?? "");
    expect(item(board, "a")?.stands, "kept at the closing itself is not newer").toBe(false);
    board.wait().keep(board.current("a")?.id ?? "");
    expect(item(board, "a")?.stands).toBe(true);
  });

  test("validity runs out at its instant, and a completed run renews it", () => {
    const board = makeBoard({ G: { validity: { hours: 2, afterRunHours: 4 }, items: { a: {} } } });
    board.rung("2");
    board.proof("a");
    const proved = board.now;
    expect(evaluateBoard(board.s, proved + 2 * HOUR - 1).items.a).toMatchObject({ stands: true, until: proved + 2 * HOUR });
    expect(evaluateBoard(board.s, proved + 2 * HOUR).items.a?.state).toBe("lapsed");
    const run = board.run("1");
    board.wait().brief(run);
    board.completeRun(run);
    const end = board.s.runs[0]?.acts.find((a) => a.act === "ended")?.recorded ?? 0;
    expect(item(board, "a")?.until).toBe(end + 4 * HOUR);
  });

  test("follows: the other must stand, with an older proof", () => {
    const board = makeBoard({ G: { items: { a: {}, b: { follows: ["a"] } } } });
    board.proof("b");
    expect(codes(board, "b")).toEqual(["follows"]);
    board.proof("a");
    expect(codes(board, "b"), "at one instant is not older").toEqual(["follows"]);
    board.wait().proof("b");
    expect(item(board, "b")?.stands).toBe(true);
  });

  test("a step holds until the item that ends it, and no longer than its window", () => {
    const board = makeBoard({
      G: { items: { out: { step: { endedBy: "back" } }, crank: { follows: ["out"] }, back: { follows: ["crank"] } } },
    });
    board.proof("out");
    board.wait().proof("crank");
    board.wait().proof("back");
    expect(item(board, "crank")?.stands).toBe(true);
    expect(item(board, "out")?.stands).toBe(true);
    board.wait().proof("crank");
    expect(codes(board, "crank")).toEqual(["step-ended"]);
    board.wait().proof("out");
    expect(codes(board, "back")).toContain("step-newer");
    board.wait(49).proof("crank");
    expect(codes(board, "crank")).toEqual(["step-too-old"]);
  });
});

describe("a gate", () => {
  test("signed by builder, then an inspector who did none of it", () => {
    const board = makeBoard({ G: { items: { a: {} } } });
    board.proof("a");
    expect(at(board).gates.G).toMatchObject({ state: "ready", complete: true, ready: true });
    board.wait().sign("G");
    expect(at(board).gates.G?.state).toBe("half signed");
    board.wait().sign("G", "bo", "inspector");
    expect(at(board).gates.G?.state, "the same person twice").toBe("half signed");
    board.wait().sign("G", "di", "inspector");
    expect(at(board).gates.G).toMatchObject({ state: "signed", stands: true, blockers: [] });
  });

  test("an inspector who did one of its items cannot carry it", () => {
    const board = makeBoard({ G: { items: { a: {}, b: {} } } });
    board.proof("a");
    board.proof("b", { by: "di", did: "di" });
    board.sign("G");
    board.wait().sign("G", "di", "inspector");
    expect(at(board).gates.G?.state).toBe("half signed");
    expect(at(board).gates.G?.blockers[0]?.owner.members).toEqual(["ed"]);
  });

  test("a new proof makes the signatures fall; a lapse that time or a keep heals does not", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["oil"] } } } });
    signAll(board);
    expect(at(board).gates.G?.stands).toBe(true);
    const opening = board.wait().open(["oil"]);
    opening.closed = board.wait().now;
    expect(at(board).gates.G?.state).toBe("lapsed");
    board.wait().keep(board.current("a")?.id ?? "");
    expect(at(board).gates.G?.state, "kept: nothing to sign again").toBe("signed");
    board.wait().proof("a");
    expect(at(board).gates.G?.state).toBe("ready");
  });

  test("waits for what it needs, and only the root stops the run", () => {
    const board = makeBoard({ A: { items: { a: {} } }, B: { needs: ["A"], items: { b: {} } }, C: { needs: ["B"], items: { c: {} } } });
    const result = at(board);
    expect(result.gates.C?.state).toBe("waiting");
    expect(result.next?.blockers.filter((b) => b.subject.kind === "gate").map((b) => b.subject.id)).toEqual(["A"]);
  });

  test("edges pass through a hidden gate", () => {
    const board = makeBoard({
      A: { items: { a: {} } },
      B: { needs: ["A"], hidden: true, items: { b: {} } },
      C: { needs: ["B"], items: { c: {} } },
    });
    expect(at(board).gates.C?.prerequisites).toEqual(["A"]);
    expect(at(board).gates.B?.present).toBe(false);
  });

  test("after: work there on a shared system undoes the proof here", () => {
    const board = makeBoard({
      A: { items: { a: { systems: ["fuelsup"] }, x: { systems: ["oil"] } } },
      B: { after: ["A"], items: { b: { systems: ["fuelsup"] } } },
    });
    signAll(board);
    expect(at(board).gates.B?.stands).toBe(true);
    board.wait().proof("x");
    expect(item(board, "b")?.stands, "another system").toBe(true);
    board.proof("a");
    expect(codes(board, "b")).toEqual(["after-gate"]);
    board.withdraw(board.current("a") ?? { withdrawn: null });
    expect(codes(board, "b"), "taking the work back does not bring it back").toEqual(["after-gate"]);
  });

  test("each run: newer than all other work and signatures, spent by a run", () => {
    const board = makeBoard({ A: { items: { a: {} } }, W: { eachRun: true, requiredBy: { kind: "runs" }, items: { w: {} } } });
    signAll(board);
    expect(at(board).gates.W?.stands).toBe(true);
    const run = board.run("1");
    board.wait().brief(run);
    board.completeRun(run);
    expect(at(board).gates.W?.state).toBe("lapsed");
  });

  test("gates that need each other never stand and never hang", () => {
    const board = makeBoard({ A: { needs: ["B"], items: { a: {} } }, B: { needs: ["A"], items: { b: {} } } });
    board.proof("a");
    board.proof("b");
    board.sign("A");
    board.sign("A", "di", "inspector");
    expect(at(board).gates.A).toMatchObject({ stands: false, state: "waiting" });
    expect(at(board).next?.clear).toBe(false);
  });

  test("a grounding finding on its system, and a loose end due before it, keep it from being complete", () => {
    const board = makeBoard({ G: { items: { a: { systems: ["oil"] } } } });
    signAll(board);
    const finding = board.finding("grounding", { system: "oil" });
    expect(at(board).gates.G?.stands).toBe(false);
    finding.closed = board.record("closed", { by: "di", as: "inspector" });
    expect(at(board).gates.G?.stands).toBe(true);
    board.looseEnd({ kind: "gate", gate: "G" });
    expect(at(board).gates.G?.blockers.map((b) => b.code)).toEqual(["loose-end"]);
  });
});

function briefed() {
  const board = signAll(makeBoard({ G: { items: { a: { systems: ["oil"] } } } }));
  const run = board.run("1");
  board.wait().brief(run);
  return { board, run, result: () => at(board).runs.find((r) => r.id === run.id) };
}

describe("a run", () => {
  test("clear when everything holds, until the wind's day ends", () => {
    const { result, run } = briefed();
    expect(result()).toMatchObject({ clear: true, state: "planned", blockers: [], until: run.winds[0]?.dayEnds });
  });

  test("each lack is named", () => {
    const lacks: [string, (b: ReturnType<typeof briefed>) => void][] = [
      ["not-acknowledged", ({ run }) => run.acks.pop()],
      ["no-answer", ({ run }) => run.answers.pop()],
      ["no-go", ({ board, run }) => board.answer(run, "fi", { answer: "no-go", reason: "no gloves" })],
      ["wind-missing", ({ run }) => run.winds.pop()],
      ["wind-over", ({ board, run }) => board.wind(run, { speed: 30 })],
      ["wind-over", ({ board, run }) => board.wind(run, { tail: true })],
      ["position-empty", ({ run }) => run.plans[0]?.positions.pop()],
      ["people", ({ run }) => run.plans[0]?.positions.pop()],
      ["pair", ({ run }) => run.plans[0]?.positions.push({ position: "fireguard", member: "la" })],
      ["not-active", ({ board }) => (board.s.members.find((m) => m.id === "fi") as { roles: unknown[] }).roles.splice(0)],
      ["limit-unconfirmed", ({ board }) => ((board.s.values[0] as { source: string | null }).source = null)],
      ["grounding", ({ board }) => board.finding("grounding", { system: "exh" })],
      ["loose-end", ({ board }) => board.looseEnd({ kind: "rung", rung: "1" })],
      ["clearance", ({ board }) => board.finding("limiting", { cap: 10 })],
      ["no-answer", ({ board, run }) => board.act(run, "hold")],
    ];
    for (const [code, spoil] of lacks) {
      const made = briefed();
      spoil(made);
      expect(made.result()?.clear, code).toBe(false);
      expect(
        made.result()?.blockers.map((b) => b.code),
        code,
      ).toContain(code);
    }
  });

  test("clearance is the least of plan, redline and limiting findings, and names what binds", () => {
    const { board, result } = briefed();
    expect(result()?.clearance).toMatchObject({ rpm: 20, binds: { kind: "plan" } });
    const finding = board.finding("limiting", { cap: 12 });
    expect(result()?.clearance).toMatchObject({ rpm: 12, binds: { kind: "finding", id: finding.id } });
    (board.s.values[0] as { value: number }).value = 11;
    expect(result()?.clearance).toMatchObject({ rpm: 11, binds: { kind: "redline" } });
  });

  test("GO stands until its end; HOLD stays until GO is called again after a new roll call", () => {
    const { board, run, result } = briefed();
    board.act(run, "go", { ends: board.now + HOUR });
    expect(result()).toMatchObject({ state: "called", go: { ends: board.now + HOUR } });
    expect(evaluateBoard(board.s, board.now + HOUR).runs[0]).toMatchObject({ state: "held", go: null });
    board.wait().act(run, "hold");
    expect(result()).toMatchObject({ state: "held", clear: false });
    board.wait();
    for (const m of ["la", "cy", "fi"]) board.answer(run, m);
    expect(result()).toMatchObject({ state: "held", clear: true });
  });

  test("the start wants answers and wind of the last hour", () => {
    const { board, run, result } = briefed();
    board.act(run, "go");
    expect(result()?.startBlockers).toEqual([]);
    expect(evaluateBoard(board.s, board.now + HOUR + 1).runs[0]?.startBlockers.map((b) => b.code)).toEqual(["answer-old", "wind-old"]);
  });

  test("a run that was called keeps another attempt from being clear until it is run or scrubbed, HOLD or not", () => {
    const { board, run } = briefed();
    const other = board.run("1");
    board.brief(other);
    board.act(run, "go");
    const stops = () =>
      at(board)
        .runs.find((r) => r.id === other.id)
        ?.blockers.map((b) => b.code);
    expect(stops()).toEqual(["other-run"]);
    board.act(run, "hold");
    expect(stops()).toEqual(["other-run"]);
    board.act(run, "scrub");
    expect(stops()).toEqual([]);
  });

  test("ended, then reviewed when outcome, log and post-run gate are there; the rung is settled", () => {
    const { board, run } = briefed();
    board.act(run, "go");
    board.act(run, "start");
    expect(at(board).runs[0]?.state).toBe("running");
    board.wait().act(run, "ended");
    expect(
      at(board)
        .runs.find((r) => r.id === run.id)
        ?.reviewBlockers.map((b) => b.code),
    ).toEqual(["outcome-missing", "log-missing", "gate-missing"]);
    board.act(run, "outcome");
    expect(at(board).rungs["1"]?.settled).toBe(true);
    const second = briefed();
    second.board.completeRun(second.run);
    expect(second.result()?.state).toBe("reviewed");
    expect(at(second.board).nextRung).toBeNull();
  });

  test("planned lower than its rung, or set back since, it settles nothing", () => {
    const { board, run } = briefed();
    (run.plans[0] as { rpm: number }).rpm = 19;
    board.completeRun(run);
    expect(at(board).rungs["1"]?.settled).toBe(false);
    (run.plans[0] as { rpm: number }).rpm = 20;
    expect(at(board).rungs["1"]?.settled).toBe(true);
    board.wait().s.rungs[0]?.setBack.push(board.record("set-back", { by: "la", as: "lead" }));
    expect(at(board).rungs["1"]?.settled).toBe(false);
  });
});

describe("preview and release", () => {
  test("the preview of an opening is what the board shows after it", () => {
    const { board } = briefed();
    const opening = board.wait().open(["oil"]);
    const before = { ...board.s, openings: [] };
    expect(evaluateBoard(withOpening(before, opening), board.now)).toEqual(at(board));
  });

  test("released by a lead and an inspector, lapsed by a later finding", () => {
    const { board, run } = briefed();
    board.completeRun(run);
    expect(at(board).release.state).toBe("ready");
    const covers = at(board).release.covers;
    const sign = (by: string, as: "lead" | "inspector") =>
      board.s.releaseSignatures.push({
        ...board.record("rel", { by, as }),
        as,
        meaning: "released",
        rulesVersion: "1",
        covers,
        withdrawn: null,
      });
    sign("la", "lead");
    expect(at(board).release.state).toBe("half signed");
    sign("di", "inspector");
    expect(at(board).release).toMatchObject({ state: "released", stands: true, blockers: [] });
    board.wait().finding("watch");
    expect(at(board).release.state).toBe("lapsed");
  });
});

describe("what was opened since the engine last ran", () => {
  test.each([
    ["at the very end of the run", 0, "not yet"],
    ["after it", 1, "not yet"],
    ["before it", -1, "ready"],
  ])("an opening closed %s", (_, off, state) => {
    const { board, run } = briefed();
    board.completeRun(run);
    const end =
      evaluateBoard(board.s, board.now).runs.find((r) => r.id === run.id) &&
      board.s.runs.flatMap((r) => r.acts).find((a) => a.act === "ended");
    if (end?.act !== "ended") throw new Error("It has not ended");
    const opening = board.open(["drive"]);
    opening.opened = end.at + off;
    opening.closed = end.at + off;
    expect(evaluateBoard(board.s, board.now).release.state).toBe(state);
  });
});

describe("what stops a run is never lost on the way", () => {
  test("a required gate that waits for one the run does not require still stops it", () => {
    const board = makeBoard({ X: { requiredBy: { kind: "release" }, items: { x: {} } }, W: { needs: ["X"], items: { w: {} } } });
    board.proof("w");
    board.sign("W");
    board.wait().sign("W", "di", "inspector");
    const run = board.run("1");
    board.wait().brief(run);
    const result = at(board).runs.find((r) => r.id === run.id);
    expect(result).toMatchObject({ clear: false });
    expect(result?.blockers.map((b) => b.subject.id)).toEqual(["X"]);
  });

  test("a gate that only a grounding finding stops is told by the finding alone", () => {
    const { board, result } = briefed();
    const finding = board.finding("grounding", { system: "oil" });
    expect(result()?.clear).toBe(false);
    expect(result()?.blockers.map((b) => b.subject.id)).toEqual([finding.id]);
  });
});
