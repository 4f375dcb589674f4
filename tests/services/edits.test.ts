import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { answeredEdits, waitingEdits } from "#app/db/queries/edits.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { type Edit, gateEdit, gateFields, itemEdit, itemFields } from "#app/lib/gates/edits";
import type { Gate, Item } from "#app/lib/gates/snapshot";
import { keysThatCome } from "#app/lib/gates/trait-edit";
import { newId } from "#app/lib/ids";
import { verify } from "#app/lib/record/chain";
import { parseEvent } from "#app/lib/record/events";
import { namesIn } from "#app/lib/record/names";
import { tell } from "#app/lib/record/tell";
import { editSchema, readEdit } from "#app/lib/schemas/edit";
import { acceptEdit } from "#app/lib/services/accept-edit.server";
import { editBoard } from "#app/lib/services/edit-board.server";
import { addMember } from "#app/lib/services/members.server";
import { rejectEdit } from "#app/lib/services/reject-edit.server";
import { generate } from "#app/lib/template/generate";
import type { Traits } from "#app/lib/template/types";
import { MINUTE, type Person, TRAITS, value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
let restore: () => void;
beforeAll(async () => {
  w = await workshop();
  restore = await w.save();
}, 60_000);
beforeEach(() => {
  restore();
  w.clock.add(MINUTE);
});
afterAll(() => w.clock.stop());

const refused = (status: number, code: string) => ({ ok: false, status, code });
const reason = "the kit has no such part";
const edit = (person: Person, what: Edit, why = reason) => editBoard(w.act(person), { edit: what, reason: why });
const accept = (person: Person, id: string, wordsOnly = false) =>
  acceptEdit(w.act(person), { edit: id, wordsOnly, reason: "looked at it" });

async function ofItem(key: string, over: Partial<Item>): Promise<Edit> {
  const item = await w.item(key);
  return itemEdit(item, { ...itemFields(item), ...over }) as Edit;
}
async function ofGate(key: string, over: Partial<Gate>): Promise<Edit> {
  const { e, id } = await w.gate(key);
  const gate = e.snapshot.gates.find((g) => g.id === id) as Gate;
  return gateEdit(gate, { ...gateFields(gate), ...over }) as Edit;
}
const hide = async (key: string): Promise<Edit> => ({ kind: "hide", subject: { kind: "item", id: (await w.item(key)).id } });
const plainItem = async (gate: string): Promise<Item> => {
  const { e, id } = await w.gate(gate);
  return e.snapshot.items.find((i) => i.gate === id && !i.killer && i.parts.every((p) => p.kind === "tick")) as Item;
};
async function history(): Promise<string[]> {
  const events = (await recordLines(db(), w.installId)).map((l) => parseEvent(l.event));
  const names = namesIn(events);
  return events.map((ev) => {
    const { did, details } = tell(ev, names, "si");
    return [did, ...details].join(" | ");
  });
}

describe("before the first proof", () => {
  it("the lead shapes the board freely, and the record says it", async () => {
    const item = await plainItem("EC");
    expect(value(await edit("lio", await ofItem(item.key, { words: "Say it our way." }), "")).class).toBe("free");
    expect(value(await edit("lio", await hide(item.key), ""))).toEqual({ class: "free", waiting: null });
    expect(await w.item(item.key)).toMatchObject({ words: "Say it our way.", hidden: true, revision: 3 });
    expect((await history()).slice(-2)).toEqual([
      expect.stringContaining(`changed the board | “Say it our way.” in place of “${item.words}”`),
      expect.stringContaining(`changed the board | Not asked any more: ${item.key}`),
    ]);
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });

  it("nobody but lead and inspector does", async () => {
    const what = await ofItem("EC1", { words: "Other words." });
    expect(await edit("bea", what)).toMatchObject(refused(403, "not-your-role"));
    expect(await edit("olga", what)).toMatchObject(refused(404, "not-found"));
  });

  it("a new gate and a new item stand where they were put, and another order holds", async () => {
    const { e } = await w.gate("EC");
    const [first, second] = e.snapshot.gates as [Gate, Gate];
    const fields = { ...gateFields(second), name: "Cooling flap", short: "Flap", needs: [first.id], after: [] };
    value(await edit("lio", { kind: "add-gate", id: newId(), key: "CFL", before: second.id, to: fields }));
    expect((await w.board()).snapshot.gates.map((g) => g.key).slice(0, 3)).toEqual([first.key, "CFL", second.key]);
    const gate = await w.gate("CFL");
    const model = itemFields(await plainItem("EC"));
    for (const n of [51, 52])
      value(
        await edit("lio", {
          kind: "add-item",
          id: newId(),
          key: `CFL${n}`,
          gate: gate.id,
          to: { ...model, words: `Step ${n}.`, follows: [] },
        }),
      );
    expect(await w.gate("CFL")).toMatchObject({ present: true, of: 2 });
    value(await edit("lio", { kind: "move", subject: { kind: "item", id: (await w.item("CFL52")).id }, by: -1 }));
    const order = (await w.board()).snapshot.items.filter((i) => i.gate === gate.id).map((i) => [i.key, i.revision]);
    expect(order).toEqual([
      ["CFL52", 1],
      ["CFL51", 1],
    ]);
  });
});

describe("after the first proof", () => {
  beforeEach(async () => {
    await w.confirmValues();
    await w.enterNumbers();
    await w.stockCrib();
    await w.proveGate("MF");
    await w.signBoth("MF");
  });

  it("what asks for more counts at once and makes proof and signatures lapse", async () => {
    const item = await plainItem("MF");
    expect((await w.gate("MF")).stands).toBe(true);
    const photo = { kind: "photo", of: "the place", optional: false } as const;
    expect(value(await edit("lio", await ofItem(item.key, { parts: [...item.parts, photo] }), ""))).toEqual({
      class: "at once",
      waiting: null,
    });
    const e = await w.board();
    expect(e.result.items[item.id]?.stands).toBe(false);
    expect((await w.gate("MF")).state).toBe("lapsed");
  });

  it("what asks for less waits, changes nothing, and wants a reason", async () => {
    const item = await plainItem("MF");
    expect(await edit("lio", await hide(item.key), "")).toMatchObject(refused(422, "invalid"));
    const { waiting } = value(await edit("lio", await hide(item.key)));
    const e = await w.board();
    expect(e.snapshot.editsWaiting).toMatchObject([{ id: waiting, by: "lio", as: "lead", words: expect.stringContaining(item.key) }]);
    expect((await w.gate("MF")).stands).toBe(true);
    expect(await edit("lio", await hide(item.key))).toMatchObject(refused(409, "already"));
  });

  it("an inspector, another person, lets it count: the board changes then", async () => {
    const item = await plainItem("MF");
    const id = value(await edit("lio", await hide(item.key))).waiting as string;
    expect(await accept("lio", id)).toMatchObject(refused(403, "not-your-role"));
    expect(await accept("bea", id)).toMatchObject(refused(403, "not-your-role"));
    value(await accept("ines", id));
    expect((await w.item(item.key)).hidden).toBe(true);
    expect((await w.gate("MF")).stands).toBe(false);
    expect(await waitingEdits(db(), w.installId)).toEqual([]);
    expect(await answeredEdits(db(), w.installId)).toMatchObject([{ answer: { answer: "accepted", by: "ines", as: "inspector" } }]);
    expect(await accept("ines", id)).toMatchObject(refused(409, "already"));
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
    expect((await history()).slice(-3)).toEqual([
      expect.stringMatching(/^asked for a change of the board, which waits for an inspector \| .* \| the kit has no such part$/),
      expect.stringMatching(/^accepted the change of the board .* \| looked at it$/),
      expect.stringMatching(/^let the change of the board count \| Not asked any more/),
    ]);
  });

  it("an inspector who is the lead too never accepts an edit of their own", async () => {
    value(await addMember(w.act("lio"), { email: "ines@n0200.example", role: "lead" }));
    const id = value(await edit("ines", await hide((await plainItem("MF")).key))).waiting as string;
    expect(await accept("ines", id)).toMatchObject(refused(403, "own-work"));
    value(await rejectEdit(w.act("ines"), { edit: id, reason: "thought better of it" }));
    expect(await answeredEdits(db(), w.installId)).toMatchObject([{ answer: { answer: "taken back" } }]);
  });

  it("words only, accepted as that, leave the signatures; accepted as more they do not", async () => {
    const item = await plainItem("MF");
    const first = value(await edit("lio", await ofItem(item.key, { words: "The same in other words." }))).waiting as string;
    value(await accept("ines", first, true));
    expect(await w.item(item.key)).toMatchObject({ words: "The same in other words.", revision: item.revision });
    expect((await w.gate("MF")).stands).toBe(true);
    const second = value(await edit("lio", await ofItem(item.key, { words: "Something else." }))).waiting as string;
    value(await accept("ines", second));
    expect((await w.item(item.key)).revision).toBe(item.revision + 1);
    expect((await w.gate("MF")).stands).toBe(false);
    const third = value(await edit("lio", await ofGate("MF", { policy: [["builder"], ["lead", "inspector"]] }))).waiting as string;
    expect(await accept("ines", third, true)).toMatchObject(refused(409, "order"));
  });

  it("rejected it never counts", async () => {
    const item = await plainItem("MF");
    const id = value(await edit("lio", await hide(item.key))).waiting as string;
    expect(await rejectEdit(w.act("bea"), { edit: id, reason: "no" })).toMatchObject(refused(403, "not-your-role"));
    value(await rejectEdit(w.act("ines"), { edit: id, reason: "it is needed" }));
    expect((await w.board()).snapshot.editsWaiting).toEqual([]);
    expect((await w.item(item.key)).hidden).toBe(false);
    expect(await accept("ines", id)).toMatchObject(refused(409, "already"));
  });

  it("is not accepted on a board that has moved on since", async () => {
    const item = await plainItem("MF");
    const id = value(await edit("lio", await ofItem(item.key, { words: "First idea." }))).waiting as string;
    const other = value(await edit("lio", await ofItem(item.key, { words: "Second idea." }))).waiting as string;
    value(await accept("ines", other));
    expect(await accept("ines", id)).toMatchObject(refused(409, "stale"));
    expect((await w.item(item.key)).words).toBe("Second idea.");
  });

  it("keeps an older proof's evidence in the words of what was asked then", async () => {
    const item = await w.item("MF1");
    const id = value(await edit("lio", await ofItem(item.key, { parts: [{ kind: "tick" }] }))).waiting as string;
    const before = (await history()).find((line) => line.startsWith(`proved “${item.key}`));
    value(await accept("ines", id));
    expect(before).toContain("fasteners");
    expect((await history()).find((line) => line.startsWith(`proved “${item.key}`))).toBe(before);
  });

  it("other answers about the install are the lead's to ask for and an inspector's to accept", async () => {
    const to: Traits = { ...TRAITS, cooling: "liquid", mixctl: false };
    const { snapshot } = await w.board();
    const what: Edit = { kind: "traits", from: TRAITS, to, ids: Object.fromEntries(keysThatCome(snapshot, to).map((k) => [k, newId()])) };
    expect(await edit("ines", what)).toMatchObject(refused(403, "not-your-role"));
    const id = value(await edit("lio", what)).waiting as string;
    expect((await w.board()).snapshot.traits).toEqual(TRAITS);
    value(await accept("ines", id));
    const after = (await w.board()).snapshot;
    expect(after.traits).toEqual(to);
    const shown = after.items.filter((i) => !i.hidden).map((i) => i.key);
    expect(shown.sort()).toEqual(
      generate(to)
        .items.map((i) => i.key)
        .sort(),
    );
    expect(after.values.map((v) => v.key)).toEqual(generate(to).values.map((v) => v.key));
    expect(after.values.find((v) => v.key === "coolantMax")).toMatchObject({ source: null });
    expect(after.values.find((v) => v.key === "redline")?.source).not.toBeNull();
    expect(verify(await recordLines(db(), w.installId)).ok).toBe(true);
  });
});

describe("an edit as it is sent", () => {
  it("may repeat whatever the template says, in every part of every item", () => {
    const long: Traits = { ...TRAITS, cooling: "airliquid", propeller: "cshyd", metering: "mechinj", delivery: "boost", turbo: true };
    for (const traits of [TRAITS, long])
      for (const def of generate(traits).items) {
        const { words, killer, secondEyes, guarded, systems, parts, follows, validity, caution } = def;
        const to = { words, killer, secondEyes, guarded, systems, parts, follows, validity, caution };
        const read = editSchema.safeParse({ kind: "add-item", id: "a", key: "QZ51", gate: "g", to });
        expect(read.error?.issues.map((i) => `${def.key} ${i.path.join(".")} ${i.message}`)).toBeUndefined();
      }
    for (const { name, short, needs, after, requiredBy, validity, policy, caution } of generate(TRAITS).gates) {
      const to = { name, short, needs, after, requiredBy, validity, policy, caution };
      expect(editSchema.safeParse({ kind: "add-gate", id: "a", key: "QZ", before: null, to }).error?.issues).toBeUndefined();
    }
  });

  it.each([
    "",
    "{",
    "null",
    '{"kind":"hide"}',
    '{"kind":"change-item","id":"a","from":{},"to":{"revision":9}}',
    '{"kind":"change-item","id":"a","from":{},"to":{"parts":[{"kind":"measure","label":"x","places":[""],"criterion":{"quantity":"pressure","band":{"min":3,"max":2},"basis":{"kind":"maker"},"source":null}}]}}',
    '{"kind":"change-gate","id":"a","from":{},"to":{"policy":[["crew"]]}}',
  ])("is refused where it is none: %s", (text) => expect(readEdit(text)).toBeNull());
});
