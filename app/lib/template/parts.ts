/**
 * Turning a row's parts of evidence into those of one install: its places, counts and bands.
 */
import type { CountRule, LimitRef, PartKind, PartRow, PlaceRule } from "#app/lib/template/rows";
import type { TraitWord } from "#app/lib/template/trait-words";
import type { Criterion, Part, ValueKey } from "#app/lib/template/types";
import type { Band } from "#app/lib/units/quantity";

export interface PartContext {
  words: ReadonlySet<TraitWord>;
  /** Value entered, else its preset, else null. */
  value: (key: ValueKey) => number | null;
}

/** Above this, running, the install is taken to be on 24 V. */
const HIGHEST_12V_SYSTEM = 20;

const numbered = (name: string, count: number) => Array.from({ length: count }, (_, index) => `${name} ${index + 1}`);
const oneOrEach = (names: string[]) => (names.length > 1 ? names : [""]);

function counted(rule: CountRule | undefined, { value }: PartContext): number | null {
  const cylinders = value("cylinders");
  if (rule === "cylinders") return cylinders;
  const plugs = value("plugs");
  return rule === "plugs" && cylinders !== null && plugs !== null ? cylinders * plugs : null;
}

function placesOf(rule: PlaceRule, context: PartContext): string[] {
  if (rule === "one") return [""];
  if (Array.isArray(rule)) return rule;
  const has = (word: TraitWord) => context.words.has(word);
  if (rule === "each-cylinder") return numbered(has("rotary") ? "rotor" : "cylinder", counted("cylinders", context) ?? 1);
  if (rule === "each-grounded-source") return oneOrEach(numbered("source", has("mixed") ? 1 : 2));
  if (rule === "each-electric-pump") return oneOrEach(numbered("pump", has("pump2") ? 2 : 1));
  if (rule === "each-computer") return oneOrEach(numbered("computer", has("ecu2") ? 2 : 1));
  const levels: [TraitWord, string][] = [
    ["oilsys", "oil"],
    ["oilinj", "two-stroke oil"],
    ["geared", "gearbox"],
    ["wetcool", "coolant"],
  ];
  return levels.filter(([word]) => has(word)).map(([, name]) => name);
}

/** The band with its ends from the install; null as long as one of them is not entered. */
function bandFromLimits(limits: LimitRef[], band: Band | null, { value }: PartContext): Band | null {
  let result = band ?? { min: null, max: null };
  for (const { key, end } of limits) {
    const bound = value(key);
    if (bound === null) return band;
    result = { ...result, [end]: bound };
  }
  return result;
}

function doubled({ min, max }: Band): Band {
  return { min: min === null ? null : min * 2, max: max === null ? null : max * 2 };
}

function criterionOf(row: Extract<PartKind, { kind: "measure" }>, context: PartContext): Criterion {
  const [limit, otherLimit] = row.limits ?? [];
  let band = row.limits ? bandFromLimits(row.limits, row.band, context) : row.band;
  if (band && row.doubledAt24V && (context.value("busVoltsMax") ?? 0) > HIGHEST_12V_SYSTEM) band = doubled(band);
  return {
    quantity: row.quantity,
    band,
    basis: row.basis,
    source: null,
    ...(limit ? { limit } : {}),
    ...(otherLimit ? { otherLimit } : {}),
  };
}

/** One part of evidence for this install. */
export function toPart({ when: _, ...row }: PartRow, context: PartContext): Part {
  switch (row.kind) {
    case "tick":
      return row.reference === undefined
        ? { kind: "tick" }
        : { kind: "tick", reference: { asks: row.reference, text: null, source: null } };
    case "measure":
      return { kind: "measure", label: row.label, places: placesOf(row.places, context), criterion: criterionOf(row, context) };
    case "torque": {
      const criterion: Criterion = { quantity: "torque", band: null, basis: { kind: "maker" }, source: null };
      return { kind: "torque", label: row.label, places: [""], criterion, count: counted(row.count, context) };
    }
    case "tally": {
      const expected = counted(row.expected, context);
      const of = row.of === undefined ? {} : { of: row.of };
      return { kind: "tally", mode: row.mode, ...of, ...(expected === null ? {} : { expected }), words: row.words };
    }
    case "photo":
      return { kind: "photo", of: row.of, optional: false };
    case "reading":
      return { kind: "reading", label: row.label, places: placesOf(row.places, context), quantity: row.quantity, optional: row.optional };
    default:
      return row;
  }
}
