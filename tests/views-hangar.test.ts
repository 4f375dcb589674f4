import { describe, expect, it } from "vitest";
import { rpmText } from "#app/lib/gates/clearance";
import { evaluate } from "#app/lib/gates/evaluate";
import type { Role } from "#app/lib/gates/snapshot";
import { answerOf } from "#app/lib/views/board";
import { type HangarRow, hangarRow, hangarView, rolesText } from "#app/lib/views/hangar";
import { type Board, makeBoard, signAll } from "./support/snapshots";

const gates = () =>
  makeBoard({
    MF: { name: "Mount", short: "Mount", items: { m1: { systems: ["mount"] } } },
    FP: { name: "Fuel prime", short: "Fuel prime", needs: ["MF"], items: { f1: { secondEyes: true }, f2: {} } },
    WR: { name: "Walk-round", short: "Walk-round", eachRun: true, requiredBy: { kind: "runs" }, needs: ["MF", "FP"], items: { w1: {} } },
  });
const viewer = (id: string, ...roles: Role[]) => ({ id, roles });
const builder = viewer("bo", "builder");
const inspector = viewer("di", "inspector");
const lead = viewer("la", "lead", "builder");
const crew = viewer("fi", "crew");
const row = (board: Board, me: { id: string; roles: Role[] }, changedAt = board.now): HangarRow =>
  hangarRow(evaluate(board.s, board.now), me, changedAt);
const labels = (board: Board, me: { id: string; roles: Role[] }) => row(board, me).waits.map((w) => w.label);

/** Everything signed, run 1 planned, acknowledged, answered and the wind read. */
function clearForRun1() {
  const board = signAll(gates());
  board.wait();
  const run = board.run("1");
  board.brief(run);
  return { board, run };
}

describe("a row of the hangar", () => {
  it("says where the install stands in the board's own words", () => {
    const board = gates();
    const made = row(board, lead);
    const { title, state } = answerOf(evaluate(board.s, board.now));
    expect(made.answer).toEqual({ title, state, held: false });
    expect(title).toBe("Not clear for run 1");
    expect(made).toMatchObject({ registration: "N0TEST", href: "/installs/install", roles: "lead and builder" });
  });

  it("draws the small Line: each gate once, the walk-round last, and says how many are signed", () => {
    const board = gates();
    board.work(board.s.gates.find((g) => g.id === "MF") as Board["s"]["gates"][number]);
    const { line, progress } = row(board, builder);
    expect(line.gates.map((g) => g.state)).toEqual(["signed", "in-work", "waiting"]);
    expect(line.label).toBe("1 of 3 gates signed, 0 of 1 run settled");
    expect(progress).toBe(1);
    expect(line.released).toBe(false);
  });

  it("says GO and its end, then HOLD in words of its own", () => {
    const { board, run } = clearForRun1();
    expect(row(board, crew).answer.title).toBe("Clear for run 1a");
    board.act(run, "go");
    const go = row(board, crew);
    expect(go.answer.title).toBe("GO stands for run 1a");
    expect(go.answer.state).toMatch(/^until \d+ May \d\d:\d\d UTC$/);
    expect(go.clearance).toContain(rpmText(20));
    board.wait();
    board.act(run, "hold");
    expect(row(board, crew).answer).toMatchObject({ title: "HOLD, run 1a", held: true });
  });

  it("names the time of the next run with its zone, or says that it has none", () => {
    const board = gates();
    board.rung("2");
    expect(row(board, lead).planned).toBe("Run 1 has no time yet.");
    const run = board.run("1", { plannedStart: Date.UTC(2031, 4, 10, 7, 30) });
    board.plan(run);
    expect(row(board, lead).planned).toBe("Run 1a is planned for Sat 10 May 07:30 UTC.");
  });

  it("can be found by registration, name, role and what waits, in small letters", () => {
    const board = gates();
    for (const id of ["m1"]) board.proof(id);
    const { words } = row(board, builder);
    expect(words).toBe(words.toLowerCase());
    for (const part of ["n0test", "test install", "builder", "not clear for run 1", "sign mount"]) expect(words).toContain(part);
  });
});

describe("what waits for a person", () => {
  it("is the first signature for the builder, then the countersignature for the inspector", () => {
    const board = gates();
    board.proof("m1");
    expect(labels(board, builder)).toEqual(["Sign Mount"]);
    expect(labels(board, inspector)).toEqual([]);
    board.sign("MF");
    expect(labels(board, builder)).toEqual([]);
    expect(labels(board, inspector)).toEqual(["Countersign Mount"]);
  });

  it("is second eyes for everybody but the one who did it", () => {
    const board = gates();
    board.work(board.s.gates.find((g) => g.id === "MF") as Board["s"]["gates"][number]);
    board.wait();
    board.proof("f1", { by: "bo" });
    expect(labels(board, builder)).toEqual([]);
    expect(labels(board, viewer("cy", "builder"))).toEqual(["Look and confirm: f1"]);
    expect(labels(board, crew)).toEqual([]);
  });

  it("is the card, then the roll call, for whoever stands at the run, and GO for the lead once it is clear", () => {
    const board = signAll(gates());
    board.wait();
    const run = board.run("1");
    const plan = board.plan(run);
    expect(labels(board, crew)).toEqual(["Read the run card"]);
    run.acks.push({ ...board.record("ack", { by: "fi", as: "crew" }), version: plan.version });
    expect(labels(board, crew)).toEqual(["Answer the roll call"]);
    board.answer(run, "fi");
    expect(labels(board, crew)).toEqual([]);
    expect(labels(board, viewer("ed", "inspector"))).toEqual([]);
    for (const by of ["la", "cy"]) {
      run.acks.push({ ...board.record("ack", { by, as: "crew" }), version: plan.version });
      board.answer(run, by);
    }
    expect(labels(board, lead)).toEqual([]);
    board.wind(run);
    expect(labels(board, lead)).toEqual(["Call GO for run 1a"]);
    expect(labels(board, crew)).toEqual([]);
  });

  it("is nothing where only work is to be done; then it says what comes first, and for whom", () => {
    const made = row(gates(), builder);
    expect(made.waits).toEqual([]);
    expect(made.first).toMatch(/^First: Mount.* For Member/);
  });
});

describe("the order of the hangar", () => {
  const blank = row(gates(), builder);
  const wait = { label: "Sign", note: "", href: "/" };
  const named = (registration: string, waits: number, changedAt: number): HangarRow => ({
    ...blank,
    registration,
    changedAt,
    waits: Array.from({ length: waits }, () => wait),
  });

  it("puts first where most waits, then what changed last, then the registration", () => {
    const rows = [named("N0555E", 0, 5), named("N0444D", 0, 9), named("N0333C", 2, 1), named("N0222B", 1, 3), named("N0111A", 0, 5)];
    const view = hangarView(rows);
    expect(view.rows.map((r) => r.registration)).toEqual(["N0333C", "N0222B", "N0444D", "N0111A", "N0555E"]);
    expect(rows[0]?.registration).toBe("N0555E");
    expect(view).toMatchObject({ waits: 3, title: "3 things wait for you", state: "on 2 of your 5 installs" });
  });

  it("says one thing, nothing and no installs as they are", () => {
    expect(hangarView([named("N0111A", 1, 1)])).toMatchObject({ title: "1 thing waits for you", state: "on 1 of your 1 install" });
    expect(hangarView([named("N0111A", 0, 1)])).toMatchObject({ title: "Nothing waits for you", state: "on your install" });
    expect(hangarView([named("N0111A", 0, 1), named("N0222B", 0, 1)]).state).toBe("on any of your 2 installs");
    expect(hangarView([])).toMatchObject({ title: "No installs yet", waits: 0, rows: [] });
  });

  it("lists roles as people say them", () => {
    expect(rolesText(["crew"])).toBe("crew");
    expect(rolesText(["lead", "builder", "crew"])).toBe("lead, builder and crew");
  });
});
