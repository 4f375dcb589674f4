import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { gateHistory } from "#app/db/queries/gate-history.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { verify } from "#app/lib/record/chain";
import { checkEvidence } from "#app/lib/schemas/evidence";
import { NOT_PLAIN } from "#app/lib/schemas/plain-text";
import type { RecordProof } from "#app/lib/schemas/proof";
import { acceptNotApplicable } from "#app/lib/services/accept-not-applicable.server";
import { confirmProof } from "#app/lib/services/confirm-proof.server";
import { keepProof } from "#app/lib/services/keep-proof.server";
import { openSystem } from "#app/lib/services/open-system.server";
import { recordProof } from "#app/lib/services/record-proof.server";
import { withdrawProof } from "#app/lib/services/withdraw-proof.server";
import { MINUTE, value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
let restore: () => void;
beforeAll(async () => {
  w = await workshop();
  await w.confirmValues();
  await w.enterNumbers();
  await w.stockCrib();
  restore = await w.save();
}, 60_000);
beforeEach(() => {
  restore();
  w.clock.add(MINUTE);
});
afterAll(() => w.clock.stop());

const state = async (key: string) => (await w.board()).result.items[(await w.item(key)).id]?.state;
/** MF4 is done by one person with a photo, MF6 by one with a tick, MF5 wants second eyes, MF1 torques. */
const record = async (key: string, over: Partial<RecordProof> = {}, person: Parameters<Workshop["act"]>[0] = "bea") =>
  recordProof(w.act(person), await w.proofInput(key, over));

describe("a proof", () => {
  it("makes its item done, and stands in the gate's history", async () => {
    const { proof } = value(await record("MF6", { note: "looked from below" }));
    expect(await state("MF6")).toBe("done");
    const [newest] = await gateHistory(db(), w.installId, (await w.gate("MF")).id);
    expect(newest).toMatchObject({ name: "Bea", item: { key: "MF6" }, event: { id: proof, type: "proof", as: "builder" } });
    expect(await gateHistory(db(), w.installId, (await w.gate("EC")).id)).toEqual([]);
  });

  it("with a torque names its wrench and is worked out against the band", async () => {
    expect(await state("MF1")).toBe("to do");
    const { proof } = value(await record("MF1"));
    expect(await state("MF1")).toBe("second eyes");
    value(await confirmProof(w.act("tom"), { proof, as: "builder" }));
    expect(await state("MF1")).toBe("done");
  });

  it.each<[string, string, Partial<RecordProof>, Parameters<Workshop["act"]>[0], number, string, RegExp]>([
    ["a crew member's good news", "MF6", { as: "crew" }, "cal", 403, "not-your-role", /builder/],
    ["a role that the person does not hold", "MF6", { as: "inspector" }, "bea", 403, "not-your-role", /inspector/],
    ["an item that is not here", "MF6", { item: "nowhere" }, "bea", 404, "not-found", /not here/],
    ["an item that changed since", "MF6", { revision: 7 }, "bea", 409, "stale", /changed since/],
    ["too few values", "OC1", { evidence: [{ kind: "measure", values: [] }] }, "bea", 422, "invalid", /Part 1/],
    ["evidence of another kind", "MF6", { evidence: [{ kind: "text", text: "x" }] }, "bea", 422, "invalid", /asks for tick, text was sent/],
    ["no evidence", "MF6", { evidence: [] }, "bea", 422, "invalid", /nothing was entered/],
    ["a number that is none", "OC1", { evidence: [{ kind: "measure", values: [Number.NaN] }] }, "bea", 422, "invalid", /Part 1/],
    [
      "a photo that never arrived",
      "MF4",
      { evidence: [{ kind: "photo", files: ["nope"], stored: true }] },
      "bea",
      422,
      "invalid",
      /has not arrived/,
    ],
    ["a tool of nobody", "MF6", { tools: ["nope"] }, "bea", 422, "invalid", /not in this crib/],
    ["somebody unknown", "MF6", { did: "olga", at: Date.UTC(2026, 11, 3, 7, 0) }, "bea", 422, "invalid", /not a member/],
    ["another person's work without its time", "MF6", { did: "tom" }, "bea", 422, "invalid", /when it was done/],
    ["a time to come", "MF6", { at: Date.UTC(2026, 11, 4) }, "bea", 422, "invalid", /not come yet/],
    ["not applicable without a reason", "MF6", { state: "na", note: "" }, "bea", 422, "invalid", /Say why/],
    ["a guarded item before its prerequisites stand", "OP4", {}, "bea", 409, "gate-waits", /guarded/],
    ["a computed item", "WR4", {}, "bea", 409, "order", /nobody ticks/],
  ])("is refused: %s", async (_, key, over, person, status, code, message) => {
    const outcome = await record(key, over, person);
    expect(outcome).toMatchObject({ ok: false, status, code });
    expect(outcome.ok ? "" : outcome.message).toMatch(message);
    expect((await w.board()).snapshot.proofs).toEqual([]);
  });

  it("says in its refusal what the first blocker says", async () => {
    const outcome = await record("OP4");
    expect(outcome.ok ? "" : outcome.message).toBe(outcome.ok ? undefined : outcome.blockers[0]?.sentence);
  });

  it("that failed is taken from anybody, whatever is missing", async () => {
    value(await record("MF1", { state: "failed", as: "crew", evidence: [], note: "thread stripped" }, "cal"));
    expect(await state("MF1")).toBe("to do");
  });

  it("written down afterwards waits for a second person, and counts at the typed time", async () => {
    w.clock.add(60 * MINUTE);
    const at = (await w.board()).at - 30 * MINUTE;
    const { proof } = value(await record("MF6", { did: "tom", at }));
    expect(await state("MF6")).toBe("second eyes");
    expect(await confirmProof(w.act("tom"), { proof, as: "builder" })).toMatchObject({ ok: false, status: 403, code: "own-work" });
    expect(await confirmProof(w.act("bea"), { proof, as: "builder" })).toMatchObject({ ok: false, status: 403, code: "own-work" });
    expect(await confirmProof(w.act("cal"), { proof, as: "builder" })).toMatchObject({ ok: false, status: 403, code: "not-your-role" });
    value(await confirmProof(w.act("lio"), { proof, as: "lead" }));
    expect(await state("MF6")).toBe("done");
    expect((await w.board()).snapshot.proofs[0]).toMatchObject({ counts: at, did: "tom", by: "bea", late: true });
  });

  it("withdrawn leaves its item to do; an older one does not come back; it is withdrawn once", async () => {
    value(await record("MF6"));
    w.clock.add(MINUTE);
    const { proof } = value(await record("MF6"));
    value(await withdrawProof(w.act("cal"), { proof, reason: "wrong aircraft" }));
    expect(await state("MF6")).toBe("to do");
    expect(await withdrawProof(w.act("cal"), { proof, reason: "wrong aircraft" })).toMatchObject({
      ok: false,
      status: 409,
      code: "already",
    });
    expect(await withdrawProof(w.act("cal"), { proof: "nope", reason: "wrong" })).toMatchObject({ ok: false, status: 404 });
  });
});

describe("evidence", () => {
  it("has no text that turns the reading round, in words, places or sheets", () => {
    const text = [{ kind: "text", asks: "Serial number" }] as const;
    expect(checkEvidence([...text], "done", [{ kind: "text", text: "0042\n0043" }]).ok).toBe(true);
    expect(checkEvidence([...text], "done", [{ kind: "text", text: "00\u202e24" }])).toMatchObject({ message: `Part 1: ${NOT_PLAIN}` });
    const sheet = { kind: "sheet", sheet: "restraint" } as const;
    const inputs = { straps: [{ name: "left\u2066" }] };
    expect(checkEvidence([sheet], "failed", [{ ...sheet, version: "1", inputs, took: {} }])).toMatchObject({ ok: false });
    expect(checkEvidence([sheet], "failed", [{ ...sheet, version: "1", inputs: { straps: [{ name: "left" }] }, took: {} }]).ok).toBe(true);
  });
});

describe("not applicable", () => {
  it("stands once an inspector who did not record it has accepted the reason", async () => {
    const { proof } = value(await record("MF6", { state: "na", note: "no firewall on this one", evidence: [] }));
    expect(await state("MF6")).toBe("second eyes");
    expect(await acceptNotApplicable(w.act("tom"), { proof, reason: "seen it" })).toMatchObject({
      ok: false,
      status: 403,
      code: "not-your-role",
    });
    value(await acceptNotApplicable(w.act("ines"), { proof, reason: "seen it" }));
    expect(await state("MF6")).toBe("not applicable");
  });

  it("is not for what guards a life before each run, and not an inspector's own", async () => {
    expect(await record("WR1", { state: "na", note: "not today", evidence: [] })).toMatchObject({
      ok: false,
      status: 409,
      code: "na-not-allowed",
    });
    const { proof } = value(await record("MF6", { state: "na", note: "no firewall", evidence: [], as: "inspector" }, "ines"));
    expect(await acceptNotApplicable(w.act("ines"), { proof, reason: "seen it" })).toMatchObject({
      ok: false,
      status: 403,
      code: "own-work",
    });
  });
});

describe("a keep", () => {
  it("brings a proof back that an opening made lapse, by an inspector alone", async () => {
    const { proof } = value(await record("MF4"));
    expect(await keepProof(w.act("ines"), { proof, reason: "nothing was touched" })).toMatchObject({
      ok: false,
      status: 409,
      code: "order",
    });
    w.clock.add(MINUTE);
    value(await openSystem(w.act("tom"), { systems: ["mount"], reason: "One bolt out", closed: true }));
    expect(await state("MF4")).toBe("lapsed");
    w.clock.add(MINUTE);
    expect(await keepProof(w.act("tom"), { proof, reason: "nothing was touched" })).toMatchObject({
      ok: false,
      status: 403,
      code: "not-your-role",
    });
    value(await keepProof(w.act("ines"), { proof, reason: "nothing was touched" }));
    expect(await state("MF4")).toBe("done");
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });
});
