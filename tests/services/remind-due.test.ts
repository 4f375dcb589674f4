import { eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";
import { now } from "#app/lib/clock";
import { dueSoon } from "#app/lib/gates/crib-dues";
import { addExtinguisher, addTool, recordLook, recordToolCheck } from "#app/lib/services/crib.server";
import { endRole } from "#app/lib/services/members.server";
import { remindDue } from "#app/lib/services/remind-due.server";
import { makeBoard } from "../support/snapshots";
import { MINUTE, value, type Workshop, workshop } from "../support/workshop";

vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

const DAY = 24 * 60 * MINUTE;

describe("what runs out soon", () => {
  const at = 1_000 * DAY;
  const tool = (name: string, ends: number | null, good = true) => ({
    id: name,
    name,
    checks: ends === null ? [] : [{ id: `${name}-c`, at: at - 100 * DAY, good, due: good ? ends : null, since: null }],
  });
  const soon = (tools: ReturnType<typeof tool>[], now = at) => dueSoon({ tools, extinguishers: [] }, now).map((d) => [d.name, d.lead]);

  it("is named at the longest lead time and again at the shortest, until it has run out", () => {
    const ends = at + 14 * DAY;
    expect(soon([tool("a", ends)], at - 1)).toEqual([]);
    expect(soon([tool("a", ends)], at)).toEqual([["a", 14]]);
    expect(soon([tool("a", ends)], ends - 3 * DAY - 1)).toEqual([["a", 14]]);
    expect(soon([tool("a", ends)], ends - 3 * DAY)).toEqual([["a", 3]]);
    expect(soon([tool("a", ends)], ends - 1)).toEqual([["a", 3]]);
    expect(soon([tool("a", ends)], ends)).toEqual([]);
  });

  it("comes soonest first, and leaves out what has no date", () => {
    const bad = { ...tool("bad", at + DAY), checks: [{ id: "x", at, good: false, due: null, since: null }] };
    expect(soon([tool("later", at + 9 * DAY), tool("never", null), bad, tool("first", at + 2 * DAY)])).toEqual([
      ["first", 3],
      ["later", 14],
    ]);
  });

  it("asks look and service of an extinguisher, none of one that was withdrawn", () => {
    const { extinguishers } = makeBoard({}).s;
    const [one, two] = extinguishers.map((x) => ({ ...x, lookDue: at + 2 * DAY, serviceDue: at + 10 * DAY }));
    if (!one || !two) throw new Error("no extinguishers");
    const found = dueSoon({ tools: [], extinguishers: [one, { ...two, withdrawn: true }] }, at);
    expect(found.map((d) => [d.id, d.kind, d.lead])).toEqual([
      [one.id, "look", 3],
      [one.id, "service", 14],
    ]);
  });
});

describe("the mail before a date of the crib", () => {
  let w: Workshop;
  let restore: () => void;
  beforeAll(async () => {
    w = await workshop();
    restore = await w.save();
  }, 60_000);
  beforeEach(() => restore());
  afterAll(() => w.clock.stop());

  const mails = () => db().select().from(outbox).where(eq(outbox.kind, "due"));
  async function wrench(due: string) {
    const { tool } = value(await addTool(w.act("bea"), { name: "Torque wrench TW-5", serial: "" }));
    value(await recordToolCheck(w.act("bea"), { tool, on: null, good: true, due }));
    return tool;
  }
  /** "2026-12-13": that many days on, in UTC, which is near enough in winter. */
  const date = (days: number) => new Date(now() + days * DAY).toISOString().slice(0, 10);

  it("goes once to each lead and builder for each date and lead time", async () => {
    await wrench(date(10));
    const readers = (await w.board()).snapshot.members.filter((m) => m.roles.some((r) => r.role === "lead" || r.role === "builder"));
    expect(readers.length).toBeGreaterThan(1);
    expect(await remindDue()).toBe(readers.length);
    expect(await remindDue()).toBe(0);
    const first = await mails();
    expect(new Set(first.map((m) => m.toUserId))).toEqual(new Set(readers.map((r) => r.id)));
    expect(first[0]?.subject).toMatch(/^Due soon: Torque wrench TW-5 of N0200\w*, calibration to the end of /);
    expect(first[0]?.text).toContain("Have it checked, then enter the check in the crib with its certificate.");
    expect(first[0]?.text.split("\n").every((line) => line.length <= 72 || /^https?:/.test(line))).toBe(true);
    w.clock.add(8 * DAY);
    expect(await remindDue()).toBe(readers.length);
    expect(await remindDue()).toBe(0);
    w.clock.add(5 * DAY);
    expect(await remindDue()).toBe(0);
  });

  it("goes again for a new date, and not for one that a check has overtaken", async () => {
    const tool = await wrench(date(10));
    w.clock.add(MINUTE);
    value(await recordToolCheck(w.act("bea"), { tool, on: null, good: true, due: date(300) }));
    expect(await remindDue()).toBe(0);
    w.clock.add(MINUTE);
    value(await recordToolCheck(w.act("bea"), { tool, on: null, good: true, due: date(12) }));
    expect(await remindDue()).toBeGreaterThan(0);
  });

  it("does not go to who holds the role no more, nor for an extinguisher out of use", async () => {
    const { extinguisher } = value(await addExtinguisher(w.act("bea"), { name: "CO2 by the door", agent: "co2", classB: true, charge: 5 }));
    value(await recordLook(w.act("bea"), { extinguisher, kind: "look", due: date(2), note: "" }));
    value(await endRole(w.act("lio"), { member: "tom", role: "builder" }));
    await remindDue();
    const sent = await mails();
    expect(sent.map((m) => m.toUserId)).not.toContain("tom");
    expect(sent[0]?.text).toContain("Monthly look");
    w.clock.add(MINUTE);
    const other = value(await addExtinguisher(w.act("bea"), { name: "Cart two", agent: "co2", classB: true, charge: 5 })).extinguisher;
    value(await recordLook(w.act("bea"), { extinguisher: other, kind: "look", due: date(2), note: "" }));
    value(await recordLook(w.act("bea"), { extinguisher: other, kind: "withdrawn", due: null, note: "low" }));
    expect(await remindDue()).toBe(0);
  });
});
