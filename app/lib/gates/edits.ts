/**
 * Edits of an install's board as plain data: what is to change, and what stood there before. They are stored as they are, so that an
 * edit that waits can be judged again, and refused when the board has moved on.
 */

import type { Gate, Item, Snapshot } from "#app/lib/gates/snapshot";
import { same } from "#app/lib/template/carry-over";
import { CARD_GATES } from "#app/lib/template/template";
import type { Traits } from "#app/lib/template/types";

export type GateFields = Pick<Gate, "name" | "short" | "needs" | "after" | "requiredBy" | "validity" | "policy" | "caution">;
export type ItemFields = Pick<
  Item,
  "words" | "killer" | "secondEyes" | "guarded" | "systems" | "parts" | "follows" | "validity" | "caution"
>;

/** A gate or an item, by id. */
export interface EditSubject {
  kind: "gate" | "item";
  id: string;
}

/** `from` has the same fields as `to`: those that change, as they were when the edit was made. */
export type Edit =
  /** `before`: the gate in front of which it stands; null = at the end. */
  | { kind: "add-gate"; id: string; key: string; to: GateFields; before: string | null }
  | { kind: "add-item"; id: string; key: string; gate: string; to: ItemFields }
  | { kind: "change-gate"; id: string; from: Partial<GateFields>; to: Partial<GateFields> }
  | { kind: "change-item"; id: string; from: Partial<ItemFields>; to: Partial<ItemFields> }
  | { kind: "hide" | "show"; subject: EditSubject }
  /** One place up (-1) or down (1) among those that are shown. */
  | { kind: "move"; subject: EditSubject; by: -1 | 1 }
  /** `ids`: for each key that was never on this board. */
  | { kind: "traits"; from: Traits; to: Traits; ids: Record<string, string> };

export const gateFields = ({ name, short, needs, after, requiredBy, validity, policy, caution }: Gate): GateFields => ({
  ...{ name, short, needs, after, requiredBy, validity, policy, caution },
});
export const itemFields = ({ words, killer, secondEyes, guarded, systems, parts, follows, validity, caution }: Item): ItemFields => ({
  ...{ words, killer, secondEyes, guarded, systems, parts, follows, validity, caution },
});

/** Only the fields in which the two differ; null where they are the same. Lists of ids are the same in any order. */
function differences<T extends object>(from: T, to: T): { from: Partial<T>; to: Partial<T> } | null {
  const keys = (Object.keys(to) as (keyof T)[]).filter((k) => !same(unordered(k, from[k]), unordered(k, to[k])));
  if (!keys.length) return null;
  const pick = (all: T) => Object.fromEntries(keys.map((k) => [k, all[k]])) as Partial<T>;
  return { from: pick(from), to: pick(to) };
}
const SETS = new Set<PropertyKey>(["needs", "after", "systems", "follows"]);
const unordered = (key: PropertyKey, list: unknown): unknown => (SETS.has(key) && Array.isArray(list) ? [...list].sort() : list);

/** @returns the edit that makes this gate so; null where it is so already. */
export function gateEdit(gate: Gate, to: GateFields): Edit | null {
  const changed = differences(gateFields(gate), to);
  return changed && { kind: "change-gate", id: gate.id, ...changed };
}

/** @returns the edit that makes this item so; null where it is so already. */
export function itemEdit(item: Item, to: ItemFields): Edit | null {
  const changed = differences(itemFields(item), to);
  return changed && { kind: "change-item", id: item.id, ...changed };
}

/** Whether what the edit found is still so. Records of the order of a list have no such thing. */
export function isStale(snapshot: Snapshot, edit: Edit): boolean {
  if (edit.kind === "change-gate")
    return !matches(
      snapshot.gates.find((g) => g.id === edit.id),
      edit.from,
    );
  if (edit.kind === "change-item")
    return !matches(
      snapshot.items.find((i) => i.id === edit.id),
      edit.from,
    );
  return edit.kind === "traits" && !same(snapshot.traits, edit.from);
}
const matches = (row: object | undefined, from: object): boolean =>
  row !== undefined && Object.entries(from).every(([k, was]) => same((row as Record<string, unknown>)[k], was));

/** What the edit is about; null = the whole board. */
export function subjectOf(edit: Edit): EditSubject | null {
  switch (edit.kind) {
    case "add-gate":
    case "change-gate":
      return { kind: "gate", id: edit.id };
    case "add-item":
    case "change-item":
      return { kind: "item", id: edit.id };
    case "traits":
      return null;
    default:
      return edit.subject;
  }
}

/** Killer items of the gates of the run day are printed on the run card. */
export const isOnCard = (killer: boolean, gateKey: string): boolean => killer && CARD_GATES.includes(gateKey);

/** Items that people add are numbered above this; the template's numbers stay far below. */
export const OWN_ITEMS_AFTER = 50;
