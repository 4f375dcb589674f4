/**
 * A board for other answers about the install: what the template then asks for comes, what it no longer asks for is hidden, and what
 * people changed by hand stays. Post-run gates of runs that were started keep their definition.
 */
import { traitInputs } from "#app/lib/bench/sheet";
import type { Gate, Item, Rung, Snapshot } from "#app/lib/gates/snapshot";
import { carryOver, same } from "#app/lib/template/carry-over";
import { generate } from "#app/lib/template/generate";
import { changedWords, itemsUsing } from "#app/lib/template/trait-use";
import type { GateDef, GeneratedBoard, ItemDef, Part, Traits, ValueKey } from "#app/lib/template/types";

type Ids = Readonly<Record<string, string>>;

/** What the template says for the present answers and for others, with the values of the install as they are. */
export function boardsOf(s: Snapshot, to: Traits): { before: GeneratedBoard; after: GeneratedBoard } {
  const known: Partial<Record<ValueKey, number>> = Object.fromEntries(
    s.values.flatMap((v) => (v.value === null ? [] : [[v.key, v.value]])),
  );
  return { before: generate(s.traits, known), after: generate(to, known) };
}

const isOfRun = (s: Snapshot): ((gate: string) => boolean) => {
  const ids = new Set(s.gates.filter((g) => g.lookBack?.kind === "run").map((g) => g.id));
  return (gate) => ids.has(gate);
};

/** Keys of gates and items that come and were never on this board: each needs an id. */
export function keysThatCome(s: Snapshot, to: Traits): string[] {
  const { after } = boardsOf(s, to);
  const known = new Set([...s.gates, ...s.items].map((x) => x.key));
  return [...after.gates, ...after.items].flatMap((def) => (known.has(def.key) ? [] : [def.key]));
}

/** @param ids by key, for what was never on this board. */
export function withTraits(s: Snapshot, to: Traits, ids: Ids): Snapshot {
  const { before, after } = boardsOf(s, to);
  const gateIds: Ids = { ...ids, ...Object.fromEntries(s.gates.map((g) => [g.key, g.id])) };
  const ofRun = isOfRun(s);
  const itemIds: Ids = { ...ids, ...Object.fromEntries(s.items.flatMap((i) => (ofRun(i.gate) ? [] : [[i.key, i.id]]))) };
  return {
    ...s,
    traits: to,
    gates: gatesNow(s, before, after, gateIds),
    items: itemsNow(s, before, after, { gateIds, itemIds, to }),
    values: valuesNow(s, before, after),
    rungs: rungsNow(s, before, after),
  };
}

/** The stored list with what came into the template's and without what went from it. */
function mergeSet<T>(before: T[], after: T[], stored: T[]): T[] {
  const kept = stored.filter((x) => after.includes(x) || !before.includes(x));
  return [...kept, ...after.filter((x) => !before.includes(x) && !kept.includes(x))];
}
const idsOf = (ids: Ids, keys: string[]): string[] => keys.flatMap((key) => ids[key] ?? []);

function gatesNow(s: Snapshot, before: GeneratedBoard, after: GeneratedBoard, ids: Ids): Gate[] {
  const was = new Map(before.gates.map((g) => [g.key, g]));
  const is = new Map(after.gates.map((g) => [g.key, g]));
  const fromDef = ({ needs, after: later, lookBack, ...rest }: GateDef) => ({
    ...rest,
    lookBack: lookBack?.kind === "rung" ? lookBack : null,
    needs: idsOf(ids, needs),
    after: idsOf(ids, later),
  });
  const list = s.gates.map((gate): Gate => {
    const [old, def] = [was.get(gate.key), is.get(gate.key)];
    if (old && !def) return { ...gate, hidden: true, revision: gate.revision + 1 };
    if (!old && def) return { ...gate, ...fromDef(def), hidden: false, revision: gate.revision + 1 };
    if (!old || !def) return gate;
    const [a, b] = [fromDef(old), fromDef(def)];
    const next = {
      ...gate,
      ...carryOver({ ...a, needs: [], after: [] }, { ...b, needs: [], after: [] }, { ...defOfGate(gate), needs: [], after: [] }),
      needs: mergeSet(a.needs, b.needs, gate.needs),
      after: mergeSet(a.after, b.after, gate.after),
    };
    return same(next, gate) ? gate : { ...next, revision: gate.revision + 1 };
  });
  const known = new Set(s.gates.map((g) => g.key));
  for (const [n, def] of after.gates.entries()) {
    if (known.has(def.key)) continue;
    const id = ids[def.key];
    if (id === undefined) throw new Error(`No id for ${def.key}`);
    const before = after.gates.slice(0, n).map((g) => g.key);
    const at = list.findLastIndex((g) => before.includes(g.key)) + 1;
    list.splice(at, 0, { ...fromDef(def), id, revision: 1, hidden: false });
  }
  return list;
}

const defOfGate = ({ id: _, revision: __, hidden: ___, lookBack, ...def }: Gate) => ({
  ...def,
  lookBack: lookBack?.kind === "rung" ? lookBack : null,
});
const defOfItem = ({ id: _, gate: __, revision: ___, hidden: ____, ...def }: Item) => def;

interface ItemContext {
  gateIds: Ids;
  itemIds: Ids;
  to: Traits;
}

function itemsNow(s: Snapshot, before: GeneratedBoard, after: GeneratedBoard, { gateIds, itemIds, to }: ItemContext): Item[] {
  const ofRun = isOfRun(s);
  const was = new Map(before.items.map((i) => [i.key, i]));
  const is = new Map(after.items.map((i) => [i.key, i]));
  const using = itemsUsing(changedWords(s.traits, to));
  const uses = (item: Item): boolean =>
    using.has(item.key) || item.parts.some((p) => p.kind === "sheet" && !same(traitInputs(p.sheet, s.traits), traitInputs(p.sheet, to)));
  const withIds = (part: Part): Part =>
    part.kind === "tally" && part.of !== undefined ? { ...part, of: itemIds[part.of] ?? part.of } : part;
  const fromDef = ({ gate: _, runs: __, follows, step, parts, ...rest }: ItemDef) => ({
    ...rest,
    parts: parts.map(withIds),
    follows: idsOf(itemIds, follows),
    step: step && { endedBy: step.endedBy === null ? null : (itemIds[step.endedBy] ?? null) },
  });
  const list = s.items.map((item): Item => {
    if (ofRun(item.gate)) return item;
    const [old, def] = [was.get(item.key), is.get(item.key)];
    if (old && !def) return { ...item, hidden: true, revision: item.revision + 1 };
    if (!old && def) return { ...item, ...fromDef(def), hidden: false, revision: item.revision + 1 };
    if (!old || !def) return item;
    const [a, b] = [fromDef(old), fromDef(def)];
    const next = {
      ...item,
      ...carryOver(
        { ...a, follows: [], systems: [] },
        { ...b, follows: [], systems: [] },
        { ...defOfItem(item), follows: [], systems: [] },
      ),
      follows: mergeSet(a.follows, b.follows, item.follows),
      systems: mergeSet(a.systems, b.systems, item.systems),
    };
    return same(next, item) && !uses(item) ? item : { ...next, revision: item.revision + 1 };
  });
  const known = new Set(s.items.flatMap((i) => (ofRun(i.gate) ? [] : [i.key])));
  for (const def of after.items) {
    if (known.has(def.key)) continue;
    const [id, gate] = [itemIds[def.key], gateIds[def.gate]];
    if (id === undefined || gate === undefined) throw new Error(`No id for ${def.key}`);
    const order = after.items.filter((i) => i.gate === def.gate).map((i) => i.key);
    const earlier = order.slice(0, order.indexOf(def.key));
    const own = list.findLastIndex((i) => i.gate === gate && earlier.includes(i.key));
    const first = list.findIndex((i) => i.gate === gate);
    const at = own >= 0 ? own + 1 : first >= 0 ? first : list.length;
    list.splice(at, 0, { ...fromDef(def), id, gate, revision: 1, hidden: false });
  }
  return list;
}

/** Ratings and limits that come stand at their starting points, not confirmed; those that go are asked of nobody. */
function valuesNow(s: Snapshot, before: GeneratedBoard, after: GeneratedBoard): Snapshot["values"] {
  const was = new Map(before.values.map((v) => [v.key, v]));
  const stored = new Map(s.values.map((v) => [v.key, v]));
  return after.values.map((def) => {
    const [old, row] = [was.get(def.key), stored.get(def.key)];
    if (!row) return { ...def, value: def.preset, source: null };
    if (!old) return row;
    const { value, source, ...own } = row;
    return { ...carryOver(old, def, own), value, source };
  });
}

/** A rung of which a run was planned stays, whatever the answers. */
function rungsNow(s: Snapshot, before: GeneratedBoard, after: GeneratedBoard): Rung[] {
  const was = new Map(before.rungs.map((r) => [r.key, r]));
  const is = new Map(after.rungs.map((r) => [r.key, r]));
  const stays = (r: Rung) => is.has(r.key) || !was.has(r.key) || s.runs.some((run) => run.rung === r.key);
  const kept = s.rungs.filter(stays).map((rung): Rung => {
    const [old, def] = [was.get(rung.key), is.get(rung.key)];
    return old && def ? { ...rung, ...carryOver(old, def, { ...pickRung(rung) }) } : rung;
  });
  for (const [n, def] of after.rungs.entries()) {
    if (kept.some((r) => r.key === def.key)) continue;
    const earlier = after.rungs.slice(0, n).map((r) => r.key);
    const at = kept.findLastIndex((r) => earlier.includes(r.key)) + 1;
    kept.splice(at, 0, { ...def, order: 0, leftOut: null, setBack: [] });
  }
  return kept.map((rung, order) => ({ ...rung, order }));
}
const pickRung = ({ key, name, rpm, share, card, crew }: Rung) => ({ key, name, rpm, share, card, crew });
