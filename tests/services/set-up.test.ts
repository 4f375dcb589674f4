import { eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { installs } from "#app/db/schema/installs";
import { newId } from "#app/lib/ids";
import { verify } from "#app/lib/record/chain";
import { noteSchema } from "#app/lib/schemas/act";
import { NOT_PLAIN } from "#app/lib/schemas/plain-text";
import { createInstallSchema } from "#app/lib/schemas/set-up";
import { confirmValue } from "#app/lib/services/confirm-value.server";
import { createInstall, INSTALLS_A_DAY } from "#app/lib/services/create-install.server";
import { enterNumber } from "#app/lib/services/enter-number.server";
import { carryOver } from "#app/lib/template/carry-over";
import { generate } from "#app/lib/template/generate";
import { toSI } from "#app/lib/units/convert";
import { MINUTE, TRAITS, value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
let restore: () => void;
beforeAll(async () => {
  w = await workshop();
  restore = await w.save();
}, 60_000);
beforeEach(() => {
  restore();
  w.clock.add(MINUTE);
});
afterAll(() => w.clock.stop());

const refused = (status: number, code: string) => ({ ok: false, status, code });
const source = "maker's manual p. 7";

describe("a new install", () => {
  it("has the template's board for its traits, its creator as lead, and what was left out with the reason", async () => {
    const { snapshot } = await w.board();
    const board = generate(TRAITS);
    expect(snapshot.gates.map((g) => g.key)).toEqual(board.gates.map((g) => g.key));
    expect(snapshot.items.map((i) => i.key).sort()).toEqual(board.items.map((i) => i.key).sort());
    expect(w.leftOut).toEqual(board.leftOut);
    const gateKey = new Map(snapshot.gates.map((g) => [g.id, g.key]));
    expect(snapshot.gates.map((g) => g.needs.map((n) => gateKey.get(n)))).toEqual(board.gates.map((g) => g.needs));
    const itemKey = new Map(snapshot.items.map((i) => [i.id, i.key]));
    for (const i of snapshot.items) {
      const def = board.items.find((d) => d.key === i.key);
      expect([i.key, i.follows.map((f) => itemKey.get(f)), i.step?.endedBy ? itemKey.get(i.step.endedBy) : null]).toEqual([
        i.key,
        def?.follows,
        def?.step?.endedBy ?? null,
      ]);
    }
    expect(snapshot.members.find((m) => m.id === "lio")?.roles).toMatchObject([{ role: "lead", to: null }]);
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });

  it("is made once however often its form is sent", async () => {
    const act = { actor: { userId: "lio" }, commandId: newId() };
    const form = createInstallSchema.parse({
      registration: "N0210Q",
      name: "Second",
      timeZone: "UTC",
      traits: TRAITS,
      values: { redline: { value: 45, source } },
    });
    const before = await db().$count(installs);
    const sent = await Promise.all([1, 2, 3].map(() => createInstall(act, form)));
    expect(new Set(sent.map((o) => JSON.stringify(o))).size).toBe(1);
    expect(await db().$count(installs)).toBe(before + 1);
  });

  it("is refused where one account has made 20 of them within a day, and made again the day after", async () => {
    const form = createInstallSchema.parse({ registration: "N0211R", name: "One of many", timeZone: "UTC", traits: TRAITS });
    const make = (userId: string) => createInstall({ actor: { userId }, commandId: newId() }, form);
    const made = await db().$count(installs, eq(installs.createdBy, "lio"));
    for (let n = made; n < INSTALLS_A_DAY; n++) value(await make("lio"));
    expect(await make("lio")).toMatchObject(refused(409, "too-many-installs"));
    value(await make("olga"));
    w.clock.add(24 * 60 * MINUTE);
    value(await make("lio"));
  });

  it.each([
    ["turns its letters round", "N02\u202e10"],
    ["holds them apart", "\u2066N0210"],
    ["rings a bell", "N0210\u0007"],
  ])("refuses a name that %s", (_, name) => {
    const form = { registration: "N0210Q", name, timeZone: "UTC", traits: TRAITS };
    const read = createInstallSchema.safeParse(form);
    expect(read.error?.issues).toMatchObject([{ path: ["name"], message: NOT_PLAIN }]);
    expect(noteSchema.safeParse(`first line\r\n\tsecond ${name}`).success).toBe(false);
    expect(noteSchema.parse("first line\r\n\tsecond, עברית, é")).toBe("first line\r\n\tsecond, עברית, é");
  });

  it("refuses a time zone that is none and traits that cannot be true together", () => {
    const form = { registration: "N0210Q", name: "Second", timeZone: "Mars/Olympus", traits: TRAITS };
    expect(createInstallSchema.safeParse(form).success).toBe(false);
    expect(createInstallSchema.safeParse({ ...form, timeZone: "UTC" }).success).toBe(true);
    expect(createInstallSchema.safeParse({ ...form, timeZone: "UTC", traits: { ...TRAITS, cycle: "diesel" } }).success).toBe(false);
  });
});

describe("a maker's number", () => {
  const enter = async (key: string, over: Partial<Parameters<typeof enterNumber>[1]>, person: "bea" | "ines" | "cal" = "bea", part = 0) =>
    enterNumber(w.act(person), { item: (await w.item(key)).id, part, band: null, text: null, source, ...over });
  const band = async (key: string) => {
    const [part] = (await w.item(key)).parts;
    return part?.kind === "torque" || part?.kind === "measure" ? part.criterion : null;
  };

  it("that was missing holds at once and is a new revision", async () => {
    expect(await band("MF1")).toMatchObject({ band: null, source: null });
    expect(value(await enter("MF1", { band: { min: 20, max: 24 } })).revision).toBe(2);
    expect(await band("MF1")).toMatchObject({ band: { min: 20, max: 24 }, source });
  });

  it("that confirms a default as it is keeps the revision", async () => {
    const old = await band("IG1");
    expect(value(await enter("IG1", { band: old?.band ?? null })).revision).toBe(1);
    expect(await band("IG1")).toEqual({ ...old, source });
  });

  it("that asks for less is an inspector's once work has begun; narrower is anybody's", async () => {
    value(await enter("MF1", { band: { min: 20, max: 24 } }));
    expect(value(await enter("MF1", { band: { min: 18, max: 24 } })).revision).toBe(3);
    await w.prove("MF2");
    expect(await enter("MF1", { band: { min: 18, max: 26 } })).toMatchObject(refused(403, "not-your-role"));
    expect(await enter("MF1", { band: { min: 18, max: null } })).toMatchObject(refused(403, "not-your-role"));
    expect(value(await enter("MF1", { band: { min: 19, max: 23 } })).revision).toBe(4);
    expect(value(await enter("MF1", { band: { min: 18, max: 26 } }, "ines")).revision).toBe(5);
  });

  it("makes a proof of the old revision lapse", async () => {
    await w.enterNumbers();
    await w.stockCrib();
    await w.prove("MF1");
    value(await enter("MF1", { band: { min: 12, max: 18 } }));
    const mf1 = await w.item("MF1");
    expect((await w.board()).result.items[mf1.id]).toMatchObject({ state: "lapsed", blockers: [{ code: "old-revision" }] });
  });

  it.each([
    ["by crew", "MF1", { band: { min: 1, max: 2 } }, "cal", 403],
    ["no band", "MF1", {}, "bea", 422],
    ["on a part that takes none", "MF2", { band: { min: 1, max: 2 } }, "bea", 422],
    ["on a part that is not there", "MF2", { band: { min: 1, max: 2 }, part: 9 }, "bea", 404],
  ] as const)("is refused: %s", async (_, key, over, person, status) => {
    expect(await enter(key, over, person)).toMatchObject({ ok: false, status });
  });
});

describe("a rating or limit", () => {
  const confirm = (key: string, si: number, person: "lio" | "ines" | "cal" | "bea" = "lio") =>
    confirmValue(w.act(person), { key, value: si, source });
  const values = async () => Object.fromEntries((await w.board()).snapshot.values.map((v) => [v.key, v]));

  it("confirmed as it is changes no item", async () => {
    const { windLimit } = await values();
    expect(value(await confirm("windLimit", windLimit?.value ?? 0)).revised).toEqual([]);
    expect((await values()).windLimit).toMatchObject({ value: windLimit?.value, source });
  });

  it("that changes gives every item that uses it a new revision", async () => {
    const using = (await w.board()).snapshot.items.filter((i) => i.parts.some((p) => p.kind === "measure" && p.criterion.limit));
    const limit = using[0]?.parts.find((p) => p.kind === "measure")?.criterion.limit;
    if (!limit) throw new Error("No item uses a limit");
    const users = using.filter((i) => i.parts.some((p) => p.kind === "measure" && p.criterion.limit?.key === limit.key)).map((i) => i.id);
    const { revised } = value(await confirm(limit.key, 123));
    expect(revised.map((r) => r.item)).toEqual(expect.arrayContaining(users));
    for (const r of revised) expect(r.revision).toBe(2);
  });

  it("rated speed sets the ladder's speeds; the number of cylinders sets the places, and what was entered stays", async () => {
    expect((await w.board()).snapshot.rungs[0]?.rpm).toBeNull();
    value(await confirm("ratedRpm", toSI(2700, "rpm")));
    expect((await w.board()).snapshot.rungs.map((r) => r.rpm !== null)).toContain(true);
    expect((await w.board()).snapshot.rungs[0]?.rpm).toBeCloseTo(toSI(1350, "rpm"), 9);

    const places = async () => (await w.item("OP1")).parts.find((p) => p.kind === "tally")?.expected;
    value(await confirm("cylinders", 4));
    expect(await places()).toBe(4);
    const op10 = await w.item("OP10");
    const torque = op10.parts.findIndex((p) => p.kind === "torque");
    value(await enterNumber(w.act("bea"), { item: op10.id, part: torque, band: { min: 20, max: 25 }, text: null, source }));
    value(await confirm("cylinders", 6));
    expect(await places()).toBe(6);
    const now = (await w.item("OP10")).parts[torque];
    expect(now?.kind === "torque" ? now.criterion : null).toMatchObject({ band: { min: 20, max: 25 }, source });
  });

  it("is more than zero where nothing else can be, such as a redline", async () => {
    expect(await confirm("redline", 0)).toMatchObject(refused(422, "invalid"));
    expect(await confirm("reductionRatio", -2)).toMatchObject({ ok: false });
    value(await confirm("oilPressureMin", 0));
    value(await confirm("redline", 45));
  });

  it("confirmed once is an inspector's to change when work has begun", async () => {
    value(await confirm("redline", 45));
    value(await confirm("redline", 46));
    await w.prove("MF2");
    expect(await confirm("redline", 50)).toMatchObject(refused(403, "not-your-role"));
    expect(await confirm("redline", 46)).toMatchObject({ ok: true });
    value(await confirm("redline", 44, "ines"));
    expect(await confirm("nothing", 1)).toMatchObject(refused(404, "not-found"));
    expect(await confirm("windLimit", 5, "cal")).toMatchObject(refused(403, "not-your-role"));
  });
});

describe("carrying over", () => {
  it("takes the template's changes and keeps what people entered", () => {
    const before = { places: ["1", "2"], criterion: { band: null as null | { min: number }, source: null as string | null }, count: 2 };
    const after = { places: ["1", "2", "3"], criterion: { band: null, source: null }, count: 3 };
    const stored = { places: ["1", "2"], criterion: { band: { min: 20 }, source: "manual" }, count: 2 };
    expect(carryOver(before, after, stored)).toEqual({
      places: ["1", "2", "3"],
      criterion: { band: { min: 20 }, source: "manual" },
      count: 3,
    });
    expect(carryOver(before, after, { ...stored, count: 9 }).count).toBe(9);
    expect(carryOver(before, before, stored)).toEqual(stored);
    expect(carryOver({ a: { x: 1 } }, { a: { x: 2 } }, { a: { x: 1, y: 5 } as { x: number } })).toEqual({ a: { x: 2, y: 5 } });
  });
});
