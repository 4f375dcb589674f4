/**
 * The form of a calculator as a page draws it: each field with what stands in it, in the reader's units, and where that came from.
 * Pure: the install's evaluation and what was typed in, plain fields out.
 */
import { BENCH, suggested } from "#app/lib/bench/bench";
import type { BenchKey, TypedForm } from "#app/lib/bench/bench-def";
import { MOST_ROWS } from "#app/lib/bench/check";
import type { AmountField, FormField, FormGroup, Prefill } from "#app/lib/bench/form";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { symbolOf } from "#app/lib/units/convert";
import { displayUnit, format, parseEntry, type UnitSystem } from "#app/lib/units/display";

export interface BenchField {
  id: string;
  name: string;
  kind: FormField["kind"];
  label: string;
  help: string;
  optional: boolean;
  when: FormField["when"];
  unit: string;
  options: { value: string; label: string }[];
  value: string;
  /** "Set-up: engine manual p. 4", "default", "typed"; empty where nothing stands in the field. */
  origin: string;
  errors: string[];
}

export interface BenchGroup {
  name: string;
  label: string;
  row: string;
  rows: BenchField[][];
  /** One more row, as it is before anything is typed. */
  blank: BenchField[];
}

/** What stands in the form: sent in the address, or kept; null = nothing yet, so that the install's values fill it. */
export interface Standing {
  form: TypedForm;
  /** "typed", or "kept by Odalys". */
  origin: string;
  /** Kept forms leave out what the install fills. */
  complete: boolean;
}

interface Filled {
  text: string;
  origin: string;
  /** Where it is an amount of the install: the exact value. */
  si: number | null;
}

/** What the install, its answers or the default put into a field; null = nothing. */
export function prefill(e: Evaluation, key: BenchKey, field: FormField, units: UnitSystem): Filled | null {
  const choice = suggested(key, e.snapshot.traits)[field.name];
  if (choice !== undefined) return { text: choice, origin: "answers at set-up", si: null };
  if (field.kind !== "quantity") return field.preset === null ? null : { text: field.preset, origin: "default", si: null };
  for (const source of field.prefill) {
    const found = sourced(e, source);
    if (found) return { text: textOf(field, found.si, units), ...found };
  }
  return field.preset === null ? null : { text: textOf(field, field.preset, units), origin: "default", si: field.preset };
}

function sourced(e: Evaluation, source: Prefill): { si: number; origin: string } | null {
  if (source.kind === "trait") return null;
  if (source.kind === "value") {
    const value = e.facts.values.get(source.key);
    if (value?.value == null) return null;
    return { si: value.value, origin: value.source ? `Set-up: ${value.source}` : "Set-up, not confirmed yet" };
  }
  const next = e.result.next;
  const plan = next?.id ? e.facts.runs.get(next.id)?.plan : null;
  if (plan?.rpm != null) return { si: plan.rpm, origin: "plan of the next run" };
  const rung = e.facts.nextRung;
  return rung?.rpm == null ? null : { si: rung.rpm, origin: `build-up, run ${rung.key}` };
}

const textOf = (field: AmountField, si: number, units: UnitSystem): string =>
  format(field.quantity, si, units, field.as?.[units]).value.replace("−", "-");

/**
 * A field that still holds what it was filled with holds that value, not its rounded text: `inputs` (SI) are put right in place.
 * @param sources exact values with which a field may have been filled, SI.
 */
export function exactly(
  fields: FormField[],
  units: UnitSystem,
  typed: (name: string) => string | undefined,
  inputs: Record<string, unknown>,
  sources: (field: AmountField) => number[],
): void {
  for (const field of fields) {
    const text = typed(field.name)?.trim();
    if (field.kind !== "quantity" || text === undefined || typeof inputs[field.name] !== "number") continue;
    const own = sources(field).find((si) => textOf(field, si, units) === text);
    if (own !== undefined) inputs[field.name] = own;
  }
}

/** A text that was typed in one person's units as another reads it; what is no number stays as it is. */
export function converted(field: FormField, text: string, from: UnitSystem, to: UnitSystem): string {
  if (field.kind !== "quantity" || from === to || text === "") return text;
  const entry = parseEntry(text, field.quantity, from, field.as?.[from]);
  return entry.ok ? textOf(field, entry.si, to) : text;
}

export interface FormParts {
  e: Evaluation;
  key: BenchKey;
  units: UnitSystem;
  standing: Standing | null;
  errors: ReadonlyMap<string, string[]>;
}

export function benchFields(at: FormParts): BenchField[] {
  return BENCH[at.key].form.fields.map((field) => fieldView(at, field, field.name, at.standing?.form.fields[field.name]?.[0], field.name));
}

export function benchGroups(at: FormParts): BenchGroup[] {
  return BENCH[at.key].form.groups.map((group) => {
    const sent = sentRows(group, at.standing);
    const from = group.rowsFrom && at.e.facts.values.get(group.rowsFrom)?.value;
    const count = Math.min(MOST_ROWS, at.standing ? Math.max(sent, 1) : from || group.rows);
    const row = (n: number, standing: Standing | null) =>
      group.fields.map((field) => {
        const name = `${group.name}.${field.name}`;
        const text = n < sent ? standing?.form.fields[name]?.[n] : undefined;
        return fieldView({ ...at, standing: n < sent ? standing : null }, field, name, text, `${group.name}.${n}.${field.name}`);
      });
    const rows = Array.from({ length: count }, (_, n) => row(n, at.standing));
    // An error about the whole list stands at its first field.
    const whole = at.errors.get(group.name) ?? [];
    const first = rows[0]?.[0];
    if (first) first.errors = [...whole, ...first.errors];
    return { name: group.name, label: group.label, row: group.row, rows, blank: row(count, null) };
  });
}

const sentRows = (group: FormGroup, standing: Standing | null): number =>
  Math.max(0, ...group.fields.map((field) => standing?.form.fields[`${group.name}.${field.name}`]?.length ?? 0));

function fieldView(at: FormParts, field: FormField, name: string, text: string | undefined, path: string): BenchField {
  const { e, key, units, standing } = at;
  const own = prefill(e, key, field, units);
  const sent = text === undefined ? (standing?.complete ? "" : undefined) : converted(field, text, standing?.form.units ?? units, units);
  const value = sent ?? own?.text ?? "";
  const filled = own !== null && value === own.text ? own.origin : (standing?.origin ?? "");
  const { kind, label, help, optional, when } = field;
  return {
    id: `bench-${path.replaceAll(".", "-")}`,
    name,
    kind,
    label,
    help,
    optional,
    when,
    unit: field.kind === "quantity" ? symbolOf(field.as?.[units] ?? displayUnit(field.quantity, units)) : "",
    options: field.kind === "choice" ? field.options : [],
    value,
    origin: value === "" ? "" : filled,
    errors: at.errors.get(path) ?? [],
  };
}
