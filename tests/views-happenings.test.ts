import { parseWithZod } from "@conform-to/zod/v4";
import { beforeAll, describe, expect, it, vi } from "vitest";
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";
import {
  acceptLooseEndForm,
  fixFindingForm,
  gradeFindingForm,
  makeLooseEndForm,
  markMistakeForm,
  openForm,
  raiseFindingForm,
} from "#app/lib/schemas/happening-forms";
import { makeLooseEnd } from "#app/lib/services/make-loose-end.server";
import { openSystem } from "#app/lib/services/open-system.server";
import type { SystemKey } from "#app/lib/template/types";
import { boardView } from "#app/lib/views/board";
import { findingsView } from "#app/lib/views/findings";
import { looseEndsView } from "#app/lib/views/loose-ends";
import { openingsView, seenOf } from "#app/lib/views/openings";
import { valveOf } from "#app/lib/views/shown-states";
import { presetsOn, systemsOn, systemWords } from "#app/lib/views/systems";
import { holdWords, lapsesByBadCheck, lapsesByLooseEnd, lapsesByOpening, lapseWords, type WhatLapses } from "#app/lib/views/what-lapses";
import { type Board, makeBoard, signAll, torque } from "./support/snapshots";
import { MINUTE, value, type Workshop, workshop } from "./support/workshop";

const builder = { id: "bo", roles: ["builder" as const] };
const inspector = { id: "di", roles: ["inspector" as const] };
const crew = { id: "fi", roles: ["crew" as const] };
const judged = (board: Board) => evaluate(board.s, board.now);

const gates = () =>
  makeBoard({
    MF: { name: "Mount", items: { m1: { systems: ["mount"] } } },
    FP: { name: "Fuel prime", needs: ["MF"], items: { f1: { systems: ["fueleng"] }, f2: { systems: ["fueleng"] } } },
    DY: { name: "Day check", requiredBy: { kind: "runs" }, needs: ["FP"], items: { d1: {} } },
  });

/** Everything signed and GO called for run 1. */
function called() {
  const board = signAll(gates()).wait();
  const run = board.run("1");
  board.brief(run);
  board.wait().act(run, "go");
  return { board, run };
}

describe("what an opening makes lapse", () => {
  it("names gates before and after, their items, and what only waits", () => {
    const w = lapsesByOpening(judged(signAll(gates()).wait()), builder, ["fueleng"], true);
    expect(w.gates.map((g) => [g.id, g.before.state, g.after.state, g.words, g.items.map((i) => i.key), g.waits])).toEqual([
      ["FP", "signed", "lapsed", "signed to lapsed", ["f1", "f2"], null],
      ["DY", "signed", "waiting", "signed to waiting", [], "fuel prime"],
    ]);
    expect(w).toMatchObject({ items: 2, fallen: 2, same: 1, hold: null, running: null });
    expect(lapseWords(w)).toBe(
      "2 signed gates fall: Fuel prime and Day check. f1 “Work f1” and f2 “Work f2” lapse: do them again afterwards.",
    );
  });

  it("says first that a GO in force turns into HOLD, and how many are told", () => {
    const { board } = called();
    const w = lapsesByOpening(judged(board), crew, ["mount"], true);
    expect(w.hold).toEqual({ run: "1a", told: 3 });
    expect(holdWords(w)).toBe("GO for run 1a turns into HOLD: 3 people get a mail.");
    expect(lapsesByOpening(judged(board), crew, ["coolant"], true)).toMatchObject({ hold: null, gates: [], fallen: 0 });
  });

  it("says that a run is on", () => {
    const { board, run } = called();
    board.act(run, "start");
    expect(lapsesByOpening(judged(board), crew, ["mount"], true).running).toBe("1a");
  });

  it("is confirmed only for the choice and the GO that were shown", () => {
    const { board } = called();
    const before = seenOf(judged(board), ["oil", "mount"], true);
    expect(seenOf(judged(board), ["mount", "oil"], true)).toBe(before);
    expect(seenOf(judged(board), ["mount", "oil"], false)).not.toBe(before);
    expect(seenOf(judged(signAll(gates()).wait()), ["mount", "oil"], true)).not.toBe(before);
  });

  it("knows what a bad check of a tool undoes, as the board shows it afterwards", () => {
    const board = makeBoard({ MF: { items: { m1: { parts: [torque()] }, m2: {} } } });
    board.wait();
    signAll(board).wait();
    const e = judged(board);
    const check = { at: board.now, since: null };
    const w = lapsesByBadCheck(e, "wrench", check);
    expect(w.gates.map((g) => [g.id, g.after.state, g.items.map((i) => i.key)])).toEqual([["MF", "lapsed", ["m1"]]]);
    expect(lapsesByBadCheck(e, "another", check).gates).toEqual([]);
    board.s.tools[0]?.checks.push({ id: "bad", good: false, due: null, ...check });
    expect(judged(board).result.gates.MF?.state).toBe("lapsed");
  });

  it("knows that a loose end of its own gate stops it, and that one asked for opens nothing", () => {
    const e = judged(signAll(gates()).wait());
    const end = { what: "Vent cap", system: "mount" as const, due: { kind: "gate" as const, gate: "DY" } };
    expect(lapsesByLooseEnd(e, builder, end, true).gates.map((g) => [g.id, g.after.state])).toEqual([["DY", "lapsed"]]);
    expect(lapsesByLooseEnd(e, builder, end, false).gates.map((g) => g.id)).toEqual(["MF", "FP", "DY"]);
  });
});

// A whole install is worked through its services.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 240_000 });

describe("the preview is what the board shows afterwards", () => {
  let w: Workshop;
  let restore: () => void;
  beforeAll(async () => {
    w = await workshop();
    await w.readyForRun();
    restore = await w.save();
    return () => w.clock.stop();
  });
  const me = { id: "bea", roles: ["builder" as const] };
  /** The valves of the Line; the release's own gate is drawn as the cap, so its state is the evaluator's. */
  const onBoard = (e: Evaluation) => {
    const { gates: line, walkRound } = boardView(e, me).line;
    const rest = Object.values(e.result.gates).map((g) => [g.id, valveOf(g.state)] as const);
    return new Map([...rest, ...[...line, ...(walkRound ? [walkRound] : [])].map((g) => [g.id, g.state] as const)]);
  };
  const shown = (lapses: WhatLapses) => lapses.gates.map((g) => [g.id, g.after.state]);

  it.each<[SystemKey[], boolean]>([
    [["fueleng", "induct"], true],
    [["oil"], false],
    [["restr", "site"], true],
    [["bay"], true],
  ])("%j, closed %s", async (systems, closed) => {
    restore();
    w.clock.add(MINUTE);
    const before = await w.board();
    const preview = lapsesByOpening(before, me, systems, closed);
    value(await openSystem(w.act("bea"), { systems, reason: "Hose off", closed }));
    const after = await w.board();
    expect(after.at).toBe(before.at);
    expect(preview.gates.length).toBeGreaterThan(0);
    expect(shown(preview)).toEqual(preview.gates.map((g) => [g.id, onBoard(after).get(g.id)]));
    // Nothing else has changed, and the same items no longer stand.
    const fell = Object.values(after.result.items).filter((i) => before.result.items[i.id]?.stands && !i.stands);
    expect(new Set(preview.gates.flatMap((g) => g.items.map((i) => i.id)))).toEqual(new Set(fell.map((i) => i.id)));
    const changed = Object.values(after.result.gates).filter((g) => before.result.gates[g.id]?.state !== g.state);
    expect(changed.every((g) => preview.gates.some((p) => p.id === g.id))).toBe(true);
  });

  it("holds for a loose end too", async () => {
    restore();
    w.clock.add(MINUTE);
    const before = await w.board();
    const due = { kind: "gate" as const, gate: (await w.gate("DY")).id };
    const preview = lapsesByLooseEnd(before, me, { what: "Vent cap", system: "fuelsup", due }, false);
    value(await makeLooseEnd(w.act("bea"), { what: "Vent cap", count: 1, system: "fuelsup", why: "drained", due, askedBy: null }));
    const after = await w.board();
    expect(preview.gates.length).toBeGreaterThan(0);
    expect(shown(preview)).toEqual(preview.gates.map((g) => [g.id, onBoard(after).get(g.id)]));
    expect(preview.fallen).toBe(Object.values(after.result.gates).filter((g) => before.result.gates[g.id]?.stands && !g.stands).length);
  });
});

describe("the openings", () => {
  it("lists open ones first, newest first, and says who may do what", () => {
    const board = gates();
    const closed = board.open(["oil"], { closed: board.now });
    board.wait();
    const first = board.open(["mount"]);
    const second = board.open(["fueleng", "induct"]);
    const view = openingsView(judged(board), crew, { [closed.id]: { closed: { by: "cy", note: "hose on" }, happened: null } });
    expect(view.open.map((r) => r.id)).toEqual([second.id, first.id]);
    expect(view.open[0]?.title).toBe("Fuel, forward of the firewall; induction");
    expect(view.past).toMatchObject([{ id: closed.id, state: "closed", closed: expect.stringMatching(/by Member cy: hose on$/) }]);
    expect(view.open[0]?.close).toMatchObject({ ok: false, why: expect.stringContaining("Only a builder or an inspector") });
    expect(view.may.ok).toBe(true);
    expect(openingsView(judged(board), inspector, {}).open[0]?.mark.ok).toBe(true);
  });

  it("offers the systems of the install, and the presets that fit them", () => {
    const e = judged(gates());
    expect(systemsOn(e).map((s) => s.value)).toEqual(["mount", "fueleng", "bay"]);
    expect(presetsOn(e).map((p) => [p.key, p.systems])).toEqual([
      ["fuel-filter", ["fueleng"]],
      ["hand-in-bay", ["bay"]],
    ]);
    expect(systemWords(["bay"])).toBe("Engine bay");
  });

  it("says when it happened and when it was recorded, where those differ", () => {
    const board = gates();
    board.wait(100);
    const opening = board.open(["oil"]);
    const told = (happened: number | null) => ({ [opening.id]: { closed: null, happened } });
    const opened = (happened: number | null) => openingsView(judged(board), crew, told(happened)).open[0]?.opened ?? "";
    expect(opened(null)).toMatch(/^opened .+ by Member bo$/);
    expect(opened(opening.opened)).toBe(opened(null));
    expect(opened(opening.opened - 2 * 3600_000)).toMatch(/^happened .+, recorded .+ by Member bo$/);
  });

  it("asks a second person where somebody says that nothing was disturbed", () => {
    const board = gates();
    const opening = board.open(["oil"], { closed: board.now, undisturbed: { confirmed: null } });
    const row = (me: typeof builder | typeof crew | typeof inspector) => openingsView(judged(board), me, {}).past[0];
    expect(row(builder)?.undisturbed?.may).toMatchObject({ ok: false, why: expect.stringContaining("yourself") });
    expect(row(crew)?.undisturbed?.may).toMatchObject({
      ok: false,
      why: expect.stringContaining("Only a builder or an inspector or a lead"),
    });
    expect(row(inspector)).toMatchObject({ state: "closed", undisturbed: { may: { ok: true } } });
    opening.undisturbed = { confirmed: board.wait().record("seen", { by: "di", as: "inspector" }) };
    expect(row(inspector)).toMatchObject({ state: "undisturbed", undisturbed: { may: null } });
  });

  it("takes the time that is typed beside the words, and none that has not come", () => {
    const now = Date.UTC(2026, 11, 3, 12, 0);
    const sent = (happened: string) => ({ commandId: "c".repeat(22), systems: ["oil"], closed: "closed", reason: "Hose off", happened });
    const form = openForm("Europe/Berlin", now);
    expect(form.parse(sent("2026-12-03T12:10"))).toMatchObject({ reason: "Hose off", happened: Date.UTC(2026, 11, 3, 11, 10) });
    expect(form.parse(sent("")).happened).toBeNull();
    expect(form.safeParse(sent("2026-12-03T13:01")).error?.issues[0]).toMatchObject({ path: ["happened"] });
  });
});

describe("the loose ends", () => {
  const withRungs = () => {
    const board = signAll(gates()).wait();
    board.rung("2");
    board.rung("3");
    return board;
  };
  const detail = (board: Board, asked: string | null = null) =>
    Object.fromEntries(
      board.s.looseEnds.map((l) => [l.id, { count: 4, why: "painting", askedBy: asked, photos: [], openings: [] as string[] }]),
    );

  it("come by what they block soonest: the gate of the next run, the next run, then the others", () => {
    const board = withRungs();
    const accept = (rung: string) => ({ ...board.record("accept", { by: "di", as: "inspector" as const }), rung, reason: "far from it" });
    const late = board.looseEnd({ kind: "rung", rung: "3" }, { accepted: [accept("1"), accept("2")] });
    const soon = board.looseEnd({ kind: "rung", rung: "2" });
    const second = board.looseEnd({ kind: "rung", rung: "3" }, { accepted: [accept("1")] });
    const gate = board.looseEnd({ kind: "gate", gate: "FP" });
    const view = looseEndsView(judged(board), builder, detail(board));
    expect(view.ends.map((r) => r.id)).toEqual([gate.id, soon.id, second.id, late.id]);
    expect(view.ends.map((r) => r.stops)).toEqual(["stops Fuel prime and run 1", "stops run 1", "stops run 2", "stops run 3"]);
    expect(view.ends.map((r) => r.tag)).toEqual(["L-4", "L-2", "L-3", "L-1"]);
    expect(view).toMatchObject({ title: "4 loose ends", state: "2 stop run 1, 2 are due later" });
    expect(view.ends[3]).toMatchObject({ due: "due before run 3", accepted: "accepted for runs 1 and 2 by Member di: far from it" });
    expect(view.ends[1]?.title).toBe("4 × lead off");
  });

  it("are confirmed by a second person, and stand below once they are", () => {
    const board = withRungs();
    const end = board.looseEnd({ kind: "rung", rung: "2" }, { restored: board.record("restored", { by: "bo" }) });
    const own = looseEndsView(judged(board), builder, detail(board)).ends[0];
    expect(own?.confirm).toMatchObject({ ok: false, why: expect.stringContaining("another person") });
    expect(looseEndsView(judged(board), inspector, detail(board)).ends[0]?.confirm.ok).toBe(true);
    end.confirmed = board.record("confirmed", { by: "cy" });
    const view = looseEndsView(judged(board), builder, detail(board));
    expect(view.ends).toEqual([]);
    expect(view.past[0]?.says).toContain("seen by Member cy");
  });

  it("can be accepted for runs before the due one alone, and say what putting them back undoes", () => {
    const board = withRungs();
    board.looseEnd({ kind: "rung", rung: "3" }, { system: "mount" });
    const [row] = looseEndsView(judged(board), inspector, detail(board)).ends;
    expect(row?.accept.rungs.map((r) => r.value)).toEqual(["1", "2"]);
    expect(row?.accept.may.ok).toBe(true);
    expect(row?.lapses?.says).toContain("Mount");
    expect(looseEndsView(judged(board), inspector, detail(board, "m1")).ends[0]?.lapses).toBeNull();
    expect(looseEndsView(judged(board), builder, detail(board)).ends[0]?.accept.may.why).toContain("Only an inspector");
  });
});

describe("the findings", () => {
  it("come open before fixed, grounding before limiting before watch, the lowest cap first", () => {
    const board = gates();
    const fixed = board.finding("grounding", { fixed: { ...board.record("fix"), action: "tightened" } });
    const watch = board.finding("watch");
    const high = board.finding("limiting", { cap: 19 });
    const low = board.finding("limiting", { cap: 10 });
    const closed = board.finding("grounding", { closed: board.record("close", { by: "di", as: "inspector" }) });
    const ground = board.finding("grounding", { system: "fueleng" });
    const view = findingsView(judged(board), builder, {});
    expect(view.open.map((r) => r.id)).toEqual([ground.id, low.id, high.id, watch.id, fixed.id]);
    expect(view.closed.map((r) => r.id)).toEqual([closed.id]);
    expect(view.open.map((r) => r.tag)).toEqual(["F-6", "F-4", "F-3", "F-2", "F-1"]);
    expect(view).toMatchObject({ title: "5 findings open", state: "F-6 and F-1 stop every run", held: true });
  });

  it("say in words what they do to the next run", () => {
    const board = gates();
    board.finding("limiting", { cap: 10 });
    board.finding("limiting", { cap: 40 });
    board.finding("grounding", { system: "mount" });
    const effects = findingsView(judged(board), builder, {}).open.map((r) => r.effect);
    expect(effects).toEqual([
      "Stops every run, and these gates: MF.",
      "Caps run 1 at 600 rpm; its plan goes to 1,200 rpm.",
      "Caps every run at 2,400 rpm; run 1 stays below, with 1,200 rpm.",
    ]);
    board.s.findings.pop();
    expect(findingsView(judged(board), builder, {}).state).toBe("F-1 caps run 1 at 600 rpm");
  });

  it("let anyone sharpen, an inspector lower, a builder fix and another person close", () => {
    const board = gates();
    const finding = board.finding("limiting", { cap: 10 });
    const row = (me: typeof builder | typeof crew | typeof inspector) => findingsView(judged(board), me, {}).open[0];
    expect(row(crew)?.grades.map((g) => g.may.ok)).toEqual([true, true, false]);
    expect(row(inspector)?.grades.map((g) => g.may.ok)).toEqual([true, true, true]);
    expect([row(crew)?.fix.ok, row(builder)?.fix.ok]).toEqual([false, true]);
    finding.fixed = { ...board.record("fix", { by: "bo" }), action: "tightened" };
    expect([row(builder)?.close.ok, row(inspector)?.close.ok]).toEqual([false, true]);
    expect(row(builder)?.trail.map((t) => [t.name, t.done, t.who])).toEqual([
      ["raised", true, "Member bo"],
      ["fixed", true, "Member bo"],
      ["closed", false, "Waits for Member di or Member ed"],
    ]);
  });

  it("warn of the HOLD while GO stands", () => {
    const { board } = called();
    expect(findingsView(judged(board), crew, {}).goWarning).toContain("3 people get a mail");
    expect(findingsView(judged(gates()), crew, {}).goWarning).toBeNull();
  });

  it("and every other form say what to write where nothing is", () => {
    const forms = {
      open: openForm("Europe/Berlin", 0),
      mistake: markMistakeForm,
      make: makeLooseEndForm,
      accept: acceptLooseEndForm,
      raise: raiseFindingForm("si"),
      grade: gradeFindingForm("si"),
      fix: fixFindingForm,
    };
    for (const [name, schema] of Object.entries(forms)) {
      const empty = new FormData();
      for (const field of ["reason", "words", "what", "why", "count", "due", "system", "severity", "cap", "happened", "rung"])
        empty.append(field, "");
      for (const [field, value] of [
        ["commandId", "c".repeat(22)],
        ["opening", "o"],
        ["looseEnd", "l"],
        ["finding", "f"],
      ] as const)
        empty.append(field, value);
      const submission = parseWithZod(empty, { schema: schema as typeof fixFindingForm });
      const errors = Object.entries(submission.reply().error ?? {});
      expect(errors.length, name).toBeGreaterThan(0);
      for (const [field, said] of errors)
        expect(said?.join(), `${name} ${field}`).toMatch(/^(Say|Choose|Count|Type|Enter|Nothing is entered)/);
    }
  });

  it("take a cap on a limiting one alone, with the fault at its field", () => {
    const form = raiseFindingForm("si");
    const sent = (severity: string, cap: string) =>
      form.safeParse({ commandId: "c".repeat(22), system: "oil", words: "Weeps at the union", severity, cap });
    expect(sent("limiting", "1500").data?.cap).toBeCloseTo(25);
    expect(sent("watch", "1500").data?.cap).toBeNull();
    expect(sent("limiting", "").error?.issues[0]?.path).toEqual(["cap"]);
    expect(sent("limiting", "0").error?.issues[0]?.path).toEqual(["cap"]);
  });
});
