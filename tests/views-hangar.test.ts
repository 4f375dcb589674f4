import { parseWithZod } from "@conform-to/zod/v4";
import { describe, expect, it } from "vitest";
import { evaluate } from "#app/lib/gates/evaluate";
import { inviteForm } from "#app/lib/schemas/account";
import { addExtinguisherForm, badCheckForm, goodCheckForm } from "#app/lib/schemas/crib-forms";
import { fieldsOf, replyOf } from "#app/lib/schemas/form-reply";
import { valueForm } from "#app/lib/schemas/set-up-forms";
import { valueDefs } from "#app/lib/template/values";
import { crewPageView } from "#app/lib/views/crew";
import { cribView } from "#app/lib/views/crib";
import { dateAfter, dueView, monthTicks } from "#app/lib/views/crib-dates";
import { hangarRow, hangarView } from "#app/lib/views/hangar";
import { setUpView } from "#app/lib/views/set-up";
import { SAMPLES } from "./support/sample-traits";
import { type Board, makeBoard, signAll, torque } from "./support/snapshots";

const DAY = 86_400_000;
const COMMAND = "0123456789abcdefghij";
const formOf = (fields: Record<string, string>) => {
  const form = new FormData();
  for (const [name, value] of Object.entries({ commandId: COMMAND, ...fields })) form.set(name, value);
  return form;
};
const evaluated = (board: Board) => evaluate(board.s, board.now);
const oneGate = () => makeBoard({ FP: { name: "Fuel prime", short: "Fuel", items: { FP1: { secondEyes: true } } } });

describe("a row of the hangar", () => {
  it("tells the second person, and nobody else, that an item waits", () => {
    const board = oneGate();
    board.proof("FP1");
    const row = (id: string, roles: ("builder" | "crew")[]) => hangarRow(evaluated(board), { id, roles }, board.now);
    expect(row("cy", ["builder"]).waits.map((w) => w.label)).toEqual(["Look and confirm: FP1"]);
    expect(row("bo", ["builder"]).waits).toEqual([]);
    expect(row("fi", ["crew"]).waits).toEqual([]);
    expect(row("fi", ["crew"]).first).toMatch(/^First: /);
  });

  it("asks for the signature, then for the countersignature of another", () => {
    const board = makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } });
    board.proof("FP1");
    const waits = (id: string, role: "builder" | "inspector") =>
      hangarRow(evaluated(board), { id, roles: [role] }, board.now).waits.map((w) => w.label);
    expect(waits("bo", "builder")).toEqual(["Sign Fuel prime"]);
    expect(waits("di", "inspector")).toEqual([]);
    board.wait().sign("FP", "bo", "builder");
    expect(waits("bo", "builder")).toEqual([]);
    expect(waits("di", "inspector")).toEqual(["Countersign Fuel prime"]);
  });

  it("asks the crew to read the card, then to answer, and says run, time and clearance", () => {
    const board = signAll(makeBoard({ FP: { items: { FP1: {} } } }));
    const run = board.run("1");
    const row = () => hangarRow(evaluated(board), { id: "fi", roles: ["crew"] }, board.now);
    const waits = () => row().waits.map((w) => w.label);
    expect(waits()).toEqual([]);
    board.brief(run);
    expect(waits()).toEqual([]);
    const { acks, answers } = run;
    run.answers = [];
    expect(waits()).toEqual(["Answer the roll call"]);
    run.acks = [];
    expect(waits()).toEqual(["Read the run card"]);
    Object.assign(run, { acks, answers });
    board.wait();
    board.act(run, "hold", { reason: "smoke", auto: false }, { by: "cy", as: "builder" });
    expect(waits()).toEqual(["Answer the roll call"]);
    board.wait();
    board.answer(run, "fi");
    expect(waits()).toEqual([]);
    run.acts.pop();
    expect(row().planned).toMatch(/^Run 1a is planned for \w{3} \d+ \w{3} \d\d:\d\d \S+\.$/);
    expect(row().clearance).toMatch(/^Cleared to [\d,]+ rpm\.$/);
    expect(row().answer.title).toBe("Clear for run 1a");
    const lead = hangarRow(evaluated(board), { id: "la", roles: ["lead", "builder"] }, board.now);
    expect(lead.waits.map((w) => w.label)).toEqual(["Call GO for run 1a"]);
    expect(lead.roles).toBe("lead and builder");
  });

  it("never says cleared beside a run that is not clear, and tells those who can clear what comes first", () => {
    const board = makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } });
    board.plan(board.run("1"));
    const row = (id: string, role: "builder" | "crew") => hangarRow(evaluated(board), { id, roles: [role] }, board.now);
    expect(row("cy", "builder").answer.title).toBe("Not clear for run 1a");
    expect(row("bo", "builder").clearance).toBe("Once nothing stops it: cleared to 1,200 rpm.");
    const ran = hangarRow(evaluate({ ...board.s, values: [] }, board.now), { id: "bo", roles: ["builder"] }, board.now);
    expect(ran.clearance).toBe("Not cleared to any speed yet.");
    // One who waits for nobody: not on the run, and the first thing is a builder's.
    board.s.runs = [];
    expect(row("bo", "builder").first).toMatch(/^You can clear what comes first: Fuel prime/);
    expect(row("fi", "crew").first).toMatch(/^First: Fuel prime.* For Member /);
  });

  it("stands the one that waits most first, the newest change first among equals", () => {
    const e = evaluated(oneGate());
    const made = (id: string, waits: number, changedAt: number) => ({
      ...hangarRow(e, { id: "fi", roles: ["crew"] }, changedAt),
      id,
      waits: Array.from({ length: waits }, () => ({ label: "", note: "", href: "" })),
    });
    const view = hangarView([made("a", 0, 5), made("b", 2, 1), made("c", 0, 9), made("d", 1, 3)]);
    expect(view.rows.map((r) => r.id)).toEqual(["b", "d", "c", "a"]);
    expect([view.title, view.state]).toEqual(["3 things wait for you", "on 2 of your 4 installs"]);
    expect(hangarView([made("a", 1, 1)]).title).toBe("1 thing waits for you");
    expect(hangarView([made("a", 0, 1)])).toMatchObject({ title: "Nothing to sign or answer", state: "on your install" });
    expect(hangarView([]).title).toBe("No installs yet");
  });
});

describe("the set-up", () => {
  const board = makeBoard();
  board.s.values = valueDefs(SAMPLES.boostedConstantSpeed).map((def) => ({ ...def, value: def.preset, source: null }));
  const redline = board.s.values.find((v) => v.key === "redline");
  if (!redline) throw new Error("no redline");
  redline.value = 2712.5 / 60;
  const view = () => setUpView(evaluated(board), { id: "la", roles: ["lead", "builder"] }, "si");

  it("names first what the evaluator lets stop the runs, the redline before all", () => {
    const stop = evaluated(board).result.next?.blockers.find((b) => b.code === "limit-unconfirmed");
    const open = view().groups[0]?.rows.filter((r) => r.state !== "confirmed") ?? [];
    expect(stop?.title).toBe(`${open.length} limits not confirmed`);
    expect(view().groups.map((g) => g.key)).toEqual(["runs", "release", "ratings"]);
    expect(view().next?.label).toBe("Redline");
    expect(view().groups.flatMap((g) => g.rows)).toHaveLength(board.s.values.length);
  });

  it("says of each whether it is a default, missing or read", () => {
    const rows = view().groups.flatMap((g) => g.rows);
    expect(rows.find((r) => r.key === "redline")).toMatchObject({ word: "not confirmed", value: "2,713", typed: "2713", unit: "rpm" });
    expect(rows.find((r) => r.key === "oilPressureMax")).toMatchObject({ word: "not entered", value: null, unit: "kPa" });
    redline.source = "engine manual p. 12";
    expect(view().groups[0]?.rows[0]).toMatchObject({ word: "read", source: "engine manual p. 12" });
    redline.source = null;
  });

  it("lets nobody confirm who is crew only, and says who may", () => {
    expect(setUpView(evaluated(board), { id: "fi", roles: ["crew"] }, "si").may).toMatchObject({ ok: false });
    expect(view().may.ok).toBe(true);
  });

  it("takes a figure left as shown for the value itself, and another for what it says", () => {
    const read = (value: string, source = "manual p. 12") =>
      parseWithZod(formOf({ key: "redline", value, source }), { schema: valueForm(redline, "si") });
    const kept = read("2713");
    expect(kept.status === "success" && kept.value.value).toBe(redline.value);
    const typed = read("2700");
    expect(typed.status === "success" && typed.value.value).toBeCloseTo(45, 9);
    expect(read("fast", "").reply().error).toMatchObject({
      value: [expect.stringContaining("not a number")],
      source: [expect.stringContaining("where it was read")],
    });
  });

  it("keeps the text of the form that came back, and of no other", () => {
    const sent = formOf({ key: "redline", value: "fast", source: "p. 12" });
    const reply = replyOf("value-redline", sent, { value: ["no"], source: null });
    const mine = fieldsOf("value-redline", reply);
    expect(mine.field("value", "2713")).toMatchObject({ id: "value-redline-value", defaultValue: "fast", errors: ["no"] });
    expect(mine.field("source").errors).toBeUndefined();
    expect(fieldsOf("value-idleRpm", reply).field("value", "800")).toMatchObject({ defaultValue: "800", errors: undefined });
    expect(reply.typed).not.toHaveProperty("commandId");
  });
});

describe("the crew", () => {
  it("counts who is missing for the runs and for the signatures", () => {
    const board = makeBoard();
    const rung = board.s.rungs[0];
    if (!rung) throw new Error("no rung");
    const here = board.s.members.length;
    rung.crew = { ...rung.crew, people: here + 2 };
    const view = () => crewPageView(evaluated(board), { id: "la", roles: ["lead", "builder"] });
    expect(view().needs[0]).toMatchObject({ met: false, title: `Run 1 needs ${here + 2} people` });
    expect(view().needs[0]?.says).toContain("bring in 2 more");
    rung.crew = { ...rung.crew, people: here };
    expect(view().needs.every((n) => n.met)).toBe(true);
    for (const m of board.s.members) m.roles = m.roles.map((r) => (r.role === "inspector" ? { ...r, to: board.now } : r));
    expect(view().needs.find((n) => n.key === "inspector")).toMatchObject({ met: false, title: "No inspector" });
    expect(view().former.length).toBeGreaterThan(0);
  });

  it("takes an address as people type it, and asks what they do", () => {
    const good = parseWithZod(formOf({ email: " Noor@Demo.Example ", role: "crew" }), { schema: inviteForm });
    expect(good.status === "success" && good.value.email).toBe("noor@demo.example");
    const bad = parseWithZod(formOf({ email: "noor" }), { schema: inviteForm });
    expect(bad.reply().error).toMatchObject({ email: [expect.stringContaining("address such as")], role: ["Choose what they do here."] });
  });
});

describe("the crib", () => {
  const crib = (board: Board) => cribView(evaluated(board), "la", "si", { serials: { wrench: "4471" }, checks: {}, bottles: {} });

  it("lists what runs out, out of date first, then by days left", () => {
    const board = makeBoard({});
    const DAY = 86_400_000;
    const tool = board.tool("old", board.now - DAY);
    board.tool("soon", board.now + 2 * DAY);
    board.tool("never").checks = [];
    board.tool("bad").checks.push({ id: "b", at: board.now, good: false, due: null, since: null });
    const [first] = board.s.extinguishers;
    if (!first) throw new Error("no extinguisher");
    board.s.extinguishers = [{ ...first, lookDue: board.now + DAY / 2, serviceDue: board.now + 40 * DAY }];
    const { due } = crib(board);
    expect(due.slice(0, 6).map((d) => [d.name, d.what, d.word.replace(/ since .*/, ""), d.state])).toEqual([
      ["Wrench bad", "calibration", "out of tolerance", "out"],
      ["Wrench never", "calibration", "never done", "out"],
      [tool.name, "calibration", "past its date", "out"],
      ["Cart one", "monthly look", "last day", "due soon"],
      ["Wrench soon", "calibration", "2 days left", "due soon"],
      ["Cart one", "yearly service", "40 days left", "in date"],
    ]);
  });

  it("names the proofs that fall when the tool is found out of tolerance, as the evaluator then judges", () => {
    const board = makeBoard({ OP: { items: { OP1: { parts: [torque()] }, OP2: {} } } });
    board.wait();
    board.proof("OP1");
    board.proof("OP2");
    const [row] = crib(board).tools;
    const tool = board.s.tools[0];
    if (!row || !tool) throw new Error("no tool");
    expect(row).toMatchObject({ state: "in date", detail: "serial 4471", reach: "OP1" });
    tool.checks.push({ id: "bad", at: board.now, good: false, due: null, since: null });
    board.wait();
    const after = evaluated(board).result.items;
    expect([after.OP1?.stands, after.OP2?.stands]).toEqual([false, true]);
    expect(crib(board).tools[0]).toMatchObject({ state: "out", word: "out of tolerance", reach: null });
    expect(crib(board).tools[0]?.hangs).toContain("1 proof to do again: OP1");
  });

  it.each([
    [null, "out", "never done"],
    [0, "out", "past its date"],
    [1, "due soon", "last day"],
    [30 * DAY, "due soon", "30 days left"],
    [30 * DAY + 1, "in date", "in date"],
  ])("a date that ends %s ms from now is %s: %s", (left, state, word) => {
    const now = Date.UTC(2026, 11, 1, 12);
    expect(dueView("calibration", left === null ? null : now + left, 30, now, "UTC")).toMatchObject({ state, word });
  });

  it("offers days that exist, and shows the last day that is in date", () => {
    const now = Date.UTC(2027, 0, 31, 12);
    expect([dateAfter(now, 0, "UTC"), dateAfter(now, 1, "UTC"), dateAfter(now, 12, "UTC")]).toEqual([
      "2027-01-31",
      "2027-02-28",
      "2028-01-31",
    ]);
    expect(dateAfter(Date.UTC(2026, 11, 31, 23, 30), 0, "Europe/Berlin")).toBe("2027-01-01");
    expect(dueView("look", Date.UTC(2027, 2, 1), 7, now, "UTC").until).toBe("28 Feb 2027");
    const ticks = monthTicks(now, "UTC");
    expect(ticks).toHaveLength(12);
    expect(ticks[0]?.label).toBe("Feb");
    expect(ticks.every((t) => t.share > 0 && t.share <= 1)).toBe(true);
  });

  it("asks a good check for its last day, and a bad one for what was found", () => {
    const good = parseWithZod(formOf({ intent: "good-check", tool: "t", on: "2026-12-01" }), { schema: goodCheckForm });
    expect(good.reply().error).toEqual({ due: ["Enter the last day in date, as the label or certificate says."] });
    const bad = parseWithZod(formOf({ intent: "bad-check", tool: "t", on: "2026-12-01" }), { schema: badCheckForm });
    expect(bad.reply().error).toEqual({ note: ["Say what was found, in a few words."] });
  });

  it("takes a bottle's charge in the person's unit", () => {
    const read = (units: "si" | "us", charge: string) =>
      parseWithZod(formOf({ intent: "add-extinguisher", name: "EX-1", agent: "co2", charge }), { schema: addExtinguisherForm(units) });
    const us = read("us", "5");
    // 1 lb = 0.45359237 kg exactly (international yard and pound agreement of 1959).
    expect(us.status === "success" && us.value.charge).toBeCloseTo(5 * 0.45359237, 9);
    expect(us.status === "success" && us.value.classB).toBe(false);
    expect(read("si", "0").reply().error).toMatchObject({ charge: [expect.stringContaining("above zero")] });
  });
});
