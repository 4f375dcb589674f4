/**
 * An edit taken apart into its single changes, each with whether it asks for more, for less, or for the same in other words. Pure.
 */
import type { Edit, GateFields, ItemFields } from "#app/lib/gates/edits";
import { type Change, partChanges } from "#app/lib/gates/part-changes";
import type { Gate, Item, Snapshot } from "#app/lib/gates/snapshot";
import { keysThatCome, withTraits } from "#app/lib/gates/trait-edit";
import { count } from "#app/lib/gates/who";
import { SYSTEM_NAMES } from "#app/lib/template/systems";
import type { RequiredBy, SignPolicy, SystemKey, Validity } from "#app/lib/template/types";
import type { UnitSystem } from "#app/lib/units/display";

const more = (says: string): Change => ({ weight: "more", says });
const less = (says: string): Change => ({ weight: "less", says });
const words = (says: string): Change => ({ weight: "words", says });

/** @param edit fits the snapshot. @param units for bands in words. @returns at least one change. */
export function changesOf(s: Snapshot, edit: Edit, units: UnitSystem = "si"): Change[] {
  switch (edit.kind) {
    case "add-gate":
      return [more(`A new gate: ${edit.to.name}`)];
    case "add-item":
      return [more(`A new item in ${gateName(s, edit.gate)}: ${edit.to.words}`)];
    case "change-gate": {
      const gate = s.gates.find((g) => g.id === edit.id);
      return gate ? gateChanges(s, gate, edit.to) : [];
    }
    case "change-item": {
      const item = s.items.find((i) => i.id === edit.id);
      return item ? itemChanges(s, item, edit.to, units) : [];
    }
    case "hide":
      return [less(`Not asked any more: ${nameOfSubject(s, edit.subject)}`)];
    case "show":
      return [more(`Asked again: ${nameOfSubject(s, edit.subject)}`)];
    case "move":
      return [{ weight: "order", says: `${nameOfSubject(s, edit.subject)} one place ${edit.by < 0 ? "up" : "down"}` }];
    case "traits":
      return traitChanges(s, edit);
  }
}

const gateName = (s: Snapshot, id: string): string => s.gates.find((g) => g.id === id)?.name ?? "a gate that is not here";
const itemName = (i: Item): string => `${i.key} “${i.words.replace(/\.$/, "")}”`;
const itemNameOf = (s: Snapshot, id: string): string => {
  const item = s.items.find((i) => i.id === id);
  return item ? itemName(item) : "an item that is not here";
};

/** "FP3 “Purge the supply line”" or the gate's name. */
export const nameOfSubject = (s: Snapshot, { kind, id }: { kind: "gate" | "item"; id: string }): string =>
  kind === "gate" ? gateName(s, id) : itemNameOf(s, id);

/** What stands in the first list and not in the second. */
const without = <T>(list: T[], other: T[]): T[] => list.filter((x) => !other.includes(x));

function gateChanges(s: Snapshot, gate: Gate, to: Partial<GateFields>): Change[] {
  const list: Change[] = [];
  if (to.name !== undefined) list.push(words(`Called “${to.name}” in place of “${gate.name}”`));
  if (to.short !== undefined) list.push(words(`“${to.short}” on the Line in place of “${gate.short}”`));
  if (to.caution !== undefined) list.push(cautionChange(gate.caution, to.caution));
  for (const [kind, verb] of [
    ["needs", "Needs"],
    ["after", "Comes after"],
  ] as const) {
    const ids = to[kind];
    if (!ids) continue;
    for (const id of without(ids, gate[kind])) list.push(more(`${verb} ${gateName(s, id)}`));
    for (const id of without(gate[kind], ids)) list.push(less(`${verb} ${gateName(s, id)} no longer`));
  }
  if (to.requiredBy !== undefined) list.push(less(`Required by ${requiredWords(to.requiredBy)}, was ${requiredWords(gate.requiredBy)}`));
  if (to.policy !== undefined) list.push(less(`Signed by ${policyWords(to.policy)}, was ${policyWords(gate.policy)}`));
  if (to.validity !== undefined) list.push(...validityChanges(gate.validity, to.validity));
  return list;
}

function itemChanges(s: Snapshot, item: Item, to: Partial<ItemFields>, units: UnitSystem): Change[] {
  const list: Change[] = [];
  if (to.words !== undefined) list.push(words(`“${to.words}” in place of “${item.words}”`));
  if (to.caution !== undefined) list.push(cautionChange(item.caution, to.caution));
  if (to.killer !== undefined) list.push(less(to.killer ? "Marked as guarding a life" : "No longer marked as guarding a life"));
  if (to.guarded !== undefined)
    list.push(less(to.guarded ? "Not before the gates in front of it stand" : "May be done before the gates in front of it stand"));
  if (to.secondEyes !== undefined)
    list.push(to.secondEyes ? more("Wants a second pair of eyes") : less("Wants no second pair of eyes any more"));
  if (to.systems !== undefined) {
    const [come, go] = [without(to.systems, item.systems), without(item.systems, to.systems)];
    if (come.length) list.push(more(`Belongs also to: ${systemWords(come)}`));
    if (go.length) list.push(less(`Belongs no longer to: ${systemWords(go)}`));
  }
  if (to.parts !== undefined) list.push(...partChanges(item.parts, to.parts, units));
  if (to.follows !== undefined) {
    for (const id of without(to.follows, item.follows)) list.push(more(`Follows ${itemNameOf(s, id)}`));
    for (const id of without(item.follows, to.follows)) list.push(less(`Follows ${itemNameOf(s, id)} no longer`));
  }
  if (to.validity !== undefined) {
    const ofGate = s.gates.find((g) => g.id === item.gate)?.validity ?? null;
    list.push(...validityChanges(item.validity ?? ofGate, to.validity ?? ofGate));
  }
  return list;
}

const systemWords = (systems: SystemKey[]): string => systems.map((k) => SYSTEM_NAMES[k]).join("; ");

function cautionChange(was: string | null, is: string | null): Change {
  if (was === null) return more(`A caution: ${is}`);
  return is === null ? less(`Without the caution “${was}”`) : words(`Caution “${is}” in place of “${was}”`);
}

/** Hours of null never end. Whether a run renews a proof or cuts it short depends on when it ran, so a change of that kind counts as wider. */
function validityChanges(was: Validity | null, is: Validity | null): Change[] {
  const [a, b] = [was ?? NEVER, is ?? NEVER];
  const wider =
    (b.hours ?? Infinity) > (a.hours ?? Infinity) ||
    (a.afterRunHours === null) !== (b.afterRunHours === null) ||
    (b.afterRunHours ?? 0) > (a.afterRunHours ?? 0);
  const says = `Holds ${validityWords(is)}, was ${validityWords(was)}`;
  return [wider ? less(says) : more(says)];
}
const NEVER: Validity = { hours: null, afterRunHours: null };

export function validityWords(v: Validity | null): string {
  if (!v || (v.hours === null && v.afterRunHours === null)) return "without an end";
  const first = v.hours === null ? "without an end" : `${v.hours} h`;
  return v.afterRunHours === null ? first : `${first}, ${v.afterRunHours} h from the end of a run`;
}

export function requiredWords(by: RequiredBy): string {
  switch (by.kind) {
    case "runs-and-release":
      return "runs and release";
    case "runs":
      return "runs";
    case "release":
      return "the release alone";
    default:
      return `run ${by.rung} and the release`;
  }
}

export const policyWords = (policy: SignPolicy): string => policy.map((roles) => roles.join(" or ")).join(", then ") || "nobody";

function traitChanges(s: Snapshot, edit: Extract<Edit, { kind: "traits" }>): Change[] {
  const after = withTraits(s, edit.to, edit.ids);
  const come = new Set(keysThatCome(s, edit.to));
  const was = new Map(s.items.map((i) => [i.id, i]));
  const list: Change[] = [];
  for (const item of after.items) {
    const old = was.get(item.id);
    if (!old ? come.has(item.key) : old.hidden && !item.hidden) list.push(more(`Comes: ${itemName(item)}`));
    else if (old && !old.hidden && item.hidden) list.push(less(`Goes: ${itemName(item)}`));
  }
  const anew = after.items.filter((i) => !i.hidden && (was.get(i.id)?.revision ?? i.revision) < i.revision && !was.get(i.id)?.hidden);
  if (anew.length) list.push(less(`${count(anew.length, "item says", "items say")} something new: ${anew.map((i) => i.key).join(", ")}`));
  return list.length ? list : [less("Nothing on the board changes; the bench takes the new answers")];
}
