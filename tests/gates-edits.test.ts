import { describe, expect, it } from "vitest";
import { applyEdit } from "#app/lib/gates/apply-edit";
import { classifyEdit, mayAcceptEdit, mayEditBoard, mayRejectEdit } from "#app/lib/gates/edit-verdicts";
import { type Edit, gateEdit, gateFields, itemEdit, itemFields } from "#app/lib/gates/edits";
import { evaluate } from "#app/lib/gates/evaluate";
import type { Gate, Item, Snapshot } from "#app/lib/gates/snapshot";
import { generate } from "#app/lib/template/generate";
import { TEMPLATE } from "#app/lib/template/template";
import type { Part, Traits } from "#app/lib/template/types";
import { Board } from "./support/board";
import { measure, tick, torque } from "./support/parts";

const photo: Part = { kind: "photo", of: "the joint", optional: false };

/** Two gates in a chain: the second needs the first. */
function worked() {
  const b = new Board().cast();
  const first = b.gate("FS");
  const second = b.gate("FP", { needs: ["FS"] });
  const hose = b.item("FS1", "FS", { parts: [measure(5, 15)], systems: ["fuelsup"] });
  const cap = b.item("FS2", "FS", { parts: [tick], systems: ["fuelsup"] });
  const purge = b.item("FP1", "FP", { parts: [tick, photo], systems: ["fueleng"] });
  const strap = b.item("FP2", "FP", { parts: [torque(4)], systems: ["restr"], killer: true });
  return { b, first, second, hose, cap, purge, strap };
}

type Setting = ReturnType<typeof worked>;
const begun = (): Setting => {
  const w = worked();
  w.b.proof(w.cap.id);
  return w;
};

const ofItem = (item: Item, over: Partial<Item>): Edit => {
  const edit = itemEdit(item, { ...itemFields(item), ...over });
  if (!edit) throw new Error("Nothing changes");
  return edit;
};
const ofGate = (gate: Gate, over: Partial<Gate>): Edit => {
  const edit = gateEdit(gate, { ...gateFields(gate), ...over });
  if (!edit) throw new Error("Nothing changes");
  return edit;
};
const classOf = (s: Snapshot, edit: Edit): string => {
  const judged = classifyEdit(s, edit);
  return judged.ok ? judged.class : `no: ${judged.sentence}`;
};
const item = (s: Snapshot, id: string): Item => s.items.find((i) => i.id === id) as Item;
const gate = (s: Snapshot, id: string): Gate => s.gates.find((g) => g.id === id) as Gate;

describe("an edit of the board", () => {
  it("is none where nothing is different, whatever the order of a list", () => {
    const { hose, second } = worked();
    expect(itemEdit(hose, { ...itemFields(hose), systems: [...hose.systems] })).toBeNull();
    expect(gateEdit({ ...second, needs: ["a", "b"] }, { ...gateFields(second), needs: ["b", "a"] })).toBeNull();
  });

  it.each<[string, (w: Setting) => Edit, "at once" | "waits"]>([
    ["a narrower band", (w) => ofItem(w.hose, { parts: [measure(6, 15)] }), "at once"],
    ["a wider band", (w) => ofItem(w.hose, { parts: [measure(4, 15)] }), "waits"],
    ["a band moved along", (w) => ofItem(w.hose, { parts: [measure(6, 16)] }), "waits"],
    ["a band without its upper end", (w) => ofItem(w.hose, { parts: [measure(5, null)] }), "waits"],
    ["a photo as well", (w) => ofItem(w.hose, { parts: [measure(5, 15), photo] }), "at once"],
    ["a photo no longer", (w) => ofItem(w.purge, { parts: [tick] }), "waits"],
    ["a tick in place of a measurement", (w) => ofItem(w.hose, { parts: [tick] }), "waits"],
    ["fewer fasteners", (w) => ofItem(w.strap, { parts: [torque(3)] }), "waits"],
    ["a number of fasteners where none was said", (w) => ofItem({ ...w.strap, parts: [torque(null)] }, { parts: [torque(4)] }), "at once"],
    ["other words", (w) => ofItem(w.cap, { words: "Cap on, chain fitted." }), "waits"],
    ["a second pair of eyes", (w) => ofItem(w.cap, { secondEyes: true }), "at once"],
    ["no second pair of eyes", (w) => ofItem({ ...w.cap, secondEyes: true }, { secondEyes: false }), "waits"],
    ["a mark", (w) => ofItem(w.cap, { guarded: true }), "waits"],
    ["one system more", (w) => ofItem(w.cap, { systems: ["fuelsup", "bay"] }), "at once"],
    ["another system", (w) => ofItem(w.cap, { systems: ["bay"] }), "waits"],
    ["a shorter validity", (w) => ofItem(w.cap, { validity: { hours: 4, afterRunHours: null } }), "at once"],
    [
      "a longer validity",
      (w) => ofItem({ ...w.cap, validity: { hours: 4, afterRunHours: null } }, { validity: { hours: 5, afterRunHours: null } }),
      "waits",
    ],
    [
      "a run that renews",
      (w) => ofItem({ ...w.cap, validity: { hours: 4, afterRunHours: null } }, { validity: { hours: 4, afterRunHours: 1 } }),
      "waits",
    ],
    ["something to follow", (w) => ofItem(w.cap, { follows: [w.hose.id] }), "at once"],
    ["nothing to follow", (w) => ofItem({ ...w.cap, follows: [w.hose.id] }, { follows: [] }), "waits"],
    ["a caution where there was none", (w) => ofItem(w.cap, { caution: "Fuel vapour." }), "at once"],
    ["no caution", (w) => ofItem({ ...w.cap, caution: "Fuel vapour." }, { caution: null }), "waits"],
    ["an edge", (w) => ofGate(w.second, { after: [w.first.id] }), "at once"],
    ["an edge less", (w) => ofGate(w.second, { needs: [] }), "waits"],
    ["who signs", (w) => ofGate(w.second, { policy: [["builder"]] }), "waits"],
    ["what requires it", (w) => ofGate(w.second, { requiredBy: { kind: "runs" } }), "waits"],
    ["hiding", (w) => ({ kind: "hide", subject: { kind: "item", id: w.hose.id } }), "waits"],
    ["another order", (w) => ({ kind: "move", subject: { kind: "item", id: w.cap.id }, by: -1 }), "at once"],
    ["a gate", (w) => ({ kind: "add-gate", id: "new", key: "QZ", before: null, to: gateFields(w.second) }), "at once"],
    ["an item", (w) => ({ kind: "add-item", id: "new", key: "FS51", gate: w.first.id, to: itemFields(w.cap) }), "at once"],
  ])("with %s counts by what it asks", (_, make, expected) => {
    for (const w of [worked(), begun()]) {
      const edit = make(w);
      // The item as the edit found it.
      if (edit.kind === "change-item") Object.assign(item(w.b.s, edit.id), edit.from);
      expect(classOf(w.b.s, edit)).toBe(w.b.s.proofs.length ? expected : "free");
    }
  });

  it("is words only where nothing but words is different", () => {
    const { b, cap } = begun();
    const judged = (edit: Edit) => classifyEdit(b.s, edit);
    expect(judged(ofItem(cap, { words: "Cap on." }))).toMatchObject({ wordsOnly: true });
    expect(judged(ofItem(cap, { words: "Cap on.", secondEyes: true }))).toMatchObject({ wordsOnly: false, class: "waits" });
  });

  it("leaves the template's keys to the template", () => {
    const { b, first, cap } = worked();
    const gateOf = (key: string): Edit => ({ kind: "add-gate", id: "new", key, before: null, to: { ...gateFields(first), needs: [] } });
    const itemOf = (key: string): Edit => ({ kind: "add-item", id: "new", key, gate: first.id, to: itemFields(cap) });
    expect([gateOf("QZ"), gateOf("TD"), itemOf("FS51"), itemOf("FS9"), itemOf("FP51")].map((e) => classOf(b.s, e).slice(0, 4))).toEqual([
      "free",
      "no: ",
      "free",
      "no: ",
      "no: ",
    ]);
  });

  it("never hides what guards a life, its gate, or takes the mark away, not even before the first proof", () => {
    const { b, second, strap, purge } = worked();
    for (const edit of [
      { kind: "hide", subject: { kind: "item", id: strap.id } },
      { kind: "hide", subject: { kind: "gate", id: second.id } },
      ofItem(strap, { killer: false }),
    ] as Edit[])
      expect(classOf(b.s, edit)).toMatch(/^no: .*guards a life/);
    expect(classOf(b.s, { kind: "hide", subject: { kind: "item", id: purge.id } })).toBe("free");
  });

  it("refuses a circle of gates by name, through hidden gates too, and one of items", () => {
    const { b, first, second, hose, cap } = worked();
    expect(classOf(b.s, ofGate(first, { needs: [second.id] }))).toBe(
      `no: Gates would wait for each other in a circle: ${first.name}, then ${second.name}, then ${first.name}. Take one of these edges away first.`,
    );
    second.hidden = true;
    expect(classOf(b.s, ofGate(first, { after: [second.id] }))).toContain("in a circle");
    cap.follows = [hose.id];
    expect(classOf(b.s, ofItem(hose, { follows: [cap.id] }))).toContain(`circle: ${hose.key}, then ${cap.key}, then ${hose.key}`);
  });

  it("is refused on a board that has moved on, on what is hidden, and on a gate that looks back on a run", () => {
    const { b, cap, first } = begun();
    const edit = ofItem(cap, { words: "Cap on." });
    cap.words = "Somebody else's words.";
    expect(classifyEdit(b.s, edit)).toMatchObject({ ok: false, code: "stale" });
    cap.hidden = true;
    expect(classOf(b.s, ofItem(cap, { words: "Cap." }))).toContain("is hidden");
    expect(classOf(b.s, { kind: "show", subject: { kind: "item", id: cap.id } })).toBe("at once");
    first.lookBack = { kind: "run", run: "r" };
    expect(classOf(b.s, ofGate(first, { name: "Other" }))).toContain("was fixed when that run started");
  });
});

describe("an edit that counts", () => {
  it("gives what it changes a new revision, so that its proof or signature lapses; words only and order do not", () => {
    const { b, first, cap, hose } = begun();
    const reworded = ofItem(cap, { words: "Cap on." });
    expect(item(applyEdit(b.s, reworded), cap.id)).toMatchObject({ words: "Cap on.", revision: 2 });
    expect(item(applyEdit(b.s, reworded, true), cap.id)).toMatchObject({ words: "Cap on.", revision: 1 });
    expect(evaluate(applyEdit(b.s, reworded), b.now).result.items[cap.id]?.state).toBe("lapsed");
    expect(evaluate(applyEdit(b.s, reworded, true), b.now).result.items[cap.id]?.stands).toBe(true);
    expect(gate(applyEdit(b.s, ofGate(first, { caution: "Fuel." })), first.id).revision).toBe(2);
    const moved = applyEdit(b.s, { kind: "move", subject: { kind: "item", id: cap.id }, by: -1 });
    expect(moved.items.filter((i) => i.gate === first.id).map((i) => [i.id, i.revision])).toEqual([
      [cap.id, 1],
      [hose.id, 1],
    ]);
  });

  it("keeps the proof of what was hidden from coming back by itself", () => {
    const { b, cap } = begun();
    const subject = { kind: "item", id: cap.id } as const;
    const back = applyEdit(applyEdit(b.s, { kind: "hide", subject }), { kind: "show", subject });
    expect(evaluate(back, b.now).result.items[cap.id]?.state).toBe("lapsed");
  });

  it("leaves the snapshot that it was given as it was", () => {
    const { b, cap, first } = begun();
    const before = structuredClone(b.s);
    applyEdit(b.s, ofItem(cap, { words: "Cap on." }));
    applyEdit(b.s, { kind: "hide", subject: { kind: "gate", id: first.id } });
    expect(b.s).toEqual(before);
  });
});

describe("who", () => {
  it("edits is lead or inspector; who accepts is an inspector and another person; who made it may take it back", () => {
    const { b, cap } = begun();
    const e = evaluate(b.s, b.now);
    const edit = ofItem(cap, { words: "Cap on." });
    const may = (member: string) => mayEditBoard(e, { member, edit }).ok;
    expect([may("la"), may("bo"), may("di")]).toEqual([true, false, true]);
    const waiting = { ...b.record("edit", { by: "di", as: "inspector" }), edit };
    expect(mayAcceptEdit(e, { member: "di", waiting })).toMatchObject({ ok: false, blockers: [{ code: "own-work" }] });
    expect(mayAcceptEdit(e, { member: "la", waiting }).ok).toBe(false);
    expect(mayAcceptEdit(e, { member: "ed", waiting }).ok).toBe(true);
    expect([mayRejectEdit(e, { member: "di", waiting }).ok, mayRejectEdit(e, { member: "bo", waiting }).ok]).toEqual([true, false]);
  });

  it("accepts as words only what changes nothing else", () => {
    const { b, cap } = begun();
    const e = evaluate(b.s, b.now);
    const waiting = (edit: Edit) => ({ ...b.record("edit", { by: "la", as: "lead" }), edit });
    expect(mayAcceptEdit(e, { member: "di", waiting: waiting(ofItem(cap, { words: "Cap on." })), wordsOnly: true }).ok).toBe(true);
    expect(mayAcceptEdit(e, { member: "di", waiting: waiting(ofItem(cap, { guarded: true })), wordsOnly: true }).ok).toBe(false);
  });
});

describe("other answers about the install", () => {
  const before: Traits = worked().b.s.traits;
  /** The template's board for the plain install, with ids that are the keys. */
  function whole(): Board {
    const b = new Board().cast();
    const board = generate(before);
    b.s.gates = board.gates.map((g) => ({
      ...g,
      id: g.key,
      revision: 1,
      hidden: false,
      lookBack: g.lookBack?.kind === "rung" ? g.lookBack : null,
    }));
    b.s.items = board.items.map((i) => ({ ...i, id: i.key, revision: 1, hidden: false }));
    b.s.values = board.values.map((v) => ({ ...v, value: v.preset, source: null }));
    b.s.rungs = board.rungs.map((r, order) => ({ ...r, order, leftOut: null, setBack: [] }));
    return b;
  }
  const edit = (from: Traits, to: Traits): Edit => {
    const keys = [...generate(to).gates, ...generate(to).items].map((d) => d.key);
    return { kind: "traits", from, to, ids: Object.fromEntries(keys.map((k) => [k, k])) };
  };
  const liquid: Traits = { ...before, cooling: "liquid" };

  it("bring the board that the template has for them, and there and back again", () => {
    const { s } = whole();
    const after = applyEdit(s, edit(before, liquid));
    const shown = (x: Snapshot) =>
      x.items
        .filter((i) => !i.hidden)
        .map((i) => [i.key, i.words, i.parts, [...i.follows].sort()])
        .sort();
    const asked = (t: Traits) =>
      generate(t)
        .items.map((i) => [i.key, i.words, i.parts, [...i.follows].sort()])
        .sort();
    expect(shown(s)).toEqual(asked(before));
    expect(shown(after)).toEqual(asked(liquid));
    expect(after.gates.filter((g) => !g.hidden).map((g) => [g.key, g.needs])).toEqual(generate(liquid).gates.map((g) => [g.key, g.needs]));
    expect(after.values.map((v) => v.key)).toEqual(generate(liquid).values.map((v) => v.key));
    const back = applyEdit(after, edit(liquid, before));
    expect(shown(back)).toEqual(asked(before));
  });

  it("wait for an inspector, keep what was changed by hand, and give every item that uses them a new revision", () => {
    const b = whole();
    const own = b.s.items.find((i) => i.key === "MF1") as Item;
    own.words = "Our own words.";
    b.proof("MF2");
    expect(classOf(b.s, edit(before, liquid))).toBe("waits");
    const after = applyEdit(b.s, edit(before, liquid));
    expect(item(after, "MF1")).toMatchObject({ words: "Our own words.", revision: 1 });
    const noLever = applyEdit(b.s, edit(before, { ...before, mixctl: false }));
    const named = (key: string) => {
      const row = TEMPLATE.items.find((i) => i.key === key);
      const whole = TEMPLATE.gates.find((g) => g.key === row?.key.replace(/\d+$/, ""))?.when;
      return /\bmixctl\b/.test(
        [whole, row?.when, ...(row?.parts ?? []).map((p) => p.when), ...(row?.wordsWhen ?? []).map(([w]) => w)].join(" "),
      );
    };
    const raised = noLever.items.filter((i) => i.revision > 1).map((i) => i.key);
    expect(raised.length).toBeGreaterThan(0);
    expect(raised).toEqual(b.s.items.map((i) => i.key).filter(named));
    const gone = noLever.items.filter((i) => i.hidden).map((i) => i.key);
    expect(gone).toEqual(
      b.s.items.map((i) => i.key).filter((key) => !generate({ ...before, mixctl: false }).items.some((i) => i.key === key)),
    );
    expect(gone.length).toBeGreaterThan(0);
  });

  it("are refused where somebody changed them since", () => {
    const { s } = whole();
    expect(classifyEdit({ ...s, traits: { ...before, lithium: true } }, edit(before, liquid))).toMatchObject({ ok: false, code: "stale" });
  });
});
