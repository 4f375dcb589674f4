import { asc, eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db, write } from "#app/db/client.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { outbox } from "#app/db/schema/outbox";
import { now } from "#app/lib/clock";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { runsOutBefore } from "#app/lib/gates/runs-out";
import { mailWorker } from "#app/lib/mail/worker.server";
import { applyRules } from "#app/lib/services/apply-rules.server";
import { boardClock } from "#app/lib/services/board-clock.server";
import { callGo } from "#app/lib/services/call-go.server";
import { callHold } from "#app/lib/services/call-hold.server";
import { giveLeaseBack, takeLease } from "#app/lib/services/lease.server";
import { addMember } from "#app/lib/services/members.server";
import { beginRecord } from "#app/lib/services/perform.server";
import { planRun } from "#app/lib/services/plan-run.server";
import { remindRunsOut } from "#app/lib/services/remind-runs-out.server";
import { acknowledgeBrief, answerRollCall, recordWind } from "#app/lib/services/roll-call.server";
import { MINUTE, PIN, value, type Workshop, workshop } from "../support/workshop";

vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

const HOUR = 60 * MINUTE;
const POSITIONS = [
  { position: "operator", member: "bea" },
  { position: "runlead", member: "lio" },
  { position: "fireguard", member: "tom" },
  { position: "fireguard", member: "cal" },
  { position: "areaguard", member: "ines" },
  { position: "recorder", member: "olga" },
  { position: "observer", member: "olga" },
] as const;
let w: Workshop;
let ready: () => void;

beforeAll(async () => {
  w = await workshop();
  await w.readyForRun();
  value(await addMember(w.act("lio"), { email: "olga@n0200.example", role: "crew" }));
  w.clock.add(MINUTE);
  ready = await w.save();
}, 120_000);
afterAll(() => w.clock.stop());
beforeEach(() => ready());

async function plan(start: number): Promise<string> {
  const rpm = (await w.board()).snapshot.rungs[0]?.rpm ?? 0;
  const base = { run: null, rung: "1", place: "Apron south", rpm, positions: [...POSITIONS], windLimit: 7, gustLimit: 10 };
  return value(await planRun(w.act("lio"), { ...base, plannedStart: start })).run;
}
let runId = "";
async function called(): Promise<void> {
  const run = await plan(now() + HOUR);
  for (const person of ["bea", "lio", "tom", "cal", "ines", "olga"] as const) {
    w.clock.add(1000);
    value(await acknowledgeBrief(w.act(person), { run, version: 1 }));
    value(await answerRollCall(w.act(person), { run, version: 1, answer: "go", reason: "", queueEmpty: true }));
  }
  value(await recordWind(w.act("cal"), { run, speed: 3, gust: 5, tail: false }));
  w.clock.add(MINUTE);
  value(await callGo(w.act("lio"), { run, version: 1, pin: PIN }));
  runId = run;
}

const mails = (kind: string) => db().select().from(outbox).where(eq(outbox.kind, kind)).orderBy(asc(outbox.toUserId));

describe("the clock of several processes", () => {
  it("is one's at a time, goes on with whoever renews it, and passes when it is given back or runs out", async () => {
    expect(await takeLease("t", "a", 30_000)).toBe(true);
    expect(await takeLease("t", "b", 30_000)).toBe(false);
    w.clock.add(20_000);
    expect(await takeLease("t", "a", 30_000)).toBe(true);
    w.clock.add(20_000);
    expect(await takeLease("t", "b", 30_000)).toBe(false);
    w.clock.add(10_000);
    expect(await takeLease("t", "b", 30_000)).toBe(true);
    await giveLeaseBack("t", "a");
    expect(await takeLease("t", "a", 30_000)).toBe(false);
    await giveLeaseBack("t", "b");
    expect(await takeLease("t", "a", 30_000)).toBe(true);
  });

  it("lets the second clock wait until the first one stops", async () => {
    const [first, second] = [boardClock("one"), boardClock("two")];
    expect(await first.tick()).toBe(true);
    expect(await second.tick()).toBe(false);
    await first.stop();
    expect(await second.tick()).toBe(true);
  });
});

describe("what runs out before a planned run", () => {
  it("is named a day ahead, once, to leads and builders, and again only when something else runs out", async () => {
    const later = await plan(now() + 40 * 24 * HOUR);
    // One that ends more than a day after whatever ends before it, so that a day ahead it is the only news.
    const all = runsOutBefore(await w.board(), later);
    const soonest = all.find((r, n) => r.until - (all[n - 1]?.until ?? now()) > 26 * HOUR);
    if (!soonest) throw new Error("Nothing runs out");
    ready();
    const start = soonest.until + HOUR;
    const run = await plan(start);
    expect(runsOutBefore(await w.board(), run).map((r) => r.item)).toContain(soonest.item);
    w.clock.add(soonest.until - now() - 25 * HOUR);
    expect(await remindRunsOut()).toBe(0);
    w.clock.add(2 * HOUR);
    expect(await remindRunsOut()).toBe(1);
    const told = await mails("runs-out");
    expect(told.map((m) => m.toUserId)).toEqual(["bea", "lio", "tom"]);
    expect(told[0]?.subject).toMatch(/^Runs out: run 1 of N0200W, .*proofs? runs? out$/);
    expect(told[0]?.text).toContain(soonest.blocker.title.split(" ").slice(0, 3).join(" "));
    w.clock.add(10 * MINUTE);
    expect(await remindRunsOut()).toBe(0);
    expect(await mails("runs-out")).toHaveLength(told.length);
  });

  it("says nothing of a run that has no time, or of what lasts longer", async () => {
    const run = await plan(now() + HOUR);
    expect(runsOutBefore(await w.board(), run)).toEqual([]);
    expect(await remindRunsOut()).toBe(0);
  });
});

describe("a program with other rules", () => {
  it("finds an install made under these rules in order", async () => {
    expect(await applyRules()).toBe(0);
  });

  it("writes it into the record once, and holds a GO that was called before", async () => {
    await called();
    const older = await write(async (tx) => {
      const { writer } = await beginRecord(tx, w.installId);
      return writer.record({ by: "lio", as: "lead" }, { type: "rules-changed", data: { from: "0", to: "1", stands: [] } });
    });
    expect(await applyRules()).toBe(1);
    const lines = await recordLines(db(), w.installId, { after: older.seq });
    expect(lines.map((l) => l.event.type)).toEqual(["rules-changed", "hold-called"]);
    expect(lines[0]?.event.data).toMatchObject({ from: "1", to: RULES_VERSION });
    expect((await w.board()).result.runs.find((r) => r.id === runId)?.state).toBe("held");
    expect((await mails("hold")).length).toBe(6);
    expect(await applyRules()).toBe(0);
  });
});

describe("a GO mail that waited", () => {
  const sent: string[] = [];
  const worker = () =>
    mailWorker(async (row) => {
      sent.push(row.kind);
    });
  beforeEach(() => sent.splice(0));

  it("goes out while the GO stands", async () => {
    await called();
    await worker().drain();
    expect(sent.filter((k) => k === "go")).toHaveLength(6);
  });

  it("stays unsent once HOLD is called, and the HOLD goes out", async () => {
    await called();
    value(await callHold(w.act("cal"), { run: runId, reason: "a dog on the apron" }));
    await worker().drain();
    expect(sent.filter((k) => k === "go")).toHaveLength(0);
    expect(sent.filter((k) => k === "hold")).toHaveLength(6);
    expect((await mails("go")).every((m) => m.failedAt !== null && /over before/.test(m.lastError ?? ""))).toBe(true);
  });

  it("stays unsent once its window is over", async () => {
    await called();
    w.clock.add(6 * HOUR);
    await worker().drain();
    expect(sent.filter((k) => k === "go")).toHaveLength(0);
  });
});
