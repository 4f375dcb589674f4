import { createHash } from "node:crypto";
import { eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { signatures } from "#app/db/schema/signatures";
import { verify } from "#app/lib/record/chain";
import { addMember } from "#app/lib/services/members.server";
import { openSystem } from "#app/lib/services/open-system.server";
import { recordProof } from "#app/lib/services/record-proof.server";
import { signGates } from "#app/lib/services/sign-gates.server";
import { signRelease } from "#app/lib/services/sign-release.server";
import { withdrawSignature } from "#app/lib/services/withdraw-signature.server";
import { MINUTE, PIN, value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
let restore: () => void;
beforeAll(async () => {
  w = await workshop();
  await w.confirmValues();
  await w.enterNumbers();
  await w.stockCrib();
  await w.proveGate("MF");
  await w.proveGate("FI");
  restore = await w.save();
}, 60_000);
beforeEach(() => {
  restore();
  w.clock.add(MINUTE);
});
afterAll(() => w.clock.stop());

const state = async (key = "MF") => (await w.gate(key)).state;
const countSignatures = () => db().$count(signatures);

describe("signing a gate", () => {
  it("takes a builder's signature, then an inspector's, and then it stands", async () => {
    expect(await state()).toBe("ready");
    value(await w.sign("MF", "bea", "builder"));
    expect(await state()).toBe("half signed");
    value(await w.sign("MF", "ines", "inspector"));
    expect(await state()).toBe("signed");
    expect(await w.sign("MF", "ines", "inspector")).toMatchObject({ ok: false, status: 409, code: "already" });
  });

  it("stores the text as shown, and its hash goes into the chain", async () => {
    const { signatures: ids } = value(await w.sign("MF", "bea", "builder"));
    const [row] = await db()
      .select()
      .from(signatures)
      .where(eq(signatures.id, ids[0] ?? ""));
    const line = (await recordLines(db(), w.installId)).at(-1);
    const hash = createHash("sha256")
      .update(row?.shownText ?? "")
      .digest("hex");
    expect(line?.event).toMatchObject({ type: "signed", data: { shownHash: hash, key: "MF" } });
    expect(row?.shownText).toContain("Gate MF Mount and firewall, revision 1");
    expect(row?.shownText).toMatch(/MF1 \(revision \d\) .*15 N·m.*Bea, 3 Dec 2026 \d\d:\d\d CET/);
    expect(row?.shownText).toContain(row?.meaning);
  });

  it.each<[string, string, Parameters<Workshop["sign"]>, number, string]>([
    ["a gate that is not ready", "EC", ["EC", "bea", "builder"], 409, "item-to-do"],
    ["the inspector before the builder", "MF", ["MF", "ines", "inspector"], 409, "order"],
    ["a crew member", "MF", ["MF", "cal", "builder"], 403, "not-your-role"],
    ["a builder as inspector", "MF", ["MF", "bea", "inspector"], 403, "not-your-role"],
    ["a role that is not in the gate's policy", "MF", ["MF", "lio", "lead"], 403, "not-your-role"],
  ])("is refused: %s", async (_, __, [key, person, as], status, code) => {
    expect(await w.sign(key, person, as)).toMatchObject({ ok: false, status, code });
    expect(await countSignatures()).toBe(0);
  });

  it("is refused with a wrong PIN, and locked after five", async () => {
    const sheet = { as: "builder" as const, gates: await w.sheetOf("MF") };
    for (let n = 1; n <= 4; n++)
      expect(await signGates(w.act("bea"), { ...sheet, pin: "111112" })).toMatchObject({ ok: false, status: 403, code: "pin-wrong" });
    expect(await signGates(w.act("bea"), { ...sheet, pin: "111112" })).toMatchObject({ ok: false, status: 403, code: "pin-locked" });
    expect(await signGates(w.act("bea"), { ...sheet, pin: PIN })).toMatchObject({ ok: false, status: 403, code: "pin-locked" });
    expect(await countSignatures()).toBe(0);
  });

  it("is refused to whoever did some of the work, although an inspector", async () => {
    value(await addMember(w.act("lio"), { email: "bea@n0200.example", role: "inspector" }));
    value(await w.sign("MF", "tom", "builder"));
    expect(await w.sign("MF", "bea", "inspector")).toMatchObject({ ok: false, status: 403, code: "own-work" });
  });

  it("is refused to the first signer as the second, in another role", async () => {
    value(await addMember(w.act("lio"), { email: "tom@n0200.example", role: "inspector" }));
    value(await w.sign("MF", "tom", "builder"));
    expect(await w.sign("MF", "tom", "inspector")).toMatchObject({ ok: false, status: 403, code: "own-work" });
  });

  it("is refused when a proof came since the sheet was opened", async () => {
    const gates = await w.sheetOf("MF");
    value(await recordProof(w.act("bea"), await w.proofInput("MF6")));
    expect(await signGates(w.act("bea"), { as: "builder", gates, pin: PIN })).toMatchObject({ ok: false, status: 409, code: "stale" });
  });

  it("signs the gates of one sheet with one PIN, all or none", async () => {
    const gates = [...(await w.sheetOf("MF")), ...(await w.sheetOf("FI"))];
    expect(value(await signGates(w.act("bea"), { as: "builder", gates, pin: PIN })).signatures).toHaveLength(2);
    restore();
    const withEc = [...gates, ...(await w.sheetOf("EC"))];
    expect(await signGates(w.act("bea"), { as: "builder", gates: withEc, pin: PIN })).toMatchObject({ ok: false, status: 409 });
    expect(await signGates(w.act("bea"), { as: "builder", gates: [...gates, ...gates], pin: PIN })).toMatchObject({
      ok: false,
      status: 422,
    });
    expect(await countSignatures()).toBe(0);
  });

  it("takes one of two builders who sign at once, and one of two inspectors", async () => {
    const gates = await w.sheetOf("MF");
    const both = await Promise.all((["bea", "tom"] as const).map((p) => signGates(w.act(p), { as: "builder", gates, pin: PIN })));
    expect(both.map((o) => o.ok).sort()).toEqual([false, true]);
    expect(both.find((o) => !o.ok)).toMatchObject({ status: 409, code: "order" });
    value(await addMember(w.act("lio"), { email: "cal@n0200.example", role: "inspector" }));
    const inspectors = await Promise.all((["ines", "cal"] as const).map((p) => signGates(w.act(p), { as: "inspector", gates, pin: PIN })));
    expect(inspectors.map((o) => o.ok).sort()).toEqual([false, true]);
    expect(inspectors.find((o) => !o.ok)).toMatchObject({ status: 409, code: "already" });
    expect(await countSignatures()).toBe(2);
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });

  it("once however often the same form is sent", async () => {
    const act = w.act("bea");
    const form = { as: "builder" as const, gates: await w.sheetOf("MF"), pin: PIN };
    const sent = await Promise.all([1, 2, 3].map(() => signGates(act, form)));
    expect(new Set(sent.map((o) => JSON.stringify(o))).size).toBe(1);
    expect(await countSignatures()).toBe(1);
  });
});

describe("a signed gate", () => {
  beforeEach(() => w.signBoth("MF"));

  it("lapses by an opening, and nobody un-signed it", async () => {
    value(await openSystem(w.act("cal"), { systems: ["mount"], reason: "Bolt out", closed: true }));
    expect(await state()).toBe("lapsed");
    expect(await countSignatures()).toBe(2);
  });

  it("takes a new proof only from whoever was told that its signatures lapse", async () => {
    w.clock.add(MINUTE);
    const input = await w.proofInput("MF6");
    expect(await recordProof(w.act("bea"), input)).toMatchObject({ ok: false, status: 409, code: "already" });
    value(await recordProof(w.act("bea"), { ...input, told: true }));
    expect(await state()).toBe("ready");
  });

  it("loses a signature that its signer or an inspector withdraws, nobody else", async () => {
    const [signature = ""] = (await w.gate("MF")).holding;
    expect(await withdrawSignature(w.act("tom"), { signature, reason: "not so sure" })).toMatchObject({ ok: false, status: 403 });
    value(await withdrawSignature(w.act("bea"), { signature, reason: "not so sure" }));
    expect(await state()).not.toBe("signed");
    expect(await withdrawSignature(w.act("ines"), { signature, reason: "not so sure" })).toMatchObject({
      ok: false,
      status: 409,
      code: "already",
    });
  });
});

describe("the release", () => {
  it("is refused while anything is open, with every blocker", async () => {
    const covers = (await w.board()).result.release.covers;
    const outcome = await signRelease(w.act("lio"), { as: "lead", covers, pin: PIN });
    expect(outcome).toMatchObject({ ok: false, status: 409 });
    expect(outcome.ok ? 0 : outcome.blockers.length).toBeGreaterThan(1);
    expect(await signRelease(w.act("bea"), { as: "lead", covers, pin: PIN })).toMatchObject({
      ok: false,
      status: 403,
      code: "not-your-role",
    });
  });
});

describe("two tablets at once", () => {
  it("one proof of an item is taken; whoever was slower is told who was first and when, and may still record another", async () => {
    const withdrawn = await w.proofInput("MF1");
    const now = (await w.board()).result.items[withdrawn.item]?.proof ?? null;
    const both = await Promise.all([
      recordProof(w.act("bea"), { ...withdrawn, seen: now }),
      recordProof(w.act("tom"), { ...(await w.proofInput("MF1")), seen: now }),
    ]);
    expect(both.map((o) => o.ok)).toEqual([true, false]);
    expect(both[1]).toMatchObject({ ok: false, status: 409, code: "stale" });
    expect(both[1]?.ok === false && both[1].message).toMatch(/^Bea recorded it on 3 Dec \d\d:\d\d CET, after this page was opened\./);
    const first = both[0]?.ok ? both[0].value.proof : "";
    expect((await w.board()).result.items[withdrawn.item]?.proof).toBe(first);
    expect(await recordProof(w.act("tom"), { ...(await w.proofInput("MF1")), seen: first })).toMatchObject({ ok: true });
  });

  it("bad news is taken all the same", async () => {
    const input = await w.proofInput("MF1");
    expect(await recordProof(w.act("cal"), { ...input, as: "crew", state: "failed", evidence: [], seen: null })).toMatchObject({
      ok: true,
    });
  });

  it("one first signature is taken when two builders sign, and the other is told that it is there", async () => {
    const gates = await w.sheetOf("MF");
    const both = await Promise.all([
      signGates(w.act("bea"), { as: "builder", gates, pin: PIN }),
      signGates(w.act("tom"), { as: "builder", gates, pin: PIN }),
    ]);
    expect(both.map((o) => o.ok).sort()).toEqual([false, true]);
    expect(await countSignatures()).toBe(1);
    expect(await state()).toBe("half signed");
  });

  it("a signature that meets an opening is refused, and says who opened what", async () => {
    const gates = await w.sheetOf("MF");
    const [opened, signed] = await Promise.all([
      openSystem(w.act("cal"), { systems: ["mount"], reason: "mount bolt turned", closed: false, opened: null } as never),
      signGates(w.act("bea"), { as: "builder", gates, pin: PIN }),
    ]);
    expect(opened.ok).toBe(true);
    expect(await state()).not.toBe("half signed");
    if (!signed.ok) expect(signed.message).toContain("Cal opened it 3 Dec");
    const late = await signGates(w.act("bea"), { as: "builder", gates, pin: PIN });
    expect(late).toMatchObject({ ok: false, status: 409 });
    expect(late.ok === false && late.message).toContain("Cal opened it 3 Dec");
  });

  it("a sheet that somebody proved an item of meanwhile names the person, the item and the time", async () => {
    const gates = await w.sheetOf("MF");
    const { e, id } = await w.gate("MF");
    const key = e.snapshot.items.find((i) => i.gate === id && !i.hidden && !i.secondEyes)?.key ?? "";
    w.clock.add(MINUTE);
    value(await recordProof(w.act("tom"), { ...(await w.proofInput(key)), told: true }));
    const late = await signGates(w.act("bea"), { as: "builder", gates, pin: PIN });
    expect(late.ok === false && late.message).toMatch(
      new RegExp(`^Tom proved ${key} on 3 Dec \\d\\d:\\d\\d CET since you opened this sheet\\.`),
    );
  });
});
