import fc from "fast-check";
import { expect, test, vi } from "vitest";
import { applyEdit } from "#app/lib/gates/apply-edit";
import { classifyEdit } from "#app/lib/gates/edit-verdicts";
import { type Edit, gateEdit, gateFields, type ItemFields, itemEdit, itemFields } from "#app/lib/gates/edits";
import { evaluateBoard } from "#app/lib/gates/evaluate";
import type { BoardResult } from "#app/lib/gates/result";
import type { Gate, Item, Snapshot } from "#app/lib/gates/snapshot";
import { makeScene, SOME_SYSTEMS } from "./support/arb-snapshot";
import { type Dice, diceFrom } from "./support/dice";
import { measure, tick, torque } from "./support/parts";
import { runsOf } from "./support/property-runs";

vi.setConfig({ testTimeout: 60_000 });

const HOURS = [null, 4, 12, 24, 336];
const validity = (dice: Dice) => dice.one([null, { hours: dice.one(HOURS), afterRunHours: dice.one(HOURS) }]);
const band = (dice: Dice) => measure(dice.one([null, 1, 5, 8, 12]), dice.one([null, 12, 15, 20]));

function itemChange(dice: Dice, s: Snapshot, item: Item): Partial<ItemFields> {
  const peers = s.items.filter((i) => i.gate === item.gate && i.id !== item.id);
  return dice.one<() => Partial<ItemFields>>([
    () => ({ words: `${item.words} again` }),
    () => ({ secondEyes: !item.secondEyes }),
    () => ({ guarded: !item.guarded }),
    () => ({ systems: dice.some(SOME_SYSTEMS, 50) }),
    () => ({ validity: validity(dice) }),
    () => ({ caution: dice.one([null, "Mind it."]) }),
    () => ({ follows: dice.some(peers, 40).map((i) => i.id) }),
    () => ({ parts: [...item.parts, dice.one([tick, band(dice), torque()])] }),
    () => ({ parts: item.parts.map((p) => (p.kind === "measure" ? band(dice) : p)) }),
    () => ({ parts: [dice.one([tick, band(dice), torque()])] }),
  ])();
}

function gateChange(dice: Dice, s: Snapshot, gate: Gate): Partial<Gate> {
  const others = s.gates.filter((g) => g.id !== gate.id).map((g) => g.id);
  return dice.one<() => Partial<Gate>>([
    () => ({ name: `${gate.name} again` }),
    () => ({ needs: dice.some(others, 30) }),
    () => ({ after: dice.some(others, 30) }),
    () => ({ needs: [...gate.needs, ...dice.some(others, 20)] }),
    () => ({ validity: validity(dice) }),
    () => ({ policy: [["builder"]] }),
    () => ({ requiredBy: { kind: "runs" } }),
  ])();
}

/** Any edit at all; null where it changes nothing. */
function someEdit(dice: Dice, s: Snapshot): Edit | null {
  const [item, gate] = [dice.one(s.items), dice.one(s.gates)];
  const subject = dice.one([{ kind: "item", id: item.id } as const, { kind: "gate", id: gate.id } as const]);
  const fresh = { ...itemFields(item), follows: [], parts: [dice.one([tick, band(dice)])] };
  return dice.one<() => Edit | null>([
    () => itemEdit(item, { ...itemFields(item), ...itemChange(dice, s, item) }),
    () => itemEdit(item, { ...itemFields(item), ...itemChange(dice, s, item) }),
    () => gateEdit(gate, { ...gateFields(gate), ...gateChange(dice, s, gate) }),
    () => ({ kind: dice.one(["hide", "show"]), subject }),
    () => ({ kind: "move", subject, by: dice.one([-1, 1]) }),
    () => ({ kind: "add-item", id: "new-item", key: `${gate.key}51`, gate: gate.id, to: fresh }),
    () => ({
      kind: "add-gate",
      id: "new-gate",
      key: "QZ",
      before: gate.id,
      to: { ...gateFields(gate), needs: dice.some(s.gates, 20).map((g) => g.id) },
    }),
  ])();
}

function standings(board: BoardResult): Map<string, { stands: boolean; until: number | null; cap: number }> {
  const runs = board.runs.flatMap((r) =>
    r.id ? [[`run ${r.id}`, { stands: r.clear, until: r.until, cap: r.clearance.rpm }] as const] : [],
  );
  const row = (x: { stands: boolean; until: number | null }) => ({ stands: x.stands, until: x.until, cap: 0 });
  return new Map([
    ...Object.values(board.items).map((i) => [`item ${i.id}`, row(i)] as const),
    ...Object.values(board.gates).map((g) => [`gate ${g.id}`, row(g)] as const),
    ...runs,
    ["release", row(board.release)],
  ]);
}

/** What stands, holds longer or is cleared higher than before. */
function better(before: BoardResult, after: BoardResult): string[] {
  const was = standings(before);
  return [...standings(after)].flatMap(([name, now]) => {
    const then = was.get(name);
    if (!then) return [];
    if (now.cap > then.cap) return [`${name} is cleared higher`];
    if (!now.stands) return [];
    if (!then.stands) return [`${name} newly stands`];
    return (now.until ?? Infinity) > (then.until ?? Infinity) ? [`${name} stands longer`] : [];
  });
}

const edited = (g: fc.GeneratorValue) => {
  const dice = diceFrom(g);
  const { snapshot, at } = makeScene(dice);
  const edit = someEdit(dice, snapshot);
  const judged = edit && classifyEdit(snapshot, edit);
  return judged?.ok && edit ? { snapshot, at, edit, judged } : null;
};

test("an edit that counts at once never makes anything newly stand, stand longer, or clears higher", () => {
  let counted = 0;
  fc.assert(
    fc.property(fc.gen(), (g) => {
      const one = edited(g);
      if (one?.judged.class !== "at once") return;
      counted++;
      const after = evaluateBoard(applyEdit(one.snapshot, one.edit), one.at);
      expect(better(evaluateBoard(one.snapshot, one.at), after), JSON.stringify(one.edit)).toEqual([]);
    }),
    runsOf(4_000),
  );
  expect(counted).toBeGreaterThan(0);
});

test("words accepted as words only change nothing that stands, and no edit changes the snapshot that it was given", () => {
  let counted = 0;
  fc.assert(
    fc.property(fc.gen(), (g) => {
      const one = edited(g);
      if (!one) return;
      const copy = structuredClone(one.snapshot);
      applyEdit(one.snapshot, one.edit);
      expect(one.snapshot).toEqual(copy);
      if (!one.judged.wordsOnly) return;
      counted++;
      const after = evaluateBoard(applyEdit(one.snapshot, one.edit, true), one.at);
      expect(standings(after)).toEqual(standings(evaluateBoard(one.snapshot, one.at)));
    }),
    runsOf(1_500),
  );
  expect(counted).toBeGreaterThan(0);
});
