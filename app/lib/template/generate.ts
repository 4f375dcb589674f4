/**
 * From the traits of an install to its board: which gates and items it has, what each asks for, the ladder of runs.
 * The same traits and values always give the same board.
 */
import { applies, whyNot } from "#app/lib/template/condition";
import { BUILDER_INSPECTOR, BUILDER_LEAD, type GateRow, INSPECTOR_RUNGS } from "#app/lib/template/gates";
import { type PartContext, toPart } from "#app/lib/template/parts";
import { POSITIONS } from "#app/lib/template/positions";
import type { ItemRow } from "#app/lib/template/rows";
import { rungsOf, type Values } from "#app/lib/template/runs";
import { CARD_GATES, gateOf, TEMPLATE } from "#app/lib/template/template";
import { type TraitWord, traitWords } from "#app/lib/template/trait-words";
import type { GateDef, GeneratedBoard, ItemDef, Traits } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { TEMPLATE_VERSION } from "#app/lib/template/version";

type Words = ReadonlySet<TraitWord>;

/** Conditions that an item stands under: its gate's, then its own. */
function conditionsOf(row: ItemRow, gates: ReadonlyMap<string, GateRow>): string[] {
  return [gates.get(gateOf(row.key))?.when, row.when].filter((when) => when !== undefined);
}

function wordsOf(row: ItemRow, words: Words): string {
  return row.wordsWhen.find(([when]) => applies(when, words))?.[1] ?? row.words;
}

function toItem(row: ItemRow, onBoard: ReadonlySet<string>, words: Words, context: PartContext): ItemDef {
  const gate = gateOf(row.key);
  const ending = row.step?.endedBy ?? null;
  const everyRun = row.runs?.unless !== undefined && applies(row.runs.unless, words);
  return {
    key: row.key,
    gate,
    words: wordsOf(row, words),
    killer: row.killer,
    secondEyes: row.secondEyes,
    guarded: row.guarded,
    onCard: row.killer && CARD_GATES.includes(gate),
    systems: row.systems,
    parts: row.parts.filter((part) => applies(part.when, words)).map((part) => toPart(part, context)),
    follows: row.follows.filter((key) => onBoard.has(key)),
    step: row.step ? { endedBy: ending !== null && onBoard.has(ending) ? ending : null } : null,
    validity: null,
    caution: row.caution,
    offersLooseEnd: row.offersLooseEnd,
    runs: row.runs === null || everyRun ? null : row.runs.rungs,
    ...(row.source === undefined ? {} : { source: row.source }),
  };
}

/** Edges of a gate on this board: those to a gate that vanished pass to what that gate needs. */
function edges(keys: string[], gates: ReadonlyMap<string, GateRow>, onBoard: ReadonlySet<string>, words: Words): string[] {
  const found = keys.flatMap((key) => {
    const target = gates.get(key);
    return onBoard.has(key) || !target ? [key] : edges(neededBy(target, words), gates, onBoard, words);
  });
  return [...new Set(found)];
}

function neededBy(row: GateRow, words: Words): string[] {
  return row.needs.filter((need) => applies(need.when, words)).map((need) => need.gate);
}

function toGate(row: GateRow, gates: ReadonlyMap<string, GateRow>, onBoard: ReadonlySet<string>, words: Words): GateDef {
  const { when: _, ...rest } = row;
  return { ...rest, needs: edges(neededBy(row, words), gates, onBoard, words), after: edges(row.after, gates, onBoard, words) };
}

function leftOut(rows: ItemRow[], gates: ReadonlyMap<string, GateRow>, words: Words): GeneratedBoard["leftOut"] {
  return rows.flatMap((row) => {
    const because = conditionsOf(row, gates)
      .map((when) => whyNot(when, words))
      .find((reason) => reason !== "");
    return because === undefined ? [] : [{ key: row.key, words: wordsOf(row, words), because }];
  });
}

/**
 * The board of an install. `traits` must satisfy `traitsSchema`; `values` (SI) are those entered so far: presets stand in
 * for what is missing, and where there is none the band or speed stays null until somebody enters it.
 */
export function generate(traits: Traits, values: Values = {}): GeneratedBoard {
  const words = traitWords(traits);
  const defs = valueDefs(traits);
  const presets = new Map(defs.map((def) => [def.key, def.preset]));
  const context: PartContext = { words, value: (key) => values[key] ?? presets.get(key) ?? null };

  const gateRows = new Map([...TEMPLATE.gates, TEMPLATE.postRunGate].map((row) => [row.key, row]));
  const applicable = (row: ItemRow) => conditionsOf(row, gateRows).every((when) => applies(when, words));
  const itemRows = TEMPLATE.items.filter(applicable);
  const postRunRows = TEMPLATE.postRunItems.filter(applicable);

  const itemKeys = new Set([...itemRows, ...postRunRows].map(({ key }) => key));
  const gateKeys = new Set(itemRows.map(({ key }) => gateOf(key)));
  const gates = TEMPLATE.gates.filter(({ key }) => gateKeys.has(key));
  const rungs = rungsOf(traits, values);
  const policyOf = (rung: string) => (INSPECTOR_RUNGS.includes(rung) ? BUILDER_INSPECTOR : BUILDER_LEAD);

  return {
    templateVersion: TEMPLATE_VERSION,
    gates: gates.map((row) => toGate(row, gateRows, gateKeys, words)),
    items: itemRows.map((row) => toItem(row, itemKeys, words, context)),
    rungs,
    values: defs,
    positions: POSITIONS.filter(({ key }) => key !== "swinger" || traits.starter === "hand"),
    leftOut: leftOut([...TEMPLATE.items, ...TEMPLATE.postRunItems], gateRows, words),
    postRun: {
      gate: toGate(TEMPLATE.postRunGate, gateRows, gateKeys, words),
      items: postRunRows.map((row) => toItem(row, itemKeys, words, context)),
      policyByRung: Object.fromEntries([...rungs.map(({ key }) => key), "L"].map((key) => [key, policyOf(key)])),
    },
  };
}
