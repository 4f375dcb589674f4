import { and, eq } from "drizzle-orm";
import { afterEach, beforeEach, expect, it } from "vitest";
import { db } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";
import { now } from "#app/lib/clock";
import { callNoGo } from "#app/lib/services/call-no-go.server";
import { confirmValue } from "#app/lib/services/confirm-value.server";
import { addTool, recordToolCheck } from "#app/lib/services/crib.server";
import { giveRole } from "#app/lib/services/members.server";
import { chooseMails } from "#app/lib/services/own-choices.server";
import { planRun } from "#app/lib/services/plan-run.server";
import { remindDue } from "#app/lib/services/remind-due.server";
import { toSI } from "#app/lib/units/convert";
import { value, type Workshop, workshop } from "../support/workshop";

let w: Workshop;
beforeEach(async () => {
  w = await workshop();
});
afterEach(() => w.clock.stop());

const readers = async (kind: string) =>
  (
    await db()
      .select({ id: outbox.toUserId })
      .from(outbox)
      .where(and(eq(outbox.kind, kind), eq(outbox.installId, w.installId)))
  ).map((m) => m.id);

it("a lead may do without mails about runs on which they hold no place; whoever holds one is told in any case", async () => {
  value(await giveRole(w.act("lio"), { member: "bea", role: "lead" }));
  const rpm = toSI(2700, "rpm");
  for (const key of ["ratedRpm", "redline"]) value(await confirmValue(w.act("lio"), { key, value: rpm, source: "maker's manual p. 9" }));
  const positions = [{ position: "operator" as const, member: "bea" }];
  const plan = { run: null, rung: "1", plannedStart: null, place: "apron", rpm: rpm / 2, positions, windLimit: 5, gustLimit: 8 };
  const { run } = value(await planRun(w.act("lio"), plan));
  for (const who of ["lio", "bea"]) await chooseMails(who, []);
  value(await callNoGo(w.act("lio"), { run, reason: "rain is coming" }));
  expect(await readers("no-go")).toEqual(["bea"]);
  await chooseMails("lio", ["runs"]);
  value(await callNoGo(w.act("lio"), { run, reason: "rain is here" }));
  expect((await readers("no-go")).sort()).toEqual(["bea", "bea", "lio"]);
});

it("mails about dates in the crib go to who wants them, and are not looked for again and again where nobody does", async () => {
  const { tool } = value(await addTool(w.act("bea"), { name: "Torque wrench", serial: "T1" }));
  const due = new Date(now() + 5 * 86_400_000).toISOString().slice(0, 10);
  value(await recordToolCheck(w.act("bea"), { tool, on: null, good: true, due, note: "" }));
  for (const who of ["bea", "tom"]) await chooseMails(who, ["runs", "runs-out"]);
  expect(await remindDue()).toBe(1);
  expect(await readers("due")).toEqual(["lio"]);
  expect(await remindDue()).toBe(0);
  await chooseMails("tom", ["due"]);
  expect(await remindDue()).toBe(1);
});
