import { describe, expect, it } from "vitest";
import { evaluate } from "#app/lib/gates/evaluate";
import { boardAnswerSchema } from "#app/lib/schemas/board-api";
import { boardView } from "#app/lib/views/board";
import { boardAnswer, tagOf } from "#app/lib/views/board-answer";
import { lapsedAt } from "#app/lib/views/lapsed-at";
import { severalView } from "#app/lib/views/sign-several";
import { type Board, HOUR, makeBoard, signAll } from "./support/snapshots";

const gates = () =>
  makeBoard({
    MF: { name: "Mount", short: "Mount", items: { m1: { systems: ["mount"] } } },
    FP: { name: "Fuel prime", short: "Fuel prime", needs: ["MF"], items: { f1: { systems: ["fueleng"] }, f2: {} } },
    WR: { name: "Walk-round", short: "Walk-round", eachRun: true, requiredBy: { kind: "runs" }, needs: ["MF", "FP"], items: { w1: {} } },
  });
const judged = (board: Board) => evaluate(board.s, board.now);
const builder = { id: "bo", roles: ["builder" as const] };
const inspector = { id: "di", roles: ["inspector" as const] };
const lead = { id: "la", roles: ["lead" as const, "builder" as const] };
const crew = { id: "fi", roles: ["crew" as const] };

/** Everything signed, run 1 planned, acknowledged, answered and the wind read: clear. */
function clearForRun1(): { board: Board; run: string } {
  const board = signAll(gates());
  board.wait();
  const run = board.run("1");
  const plan = board.plan(run);
  for (const by of ["la", "cy", "fi"]) {
    run.acks.push({ ...board.record("ack", { by, as: "crew" }), version: plan.version });
    board.answer(run, by);
  }
  board.wind(run);
  return { board, run: run.id };
}

describe("a run under way", () => {
  const first = (board: Board, who: Parameters<typeof boardView>[1]) => boardView(judged(board), who).acts[0];

  it("leads whoever leads it to the live card, lets the others follow, and is reviewed when it has ended", () => {
    const { board, run: id } = clearForRun1();
    const run = board.s.runs.find((r) => r.id === id);
    if (!run) throw new Error("No run");
    const live = `/installs/install/runs/${id}/live`;
    board.act(run, "go");
    expect(first(board, lead)).toMatchObject({ label: `Live card of run ${run.label}`, href: live });
    expect(boardView(judged(board), inspector).acts.some((a) => a.href === live)).toBe(false);
    board.act(run, "start");
    expect(first(board, lead)).toMatchObject({ label: `Live card of run ${run.label}` });
    expect(first(board, inspector)).toMatchObject({ label: `Follow run ${run.label}`, href: live });
    board.wait();
    board.act(run, "ended", {});
    const review = { label: `Review run ${run.label}`, href: `/installs/install/runs/${id}/review` };
    expect(first(board, inspector)).toMatchObject(review);
    expect(boardView(judged(board), crew).acts.map((a) => a.label)).not.toContain(review.label);
  });
});

describe("the answer", () => {
  it("says how many things stop the next run, and numbers them as they are listed", () => {
    const view = boardView(judged(gates()), builder);
    expect(view.answer).toMatchObject({ title: "Not clear for run 1", tone: "shut" });
    expect(view.answer.state).toBe(`${view.stops.length} things stop it`);
    expect(view.stops.map((s) => s.n)).toEqual(view.stops.map((_, i) => i + 1));
  });

  it("ties each balloon on the Line to the stop about that gate", () => {
    const view = boardView(judged(gates()), builder);
    const mount = view.stops.find((s) => s.title.startsWith("Mount"));
    expect(mount?.place).toEqual({ href: "/installs/install/gates/MF#item-m1", label: "Mount" });
    expect(view.line.gates.find((g) => g.id === "MF")?.balloon).toBe(mount?.n);
    // It waits for another gate, so it is no thing that stops the run by itself.
    expect(view.line.gates.find((g) => g.id === "FP")).toMatchObject({ state: "waiting", note: "waits for 1", balloon: null });
  });

  it("names who can clear each stop, or says what comes first", () => {
    const who = (me: typeof builder) => boardView(judged(gates()), me).stops.map((s) => s.who);
    for (const words of who(builder)) expect(words).toMatch(/^For you|^For Member |invite/);
    const mount = boardView(judged(gates()), builder).stops.findIndex((s) => s.title.startsWith("Mount"));
    expect(who(builder)[mount]).toMatch(/^For you, Member \w+ or \d more\.$/);
    // The others are named to whoever cannot clear it.
    expect(boardView(judged(gates()), crew).stops[mount]?.who).toMatch(/^For Member \w+, Member \w+ or \d more\.$/);
  });

  it("says how far a clear run is cleared, and a lead is offered GO", () => {
    const { board, run } = clearForRun1();
    const e = judged(board);
    const view = boardView(e, lead);
    expect(view.stops).toEqual([]);
    expect(view.answer).toMatchObject({ title: "Clear for run 1a", state: "cleared to 1,200 rpm", tone: "clear" });
    expect(view.acts).toContainEqual(expect.objectContaining({ label: "Call GO for run 1a", href: `/installs/install/runs/${run}` }));
    expect(boardView(e, builder).acts.map((a) => a.label)).not.toContain("Call GO for run 1a");
  });

  it("turns to HOLD with the reason first, and a spade stands on the run's pipe", () => {
    const { board, run } = clearForRun1();
    const held = board.s.runs.find((r) => r.id === run);
    if (!held) throw new Error("no run");
    board.wait();
    board.act(held, "go", { version: 1, plannedStart: board.now, ends: board.now + HOUR, cap: 20, signatures: [] });
    expect(boardView(judged(board), crew).answer).toMatchObject({ title: "GO stands for run 1a", tone: "go" });
    board.wait();
    board.act(held, "hold", { reason: "smoke", auto: false }, { by: "fi", as: "crew" });
    const view = boardView(judged(board), builder);
    expect(view.answer).toMatchObject({ title: "HOLD, run 1a", tone: "held" });
    expect(view.answer.note).toContain("Member fi called HOLD");
    expect(view.line.runs.find((r) => r.id === run)?.spade).toBe(true);
  });
});

describe("what I can do now", () => {
  it("gives a builder the gate to begin, with its first item", () => {
    const [first] = boardView(judged(gates()), builder).acts;
    expect(first).toEqual({ label: "Begin Mount", note: "Next: m1 Work m1", href: "/installs/install/gates/MF#item-m1" });
  });

  it("sends whoever would work on a system that is open to its closing first", () => {
    const board = signAll(gates()).wait();
    const opening = board.open(["fueleng"]);
    board.wait();
    expect(boardView(judged(board), builder).acts[0]).toEqual({
      label: "Close: fuel, forward of the firewall",
      note: "then f1 Work f1",
      href: `/installs/install/openings#opening-${opening.id}`,
    });
  });

  it("gives an inspector the countersignature, and not to whoever signed first", () => {
    const board = gates();
    board.proof("m1");
    board.wait().sign("MF", "bo", "builder");
    const e = judged(board);
    expect(boardView(e, inspector).acts[0]).toMatchObject({ label: "Countersign Mount", href: "/installs/install/gates/MF/sign" });
    expect(
      boardView(e, builder)
        .acts.map((a) => a.label)
        .join(),
    ).not.toContain("ountersign");
  });

  it("asks the second person to look, never the one who did it", () => {
    const board = makeBoard({ MF: { items: { m1: { secondEyes: true } } } });
    board.proof("m1");
    const e = judged(board);
    const asks = (id: string) => boardView(e, { id, roles: ["builder"] }).acts.some((a) => a.label.startsWith("Look and confirm"));
    expect(asks("cy")).toBe(true);
    expect(asks("bo")).toBe(false);
  });

  it("puts several gates that are ready on one sheet", () => {
    const board = makeBoard({ MF: { items: { m1: {} } }, EC: { items: { e1: {} } } });
    board.proof("m1");
    board.proof("e1");
    const e = judged(board);
    expect(boardView(e, builder).acts[0]).toMatchObject({ label: "Sign 2 gates on one sheet", href: "/installs/install/sign" });
    const sheet = severalView(e, { ...builder, units: "si" }, null);
    expect(sheet.sheets.map((s) => s.covers)).toEqual([board.covers("MF"), board.covers("EC")]);
    expect(severalView(e, { ...inspector, units: "si" }, null).sheets).toEqual([]);
  });

  it("is shorter for crew: the own place, the card's steps, reading the card and answering", () => {
    const board = signAll(gates()).wait();
    const run = board.run("1");
    const plan = board.plan(run);
    const before = boardView(judged(board), crew);
    expect(before.crew?.places.map((p) => p.name)).toEqual(["Fire guard"]);
    expect(before.acts.map((a) => a.label)).toEqual(["Read the run card"]);
    run.acks.push({ ...board.record("ack", { by: "fi", as: "crew" }), version: plan.version });
    expect(boardView(judged(board), crew).acts.map((a) => a.label)).toEqual(["Answer the roll call"]);
    board.answer(run, "fi");
    expect(boardView(judged(board), crew).acts).toEqual([]);
    board.wait();
    // After a HOLD everybody is asked again, whether a GO stood or not.
    board.act(run, "hold", { reason: "smoke", auto: false }, { by: "cy", as: "builder" });
    expect(boardView(judged(board), crew).acts[0]).toMatchObject({
      label: "Answer the roll call",
      note: expect.stringContaining("after HOLD"),
    });
    board.wait();
    board.answer(run, "fi");
    expect(boardView(judged(board), crew).acts).toEqual([]);
    expect(boardView(judged(board), builder).crew).toBeNull();
  });
});

describe("the board for a program", () => {
  const head = { seq: 7, hash: "ab" };

  it("has the documented shape", () => {
    const { board } = clearForRun1();
    for (const b of [gates(), board, makeBoard()]) {
      const answer = boardAnswer(judged(b), head);
      expect(boardAnswerSchema.parse(answer)).toEqual(answer);
    }
  });

  it("keeps its tag while only time passes, and changes it when a proof comes", () => {
    const board = gates();
    const tag = tagOf(boardAnswer(judged(board), head));
    expect(tagOf(boardAnswer(evaluate(board.s, board.now + 60_000), head))).toBe(tag);
    board.proof("m1");
    expect(tagOf(boardAnswer(judged(board), head))).not.toBe(tag);
  });
});

describe("since when a gate is lapsed", () => {
  const line = (board: Board) => boardView(judged(board), builder).line.gates.find((g) => g.id === "FP");
  const at = (board: Board) => {
    const e = judged(board);
    const gate = e.facts.gates.get("FP");
    return gate ? lapsedAt(e, gate) : undefined;
  };

  it("is the opening's instant, and the earliest of several causes", () => {
    const board = signAll(gates()).wait();
    const opened = board.wait().open(["fueleng"]).opened;
    expect(line(board)?.state).toBe("lapsed");
    expect(at(board)).toBe(opened);
    expect(line(board)?.note).toBe(`lapsed ${new Date(opened).toISOString().slice(11, 16)}`);
    board.wait();
    const f2 = board.s.proofs.find((p) => p.item === "f2");
    if (f2) f2.withdrawn = board.record("withdrawal");
    expect(at(board)).toBe(opened);
    board.now += 48 * HOUR;
    expect(line(board)?.note).toMatch(/^lapsed \d{1,2} [A-Z][a-z]{2}$/);
  });
  it("is the withdrawal's, the failing proof's, or the end of its validity", () => {
    const board = signAll(gates()).wait();
    const f2 = board.s.proofs.find((p) => p.item === "f2");
    if (!f2) throw new Error("No proof");
    const withdrawn = board.record("withdrawal");
    f2.withdrawn = withdrawn;
    expect(at(board)).toBe(withdrawn.recorded);
    const failed = board.wait().proof("f1", { state: "failed" });
    expect(at(board)).toBe(withdrawn.recorded);
    f2.withdrawn = null;
    expect(at(board)).toBe(failed.counts);
    const aged = signAll(gates());
    aged.find("f1").validity = { hours: 2, afterRunHours: null };
    const counts = aged.s.proofs.find((p) => p.item === "f1")?.counts ?? 0;
    aged.now = counts + 5 * HOUR;
    expect(line(aged)?.state).toBe("lapsed");
    expect(at(aged)).toBe(counts + 2 * HOUR);
  });
  it("is not told where a cause has no instant of its own", () => {
    const board = signAll(gates()).wait();
    board.find("f2").revision = 2;
    board.wait().open(["fueleng"]);
    expect(at(board)).toBeNull();
    expect(line(board)?.note).toBe("lapsed");
  });
});
