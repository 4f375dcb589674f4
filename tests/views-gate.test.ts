import { describe, expect, it } from "vitest";
import { evaluate } from "#app/lib/gates/evaluate";
import type { Item } from "#app/lib/gates/snapshot";
import type { Part } from "#app/lib/template/types";
import { readEntry } from "#app/lib/views/evidence-form";
import { gateView } from "#app/lib/views/gate";
import type { Reader } from "#app/lib/views/gate-item";
import { sheetView } from "#app/lib/views/sign";
import { START, tick } from "./support/parts";
import { type Board, makeBoard, measure, torque } from "./support/snapshots";

const builder: Reader = { id: "bo", roles: ["builder"], units: "si" };
const other: Reader = { id: "cy", roles: ["builder"], units: "si" };
const inspector: Reader = { id: "di", roles: ["inspector"], units: "si" };
const crew: Reader = { id: "fi", roles: ["crew"], units: "si" };
const pageOf = (board: Board, gate: string, me: Reader) => {
  const view = gateView(evaluate(board.s, board.now), gate, me);
  if (!view) throw new Error(`no gate ${gate}`);
  return view;
};
const rowOf = (board: Board, gate: string, me: Reader, n = 0) => {
  const row = pageOf(board, gate, me).items[n];
  if (!row) throw new Error("no such row");
  return row;
};

describe("a gate's page", () => {
  it("is not there for a gate that the install has not", () => {
    const e = evaluate(makeBoard().s, START);
    expect(gateView(e, "nope", builder)).toBeNull();
  });

  it("shows what feeds it and what comes then", () => {
    const board = makeBoard({ MF: { short: "Mount", items: { m1: {} } }, FP: { short: "Fuel", needs: ["MF"], items: { f1: {} } } });
    expect(pageOf(board, "FP", builder)).toMatchObject({
      valve: "waiting",
      state: "waits for 1 gate, 0 of 1 done",
      feeds: [{ name: "Mount", state: "in-work", href: "/installs/install/gates/MF" }],
    });
    expect(pageOf(board, "MF", builder).onward).toEqual([{ href: "/installs/install/gates/FP", label: "Fuel" }]);
  });

  it("splits the caution so that its first words stand out", () => {
    const board = makeBoard({ OP: { caution: "The propeller turns: arc clear.", items: { o1: {} } } });
    expect(pageOf(board, "OP", builder).caution).toEqual({ title: "The propeller turns.", text: "Arc clear.", sign: "propeller" });
  });

  it("offers the one next thing, then the signature, then nothing to the one who signed", () => {
    const board = makeBoard({ MF: { items: { m1: {} } } });
    expect(pageOf(board, "MF", builder).foot.act).toMatchObject({ label: "Next: m1", href: "#item-m1" });
    board.proof("m1");
    expect(pageOf(board, "MF", builder).foot.act?.label).toBe("Sign as builder");
    expect(pageOf(board, "MF", inspector).foot.act?.label).toBe("Back to the board");
    board.wait().sign("MF");
    expect(pageOf(board, "MF", builder).foot.act?.label).toBe("Back to the board");
    expect(pageOf(board, "MF", inspector).foot.act?.label).toBe("Countersign as inspector");
    expect(pageOf(board, "MF", builder).signatures.map((s) => [s.name, s.waits])).toEqual([
      ["Member bo", false],
      ["Member di or Member ed", true],
    ]);
  });
});

describe("a row", () => {
  it("takes a good proof from a builder, and only bad news from crew", () => {
    const board = makeBoard({ MF: { items: { m1: {} } } });
    expect(rowOf(board, "MF", builder)).toMatchObject({ open: true, tickOnly: true, nut: "todo", prove: { ok: true, told: false } });
    const row = rowOf(board, "MF", crew);
    expect(row).toMatchObject({ open: false, prove: { ok: false }, failed: { ok: true } });
    expect(row.prove.reason).toContain("Only a builder or an inspector can prove");
  });

  it("warns that a new proof of a signed gate makes its signatures lapse", () => {
    const board = makeBoard({ MF: { items: { m1: {} } } });
    board.proof("m1");
    board.wait().signGate("MF");
    expect(rowOf(board, "MF", builder).prove).toMatchObject({ ok: true, told: true });
  });

  it("lets another person confirm and says why not to the one who did it", () => {
    const board = makeBoard({ MF: { items: { m1: { secondEyes: true } } } });
    board.proof("m1");
    expect(rowOf(board, "MF", other)).toMatchObject({ nut: "second-eyes", word: "1 of 2", confirm: { ok: true, as: "builder" } });
    expect(rowOf(board, "MF", builder).confirm).toMatchObject({ ok: false, reason: expect.stringContaining("another person") });
  });

  it("leads to the closing of a system that is still open, and takes its proof for the next thing only then", () => {
    const board = makeBoard({ MF: { items: { m1: { systems: ["fueleng"] } } } });
    board.proof("m1");
    board.wait();
    const opening = board.open(["fueleng"]);
    board.wait();
    const href = `/installs/install/openings#opening-${opening.id}`;
    const row = rowOf(board, "MF", builder);
    expect(row).toMatchObject({ nut: "lapsed", open: false });
    expect(row.first).toMatchObject([
      { act: "Close: fuel, forward of the firewall", href, sentence: expect.stringContaining("would not count") },
    ]);
    expect(pageOf(board, "MF", builder).foot.act).toEqual({ label: "Close: fuel, forward of the firewall", note: "before m1", href });
    opening.closed = board.now;
    board.wait();
    expect(rowOf(board, "MF", builder)).toMatchObject({ open: true, first: [] });
    expect(pageOf(board, "MF", builder).foot.act?.label).toBe("Do again: m1");
  });

  it("draws a signature of a lapsed gate as one that no longer holds", () => {
    const board = makeBoard({ MF: { items: { m1: { systems: ["oil"] } } } });
    board.proof("m1");
    board.wait().signGate("MF");
    expect(pageOf(board, "MF", builder).signatures.map((s) => s.lapsed)).toEqual([false, false]);
    board.wait().open(["oil"], { closed: board.now });
    board.wait();
    expect(pageOf(board, "MF", builder).signatures.map((s) => s.lapsed)).toEqual([true, true]);
  });

  it("gives the reason of a lapse, and an inspector may keep it", () => {
    const board = makeBoard({ MF: { items: { m1: { systems: ["oil"] } } } });
    board.proof("m1");
    board.wait().open(["oil"], { closed: board.now });
    board.wait();
    const row = rowOf(board, "MF", inspector);
    expect(row).toMatchObject({ nut: "lapsed", keep: { ok: true } });
    expect(row.reasons[0]?.sentence).toContain("work");
    expect(rowOf(board, "MF", builder).keep).toBeNull();
  });

  it("guards an item while a gate before it does not stand", () => {
    const board = makeBoard({ MF: { items: { m1: {} } }, OP: { needs: ["MF"], items: { o1: { guarded: true } } } });
    const row = rowOf(board, "OP", builder);
    expect(row).toMatchObject({ open: false, prove: { ok: false, lateAllowed: false } });
    expect(row.prove.reason).toContain("guarded");
  });

  it("asks for the maker's number before anything else, and marks a default as one", () => {
    const missing: Part = { ...measure(), criterion: { quantity: "torque", band: null, basis: { kind: "maker" }, source: null } } as Part;
    const preset: Part = {
      ...measure(),
      criterion: { quantity: "pressure", band: { min: 5, max: 15 }, basis: { kind: "common" }, source: null },
    } as Part;
    const board = makeBoard({ MF: { items: { m1: { parts: [missing] }, m2: { parts: [preset] } } } });
    expect(rowOf(board, "MF", builder)).toMatchObject({
      open: false,
      prove: { ok: false, numberMissing: true },
      enterNumber: { ok: true },
    });
    expect(rowOf(board, "MF", builder, 1).parts[0]).toMatchObject({ criterion: { isDefault: true, from: "common practice" } });
    expect(pageOf(board, "MF", builder).foot.act?.label).toBe("Enter the number: m1");
  });

  it("keeps every proof in the history, withdrawn ones too", () => {
    const board = makeBoard({ MF: { items: { m1: {} } } });
    const first = board.proof("m1");
    board.wait().withdraw(first);
    board.wait().proof("m1", { note: "again" });
    expect(rowOf(board, "MF", builder).history.map((p) => [p.note, p.withdrawn !== null])).toEqual([
      ["again", false],
      ["", true],
    ]);
  });
});

describe("reading a row back", () => {
  const read = (parts: Part[], fields: [string, string][], units: "si" | "us" = "si") => {
    const board = makeBoard({ MF: { items: { m1: { parts } } } });
    const form = new FormData();
    for (const [name, value] of fields) form.append(name, value);
    return readEntry(board.find("m1") as Item, form, { snapshot: board.s, units, now: START + 12 * 3_600_000 });
  };
  const pressure = measure(200_000, 300_000);

  it("takes a value in the person's units as SI", () => {
    expect(read([pressure], [["p0.value", "250"]])).toMatchObject({ evidence: [{ values: [250_000] }], errors: [], outOfBand: [] });
    // 36 psi; 1 psi = 6894.757 Pa (NIST SP 811)
    const us = read([pressure], [["p0.value", "36"]], "us").evidence[0];
    expect(us?.kind === "measure" && us.values[0]).toBeCloseTo(36 * 6894.757, 0);
  });

  it("tells a value out of its band, and keeps its evidence for writing it down as not right", () => {
    const out = read([pressure], [["p0.value", "350"]]);
    expect(out.errors).toEqual([]);
    expect(out.outOfBand).toEqual([
      { field: "p0.value.0", message: expect.stringContaining("350 kPa is out of the band (200 to 300 kPa)") },
    ]);
    expect(out.evidence[0]).toMatchObject({ values: [350_000] });
  });

  it("names place and field where something is missing", () => {
    const { errors, evidence } = read([torque()], [["p0.value", "10"], ["p0.value", ""], ["p0.count", "4"]]); // biome-ignore format: fields
    expect(errors).toEqual([
      { field: "p0.value.1", message: expect.stringMatching(/^b: nothing is entered/) },
      { field: "p0.tool", message: expect.stringContaining("choose the wrench") },
    ]);
    expect(evidence).toEqual([null]);
  });

  it("wants the wrench's own length with an adapter, and refuses one that folds past the handle", () => {
    const base: [string, string][] = [["p0.value", "10"], ["p0.value", "10"], ["p0.count", "4"], ["p0.tool", "wrench"]]; // biome-ignore format: fields
    expect(read([torque()], [...base, ["p0.adapter", "50"]]).errors).toEqual([
      { field: "p0.wrench", message: expect.stringContaining("own length") },
    ]);
    const good = read([torque()], [...base, ["p0.adapter", "-50"], ["p0.wrench", "300"]]);
    expect(good).toMatchObject({ errors: [], tools: ["wrench"], evidence: [{ adapter: -0.05, wrenchLength: 0.3, count: 4 }] });
    expect(read([torque()], [...base, ["p0.adapter", "-300"], ["p0.wrench", "300"]]).errors[0]?.field).toBe("p0.adapter");
  });

  it("counts place by place and leaves rows out in which nothing is written", () => {
    const pairs: Part = { kind: "tally", mode: "pairs", words: { out: "caps off", in: "caps on" } };
    const rows = (...list: [string, string, string][]) =>
      list.flatMap(([place, out, back]): [string, string][] => [["p0.place", place], ["p0.out", out], ["p0.in", back]]); // biome-ignore format: fields
    expect(read([pairs], rows(["bay", "3", "3"], ["", "", ""]))).toMatchObject({
      errors: [],
      evidence: [{ places: [{ place: "bay", out: 3, in: 3 }] }],
    });
    expect(read([pairs], rows(["bay", "3", ""])).errors).toEqual([{ field: "p0.in.0", message: "bay: count how many caps on." }]);
    expect(read([pairs], rows(["", "", ""])).errors[0]?.field).toBe("p0.place.0");
  });

  it("reads bursts by the clock at the install, and none from the future or with pressure after its end", () => {
    const crank: Part = { kind: "crank", giveUpAfter: 60, basis: { kind: "common" } };
    const burst = (began: string, seconds: string, seen: string): [string, string][] => [["p0.began", began], ["p0.seconds", seconds], ["p0.pressure", seen]]; // biome-ignore format: fields
    const ok = read([crank], burst("10:30", "8", "5")).evidence[0];
    expect(ok).toEqual({ kind: "crank", bursts: [{ at: Date.UTC(2031, 4, 3, 10, 30), seconds: 8, pressureAfter: 5 }] });
    expect(read([crank], burst("23:30", "8", "")).errors[0]?.message).toContain("not come yet");
    expect(read([crank], burst("10:30", "8", "9")).errors[0]?.message).toContain("at most after 8 s");
  });

  it("ticks without asking anything", () => {
    expect(read([tick], [])).toMatchObject({ evidence: [{ kind: "tick" }], errors: [] });
  });
});

describe("the sign sheet", () => {
  it("counts apart what the board works out by itself, in the same words on foot and sheet", () => {
    const worked: Part = { kind: "computed", rule: "loose-ends" } as Part;
    const board = makeBoard({ WR: { items: { w1: {}, w2: {}, w3: { parts: [worked] } } } });
    board.proof("w1");
    board.proof("w2");
    board.wait();
    const words = "2 items, and 1 that the board works out";
    expect(pageOf(board, "WR", builder).foot.act).toMatchObject({ label: "Sign as builder", note: `${words}, with your PIN` });
    const sheet = sheetView(evaluate(board.s, board.now), "WR", builder, null);
    expect(sheet).toMatchObject({
      signed: words,
      means: expect.arrayContaining([`Everything stands as it is written down now: ${words}.`]),
    });
    expect(sheet?.sentence).toMatch(/2 items done, .*; and 1 that the board works out\.$/);
  });

  it("covers today's list, and refuses the one who did the work with the rules' own sentence", () => {
    const board = makeBoard({ MF: { name: "Mount", items: { m1: {}, m2: {} } } });
    board.proof("m1");
    board.proof("m2", { by: "di", as: "inspector", did: "di" });
    board.wait().sign("MF");
    const e = evaluate(board.s, board.now);
    const sheet = sheetView(e, "MF", { id: "ed", roles: ["inspector"], units: "si" }, null);
    expect(sheet).toMatchObject({
      act: "Countersign as inspector",
      valve: "half-signed",
      after: "signed",
      refusal: null,
      covers: board.covers("MF"),
    });
    expect(sheet?.sentence).toContain("2 items done, by Member bo and Member di");
    expect(sheet?.signed).toBe("2 items");
    expect(sheetView(e, "MF", inspector, null)?.refusal).toMatchObject({ title: "Your own work", who: "For Member ed." });
  });
});
