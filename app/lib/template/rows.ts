/**
 * How the template's rows are written: an item with its conditions and the parts of evidence it asks for.
 * The makers below keep a row to a few lines; `generate` turns rows into the items of one install.
 */

import type { Basis, ComputedRule, ItemDef, SheetKey, SystemKey, ValueKey } from "#app/lib/template/types";
import { toSI, type Unit } from "#app/lib/units/convert";
import type { Band, Quantity } from "#app/lib/units/quantity";

/** Where a part wants a value: one place, one for each of a kind the install has, or places named here. */
export type PlaceRule = "one" | "each-cylinder" | "each-grounded-source" | "each-electric-pump" | "each-computer" | "each-level" | string[];
export type CountRule = "cylinders" | "plugs" | null;
export type LimitRef = { key: ValueKey; end: "min" | "max" };

export type PartKind =
  | { kind: "tick"; reference?: string }
  | {
      kind: "measure";
      label: string;
      quantity: Quantity;
      /** Null = the maker's, or taken whole from `limits`. */
      band: Band | null;
      basis: Basis;
      places: PlaceRule;
      limits?: LimitRef[];
      /** The band is for a 12 V system; twice that on 24 V. */
      doubledAt24V?: true;
    }
  | { kind: "torque"; label: string; count: CountRule }
  | { kind: "tally"; mode: "pairs" | "out" | "in"; of?: string; expected?: CountRule; words: { out: string; in: string } }
  | { kind: "photo"; of: string }
  | { kind: "reading"; label: string; quantity: Quantity; places: PlaceRule; optional: boolean }
  | { kind: "text"; asks: string }
  | { kind: "crank"; giveUpAfter: number; basis: Basis }
  | { kind: "sheet"; sheet: SheetKey }
  | { kind: "computed"; rule: ComputedRule };

export type PartRow = PartKind & { when?: string };

export interface ItemRow {
  key: string;
  killer: boolean;
  secondEyes: boolean;
  systems: SystemKey[];
  words: string;
  /** Other words for other installs: the first whose condition holds. */
  wordsWhen: [when: string, words: string][];
  parts: PartRow[];
  when?: string;
  follows: string[];
  guarded: boolean;
  caution: string | null;
  step: ItemDef["step"];
  offersLooseEnd: ItemDef["offersLooseEnd"];
  /** Made only for runs of these rungs, unless the condition holds. */
  runs: { rungs: string[]; unless?: string } | null;
  source?: string;
}

type Extras = Partial<Omit<ItemRow, "key" | "killer" | "secondEyes" | "systems" | "words" | "parts">>;
type Marks = "" | "K" | "2" | "K2";

/** One row. Marks: K = killer, 2 = second pair of eyes. */
export function item(key: string, marks: Marks, systems: SystemKey[], words: string, parts: PartRow[], extras: Extras = {}): ItemRow {
  const plain = { wordsWhen: [], follows: [], guarded: false, caution: null, step: null, offersLooseEnd: null, runs: null };
  return { key, killer: marks.startsWith("K"), secondEyes: marks.endsWith("2"), systems, words, parts, ...plain, ...extras };
}

export const COMMON: Basis = { kind: "common" };
export const MAKER: Basis = { kind: "maker" };
export const standard = (source: string): Basis => ({ kind: "standard", source });

export const only = (when: string, part: PartRow): PartRow => ({ ...part, when });
export const tick: PartRow = { kind: "tick" };
/** A tick that nobody can give before the maker's instruction or mark is entered. */
export const tickAgainst = (reference: string): PartRow => ({ kind: "tick", reference });
export const photo = (of: string): PartRow => ({ kind: "photo", of });
export const text = (asks: string): PartRow => ({ kind: "text", asks });
export const sheet = (key: SheetKey): PartRow => ({ kind: "sheet", sheet: key });
export const computed = (rule: ComputedRule): PartRow => ({ kind: "computed", rule });
/** Torque in the maker's band; the number has to be entered first. */
export const torque = (label: string, count: CountRule = null): PartRow => ({ kind: "torque", label, count });

type MeasureExtras = { places?: PlaceRule; limits?: LimitRef[]; doubledAt24V?: true };

function measure(label: string, quantity: Quantity, band: Band | null, basis: Basis, extras: MeasureExtras): PartRow {
  return { kind: "measure", label, quantity, band, basis, places: "one", ...extras };
}

export function atMost(label: string, quantity: Quantity, max: number, unit: Unit, basis: Basis, extras: MeasureExtras = {}): PartRow {
  return measure(label, quantity, { min: null, max: toSI(max, unit) }, basis, extras);
}

export function atLeast(label: string, quantity: Quantity, min: number, unit: Unit, basis: Basis, extras: MeasureExtras = {}): PartRow {
  return measure(label, quantity, { min: toSI(min, unit), max: null }, basis, extras);
}

export function within(label: string, quantity: Quantity, deviation: number, unit: Unit, basis: Basis): PartRow {
  const max = toSI(deviation, unit);
  return measure(label, quantity, { min: -max, max }, basis, {});
}

/** A measurement judged by the maker's number alone, or by limits of the install. */
export function makers(label: string, quantity: Quantity, extras: MeasureExtras = {}): PartRow {
  return measure(label, quantity, null, MAKER, extras);
}

export function reading(label: string, quantity: Quantity, places: PlaceRule = "one", optional = false): PartRow {
  return { kind: "reading", label, quantity, places, optional };
}

/** Counts by place, each with its own out and in. */
export const pairs = (out: string, back: string): PartRow => ({ kind: "tally", mode: "pairs", words: { out, in: back } });
