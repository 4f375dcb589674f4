/**
 * What an item's row asks for, part by part, in the units of the person who reads it.
 * Pure: the item's criteria in, plain fields for the form out.
 */

import type { FormField } from "#app/lib/bench/form";
import { SHEET_FORMS, traitInputs } from "#app/lib/bench/sheet";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { bandInForce, numberMissing } from "#app/lib/gates/evidence";
import { currentProof, proofsOf } from "#app/lib/gates/facts";
import type { Item } from "#app/lib/gates/snapshot";
import type { Criterion, Part, SheetKey, ValueKey } from "#app/lib/template/types";
import { symbolOf } from "#app/lib/units/convert";
import { displayUnit, format, formatBand, type UnitSystem } from "#app/lib/units/display";
import type { Band, Quantity } from "#app/lib/units/quantity";
import { prefill } from "#app/lib/views/bench-form";

/** A number that judges: where it is from, and whether somebody has confirmed it. */
export interface CriterionView {
  quantity: Quantity;
  unit: string;
  /** SI, for telling at once whether a value is in. */
  band: Band | null;
  bandText: string;
  from: string;
  /** A default that nobody has confirmed yet. */
  isDefault: boolean;
  /** Labels of the install's limits that are missing: they are entered in the set-up. */
  limitsMissing: string[];
  /** The band may be entered in the row: no limit of the install makes it. */
  enterable: boolean;
  /** The band as it would be typed, for confirming it. */
  typed: { min: string; max: string };
}

export interface FieldView {
  kind: FormField["kind"];
  name: string;
  label: string;
  help: string;
  optional: boolean;
  when: FormField["when"];
  unit: string;
  options: { value: string; label: string }[];
  value: string;
  /** Decided by the install's traits: sent along, not asked. */
  fixed: boolean;
}

export interface SheetView {
  sheet: SheetKey;
  title: string;
  formula: string;
  caution: string;
  fields: FieldView[];
  groups: { name: string; label: string; row: string; rows: number; fields: FieldView[] }[];
}

export type PartView = { n: number; missing: boolean } & (
  | { kind: "tick"; asks: string | null; text: string | null; from: string | null }
  | { kind: "measure"; label: string; places: string[]; criterion: CriterionView }
  | { kind: "torque"; label: string; places: string[]; criterion: CriterionView; count: number | null; lengthUnit: string }
  | {
      kind: "tally";
      mode: "pairs" | "out" | "in";
      places: { place: string; out: number | null }[];
      expected: number | null;
      words: { out: string; in: string };
    }
  | { kind: "photo"; of: string; optional: boolean }
  | { kind: "reading"; label: string; places: string[]; quantity: Quantity; unit: string; optional: boolean }
  | { kind: "text"; asks: string }
  | { kind: "crank"; giveUpAfter: number; from: string }
  | { kind: "sheet"; sheet: SheetView }
  | { kind: "computed" }
);

export function partViews(e: Evaluation, item: Item, units: UnitSystem): PartView[] {
  return item.parts.map((part, n) => partView(e, item, part, n, units));
}

function partView(e: Evaluation, item: Item, part: Part, n: number, units: UnitSystem): PartView {
  const base = { n, missing: numberMissing(e.facts, part) !== null };
  switch (part.kind) {
    case "tick":
      return {
        ...base,
        kind: "tick",
        asks: part.reference?.asks ?? null,
        text: part.reference?.text ?? null,
        from: part.reference?.source ?? null,
      };
    case "measure":
      return { ...base, kind: "measure", label: part.label, places: part.places, criterion: criterionView(e, part.criterion, units) };
    case "torque":
      return {
        ...base,
        kind: "torque",
        label: part.label,
        places: part.places,
        criterion: criterionView(e, part.criterion, units),
        count: part.count,
        lengthUnit: symbolOf(displayUnit("length", units)),
      };
    case "tally":
      return {
        ...base,
        kind: "tally",
        mode: part.mode,
        expected: part.expected ?? null,
        words: part.words,
        places: placesOf(e, item, part),
      };
    case "photo":
      return { ...base, kind: "photo", of: part.of, optional: part.optional };
    case "reading":
      return {
        ...base,
        kind: "reading",
        label: part.label,
        places: part.places,
        quantity: part.quantity,
        unit: symbolOf(displayUnit(part.quantity, units)),
        optional: part.optional,
      };
    case "text":
      return { ...base, kind: "text", asks: part.asks };
    case "crank":
      return { ...base, kind: "crank", giveUpAfter: part.giveUpAfter, from: basisWords(part.basis) };
    case "sheet":
      return { ...base, kind: "sheet", sheet: sheetView(e, part.sheet, units) };
    case "computed":
      return { ...base, kind: "computed" };
  }
}

const basisWords = (basis: Criterion["basis"]): string =>
  basis.kind === "standard" ? basis.source : basis.kind === "maker" ? "the maker’s" : "common practice";

export function criterionView(e: Evaluation, criterion: Criterion, units: UnitSystem): CriterionView {
  const values = e.facts.values;
  const limits = [criterion.limit, criterion.otherLimit].flatMap((l) => (l ? [l.key] : []));
  const band = bandInForce(criterion, (key) => values.get(key)?.value ?? null);
  const unit = symbolOf(displayUnit(criterion.quantity, units));
  const typed = (end: number | null | undefined) => (end === null || end === undefined ? "" : format(criterion.quantity, end, units).value);
  const confirmed = limits.length > 0 ? limits.every((key) => values.get(key)?.source) : criterion.source !== null;
  return {
    quantity: criterion.quantity,
    unit,
    band,
    bandText: formatBand(criterion.quantity, band, units),
    from: confirmed ? (criterion.source ?? limitsFrom(e, limits)) : basisWords(criterion.basis),
    isDefault: band !== null && !confirmed,
    limitsMissing: limits.filter((key) => values.get(key)?.value == null).map((key) => values.get(key)?.label ?? key),
    enterable: limits.length === 0,
    typed: { min: typed(criterion.band?.min), max: typed(criterion.band?.max) },
  };
}

/** "Oil pressure, least; oil pressure, most: manual p. 3": limits that were read at one place name it once. */
function limitsFrom(e: Evaluation, limits: ValueKey[]): string {
  const read = new Map<string, string[]>();
  for (const key of limits) {
    const { label, source } = e.facts.values.get(key) ?? { label: key, source: null };
    read.set(source ?? "", [...(read.get(source ?? "") ?? []), label]);
  }
  return [...read].map(([source, labels]) => `${labels.join("; ")}: ${source}`).join("; ");
}

type TallyPart = Extract<Part, { kind: "tally" }>;

/** Rows of a count: as they were last counted; for what goes back in, those that came out. */
function placesOf(e: Evaluation, item: Item, part: TallyPart): { place: string; out: number | null }[] {
  const from = part.mode === "in" && part.of ? proofsOf(e.facts, part.of).at(-1) : currentProof(e.facts, item.id);
  const given = from?.evidence.find((g) => g?.kind === "tally");
  if (given?.kind === "tally" && given.places.length)
    return given.places.map(({ place, out }) => ({ place, out: part.mode === "in" ? out : null }));
  const cylinders = part.expected ?? 0;
  return part.mode === "out" && cylinders > 0 && cylinders <= 12
    ? Array.from({ length: cylinders }, (_, i) => ({ place: `${i + 1}`, out: null }))
    : [{ place: "", out: null }];
}

function sheetView(e: Evaluation, sheet: SheetKey, units: UnitSystem): SheetView {
  const form = SHEET_FORMS[sheet];
  const decided = traitInputs(sheet, e.snapshot.traits);
  const rowsOf = (key: ValueKey | null, least: number) => (key && e.facts.values.get(key)?.value) || least;
  return {
    sheet,
    title: form.title,
    formula: form.formula,
    caution: form.caution,
    fields: form.fields.map((f) => fieldView(e, sheet, f, units, decided[f.name])),
    groups: form.groups.map((g) => ({
      name: g.name,
      label: g.label,
      row: g.row,
      rows: rowsOf(g.rowsFrom, g.rows),
      fields: g.fields.map((f) => fieldView(e, sheet, f, units)),
    })),
  };
}

function fieldView(e: Evaluation, sheet: SheetKey, field: FormField, units: UnitSystem, decided?: string): FieldView {
  const { kind, name, label, help, optional, when } = field;
  const unit = field.kind === "quantity" ? symbolOf(field.as?.[units] ?? displayUnit(field.quantity, units)) : "";
  const options = field.kind === "choice" ? field.options : [];
  return {
    kind,
    name,
    label,
    help,
    optional,
    when,
    unit,
    options,
    value: decided ?? prefill(e, sheet, field, units)?.text ?? "",
    fixed: decided !== undefined,
  };
}
