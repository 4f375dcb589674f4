import { asc, eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db, write } from "#app/db/client.server";
import { mailLog } from "#app/db/queries/mail-log.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { outbox } from "#app/db/schema/outbox";
import { now } from "#app/lib/clock";
import { verify } from "#app/lib/record/chain";
import { callGo } from "#app/lib/services/call-go.server";
import { callHold } from "#app/lib/services/call-hold.server";
import { callNoGo } from "#app/lib/services/call-no-go.server";
import { recordToolCheck } from "#app/lib/services/crib.server";
import { holdOverdue } from "#app/lib/services/hold-overdue.server";
import { addMember, endRole } from "#app/lib/services/members.server";
import { openSystem } from "#app/lib/services/open-system.server";
import { planRun } from "#app/lib/services/plan-run.server";
import { raiseFinding } from "#app/lib/services/raise-finding.server";
import { recordProof } from "#app/lib/services/record-proof.server";
import { endRun, recordUnstartedRun, stateOutcome } from "#app/lib/services/report-run.server";
import { acceptNoLog, answerExceedance, recordLogRead } from "#app/lib/services/review-run.server";
import { acknowledgeBrief, answerRollCall, recordWind } from "#app/lib/services/roll-call.server";
import { scrubRun } from "#app/lib/services/scrub-run.server";
import { sendMailAgain } from "#app/lib/services/send-mail-again.server";
import { acceptLeftOutRung, setBackRung } from "#app/lib/services/settle-rung.server";
import { startRun, takeBackStart } from "#app/lib/services/start-run.server";
import { withdrawProof } from "#app/lib/services/withdraw-proof.server";
import { MINUTE, type Person, PIN, value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

const HOUR = 60 * MINUTE;
let w: Workshop;
let run: string;
/** Ready with no run planned; planned with crew and wind; the same with GO. */
let ready: () => void;
let cleared: () => void;
let called: () => void;

beforeAll(async () => {
  w = await workshop();
  await w.readyForRun();
  // Everybody has a place in a first start: five positions and a second fire guard.
  value(await addMember(w.act("lio"), { email: "olga@n0200.example", role: "crew" }));
  w.clock.add(MINUTE);
  ready = await w.save();
  const planned = await plan();
  // Tests that plan runs of their own leave another one in `run`.
  const back = (to: () => void) => () => {
    to();
    run = planned;
  };
  run = planned;
  await rollCall();
  cleared = back(await w.save());
  value(await callGo(w.act("lio"), { run, version: 1, pin: PIN }));
  called = back(await w.save());
}, 120_000);
afterAll(() => w.clock.stop());

const POSITIONS = [
  { position: "operator", member: "bea" },
  { position: "runlead", member: "lio" },
  { position: "fireguard", member: "tom" },
  { position: "fireguard", member: "cal" },
  { position: "areaguard", member: "ines" },
  { position: "recorder", member: "olga" },
  { position: "observer", member: "olga" },
] as const;
const CREW = ["bea", "lio", "tom", "cal", "ines", "olga"] as const;

async function planInput(over = {}) {
  const rung = (await w.board()).snapshot.rungs[0];
  const base = {
    run: null,
    rung: "1",
    plannedStart: now() + HOUR,
    place: "Apron south",
    rpm: rung?.rpm ?? 0,
    positions: [...POSITIONS],
    windLimit: 7,
    gustLimit: 10,
  };
  return { ...base, ...over };
}
async function plan(over = {}): Promise<string> {
  return value(await planRun(w.act("lio"), await planInput(over))).run;
}
async function rollCall(version = 1): Promise<void> {
  for (const person of CREW) {
    w.clock.add(1000);
    value(await acknowledgeBrief(w.act(person), { run, version }));
    value(await answerRollCall(w.act(person), { run, version, answer: "go", reason: "", queueEmpty: true }));
  }
  value(await recordWind(w.act("cal"), { run, speed: 3, gust: 5, tail: false }));
  w.clock.add(MINUTE);
}
const judged = async (id = run) => {
  const found = (await w.board()).result.runs.find((r) => r.id === id);
  if (!found) throw new Error("No such run");
  return found;
};
const acts = async (id = run) => (await w.board()).snapshot.runs.find((r) => r.id === id)?.acts ?? [];
const mails = (kind: string) => db().select().from(outbox).where(eq(outbox.kind, kind)).orderBy(asc(outbox.toUserId));
const refused = (status: number, code: string) => ({ ok: false, status, code });
const go = (person: Person = "lio", version = 1) => callGo(w.act(person), { run, version, pin: PIN });

describe("a plan", () => {
  beforeEach(() => ready());

  it("is the lead's, within the install's own limits", async () => {
    expect(await planRun(w.act("bea"), await planInput())).toMatchObject(refused(403, "not-your-role"));
    expect(await planRun(w.act("lio"), await planInput({ rung: "99" }))).toMatchObject(refused(404, "not-found"));
    const plan = async (over: object) => planRun(w.act("lio"), await planInput(over));
    expect(await plan({ windLimit: 20, gustLimit: 20 })).toMatchObject(refused(409, "wind-over"));
    expect(await plan({ gustLimit: 20 })).toMatchObject(refused(409, "wind-over"));
    expect(await plan({ gustLimit: 6 })).toMatchObject(refused(409, "wind-over"));
    expect(await plan({ rpm: 400 })).toMatchObject(refused(409, "clearance"));
    expect(await plan({ positions: [{ position: "operator", member: "nobody" }] })).toMatchObject(refused(409, "not-active"));
  });

  it("goes no higher than its rung, and puts nobody in two places that one person cannot hold", async () => {
    const { rpm } = await planInput();
    const high = await planRun(w.act("lio"), await planInput({ rpm: rpm + 1 }));
    expect(high).toMatchObject(refused(409, "clearance"));
    expect(high.ok ? "" : high.message).toContain("is not clear above");
    const twice = await planRun(w.act("lio"), await planInput({ positions: [...POSITIONS, { position: "areaguard", member: "bea" }] }));
    expect(twice).toMatchObject(refused(409, "pair"));
    expect((await w.board()).snapshot.runs).toEqual([]);
  });

  it("changed in what anybody does is a new version; in time or place alone it is not", async () => {
    const id = await plan();
    expect(value(await planRun(w.act("lio"), await planInput({ run: id, place: "Apron north", plannedStart: now() + 2 * HOUR })))).toEqual({
      run: id,
      label: "1",
      version: 1,
    });
    expect(value(await planRun(w.act("lio"), await planInput({ run: id, windLimit: 6 }))).version).toBe(2);
    const stored = (await w.board()).snapshot.runs[0];
    expect(stored?.plans.map((p) => p.version)).toEqual([1, 2]);
  });

  it("scrubbed leaves its rung to be planned again, under the next label", async () => {
    run = await plan();
    value(await scrubRun(w.act("lio"), { run, reason: "rain all day" }));
    expect((await judged()).state).toBe("scrubbed");
    expect(await scrubRun(w.act("lio"), { run, reason: "rain all day" })).toMatchObject(refused(409, "already"));
    expect(value(await planRun(w.act("lio"), await planInput())).label).toBe("1b");
    expect(await planRun(w.act("lio"), await planInput({ run }))).toMatchObject(refused(409, "run-over"));
  });
});

describe("the roll call", () => {
  beforeEach(async () => {
    ready();
    run = await plan();
  });

  it("wants the card read first, of the version that is there, by the crew", async () => {
    const answer = (person: Person, version: number, reply: "go" | "no-go" = "go", reason = "") =>
      answerRollCall(w.act(person), { run, version, answer: reply, reason, queueEmpty: true });
    expect(await answer("bea", 1)).toMatchObject(refused(409, "order"));
    expect(await acknowledgeBrief(w.act("bea"), { run, version: 2 })).toMatchObject(refused(409, "stale"));
    value(await acknowledgeBrief(w.act("bea"), { run, version: 1 }));
    expect(await answer("bea", 2)).toMatchObject(refused(409, "stale"));
    value(await answer("bea", 1));
    expect(await answer("tom", 1, "no-go")).toMatchObject(refused(422, "invalid"));
    value(await answer("tom", 1, "no-go", "no headset"));
    expect((await judged()).blockers.map((b) => b.code)).toContain("no-go");
  });

  it("has a wind that is good for the day at the install", async () => {
    value(await recordWind(w.act("cal"), { run, speed: 3, gust: 5, tail: false }));
    const [wind] = (await w.board()).snapshot.runs[0]?.winds ?? [];
    expect(new Date(wind?.dayEnds ?? 0).toISOString()).toMatch(/T23:00:00.000Z$/);
    value(await recordWind(w.act("cal"), { run, speed: 8, gust: 9, tail: false }));
    expect((await judged()).blockers.map((b) => b.code)).toContain("wind-over");
  });
});

describe("GO", () => {
  beforeEach(() => cleared());

  it("is called by a lead on a clear run; it stores what it stood on, says when it ends, and every one of the crew gets a mail", async () => {
    const before = await judged();
    expect(before).toMatchObject({ state: "planned", clear: true });
    const { ends } = value(await go());
    expect(await judged()).toMatchObject({ state: "called", clear: true, go: { ends } });
    const [act] = await acts();
    expect(act).toMatchObject({ act: "go", version: 1, cap: before.clearance.rpm, ends });
    const signed = Object.values((await w.board()).result.gates)
      .filter((g) => before.requiredGates.includes(g.id))
      .flatMap((g) => g.holding);
    expect(act?.act === "go" ? [...act.signatures].sort() : []).toEqual(signed.sort());
    const sent = await mails("go");
    expect(sent.map((m) => m.toUserId)).toEqual([...CREW].sort());
    const line = (await recordLines(db(), w.installId)).at(-1);
    for (const mail of sent) {
      expect(mail.subject).toMatch(/^GO/);
      expect(mail.text.replace(/\s+/g, "")).toContain(line?.hash);
    }
    expect((await mailLog(db(), w.installId)).filter((m) => m.kind === "go").map((m) => m.state)).toEqual(CREW.map(() => "waiting"));
    expect(await mailLog(db(), w.otherInstall)).toEqual([]);
  });

  it("is refused to others, with a wrong PIN, on another version, a second time, and past its time", async () => {
    expect(await go("bea")).toMatchObject(refused(403, "not-your-role"));
    expect(await callGo(w.act("lio"), { run, version: 1, pin: "999998" })).toMatchObject(refused(403, "pin-wrong"));
    expect(await go("lio", 2)).toMatchObject(refused(409, "stale"));
    expect(await callGo(w.act("lio"), { run: "nope", version: 1, pin: PIN })).toMatchObject(refused(404, "not-found"));
    value(await go());
    expect(await go()).toMatchObject(refused(409, "already"));
    expect(await mails("go")).toHaveLength(CREW.length);
  });

  it("is refused with all blockers on a run that is not clear, in the words of the first", async () => {
    value(await raiseFinding(w.act("cal"), { system: "oil", words: "Weeping union", severity: "grounding", cap: null, photo: null }));
    const outcome = await go();
    expect(outcome).toMatchObject(refused(409, (await judged()).blockers[0]?.code ?? ""));
    expect(outcome.ok ? null : [outcome.message, outcome.blockers]).toEqual([
      (await judged()).blockers[0]?.sentence,
      (await judged()).blockers,
    ]);
    expect(await mails("go")).toEqual([]);
  });

  it("is refused when something runs out before the planned start", async () => {
    value(await planRun(w.act("lio"), await planInput({ run, plannedStart: now() + 30 * HOUR })));
    const outcome = await go();
    expect(outcome).toMatchObject({ ok: false, status: 409 });
    expect(outcome.ok ? "" : outcome.message).toMatch(/^By 4 Dec \d\d:\d\d CET: /);
  });

  it("called by two leads at once is called once", async () => {
    value(await addMember(w.act("lio"), { email: "bea@n0200.example", role: "lead" }));
    const both = await Promise.all([go("lio"), go("bea")]);
    expect(both.map((o) => o.ok).sort()).toEqual([false, true]);
    expect(both.find((o) => !o.ok)).toMatchObject({ status: 409, code: "already" });
    expect((await acts()).filter((a) => a.act === "go")).toHaveLength(1);
    expect(await mails("go")).toHaveLength(CREW.length);
  });

  it("sent twice from one form is called once", async () => {
    const act = w.act("lio");
    const both = await Promise.all([1, 2].map(() => callGo(act, { run, version: 1, pin: PIN })));
    expect(both[0]).toEqual(both[1]);
    expect(both[0]?.ok).toBe(true);
    expect(await mails("go")).toHaveLength(CREW.length);
  });
});

describe("HOLD", () => {
  beforeEach(() => {
    called();
    w.clock.add(1000);
  });

  it.each<[string, () => Promise<unknown>, string, RegExp]>([
    ["an opening", () => openSystem(w.act("cal"), { systems: ["fueleng"], reason: "Strainer out", closed: false }), "cal", /./],
    [
      "a grounding finding",
      () => raiseFinding(w.act("tom"), { system: "oil", words: "Weeping union", severity: "grounding", cap: null, photo: null }),
      "tom",
      /Weeping union/,
    ],
    [
      "a cap below the plan",
      () => raiseFinding(w.act("tom"), { system: "exh", words: "Cracked bracket", severity: "limiting", cap: 10, photo: null }),
      "tom",
      /Cleared to 600 rpm/,
    ],
    ["a failing proof", async () => recordProof(w.act("cal"), await w.proofInput("TD6", { state: "failed", as: "crew" })), "cal", /./],
    [
      "a proof withdrawn",
      async () => withdrawProof(w.act("cal"), { proof: (await w.board()).snapshot.proofs.at(-1)?.id ?? "", reason: "not sure" }),
      "cal",
      /./,
    ],
    [
      "a wrench out of tolerance",
      async () =>
        recordToolCheck(w.act("bea"), { tool: (await w.board()).snapshot.tools[0]?.id ?? "", on: null, good: false, due: null, note: "" }),
      "bea",
      /./,
    ],
    ["a crew member who leaves", () => endRole(w.act("lio"), { member: "cal", role: "crew" }), "lio", /./],
    [
      "a no-go",
      () => answerRollCall(w.act("olga"), { run, version: 1, answer: "no-go", reason: "radio dead", queueEmpty: true }),
      "olga",
      /./,
    ],
    ["wind over the limit", () => recordWind(w.act("cal"), { run, speed: 8, gust: 9, tail: false }), "cal", /Wind/],
    ["a plan that changes", async () => planRun(w.act("lio"), await planInput({ run, windLimit: 6 })), "lio", /./],
  ])("is written with %s, in the same transaction, and the crew is told", async (_, act, by, stops) => {
    const lines = (await recordLines(db(), w.installId)).length;
    expect(await act()).toMatchObject({ ok: true });
    const hold = (await acts()).at(-1);
    expect(hold).toMatchObject({ act: "hold", auto: true, by });
    expect(await judged()).toMatchObject({ state: "held", clear: false, go: null });
    const written = (await recordLines(db(), w.installId)).slice(lines);
    const last = written.at(-1)?.event;
    expect(last).toMatchObject({ type: "hold-called", id: hold?.id });
    expect(last?.type === "hold-called" ? last.data.stops.join(" ") : "").toMatch(stops);
    expect(last?.type === "hold-called" ? last.data.stops[0] : "").toBe(hold?.act === "hold" ? hold.reason : null);
    expect(new Set(written.map((l) => l.event.recorded)).size).toBe(1);
    const goMails = await mails("go");
    const holdMails = await mails("hold");
    expect(holdMails.map((m) => m.toUserId)).toEqual([...CREW].sort());
    expect(holdMails.map((m) => m.inReplyTo)).toEqual(goMails.map((m) => m.messageId));
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });

  it("is not written by what does not touch the run", async () => {
    value(await raiseFinding(w.act("cal"), { system: "oil", words: "Dusty", severity: "watch", cap: null, photo: null }));
    value(await recordWind(w.act("cal"), { run, speed: 4, gust: 5, tail: false }));
    expect(await judged()).toMatchObject({ state: "called", clear: true });
    expect(await mails("hold")).toEqual([]);
  });

  it("of a run that is held already is recorded, and mailed to the same people only after two minutes or another GO", async () => {
    const hold = async () => value(await callHold(w.act("cal"), { run, reason: "dog on the apron" }));
    const told = async () => (await mails("hold")).length / CREW.length;
    await hold();
    for (let n = 0; n < 5; n++) {
      w.clock.add(10_000);
      await hold();
    }
    expect((await acts()).filter((a) => a.act === "hold")).toHaveLength(6);
    expect(await told()).toBe(1);
    w.clock.add(2 * MINUTE);
    await hold();
    expect(await told()).toBe(2);
    await rollCall();
    value(await go());
    w.clock.add(1000);
    await hold();
    expect(await told()).toBe(3);
  });

  it("is called by anybody, once a form, and stays until a lead calls GO again after a new roll call", async () => {
    const act = w.act("olga");
    value(await callHold(act, { run, reason: "dog on the apron" }));
    value(await callHold(act, { run, reason: "dog on the apron" }));
    expect((await acts()).filter((a) => a.act === "hold")).toMatchObject([{ auto: false, by: "olga" }]);
    expect(await go()).toMatchObject({ ok: false, status: 409 });
    w.clock.add(1000);
    await rollCall();
    value(await go());
    expect((await judged()).state).toBe("called");
  });

  it("is written by the clock once GO's window is over, once", async () => {
    expect(await holdOverdue()).toBe(0);
    const ends = (await judged()).go?.ends ?? 0;
    w.clock.add(ends - now() - 1);
    expect(await holdOverdue()).toBe(0);
    w.clock.add(1);
    expect(await judged()).toMatchObject({ state: "held", go: null });
    expect(await holdOverdue()).toBe(1);
    expect(await holdOverdue()).toBe(0);
    expect((await acts()).at(-1)).toMatchObject({ act: "hold", auto: true, by: "lio" });
    expect(await mails("hold")).toHaveLength(CREW.length);
  });
});

describe("a no-go", () => {
  it("is a mail and an event, and leaves state and answers as they are", async () => {
    cleared();
    const before = await judged();
    expect(await callNoGo(w.act("bea"), { run, reason: "rain" })).toMatchObject(refused(403, "not-your-role"));
    value(await callNoGo(w.act("lio"), { run, reason: "rain is coming" }));
    expect(await judged()).toMatchObject({ state: before.state, clear: before.clear });
    expect((await mails("no-go")).map((m) => m.toUserId)).toEqual([...CREW].sort());
    expect((await recordLines(db(), w.installId)).at(-1)?.event).toMatchObject({ type: "no-go-sent", data: { reason: "rain is coming" } });
    called();
    expect(await callNoGo(w.act("lio"), { run, reason: "rain" })).toMatchObject(refused(409, "order"));
  });
});

describe("SCRUB", () => {
  it("is mailed to every one of the crew, in answer to the GO that it ends; no HOLD is written besides", async () => {
    called();
    w.clock.add(1000);
    expect(await scrubRun(w.act("bea"), { run, reason: "rain all day" })).toMatchObject(refused(403, "not-your-role"));
    expect(await mails("scrub")).toEqual([]);
    const act = w.act("lio");
    value(await scrubRun(act, { run, reason: "rain all day" }));
    value(await scrubRun(act, { run, reason: "rain all day" }));
    const [goMails, sent] = [await mails("go"), await mails("scrub")];
    expect(sent.map((m) => m.toUserId)).toEqual([...CREW].sort());
    expect(sent.map((m) => m.inReplyTo)).toEqual(goMails.map((m) => m.messageId));
    for (const mail of sent) {
      expect(mail.subject).toMatch(/^SCRUB: run 1 .*rain all day$/);
      expect(mail.text).toContain("rain all day");
      expect(mail.html).toContain("rain all day");
    }
    expect(await judged()).toMatchObject({ state: "scrubbed", go: null });
    expect(await mails("hold")).toEqual([]);
  });
});

describe("a mail that was given up", () => {
  it("is sent again by a lead, once, and a GO mail only while its GO is in force", async () => {
    called();
    w.clock.add(1000);
    const [mail] = await mails("go");
    const id = mail?.id ?? "";
    const again = (person: Person, which = id) => sendMailAgain(w.act(person), { mail: which });
    expect(await again("lio")).toMatchObject(refused(409, "already"));
    await write((tx) => tx.update(outbox).set({ failedAt: now(), tries: 10, lastError: "No such mailbox." }).where(eq(outbox.id, id)));
    expect((await mailLog(db(), w.installId)).find((m) => m.id === id)?.state).toBe("given up");
    expect(await again("bea")).toMatchObject(refused(403, "not-your-role"));
    expect(await again("lio", "nope")).toMatchObject(refused(404, "not-found"));
    expect(await sendMailAgain({ ...w.act("olga"), installId: w.otherInstall }, { mail: id })).toMatchObject(refused(404, "not-found"));
    const lines = (await recordLines(db(), w.installId)).length;
    value(await again("lio"));
    expect((await mailLog(db(), w.installId)).find((m) => m.id === id)).toMatchObject({ state: "waiting", tries: 0, nextTryAt: now() });
    expect((await recordLines(db(), w.installId)).length).toBe(lines);
    expect(await again("lio")).toMatchObject(refused(409, "already"));

    await write((tx) => tx.update(outbox).set({ failedAt: now(), tries: 10 }).where(eq(outbox.id, id)));
    value(await callHold(w.act("cal"), { run, reason: "dog on the apron" }));
    expect(await again("lio")).toMatchObject(refused(409, "go-over"));
  });
});

describe("a run", () => {
  beforeEach(() => {
    called();
    w.clock.add(1000);
  });

  it("is started with GO in force by lead, run lead or recorder; that makes its post-run gate, which the release needs", async () => {
    expect(await startRun(w.act("bea"), { run })).toMatchObject(refused(403, "not-your-role"));
    const { gate } = value(await startRun(w.act("olga"), { run }));
    expect((await judged()).state).toBe("running");
    const po = await w.gate("PO 1");
    expect(po).toMatchObject({ id: gate, lookBack: { kind: "run", run }, policy: [["builder"], ["inspector"]], present: true });
    const keys = po.e.snapshot.items.filter((i) => i.gate === gate).map((i) => i.key);
    expect(keys).toEqual(expect.arrayContaining(["PO1", "PO2", "PO5", "PO8"]));
    expect(keys).not.toContain("PO11");
    expect((await w.gate("RL")).needs).toContain(gate);
    expect(await startRun(w.act("olga"), { run })).toMatchObject(refused(409, "run-over"));
    expect(await scrubRun(w.act("lio"), { run, reason: "too late" })).toMatchObject(refused(409, "order"));
    expect(await mails("hold")).toEqual([]);
  });

  it("is not started without GO, or with answers that are too old", async () => {
    w.clock.add(61 * MINUTE);
    const outcome = await startRun(w.act("lio"), { run });
    expect(outcome).toMatchObject({ ok: false, status: 409 });
    expect(outcome.ok ? [] : outcome.blockers.map((b) => b.code)).toEqual(expect.arrayContaining(["answer-old", "wind-old"]));
    cleared();
    expect(await startRun(w.act("lio"), { run })).toMatchObject(refused(409, "go-missing"));
  });

  it("that never fired is taken back: held, its gate gone with it, the try an opening of the bay; a new start brings the gate back", async () => {
    const { gate } = value(await startRun(w.act("lio"), { run }));
    w.clock.add(MINUTE);
    value(await takeBackStart(w.act("lio"), { run }));
    const e = await w.board();
    expect((await judged()).state).toBe("held");
    expect(e.result.gates[gate]?.present).toBe(false);
    expect(e.snapshot.openings.at(-1)).toMatchObject({ systems: ["bay"] });
    expect(await takeBackStart(w.act("lio"), { run })).toMatchObject(refused(409, "order"));
    w.clock.add(MINUTE);
    await w.proveGate("WR");
    await w.signBoth("WR");
    await rollCall();
    value(await go());
    expect(value(await startRun(w.act("lio"), { run })).gate).toBe(gate);
    expect((await w.gate("PO 1")).present).toBe(true);
  });

  it("ended is reviewed by its outcome, its log, its exceedances and its post-run gate; then its rung is settled", async () => {
    value(await startRun(w.act("lio"), { run }));
    expect(await recordLogRead(w.act("bea"), { run, exceedances: [] })).toMatchObject(refused(409, "order"));
    expect(await stateOutcome(w.act("lio"), { run, outcome: "completed" })).toMatchObject(refused(409, "order"));
    w.clock.add(10 * MINUTE);
    expect(await endRun(w.act("lio"), { run, at: now() + MINUTE })).toMatchObject(refused(422, "invalid"));
    expect(await endRun(w.act("lio"), { run, at: now() - HOUR })).toMatchObject(refused(422, "invalid"));
    value(await endRun(w.act("lio"), { run, at: now() - MINUTE }));
    expect((await judged()).state).toBe("ended");
    value(await stateOutcome(w.act("lio"), { run, outcome: "completed" }));
    const { exceedances } = value(await recordLogRead(w.act("bea"), { run, exceedances: ["Oil pressure 1.9 bar for 4 s"] }));
    const [exceedance = ""] = exceedances;
    expect((await judged()).reviewBlockers.map((b) => b.code)).toContain("exceedance");
    expect(await answerExceedance(w.act("bea"), { exceedance, finding: null, words: "a glitch" })).toMatchObject(
      refused(403, "not-your-role"),
    );
    const { finding } = value(
      await raiseFinding(w.act("bea"), { system: "oil", words: "Pressure late", severity: "watch", cap: null, photo: null }),
    );
    value(await answerExceedance(w.act("bea"), { exceedance, finding, words: "see the finding" }));
    expect(await answerExceedance(w.act("ines"), { exceedance, finding, words: "see it" })).toMatchObject(refused(409, "already"));
    await w.enterNumbers();
    await w.proveGate("PO 1");
    await w.signBoth("PO 1");
    expect(await judged()).toMatchObject({ state: "reviewed", reviewBlockers: [] });
    const { result } = await w.board();
    expect(result.rungs["1"]).toEqual({ key: "1", settled: true, by: run });
    expect(result.nextRung).toBe("2");
    value(await setBackRung(w.act("lio"), { rung: "1", reason: "another propeller" }));
    expect((await w.board()).result.nextRung).toBe("1");
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });

  it("has a log, or an inspector's word why not", async () => {
    value(await startRun(w.act("lio"), { run }));
    w.clock.add(MINUTE);
    value(await endRun(w.act("lio"), { run, at: null }));
    expect(await acceptNoLog(w.act("bea"), { run, reason: "card was full" })).toMatchObject(refused(403, "not-your-role"));
    value(await acceptNoLog(w.act("ines"), { run, reason: "card was full" }));
    expect((await judged()).reviewBlockers.map((b) => b.code)).not.toContain("log-missing");
  });

  it("that nobody started here is taken from anybody, cut short, to be reviewed", async () => {
    const { run: other } = value(await recordUnstartedRun(w.act("cal"), { rung: "1", reason: "somebody swung it" }));
    expect(await judged(other)).toMatchObject({ state: "ended", label: "1x" });
    expect((await judged()).state).toBe("held");
    expect((await mails("hold")).length).toBe(CREW.length);
    expect((await w.gate("PO 1x")).present).toBe(true);
  });
});

describe("a rung", () => {
  it("is left out when an inspector accepts it", async () => {
    ready();
    expect(await acceptLeftOutRung(w.act("lio"), { rung: "1", reason: "ran at the works" })).toMatchObject(refused(403, "not-your-role"));
    value(await acceptLeftOutRung(w.act("ines"), { rung: "1", reason: "ran at the works" }));
    expect((await w.board()).result.nextRung).toBe("2");
    expect(await acceptLeftOutRung(w.act("ines"), { rung: "1", reason: "ran at the works" })).toMatchObject(refused(409, "already"));
    expect(await acceptLeftOutRung(w.act("ines"), { rung: "99", reason: "none" })).toMatchObject(refused(404, "not-found"));
  });
});
