/**
 * Reading a sheet's form back: plain repeated field names, one entry per row, into fields and rows of SI values.
 * What is not asked (`when`) is not read; an empty optional field is left out; an empty row is skipped.
 */
import { amount, check, type FieldError, missing, notChosen, type Outcome } from "#app/lib/bench/check";
import type { AmountField, FormField, FormGroup, SheetForm, UnitPair } from "#app/lib/bench/form";
import type { Quantity } from "#app/lib/units/quantity";

/** Reads a number in the person's units; `as` is given where the field is read in another unit than its quantity usually is. */
export type Parse = (text: string, quantity: Quantity, as?: UnitPair) => { ok: true; si: number } | { ok: false; sentence: string };

type Read = { ok: true; value: number | string | undefined } | { ok: false; sentence: string };
type TextOf = (field: FormField) => string;

function readAmount(field: AmountField, text: string, parse: Parse): Read {
  const entry = field.as ? parse(text, field.quantity, field.as) : parse(text, field.quantity);
  if (!entry.ok) return entry;
  const inside = check(amount(field), entry.si);
  return inside.ok ? inside : { ok: false, sentence: inside.errors[0]?.sentence ?? missing(field.label) };
}

function readField(field: FormField, text: string, parse: Parse): Read {
  if (field.kind === "choice") {
    return field.options.some((option) => option.value === text) ? { ok: true, value: text } : { ok: false, sentence: notChosen(field) };
  }
  if (text === "") return field.optional ? { ok: true, value: undefined } : { ok: false, sentence: missing(field.label) };
  return field.kind === "text" ? { ok: true, value: text } : readAmount(field, text, parse);
}

function readFields(
  fields: FormField[],
  textOf: TextOf,
  at: (name: string) => string,
  parse: Parse,
  errors: FieldError[],
): Record<string, unknown> {
  const values: Record<string, unknown> = {};
  for (const field of fields) {
    const { when } = field;
    if (when && values[when.field] !== when.is) continue;
    const read = readField(field, textOf(field), parse);
    if (!read.ok) errors.push({ field: at(field.name), sentence: read.sentence });
    else if (read.value !== undefined) values[field.name] = read.value;
  }
  return values;
}

/** A row counts once something is typed in it that the form had not put there. */
function isTyped(group: FormGroup, textOf: TextOf): boolean {
  return group.fields.some((field) => field.kind !== "choice" && field.preset === null && textOf(field) !== "");
}

/**
 * Fields and rows of `form` read by the definition; `flat` holds each group as a list of rows.
 * `rows` turns a path that counts read rows into one that counts sent rows.
 */
export function readRows(definition: SheetForm, form: ReadonlyMap<string, readonly string[]>, parse: Parse) {
  const errors: FieldError[] = [];
  const sent = (name: string, row: number): string => (form.get(name)?.[row] ?? "").trim();
  const flat = readFields(
    definition.fields,
    (field) => sent(field.name, 0),
    (name) => name,
    parse,
    errors,
  );
  const sentRow = new Map<string, number[]>();
  for (const group of definition.groups) {
    const count = Math.max(0, ...group.fields.map((field) => form.get(`${group.name}.${field.name}`)?.length ?? 0));
    const textIn =
      (row: number): TextOf =>
      (field) =>
        sent(`${group.name}.${field.name}`, row);
    const typed = Array.from({ length: count }, (_, row) => row).filter((row) => isTyped(group, textIn(row)));
    flat[group.name] = typed.map((row) => readFields(group.fields, textIn(row), (name) => `${group.name}.${row}.${name}`, parse, errors));
    sentRow.set(group.name, typed);
  }
  const rows = (path: string): string => {
    const [group = "", row, ...rest] = path.split(".");
    const typed = sentRow.get(group);
    return typed && row !== undefined ? [group, typed[Number(row)] ?? row, ...rest].join(".") : path;
  };
  return { flat, errors, rows };
}

export interface Readable {
  form: SheetForm;
  compute: (inputs: unknown) => Outcome<unknown>;
  fromForm?: (flat: Record<string, unknown>) => { inputs: Record<string, unknown>; locate: (path: string) => string };
}

/** A sent form as inputs that compute, or a sentence for every bad field, the row counted as it was sent. */
export function readWith(
  sheet: Readable,
  form: ReadonlyMap<string, readonly string[]>,
  parse: Parse,
): { ok: true; inputs: Record<string, unknown> } | { ok: false; errors: FieldError[] } {
  const { flat, errors, rows } = readRows(sheet.form, form, parse);
  if (errors.length > 0) return { ok: false, errors };
  const { inputs, locate } = sheet.fromForm?.(flat) ?? { inputs: flat, locate: (path: string) => path };
  const outcome = sheet.compute(inputs);
  if (outcome.ok) return { ok: true, inputs };
  return { ok: false, errors: outcome.errors.map(({ field, sentence }) => ({ field: rows(locate(field)), sentence })) };
}
