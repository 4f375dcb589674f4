/** Verdicts asked on whole boards: what a plan may be, who signs the release, whose figure it is to change, which mail goes out again. */
import { describe, expect, it } from "vitest";
import { evaluate } from "#app/lib/gates/evaluate";
import { mayPlanRun } from "#app/lib/gates/plan-verdicts";
import type { Verdict } from "#app/lib/gates/result";
import { mayCallGo } from "#app/lib/gates/run-verdicts";
import { isInspectorsToChange, mayConfirmValue, mayMailAgain } from "#app/lib/gates/set-up-verdicts";
import { maySignRelease, mayWithdrawReleaseSignature } from "#app/lib/gates/signing-verdicts";
import { type Board, HOUR, makeBoard, signAll } from "./support/snapshots";

const codes = (v: Verdict) => (v.ok ? [] : v.blockers.map((b) => b.code));
const sentence = (v: Verdict) => (v.ok ? "" : (v.blockers[0]?.sentence ?? ""));

describe("a plan", () => {
  const board = makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } });
  board.value("windLimit", 7, "manual p. 3", { quantity: "speed" });
  board.value("gustLimit", 11, "manual p. 3", { quantity: "speed" });
  const fine = {
    rpm: 20,
    windLimit: 7,
    gustLimit: 11,
    positions: [
      { position: "operator" as const, member: "bo" },
      { position: "fireguard" as const, member: "fi" },
    ],
  };
  const may = (over: Partial<typeof fine> = {}, member = "la", rung = "1") =>
    mayPlanRun(evaluate(board.s, board.now), { run: null, rung, member, plan: { ...fine, ...over } });

  it("within every limit is the lead's to make", () => {
    expect(may()).toEqual({ ok: true });
    expect(codes(may({}, "bo"))).toEqual(["not-your-role"]);
    expect(codes(may({}, "la", "9"))).toEqual(["not-found"]);
  });
  it.each<[string, Partial<typeof fine>, string[]]>([
    ["above its rung's speed", { rpm: 20.1 }, ["clearance"]],
    ["above the redline too", { rpm: 46 }, ["clearance", "clearance"]],
    ["in more wind than the install allows", { windLimit: 7.1 }, ["wind-over"]],
    ["in more gusts than the install allows", { gustLimit: 11.1 }, ["wind-over"]],
    ["with gusts below the wind", { windLimit: 6, gustLimit: 5 }, ["wind-over"]],
    [
      "with one person in two places that nobody holds together",
      { positions: [...fine.positions, { position: "fireguard", member: "bo" }] },
      ["pair"],
    ],
    ["with one person twice in one place", { positions: [...fine.positions, { position: "fireguard", member: "fi" }] }, ["pair"]],
    ["with somebody who is no member", { positions: [{ position: "operator", member: "nobody" }] }, ["not-active"]],
  ])("%s is refused, with what to plan instead", (_, over, expected) => {
    const verdict = may(over);
    expect(codes(verdict)).toEqual(expected);
    expect(sentence(verdict)).toMatch(/Plan|More is|Raise|Give|Choose|Invite/);
  });
  it("may leave places empty and go lower", () =>
    expect(may({ rpm: 12, windLimit: 5, gustLimit: 8, positions: [] })).toEqual({ ok: true }));
});

describe("GO", () => {
  it("on a card that has changed is refused as stale, before anything else that stops the run", () => {
    const board = signAll(makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } }));
    const run = board.run("1");
    board.brief(run);
    const may = (version?: number) => mayCallGo(evaluate(board.s, board.now), { run: run.id, member: "la", version });
    expect(may(1)).toEqual({ ok: true });
    board.wait();
    board.plan(run, { rpm: 18 });
    expect(codes(may(1))).toEqual(["stale"]);
    expect(sentence(may(1))).toContain("version 2 now");
    expect(codes(may())).not.toContain("stale");
    expect(codes(may(2))).toEqual(codes(may()));
    expect(may(2).ok).toBe(false);
  });
});

/** Its only run is done and reviewed: ready for the release's two signatures. */
function releasable(): Board {
  const board = signAll(makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } }));
  const run = board.run("1");
  board.brief(run);
  board.completeRun(run);
  return board.wait();
}

describe("the release", () => {
  const sign = (board: Board, by: string, as: "lead" | "inspector") => {
    const { covers } = evaluate(board.s, board.now).result.release;
    const row = { ...board.record("release", { by, as }), as, covers, meaning: "released", rulesVersion: "1", withdrawn: null };
    board.s.releaseSignatures.push(row);
    return row;
  };
  const may = (board: Board, member: string, as: "lead" | "inspector", seen = true) => {
    const e = evaluate(board.s, board.now);
    return maySignRelease(e, { member, as, covers: seen ? e.result.release.covers : null });
  };

  it("is signed by a lead and an inspector, in any order", () => {
    const board = releasable();
    expect(may(board, "la", "lead")).toEqual({ ok: true });
    expect(may(board, "di", "inspector")).toEqual({ ok: true });
    expect(codes(may(board, "bo", "lead"))).toEqual(["not-your-role"]);
    expect(codes(may(board, "la", "inspector"))).toEqual(["not-your-role"]);
  });
  it("wants two people, and each signature once", () => {
    const board = releasable();
    board.s.members.find((m) => m.id === "la")?.roles.push({ role: "inspector", from: board.now, to: null });
    sign(board, "la", "lead");
    expect(codes(may(board, "la", "inspector"))).toEqual(["own-work"]);
    board.member("gi", "lead");
    expect(codes(may(board, "gi", "lead"))).toEqual(["order"]);
    expect(may(board, "di", "inspector")).toEqual({ ok: true });
    sign(board, "di", "inspector");
    expect(codes(may(board, "ed", "inspector"))).toEqual(["already"]);
  });
  it("is refused on another list than the one that was shown, and with every blocker while something is open", () => {
    const board = releasable();
    const e = evaluate(board.s, board.now);
    const seen = { items: e.result.release.covers.items, signatures: ["another"] };
    expect(codes(maySignRelease(e, { member: "la", as: "lead", covers: seen }))).toEqual(["stale"]);
    board.finding("grounding");
    const open = evaluate(board.s, board.now);
    expect(open.result.release.blockers.length).toBeGreaterThan(0);
    expect(may(board, "la", "lead", false)).toEqual({ ok: false, blockers: open.result.release.blockers });
  });
  it("loses a signature that its signer or an inspector takes back", () => {
    const board = releasable();
    const { id: signature } = sign(board, "la", "lead");
    const back = (member: string) => mayWithdrawReleaseSignature(evaluate(board.s, board.now), { signature, member });
    expect(back("la")).toEqual({ ok: true });
    expect(back("di")).toEqual({ ok: true });
    expect(codes(back("bo"))).toEqual(["not-your-role"]);
  });
});

describe("a rating or limit", () => {
  const begun = () => {
    const board = makeBoard({ X: { items: { x: {} } } });
    board.value("oilPressureMin", 100, null);
    return board;
  };
  const may = (board: Board, member: string, key: string, changes: boolean) =>
    mayConfirmValue(evaluate(board.s, board.now), { member, value: { key, changes } });

  it("is anybody's to enter who builds, leads or inspects, until work has begun", () => {
    const board = begun();
    expect(may(board, "la", "redline", true)).toEqual({ ok: true });
    expect(codes(may(board, "fi", "redline", false))).toEqual(["not-your-role"]);
    expect(codes(may(board, "la", "nothing", true))).toEqual(["not-found"]);
  });
  it("that was confirmed is then an inspector's to change; its source stays anybody's, and so does what nobody confirmed", () => {
    const board = begun();
    board.proof("x");
    const e = evaluate(board.s, board.now);
    expect([isInspectorsToChange(e, "redline"), isInspectorsToChange(e, "oilPressureMin")]).toEqual([true, false]);
    expect(codes(may(board, "la", "redline", true))).toEqual(["not-your-role"]);
    expect(sentence(may(board, "la", "redline", true))).toContain("manual p. 3");
    expect(may(board, "la", "redline", false)).toEqual({ ok: true });
    expect(may(board, "la", "oilPressureMin", true)).toEqual({ ok: true });
    expect(may(board, "di", "redline", true)).toEqual({ ok: true });
  });
});

describe("a mail that was given up", () => {
  it("goes out again for a lead; a GO only while it is in force", () => {
    const board = signAll(makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } }));
    const run = board.run("1");
    board.brief(run);
    board.act(run, "go", { ends: board.now + 4 * HOUR });
    const id = run.acts.at(-1)?.id ?? "";
    const may = (kind: string, act: string, member = "la") => mayMailAgain(evaluate(board.s, board.now), { member, kind, act });
    expect(may("go", id)).toEqual({ ok: true });
    expect(may("hold", "any")).toEqual({ ok: true });
    expect(codes(may("go", id, "di"))).toEqual(["not-your-role"]);
    expect(codes(may("go", "an earlier one"))).toEqual(["go-over"]);
    board.wait();
    board.act(run, "hold", { reason: "Dog on the apron" });
    expect(codes(may("go", id))).toEqual(["go-over"]);
  });
});
