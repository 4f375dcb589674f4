/**
 * A calculator's page: what stands in its form, what comes out, in the reader's units; and the list of all of them.
 * Pure: evaluation, form and instant in, plain view out.
 */
import { BENCH, BENCH_KEYS } from "#app/lib/bench/bench";
import type { BenchKey, BenchResult, TypedForm } from "#app/lib/bench/bench-def";
import type { SheetFigure } from "#app/lib/bench/sheet-result";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Instant } from "#app/lib/gates/snapshot";
import { when } from "#app/lib/gates/when";
import { fromSI } from "#app/lib/units/convert";
import { displayUnit, format, formatBand, type UnitSystem } from "#app/lib/units/display";
import { type Drawing, drawingOf } from "#app/lib/views/bench-drawing";
import { type BenchField, type BenchGroup, benchFields, benchGroups, type Standing } from "#app/lib/views/bench-form";
import { completed, workOut } from "#app/lib/views/bench-work";
import { boardOf } from "#app/lib/views/places";

export interface FigureView {
  label: string;
  value: string;
  unit: string;
}

export interface ResultView {
  /** null = there is nothing to judge by. */
  passes: boolean | null;
  word: string;
  sentence: string;
  /** Shown large: the margin; without one, the first figures. */
  lead: FigureView[];
  figures: FigureView[];
  rule: { min: number | null; max: number | null; value: number; label: string } | null;
  drawing: Drawing | null;
}

export interface BenchView {
  key: BenchKey;
  title: string;
  answers: string;
  criterion: string;
  formula: string;
  source: string;
  caution: string;
  units: UnitSystem;
  fields: BenchField[];
  groups: BenchGroup[];
  errors: { field: string; message: string }[];
  result: ResultView | null;
  /** Inputs as a list for paper: what is asked under the choices made. */
  inputs: { label: string; value: string; origin: string }[];
  /** What stands in the form came from the address: it may be kept. */
  sent: TypedForm | null;
  kept: { by: string; at: string } | null;
  workedOut: string;
  install: string;
  home: string;
}

export interface Kept {
  inputs: TypedForm;
  by: string;
  recorded: Instant;
}

export interface BenchParts {
  e: Evaluation;
  key: BenchKey;
  units: UnitSystem;
  now: Instant;
  sent: TypedForm | null;
  kept: Kept | null;
}

export function benchView({ e, key, units, now, sent, kept }: BenchParts): BenchView {
  const { form, answers, criterion, source } = BENCH[key];
  const standing: Standing | null = sent
    ? { form: sent, origin: "typed", complete: true }
    : kept && { form: kept.inputs, origin: `kept by ${kept.by}`, complete: false };
  const worked = standing && workOut(e, key, completed(e, key, standing));
  const found = worked && !worked.ok ? worked.errors : [];
  const errors = new Map<string, string[]>();
  for (const { field, sentence } of found) errors.set(field, [...(errors.get(field) ?? []), sentence]);
  const parts = { e, key, units, standing, errors };
  const [fields, groups] = [benchFields(parts), benchGroups(parts)];
  const { install } = e.snapshot;
  return {
    key,
    title: form.title,
    answers,
    criterion,
    formula: form.formula,
    source,
    caution: form.caution,
    units,
    fields,
    groups,
    errors: found.map(({ field, sentence }) => ({ field: idOf(field, groups), message: sentence })),
    result: worked?.ok ? resultView(key, worked.inputs, worked.result, units) : null,
    inputs: listed(fields, groups),
    sent,
    kept: kept && { by: kept.by, at: when(kept.recorded, install.timeZone, true) },
    workedOut: when(now, install.timeZone, true),
    install: `${install.registration} ${install.name}`,
    home: boardOf(install.id),
  };
}

const idOf = (path: string, groups: BenchGroup[]): string => {
  const whole = groups.find((g) => g.name === path);
  return whole?.rows[0]?.[0]?.id ?? `bench-${path.replaceAll(".", "-")}`;
};

/** Figures shown large where there is no margin: a band has two ends. */
const LEAD = 2;

export function resultView(key: BenchKey, inputs: Record<string, unknown>, result: BenchResult, units: UnitSystem): ResultView {
  const { passes, sentence, margin, figures, rule } = result;
  const shown = ({ label, quantity, value, as }: SheetFigure): FigureView => {
    // More decimals than a gauge has would only look exact.
    const rounded = quantity === "fraction" ? Math.round(value * 1e4) / 1e4 : quantity === "ratio" ? Math.round(value * 1e3) / 1e3 : value;
    const { value: text, unit } = format(quantity, rounded, units, as?.[units]);
    return { label, value: text, unit };
  };
  const inUnit = (value: number | null): number | null =>
    rule && value !== null ? fromSI(value, rule.as?.[units] ?? displayUnit(rule.quantity, units)) : null;
  return {
    passes,
    word: passes === null ? "Worked out" : passes ? "Within the criterion" : "Outside the criterion",
    sentence,
    lead: margin ? [shown(margin)] : figures.slice(0, LEAD).map(shown),
    figures: figures.slice(margin ? 0 : LEAD).map(shown),
    rule: rule
      ? {
          min: inUnit(rule.min),
          max: inUnit(rule.max),
          value: inUnit(rule.value) ?? 0,
          label: `${rule.label}: ${format(rule.quantity, rule.value, units, rule.as?.[units]).text}, ${formatBand(rule.quantity, { min: rule.min, max: rule.max }, units, rule.as?.[units])}`,
        }
      : null,
    drawing: drawingOf(key, inputs, units),
  };
}

/** Whether the choice on which a field hangs has been made. */
const asked = (fields: BenchField[]) => (f: BenchField) =>
  !f.when || fields.find((c) => c.name.split(".").at(-1) === f.when?.field)?.value === f.when.is;

function listed(fields: BenchField[], groups: BenchGroup[]): BenchView["inputs"] {
  const line = (f: BenchField, before = "") => ({
    label: `${before}${f.label}`,
    value: f.kind === "choice" ? (f.options.find((o) => o.value === f.value)?.label ?? "") : f.unit ? `${f.value} ${f.unit}` : f.value,
    origin: f.origin,
  });
  const filled = (row: BenchField[]) => row.filter(asked(row)).filter((f) => f.value !== "");
  return [
    ...filled(fields).map((f) => line(f)),
    ...groups.flatMap((g) => g.rows.flatMap((row, n) => filled(row).map((f) => line(f, `${g.row} ${n + 1}: `)))),
  ];
}

export interface BenchCard {
  key: BenchKey;
  href: string;
  title: string;
  answers: string;
  /** The last result that was kept, computed anew; null = none is kept. */
  last: { passes: boolean | null; word: string; sentence: string; kept: string } | null;
}

/** Every calculator with its question and what came out last. */
export function benchCards(e: Evaluation, kept: ReadonlyMap<BenchKey, Kept>): BenchCard[] {
  const { id, timeZone } = e.snapshot.install;
  return BENCH_KEYS.map((key) => {
    const { form, answers } = BENCH[key];
    const own = kept.get(key);
    const worked = own && workOut(e, key, completed(e, key, { form: own.inputs, origin: "", complete: false }));
    const keptBy = own ? `kept by ${own.by}, ${when(own.recorded, timeZone, true)}` : "";
    const last = !worked
      ? null
      : worked.ok
        ? { ...resultView(key, worked.inputs, worked.result, own.inputs.units), kept: keptBy }
        : { passes: null, word: "To be looked at", sentence: worked.errors[0]?.sentence ?? "", kept: keptBy };
    return {
      key,
      href: `${boardOf(id)}/bench/${key}`,
      title: form.title,
      answers,
      last: last && { passes: last.passes, word: last.word, sentence: last.sentence, kept: last.kept },
    };
  });
}
