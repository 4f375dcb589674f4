import { createClient } from "@libsql/client";
import { eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { database, db, write } from "#app/db/client.server";
import { fileFor } from "#app/db/queries/files.server";
import { hangarOf } from "#app/db/queries/hangar.server";
import { memberOf } from "#app/db/queries/membership.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { commands } from "#app/db/schema/commands";
import { events } from "#app/db/schema/events";
import { memberRoles } from "#app/db/schema/members";
import { openings } from "#app/db/schema/openings";
import { newId } from "#app/lib/ids";
import { verify } from "#app/lib/record/chain";
import { endRole } from "#app/lib/services/members.server";
import { openSystem } from "#app/lib/services/open-system.server";
import { done, refuse } from "#app/lib/services/outcome";
import { perform } from "#app/lib/services/perform.server";
import { MINUTE, value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
let restore: () => void;
beforeAll(async () => {
  w = await workshop();
  restore = await w.save();
});
beforeEach(() => restore());
afterAll(() => w.clock.stop());

const opening = (reason = "Strainer out") => ({ systems: ["fueleng" as const], reason, closed: false });
const chain = async () => verify(await recordLines(db(), w.installId));
const counts = async () => ({
  events: await db().$count(events),
  openings: await db().$count(openings),
  commands: await db().$count(commands),
});

describe("an act", () => {
  it("writes its record, its event and its command together, and the chain verifies", async () => {
    const before = await counts();
    const { opening: id } = value(await openSystem(w.act("cal"), opening()));
    expect(await counts()).toEqual({ events: before.events + 1, openings: before.openings + 1, commands: before.commands + 1 });
    const [row] = await db().select().from(openings).where(eq(openings.id, id));
    const newest = (await recordLines(db(), w.installId)).at(-1);
    expect(newest?.event).toMatchObject({ id, seq: row?.seq, recorded: row?.recorded, by: "cal", as: "crew", type: "opened" });
    expect(await chain()).toMatchObject({ ok: true, lines: row?.seq });
  });

  it("is done once however often it is sent, also at the same time", async () => {
    const act = w.act("bea");
    const sent = await Promise.all([1, 2, 3, 4].map(() => openSystem(act, opening())));
    expect(new Set(sent.map((o) => JSON.stringify(o))).size).toBe(1);
    expect(sent[0]?.ok).toBe(true);
    w.clock.add(60 * MINUTE);
    expect(await openSystem(act, opening())).toEqual(sent[0]);
    expect(await db().$count(openings)).toBe(1);
  });

  it("refuses a command's number that was used for other content, by another person, for another act or on another install", async () => {
    const act = w.act("bea");
    value(await openSystem(act, opening()));
    const refused = { ok: false, status: 409, code: "command-reused" };
    expect(await openSystem(act, opening("Hose off"))).toMatchObject(refused);
    expect(await openSystem({ ...act, actor: { userId: "tom" } }, opening())).toMatchObject(refused);
    expect(await perform({ ...act, kind: "other", input: opening() }, async () => done(1))).toMatchObject(refused);
    expect(await openSystem({ installId: w.otherInstall, actor: { userId: "olga" }, commandId: act.commandId }, opening())).toMatchObject(
      refused,
    );
    expect(await db().$count(openings)).toBe(1);
  });

  it("leaves nothing behind when it is refused, and is judged afresh when it comes again", async () => {
    const before = await counts();
    const act = { ...w.act("bea"), kind: "try", input: null };
    const first = await perform(act, async (d) => {
      await d.record("builder", { type: "opened", data: { systems: ["oil"], reason: "x", opened: d.now } });
      return refuse(409, "order", "Not now.");
    });
    expect(first).toEqual({ ok: false, status: 409, code: "order", message: "Not now.", blockers: [] });
    expect(await counts()).toEqual(before);
    expect(await perform(act, async () => done("now"))).toEqual({ ok: true, value: "now" });
    expect(await chain()).toMatchObject({ ok: true });
  });

  it("leaves nothing behind when it breaks", async () => {
    const before = await counts();
    const broken = perform({ ...w.act("bea"), kind: "try", input: null }, async (d) => {
      await d.record("builder", { type: "opened", data: { systems: ["oil"], reason: "x", opened: d.now } });
      throw new Error("a bug");
    });
    await expect(broken).rejects.toThrow("a bug");
    expect(await counts()).toEqual(before);
  });

  it("is later than the one before, though the clock stands still or went back", async () => {
    const a = value(await openSystem(w.act("bea"), opening()));
    w.clock.add(-60 * MINUTE);
    const b = value(await openSystem(w.act("bea"), opening()));
    const at = async (id: string) => (await db().select().from(openings).where(eq(openings.id, id)))[0]?.recorded ?? 0;
    expect(await at(b.opening)).toBeGreaterThan(await at(a.opening));
    expect(await chain()).toMatchObject({ ok: true });
  });

  it("keeps the chain whole when many act at once", async () => {
    const people = ["lio", "bea", "tom", "ines", "cal"] as const;
    const sent = await Promise.all(Array.from({ length: 25 }, (_, n) => openSystem(w.act(people[n % 5] ?? "cal"), opening(`Work ${n}`))));
    expect(sent.every((o) => o.ok)).toBe(true);
    expect(await chain()).toMatchObject({ ok: true });
    expect(await db().$count(openings)).toBe(25);
  });
});

describe("an install of others", () => {
  it("is not there: not to act on, not to read of, not to list", async () => {
    expect(await openSystem({ ...w.act("bea"), installId: w.otherInstall }, opening())).toMatchObject({
      ok: false,
      status: 404,
      code: "not-found",
    });
    expect(await openSystem({ ...w.act("bea"), installId: newId() }, opening())).toMatchObject({
      ok: false,
      status: 404,
      code: "not-found",
    });
    expect(await memberOf(db(), w.otherInstall, "bea")).toBeNull();
    expect(await memberOf(db(), w.installId, "bea")).toEqual({ id: "bea", name: "Bea", roles: ["builder"] });
    expect((await hangarOf(db(), "bea")).map((i) => i.id)).toEqual([w.installId]);
    expect((await hangarOf(db(), "olga")).map((i) => i.id)).toEqual([w.otherInstall]);
    expect(await fileFor(db(), newId(), "bea")).toBeNull();
  });

  it("is not there any more once the last role has ended", async () => {
    value(await endRole(w.act("lio"), { member: "cal", role: "crew" }));
    expect(await openSystem(w.act("cal"), opening())).toMatchObject({ ok: false, status: 404 });
    expect(await hangarOf(db(), "cal")).toEqual([]);
  });
});

describe("the database itself", () => {
  /** A connection that knows nothing of the program. */
  const raw = async (sql: string) => {
    const client = createClient({ url: database().url });
    return client.execute(sql).finally(() => client.close());
  };
  const appendOnly = `events proofs confirmations acceptances keeps proof_withdrawals signatures signature_withdrawals release_signatures
    release_signature_withdrawals openings opening_closings opening_mistakes opening_undisturbed loose_ends loose_end_events findings finding_events tool_checks
    extinguisher_checks rung_events plan_versions acks answers winds run_acts exceedances exceedance_answers edits edit_answers files`.split(
    /\s+/,
  );

  it.each(appendOnly)("holds %s append-only", async (table) => {
    const triggers = await raw(`SELECT name FROM sqlite_master WHERE type = 'trigger' AND tbl_name = '${table}'`);
    const names = triggers.rows.map((r) => r.name);
    expect(names).toEqual(
      expect.arrayContaining([`${table}_no_update`, `${table}_no_delete`, table === "events" ? "events_in_order" : `${table}_no_replace`]),
    );
  });

  it.each([
    ["UPDATE events SET by = 'tom'", /append-only/],
    ["DELETE FROM events WHERE seq = 1", /append-only/],
    ["UPDATE openings SET reason = 'nothing'", /append-only/],
    ["DELETE FROM openings", /append-only/],
    ["REPLACE INTO openings SELECT * FROM openings", /append-only/],
    [
      "REPLACE INTO openings SELECT 'another', install_id, seq, recorded, by, 'lead', systems, 'nothing', opened, happened, loose_end, claimed FROM openings",
      /append-only/,
    ],
    ["INSERT OR REPLACE INTO events SELECT * FROM events WHERE seq = 1", /goes on from its newest/],
    ["DELETE FROM members", /never deleted|FOREIGN KEY/],
    ["DELETE FROM installs", /never deleted|FOREIGN KEY/],
    ["DELETE FROM users", /never deleted|FOREIGN KEY/],
    ["DELETE FROM member_roles", /never deleted/],
    ["UPDATE member_roles SET role = 'inspector'", /closed once/],
    ['UPDATE member_roles SET "from" = 0, "to" = 5', /closed once/],
    [
      "INSERT INTO events SELECT install_id, seq + 100, recorded, by, type, body, prev, hash FROM events WHERE seq = 1 LIMIT 1",
      /goes on from its newest/,
    ],
    [
      "INSERT INTO events SELECT install_id, (SELECT max(seq) + 1 FROM events x WHERE x.install_id = events.install_id), recorded, by, type, body, prev, hash FROM events WHERE seq = 1 LIMIT 1",
      /goes on from its newest/,
    ],
  ])("refuses %s", async (sql, why) => {
    value(await openSystem(w.act("bea"), opening()));
    await expect(raw(sql)).rejects.toThrow(why);
    expect(await chain()).toMatchObject({ ok: true });
  });

  it("closes a role's period once", async () => {
    await write((tx) => tx.update(memberRoles).set({ to: 9e12 }).where(eq(memberRoles.userId, "cal")));
    await expect(raw("UPDATE member_roles SET \"to\" = 5 WHERE user_id = 'cal'")).rejects.toThrow(/closed once/);
    await expect(raw("UPDATE member_roles SET \"to\" = NULL WHERE user_id = 'cal'")).rejects.toThrow(/closed once/);
  });
});
