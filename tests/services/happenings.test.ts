import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { cribTold } from "#app/db/queries/crib.server";
import { looseEndDetails, openingDetails } from "#app/db/queries/happening-details.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { verify } from "#app/lib/record/chain";
import { acceptLooseEnd } from "#app/lib/services/accept-loose-end.server";
import { closeOpening } from "#app/lib/services/close-opening.server";
import { confirmUndisturbed } from "#app/lib/services/confirm-undisturbed.server";
import { addExtinguisher, addTool, recordLook, recordToolCheck } from "#app/lib/services/crib.server";
import { makeLooseEnd } from "#app/lib/services/make-loose-end.server";
import { markMistake } from "#app/lib/services/mark-mistake.server";
import { addMember, endRole } from "#app/lib/services/members.server";
import { openSystem } from "#app/lib/services/open-system.server";
import { raiseFinding } from "#app/lib/services/raise-finding.server";
import { recordProof } from "#app/lib/services/record-proof.server";
import { confirmRestored, restoreLooseEnd } from "#app/lib/services/restore-loose-end.server";
import { closeFinding, fixFinding, gradeFinding, rejectFix } from "#app/lib/services/settle-finding.server";
import { MINUTE, type Person, value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
let restore: () => void;
beforeAll(async () => {
  w = await workshop();
  await w.confirmValues();
  await w.enterNumbers();
  restore = await w.save();
}, 60_000);
beforeEach(() => {
  restore();
  w.clock.add(MINUTE);
});
afterAll(() => w.clock.stop());

const snapshot = async () => (await w.board()).snapshot;
const refused = (status: number, code: string) => ({ ok: false, status, code });

describe("an opening", () => {
  it("is recorded by any member, closed by builder or inspector, once", async () => {
    const { opening } = value(await openSystem(w.act("cal"), { systems: ["oil", "oil", "fueleng"], reason: "Hose off", closed: false }));
    expect((await snapshot()).openings).toMatchObject([{ id: opening, systems: ["oil", "fueleng"], closed: null, as: "crew" }]);
    expect(await closeOpening(w.act("cal"), { opening, note: "" })).toMatchObject(refused(403, "not-your-role"));
    w.clock.add(MINUTE);
    value(await closeOpening(w.act("tom"), { opening, note: "hose on" }));
    const [closed] = (await snapshot()).openings;
    expect((closed?.closed ?? 0) - (closed?.opened ?? 0)).toBeGreaterThanOrEqual(MINUTE);
    expect(await closeOpening(w.act("tom"), { opening, note: "" })).toMatchObject(refused(409, "stale"));
    expect(await closeOpening(w.act("tom"), { opening: "nope", note: "" })).toMatchObject(refused(404, "not-found"));
  });

  it("counts from when it is recorded, although it happened earlier; not from a time to come", async () => {
    const at = (await w.board()).at;
    const open = (happened: number) => openSystem(w.act("bea"), { systems: ["oil"], reason: "Hose off", closed: true, happened });
    const { opening } = value(await open(at - 3_600_000));
    expect((await snapshot()).openings[0]?.opened).toBeGreaterThanOrEqual(at);
    expect((await openingDetails(db(), w.installId))[opening]?.happened).toBe(at - 3_600_000);
    expect(await open(at + 3_600_000)).toMatchObject(refused(422, "invalid"));
  });

  it("is marked a mistake by an inspector who did not record it", async () => {
    const { opening } = value(await openSystem(w.act("ines"), { systems: ["oil"], reason: "Hose off", closed: true }));
    expect(await markMistake(w.act("ines"), { opening, reason: "wrong aircraft" })).toMatchObject(refused(403, "own-work"));
    value(await addMember(w.act("lio"), { email: "cal@n0200.example", role: "inspector" }));
    value(await markMistake(w.act("cal"), { opening, reason: "wrong aircraft" }));
    expect(await markMistake(w.act("cal"), { opening, reason: "wrong aircraft" })).toMatchObject(refused(409, "already"));
    expect((await snapshot()).openings[0]?.mistake).toMatchObject({ by: "cal", reason: "wrong aircraft" });
  });
});

describe("a loose end", () => {
  const make = (person: Person = "bea", over = {}) =>
    makeLooseEnd(w.act(person), {
      what: "Cap on the vent",
      count: 1,
      system: "fuelsup",
      why: "Tank is drained",
      due: { kind: "rung", rung: "3" },
      askedBy: null,
      ...over,
    });

  it("is made, restored and seen restored; making and restoring it open its system", async () => {
    const { looseEnd } = value(await make());
    w.clock.add(MINUTE);
    expect(await confirmRestored(w.act("tom"), { looseEnd })).toMatchObject(refused(409, "order"));
    expect(await restoreLooseEnd(w.act("cal"), { looseEnd })).toMatchObject(refused(403, "not-your-role"));
    value(await restoreLooseEnd(w.act("bea"), { looseEnd }));
    expect(await restoreLooseEnd(w.act("tom"), { looseEnd })).toMatchObject(refused(409, "already"));
    expect(await confirmRestored(w.act("bea"), { looseEnd })).toMatchObject(refused(403, "own-work"));
    value(await confirmRestored(w.act("tom"), { looseEnd }));
    expect(await confirmRestored(w.act("ines"), { looseEnd })).toMatchObject(refused(409, "already"));
    const { openings, looseEnds } = await snapshot();
    expect(looseEnds).toMatchObject([{ restored: { by: "bea" }, confirmed: { by: "tom" } }]);
    expect(openings.map((o) => [o.systems, o.closed === null])).toEqual([
      [["fuelsup"], false],
      [["fuelsup"], false],
    ]);
  });

  it("of which its maker says that it disturbed nothing opens its system until a second person has confirmed that", async () => {
    await w.prove("MF6");
    const mf6 = await w.item("MF6");
    const stands = async () => (await w.board()).result.items[mf6.id]?.stands;
    expect(await stands()).toBe(true);
    w.clock.add(MINUTE);
    const { looseEnd } = value(await make("bea", { system: mf6.systems[0], undisturbed: true }));
    const [made] = (await snapshot()).openings;
    expect(made).toMatchObject({ undisturbed: { confirmed: null }, by: "bea" });
    expect(await stands()).toBe(false);
    const opening = made?.id ?? "";
    expect(await confirmUndisturbed(w.act("bea"), { opening })).toMatchObject(refused(403, "own-work"));
    expect(await confirmUndisturbed(w.act("cal"), { opening })).toMatchObject(refused(403, "not-your-role"));
    value(await confirmUndisturbed(w.act("tom"), { opening }));
    expect(await confirmUndisturbed(w.act("ines"), { opening })).toMatchObject(refused(409, "already"));
    expect(await stands()).toBe(true);
    w.clock.add(MINUTE);
    value(await restoreLooseEnd(w.act("bea"), { looseEnd, undisturbed: false }));
    expect(await stands()).toBe(false);
    const put = (await snapshot()).openings[1]?.id ?? "";
    expect(await confirmUndisturbed(w.act("tom"), { opening: put })).toMatchObject(refused(409, "order"));
    expect((await looseEndDetails(db(), w.installId))[looseEnd]?.openings).toEqual([opening, put]);
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });

  it("names photos of this install or none", async () => {
    expect(await make("bea", { photos: ["nope"] })).toMatchObject(refused(422, "invalid"));
  });

  it("that an item asks for is no opening", async () => {
    const op2 = await w.item("OP2");
    const offer = op2.offersLooseEnd;
    if (!offer) throw new Error("OP2 offers no loose end");
    const due = { kind: "gate" as const, gate: (await w.gate("DY")).id };
    const { looseEnd } = value(await make("bea", { askedBy: op2.id, system: offer.system, due }));
    value(await restoreLooseEnd(w.act("bea"), { looseEnd }));
    expect((await snapshot()).openings).toEqual([]);
    expect(await make("bea", { askedBy: op2.id, system: "map" })).toMatchObject(refused(422, "invalid"));
    expect(await make("bea", { askedBy: "nope" })).toMatchObject(refused(404, "not-found"));
    expect(await make("bea", { due: { kind: "rung", rung: "99" } })).toMatchObject(refused(404, "not-found"));
  });

  it("is accepted by another inspector for a rung before it is due, not from there on", async () => {
    const { looseEnd } = value(await make());
    const accept = (person: Person, rung: string) => acceptLooseEnd(w.act(person), { looseEnd, rung, reason: "no fuel is moved" });
    expect(await accept("bea", "1")).toMatchObject(refused(403, "not-your-role"));
    value(await accept("ines", "1"));
    expect(await accept("ines", "3")).toMatchObject(refused(409, "order"));
    expect(await accept("ines", "5")).toMatchObject(refused(409, "order"));
    expect((await snapshot()).looseEnds[0]?.accepted).toMatchObject([{ rung: "1", by: "ines" }]);
    const own = value(await make("ines"));
    expect(await acceptLooseEnd(w.act("ines"), { looseEnd: own.looseEnd, rung: "1", reason: "no fuel" })).toMatchObject(
      refused(403, "own-work"),
    );
  });
});

describe("a finding", () => {
  const raise = (person: Person = "cal", over = {}) =>
    raiseFinding(w.act(person), { system: "oil", words: "Weeping union", severity: "watch", cap: null, photo: null, ...over });

  it("goes from open over fixed to closed, by the people who may", async () => {
    const { finding } = value(await raise());
    expect(await closeFinding(w.act("ines"), { finding, words: "dry" })).toMatchObject(refused(409, "order"));
    expect(await fixFinding(w.act("cal"), { finding, words: "tightened" })).toMatchObject(refused(403, "not-your-role"));
    value(await fixFinding(w.act("bea"), { finding, words: "tightened" }));
    expect(await fixFinding(w.act("tom"), { finding, words: "tightened" })).toMatchObject(refused(409, "already"));
    expect(await closeFinding(w.act("tom"), { finding, words: "dry" })).toMatchObject(refused(403, "not-your-role"));
    value(await rejectFix(w.act("ines"), { finding, words: "still wet" }));
    expect((await snapshot()).findings[0]).toMatchObject({ fixed: null, closed: null });
    value(await fixFinding(w.act("tom"), { finding, words: "new seal" }));
    value(await closeFinding(w.act("ines"), { finding, words: "dry" }));
    expect((await snapshot()).findings[0]).toMatchObject({ fixed: { by: "tom", action: "new seal" }, closed: { by: "ines" } });
    expect(await closeFinding(w.act("ines"), { finding, words: "dry" })).toMatchObject(refused(409, "already"));
  });

  it("is not closed by whoever fixed it, although an inspector", async () => {
    value(await addMember(w.act("lio"), { email: "bea@n0200.example", role: "inspector" }));
    const { finding } = value(await raise());
    value(await fixFinding(w.act("bea"), { finding, words: "tightened" }));
    expect(await closeFinding(w.act("bea"), { finding, words: "dry" })).toMatchObject(refused(403, "own-work"));
  });

  it("is made sharper by anybody, lowered by an inspector alone", async () => {
    const { finding } = value(await raise());
    const grade = (person: Person, severity: "grounding" | "limiting" | "watch", cap: number | null) =>
      gradeFinding(w.act(person), { finding, severity, cap, words: "looked again" });
    value(await grade("cal", "limiting", 30));
    value(await grade("cal", "limiting", 20));
    expect(await grade("cal", "limiting", 25)).toMatchObject(refused(403, "not-your-role"));
    value(await grade("cal", "grounding", null));
    expect(await grade("bea", "watch", null)).toMatchObject(refused(403, "not-your-role"));
    value(await grade("ines", "limiting", 40));
    expect((await snapshot()).findings[0]).toMatchObject({ severity: "limiting", cap: 40 });
  });

  it("names a photo of this install or none", async () => {
    expect(await raise("cal", { photo: "nope" })).toMatchObject(refused(422, "invalid"));
  });
});

describe("the crib", () => {
  it("knows until when a tool is in date, in days at the install", async () => {
    const { tool } = value(await addTool(w.act("bea"), { name: "Torque wrench", serial: "T1" }));
    value(await recordToolCheck(w.act("bea"), { tool, on: "2026-12-01", good: true, due: "2027-06-30", note: "" }));
    const [check] = (await snapshot()).tools[0]?.checks ?? [];
    // Zurich: winter time is one hour ahead of UTC, summer time two.
    expect(new Date(check?.at ?? 0).toISOString()).toBe("2026-12-01T23:00:00.000Z");
    expect(new Date(check?.due ?? 0).toISOString()).toBe("2027-06-30T22:00:00.000Z");
  });

  it.each([
    ["a good check without its date", { on: null, good: true, due: null }],
    ["a bad check with a date", { on: null, good: false, due: "2027-01-01" }],
    ["a day to come", { on: "2026-12-09", good: true, due: "2027-01-01" }],
    ["a date that is none", { on: null, good: true, due: "2027-02-30" }],
    ["a date before the check", { on: null, good: true, due: "2026-12-01" }],
  ])("refuses %s", async (_, check) => {
    const { tool } = value(await addTool(w.act("bea"), { name: "Torque wrench", serial: "" }));
    expect(await recordToolCheck(w.act("bea"), { tool, note: "", ...check })).toMatchObject(refused(422, "invalid"));
  });

  it("is kept by builder, lead and inspector; out of tolerance is taken from anybody", async () => {
    expect(await addTool(w.act("cal"), { name: "Torque wrench", serial: "" })).toMatchObject(refused(403, "not-your-role"));
    const { tool } = value(await addTool(w.act("lio"), { name: "Torque wrench", serial: "" }));
    expect(await recordToolCheck(w.act("cal"), { tool, on: null, good: true, due: "2027-01-01", note: "" })).toMatchObject(
      refused(403, "not-your-role"),
    );
    value(await recordToolCheck(w.act("cal"), { tool, on: null, good: false, due: null, note: "dropped" }));
    expect(await recordToolCheck(w.act("bea"), { tool: "nope", on: null, good: false, due: null, note: "" })).toMatchObject(
      refused(404, "not-found"),
    );
  });

  it("keeps a certificate's number, and takes no photo that is not here", async () => {
    const { tool } = value(await addTool(w.act("bea"), { name: "Torque wrench", serial: "" }));
    const check = { tool, on: null, good: true, due: "2027-01-01", certificate: "K-4471" };
    expect(await recordToolCheck(w.act("bea"), { ...check, photo: "nope" })).toMatchObject(refused(422, "invalid"));
    const { check: id } = value(await recordToolCheck(w.act("bea"), check));
    expect((await cribTold(db(), w.installId)).checks[id]).toMatchObject({ certificate: "K-4471", photo: null, by: "bea" });
  });

  it("takes a first day of doubt on a bad check alone, and none after the day on which it was found", async () => {
    const { tool } = value(await addTool(w.act("bea"), { name: "Torque wrench", serial: "" }));
    const check = (good: boolean, since: string) =>
      recordToolCheck(w.act("bea"), { tool, on: "2026-12-01", good, due: good ? "2027-01-01" : null, since, note: "reads low" });
    expect(await check(true, "2026-11-01")).toMatchObject(refused(422, "invalid"));
    expect(await check(false, "2026-12-09")).toMatchObject(refused(422, "invalid"));
    value(await check(false, "2026-11-01"));
    expect((await snapshot()).tools[0]?.checks[0]?.since).toBe(Date.UTC(2026, 9, 31, 23));
  });

  it("takes a label's rating that fits its class, and no other", async () => {
    const add = (rating: string, classB: boolean) =>
      addExtinguisher(w.act("bea"), { name: "By the door", agent: "powder", classB, charge: 2, rating, position: "left of the door" });
    expect(await add("10-B:C", false)).toMatchObject(refused(422, "invalid"));
    expect(await add("2-A", true)).toMatchObject(refused(422, "invalid"));
    const { extinguisher } = value(await add("10-B:C", true));
    expect((await cribTold(db(), w.installId)).bottles[extinguisher]).toEqual({ rating: "10-B:C", position: "left of the door" });
  });

  it("makes a torque doubtful whose wrench is found out of tolerance afterwards", async () => {
    const { wrench } = await w.stockCrib();
    await w.prove("MF1");
    const mf1 = (await w.item("MF1")).id;
    expect((await w.board()).result.items[mf1]?.stands).toBe(true);
    w.clock.add(MINUTE);
    value(await recordToolCheck(w.act("cal"), { tool: wrench, on: null, good: false, due: null, note: "reads low" }));
    expect((await w.board()).result.items[mf1]).toMatchObject({ stands: false, blockers: [{ code: "tool-doubtful" }] });
  });

  it("knows an extinguisher's monthly look and yearly service, and takes one out of use", async () => {
    const { extinguisher } = value(await addExtinguisher(w.act("bea"), { name: "CO2 by the door", agent: "co2", classB: true, charge: 5 }));
    const look = (kind: "look" | "service" | "withdrawn", due: string | null, person: Person = "bea") =>
      recordLook(w.act(person), { extinguisher, kind, due, note: "" });
    value(await look("look", "2026-12-31"));
    value(await look("service", "2027-12-31"));
    expect(await look("look", "2026-12-01")).toMatchObject(refused(422, "invalid"));
    expect(await look("look", null)).toMatchObject(refused(422, "invalid"));
    value(await look("withdrawn", null, "cal"));
    expect((await snapshot()).extinguishers).toMatchObject([
      { withdrawn: true, lookDue: Date.UTC(2026, 11, 31, 23), serviceDue: Date.UTC(2027, 11, 31, 23) },
    ]);
    expect(await look("look", "2026-12-31")).toMatchObject(refused(422, "invalid"));
  });
});

describe("members", () => {
  it("are let in and let go by a lead alone; nobody makes themselves the inspector; a lead is left", async () => {
    expect(await addMember(w.act("bea"), { email: "olga@n0200.example", role: "crew" })).toMatchObject(refused(403, "not-your-role"));
    expect(await addMember(w.act("lio"), { email: "nobody@n0200.example", role: "crew" })).toMatchObject(refused(404, "not-found"));
    expect(await addMember(w.act("lio"), { email: "lio@n0200.example", role: "inspector" })).toMatchObject(refused(403, "own-work"));
    expect(await addMember(w.act("lio"), { email: "bea@n0200.example", role: "builder" })).toMatchObject(refused(409, "already"));
    value(await addMember(w.act("lio"), { email: "lio@n0200.example", role: "builder" }));
    expect(await endRole(w.act("lio"), { member: "lio", role: "lead" })).toMatchObject(refused(409, "order"));
    value(await addMember(w.act("lio"), { email: "olga@n0200.example", role: "lead" }));
    value(await endRole(w.act("olga"), { member: "lio", role: "lead" }));
    expect(await endRole(w.act("olga"), { member: "lio", role: "lead" })).toMatchObject(refused(404, "not-found"));
    expect(await addMember(w.act("lio"), { email: "cal@n0200.example", role: "builder" })).toMatchObject(refused(403, "not-your-role"));
  });

  it("keep what they did in a role that has ended, and come back in a new period", async () => {
    await w.prove("MF6");
    value(await endRole(w.act("lio"), { member: "bea", role: "builder" }));
    const mf6 = (await w.item("MF6")).id;
    expect((await w.board()).result.items[mf6]?.stands).toBe(true);
    expect(await recordProof(w.act("bea"), await w.proofInput("MF6"))).toMatchObject({ ok: false, status: 404 });
    w.clock.add(MINUTE);
    value(await addMember(w.act("lio"), { email: "bea@n0200.example", role: "builder" }));
    expect((await snapshot()).members.find((m) => m.id === "bea")?.roles.map((r) => r.to === null)).toEqual([false, true]);
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });
});
