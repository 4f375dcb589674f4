import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { actOnCrib } from "#app/lib/http/crib-acts.server";
import type { InstallContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { MINUTE, type Workshop, workshop } from "../support/workshop";

vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

describe("a tool found out of tolerance, from its form", () => {
  let w: Workshop;
  let wrench: string;
  let restore: () => void;
  beforeAll(async () => {
    w = await workshop();
    await w.confirmValues();
    await w.enterNumbers();
    ({ wrench } = await w.stockCrib());
    restore = await w.save();
  }, 60_000);
  beforeEach(() => {
    restore();
    w.clock.add(MINUTE);
  });
  afterAll(() => w.clock.stop());

  async function send(more: Record<string, string> = {}) {
    const e = await w.board();
    const me = { id: "cal", name: "Cal", roles: ["crew" as const], units: "si" as const };
    const install: InstallContext = { installId: w.installId, snapshot: e.snapshot, e, me, now: e.at, head: { seq: 1, hash: "" } };
    const today = new Date(e.at + 3_600_000).toISOString().slice(0, 10);
    const sent = new FormData();
    const fields = { intent: "bad-check", commandId: newId(), tool: wrench, on: today, note: "reads low", ...more };
    for (const [name, text] of Object.entries(fields)) sent.set(name, text);
    return actOnCrib(install, sent, null);
  }
  const checks = async () => (await w.board()).snapshot.tools.find((t) => t.id === wrench)?.checks.length;

  it("is recorded at once where nothing lapses", async () => {
    expect(await send()).toMatchObject({ done: true });
    expect(await checks()).toBe(2);
  });

  it("is shown with what lapses first, and recorded for the very choice that was shown", async () => {
    await w.prove("MF1");
    w.clock.add(MINUTE);
    const first = await send();
    if (!first || first.done) throw new Error("recorded without being shown");
    expect(first.status).toBe(200);
    expect(first.reply.checking?.lapses.gates.flatMap((g) => g.items.map((i) => i.key))).toEqual(["MF1"]);
    expect(await checks()).toBe(1);
    const { seen = "" } = first.reply.checking ?? {};
    expect(await send({ seen, since: "2026-01-01" })).toMatchObject({ done: false, status: 200 });
    expect(await checks()).toBe(1);
    expect(await send({ seen })).toMatchObject({ done: true });
    const mf1 = (await w.item("MF1")).id;
    expect((await w.board()).result.items[mf1]).toMatchObject({ stands: false, blockers: [{ code: "tool-doubtful" }] });
  });
});
