import { describe, expect, it } from "vitest";
import { gateEdit, itemEdit } from "#app/lib/gates/edits";
import { evaluate } from "#app/lib/gates/evaluate";
import type { Item } from "#app/lib/gates/snapshot";
import { readGateForm, readItemForm } from "#app/lib/schemas/edit-forms";
import { generate } from "#app/lib/template/generate";
import { gateFormView } from "#app/lib/views/edit-gate";
import { type ItemFormView, itemFormView } from "#app/lib/views/edit-item";
import { Board } from "./support/board";

/** The template's board for the plain install; keys are its ids. */
function whole() {
  const b = new Board().cast();
  const board = generate(b.s.traits, { cylinders: 4, ratedRpm: 45 });
  b.s.gates = board.gates.map((g) => ({
    ...g,
    id: g.key,
    revision: 1,
    hidden: false,
    lookBack: g.lookBack?.kind === "rung" ? g.lookBack : null,
  }));
  b.s.items = board.items.map((i) => ({ ...i, id: i.key, revision: 1, hidden: false }));
  b.s.values = board.values.map((v) => ({ ...v, value: v.preset, source: null }));
  return evaluate(b.s, b.now);
}
const e = whole();
const me = { id: "la", roles: ["lead" as const] };

/** The form as it comes back when nobody has changed it. */
function untouched(view: ItemFormView): Record<string, string> {
  const form: Record<string, string> = { words: view.words, caution: view.caution, hours: view.hours, afterRun: view.afterRun };
  for (const mark of ["killer", "secondEyes", "guarded"] as const) if (view[mark]) form[mark] = "yes";
  for (const s of view.systems) if (s.on) form[`sys.${s.key}`] = "yes";
  for (const f of view.follows) if (f.on) form[`follow.${f.id}`] = "yes";
  for (const p of view.parts) {
    if (p.label !== null) form[`p${p.n}.label`] = p.label;
    if (p.band) Object.assign(form, { [`p${p.n}.min`]: p.band.min, [`p${p.n}.max`]: p.band.max, [`p${p.n}.source`]: p.band.source });
    if (p.count !== null) form[`p${p.n}.count`] = p.count;
    if (p.optional) form[`p${p.n}.optional`] = "yes";
  }
  return form;
}
const of = (key: string) => e.snapshot.items.find((i) => i.id === key) as Item;
function read(item: Item | null, change: Record<string, string> = {}, units: "si" | "us" = "si") {
  const view = itemFormView(e, me, item, item?.gate ?? "MF", units) as ItemFormView;
  const form = { ...untouched(view), ...change };
  return readItemForm(
    (name) => form[name] ?? "",
    item,
    view.follows.map((f) => f.id),
    units,
  );
}
const edit = (key: string, change: Record<string, string>, units: "si" | "us" = "si") => {
  const got = read(of(key), change, units);
  return got.ok ? itemEdit(of(key), got.value) : got.errors;
};

describe("the board editor's forms", () => {
  it.each(["si", "us"] as const)("change nothing where nothing was changed, whatever the item or gate, in %s", (units) => {
    for (const item of e.snapshot.items) {
      const got = read(item, {}, units);
      expect([item.key, got.ok ? itemEdit(item, got.value) : got.errors]).toEqual([item.key, null]);
    }
    for (const gate of e.snapshot.gates) {
      const view = gateFormView(e, me, gate);
      const form: Record<string, string> = { ...view, sign1: view.places[0], sign2: view.places[1], sign3: view.places[2] } as never;
      for (const edge of view.edges) form[`edge.${edge.id}`] = edge.now;
      const got = readGateForm(
        (name) => String(form[name] ?? ""),
        gate,
        view.edges.map((x) => x.id),
      );
      expect([gate.key, got.ok ? gateEdit(gate, got.value) : got.errors]).toEqual([gate.key, null]);
    }
  });

  it("read a band in the person's own units, and want to know where it was read", () => {
    const torque = e.snapshot.items.find((i) => i.parts[0]?.kind === "torque") as Item;
    expect(edit(torque.key, { "p0.min": "100" }, "us")).toEqual({ "p0.source": [expect.stringContaining("Say where")] });
    const made = edit(torque.key, { "p0.min": "100", "p0.max": "120", "p0.source": "manual p. 4" }, "us");
    // 1 in-lb = 0.112984829 N·m: NIST SP 811, appendix B.8.
    const part = made && "kind" in made && made.kind === "change-item" ? made.to.parts?.[0] : null;
    expect(part).toMatchObject({
      criterion: { source: "manual p. 4", band: { min: expect.closeTo(11.2985, 3), max: expect.closeTo(13.5582, 3) } },
    });
    expect(edit(torque.key, { "p0.min": "20", "p0.max": "10", "p0.source": "manual p. 4" })).toMatchObject({
      "p0.min": [expect.stringContaining("above the most")],
    });
    expect(edit(torque.key, { "p0.min": "a lot", "p0.source": "manual" })).toMatchObject({
      "p0.min": [expect.stringContaining("is not a number")],
    });
  });

  it("take a part away, add one, and say what is missing", () => {
    const item = e.snapshot.items.find((i) => i.parts.length === 1 && i.parts[0]?.kind === "tick") as Item;
    expect(edit(item.key, { "new.kind": "photo", "new.label": "The joint" })).toMatchObject({
      to: { parts: [item.parts[0], { kind: "photo", of: "The joint", optional: false }] },
    });
    expect(edit(item.key, { "new.kind": "measure" })).toMatchObject({
      "new.label": [expect.any(String)],
      "new.quantity": [expect.any(String)],
    });
    expect(edit(item.key, { "p0.drop": "yes" })).toMatchObject({ to: { parts: [] } });
    expect(edit(item.key, { words: "" })).toMatchObject({ words: [expect.stringContaining("Say what")] });
    expect(edit(item.key, { hours: "soon" })).toMatchObject({ hours: [expect.stringContaining("Enter hours")] });
  });
});
