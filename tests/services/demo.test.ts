import { beforeAll, describe, expect, it } from "vitest";
import { type Database, db } from "#app/db/client.server";
import { boardNow } from "#app/db/queries/board-now.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { events } from "#app/db/schema/events";
import { installs } from "#app/db/schema/installs";
import { outbox } from "#app/db/schema/outbox";
import { users } from "#app/db/schema/users";
import { daysBefore, workingZone } from "#app/db/seed/days";
import { type SignIn, seedDemo } from "#app/db/seed.server";
import { judgePassword } from "#app/lib/auth/password.server";
import { judgePin } from "#app/lib/auth/pin.server";
import { now } from "#app/lib/clock";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { localOf } from "#app/lib/gates/local-time";
import { verify } from "#app/lib/record/chain";
import { freshDatabase } from "../support/db";

let file: Database;
let people: SignIn[];
let began: number;
beforeAll(async () => {
  file = await freshDatabase();
  began = now();
  people = await seedDemo();
}, 300_000);

/** The board at the instant at which seeding began: what the story leads up to. */
async function boardOf(registration: string): Promise<Evaluation> {
  const row = (await db().select().from(installs)).find((i) => i.registration === registration);
  const found = row && (await boardNow(file.db, row.id, began));
  if (!found) throw new Error(`No ${registration}`);
  return found.e;
}

const keysOf = (e: Evaluation, stands: boolean) =>
  e.snapshot.gates.filter((g) => e.result.next?.requiredGates.includes(g.id) && e.result.gates[g.id]?.stands === stands).map((g) => g.key);
const openItems = (e: Evaluation, gate: string) =>
  e.snapshot.items
    .filter((i) => e.snapshot.gates.find((g) => g.id === i.gate)?.key === gate && !e.result.items[i.id]?.stands)
    .map((i) => i.key);

describe("the demo", () => {
  it("has people who can sign in, each with an address that leads nowhere", async () => {
    expect(people).toHaveLength(9);
    for (const p of people) {
      expect(p.email).toMatch(/@demo\.example$/);
      expect(judgePassword(p.password, p)).toEqual({ ok: true });
      expect(judgePin(p.pin)).toEqual({ ok: true });
    }
    expect((await db().select().from(users)).map((u) => u.email).sort()).toEqual(people.map((p) => p.email).sort());
  });

  it("is loaded once", async () => {
    const count = async () => (await db().select().from(events)).length;
    const before = await count();
    expect(await seedDemo()).toEqual(people);
    expect(await count()).toBe(before);
  });

  it.each(["N0382L", "N0526P", "N0719T"])("has a chain that verifies and ends before the present: %s", async (registration) => {
    const { snapshot } = await boardOf(registration);
    const lines = await recordLines(db(), snapshot.install.id);
    expect(verify(lines)).toMatchObject({ ok: true, lines: lines.length });
    expect(lines.at(-1)?.event.recorded).toBeLessThanOrEqual(began);
  });

  it.each(["N0382L", "N0526P", "N0719T"])("asks 60 to 95 items before the first start: %s", async (registration) => {
    const e = await boardOf(registration);
    const before = new Set(e.snapshot.gates.filter((g) => !g.lookBack && g.requiredBy.kind !== "release").map((g) => g.id));
    const count = e.snapshot.items.filter((i) => before.has(i.gate) && !i.hidden).length;
    expect(count).toBeGreaterThanOrEqual(60);
    expect(count).toBeLessThanOrEqual(95);
  });

  it("N0382L is stopped by one item of the walk-round and one of its crew, and nothing else", async () => {
    const e = await boardOf("N0382L");
    const run = e.result.next;
    expect(run).toMatchObject({ rung: "1", state: "planned", clear: false });
    expect(run?.blockers.map((b) => b.code)).toEqual(["gate-in-work", "not-acknowledged", "no-answer"]);
    expect(keysOf(e, false)).toEqual(["WR"]);
    expect(openItems(e, "WR")).toEqual(["WR8"]);
    const noor = e.snapshot.members.find((m) => m.name === "Noor Lanyard");
    expect(run?.blockers.slice(1).map((b) => b.owner.members)).toEqual([[noor?.id], [noor?.id]]);
    const planned = e.snapshot.runs[0]?.plannedStart ?? 0;
    expect(planned - began).toBeGreaterThan(100 * 60_000);
    expect(planned - began).toBeLessThan(135 * 60_000);
  });

  it("N0526P has two runs behind it and a third that a finding holds", async () => {
    const e = await boardOf("N0526P");
    expect(e.result.runs.map((r) => [r.label, r.state]).sort()).toEqual([
      ["1", "reviewed"],
      ["2", "reviewed"],
      ["3", "held"],
    ]);
    expect(e.result.next?.blockers.map((b) => b.code)).toEqual(["clearance", "no-answer"]);
    expect(e.result.next?.clearance.binds).toMatchObject({ kind: "finding", rpm: 4000 / 60 });
    expect(keysOf(e, false)).toEqual([]);
    expect(e.snapshot.findings.map((f) => [f.severity, f.closed !== null])).toEqual([
      ["watch", true],
      ["limiting", false],
    ]);
    const acts = e.snapshot.runs.find((r) => r.label === "3")?.acts ?? [];
    expect([...acts].sort((a, b) => a.seq - b.seq)).toMatchObject([{ act: "go" }, { act: "hold", auto: true }]);
    expect(e.snapshot.runs.flatMap((r) => r.exceedances).map((x) => x.answered === null)).toEqual([false]);
  });

  it("N0719T is set up and not begun", async () => {
    const e = await boardOf("N0719T");
    expect(e.snapshot.members.flatMap((m) => m.roles.map((r) => r.role)).sort()).toEqual(["builder", "lead"]);
    expect([e.snapshot.proofs, e.snapshot.runs, e.snapshot.signatures]).toEqual([[], [], []]);
    expect(e.snapshot.values.filter((v) => v.source !== null)).toHaveLength(5);
    expect(e.snapshot.values.filter((v) => v.source === null).length).toBeGreaterThan(5);
  });

  it("has told the crew of each GO and of the HOLD by mail", async () => {
    const kinds = (await db().select({ kind: outbox.kind }).from(outbox)).map((m) => m.kind);
    const count = (kind: string) => kinds.filter((k) => k === kind).length;
    expect([count("go"), count("hold")]).toEqual([18, 6]);
  });
});

describe("the demo's calendar", () => {
  it("finds a working day at every hour of the year", () => {
    for (let hour = 0; hour < 365 * 24; hour++) {
      const at = Date.UTC(2027, 0, 1, hour, 30);
      const zone = workingZone(at);
      expect(zone).not.toBe("UTC");
      const { time } = localOf(at, zone);
      expect(time >= "10:00" && time < "18:00").toBe(true);
    }
  });

  it("counts days on the clocks of the place, over a change of the clocks too", () => {
    const today = Date.UTC(2027, 2, 30, 9, 0);
    expect(new Date(daysBefore(today, 0, "11:00", "Europe/Zurich")).toISOString()).toBe("2027-03-30T09:00:00.000Z");
    expect(new Date(daysBefore(today, 3, "11:00", "Europe/Zurich")).toISOString()).toBe("2027-03-27T10:00:00.000Z");
  });
});
