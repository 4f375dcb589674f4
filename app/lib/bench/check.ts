/**
 * Checking the inputs of a calculation: each bad one gets a sentence at its field, nothing is filled in silently.
 * The schemas are built from the field definitions, so that form and judgement have one set of labels and ranges.
 */
import { z } from "zod";
import type { AmountField, ChoiceField, TextField } from "#app/lib/bench/form";
import { format } from "#app/lib/units/display";

export interface FieldError {
  /** Path with dots, "straps.0.wll". */
  field: string;
  sentence: string;
}

export type Outcome<T> = { ok: true; result: T } | { ok: false; errors: FieldError[] };

function rangeOf({ quantity, min, max, as }: AmountField): string {
  const ends = (system: "si" | "us") => [min, max].map((end) => format(quantity, end, system, as?.[system]).text).join(" and ");
  const [si, us] = [ends("si"), ends("us")];
  return si === us ? si : `${si} (${us})`;
}

/** A finite number inside the field's range. */
export function amount(field: AmountField) {
  const sentence = `${field.label} must be between ${rangeOf(field)}: check the number and its unit.`;
  const notNumber = (input: unknown) =>
    input === undefined || input === null ? missing(field.label) : `${field.label} must be a number between ${rangeOf(field)}.`;
  const number = z
    .number({ error: (issue) => notNumber(issue.input) })
    .min(field.min, sentence)
    .max(field.max, sentence);
  return field.quantity === "count" ? number.int(`${field.label} must be a whole number: count them.`) : number;
}

/** A short text that is not empty. */
export function words(field: TextField) {
  const long = `${field.label} may have at most ${field.maxLength} characters: shorten it.`;
  return z
    .string({ error: () => missing(field.label) })
    .trim()
    .min(1, missing(field.label))
    .max(field.maxLength, long);
}

/** The sentence for a choice that is none of the options. */
export function notChosen(field: ChoiceField): string {
  return `${field.label}: choose ${field.options.map((option) => `"${option.label}"`).join(" or ")}.`;
}

/** The sentence for a field that has to be filled in. */
export function missing(label: string): string {
  return `${label} is missing: enter it.`;
}

/** No rig, engine or pump system has more; it bounds the work that a sent form can cause. */
export const MOST_ROWS = 60;

export const tooMany = (what: string): string => `More than ${MOST_ROWS} ${what} cannot be meant: leave out what was entered by mistake.`;

/** Inputs as the schema's type, or every error at its field. */
export function check<T>(schema: z.ZodType<T>, inputs: unknown): { ok: true; value: T } | { ok: false; errors: FieldError[] } {
  const parsed = schema.safeParse(inputs);
  if (parsed.success) return { ok: true, value: parsed.data };
  return { ok: false, errors: parsed.error.issues.map((issue) => ({ field: issue.path.join("."), sentence: sentenceOf(issue) })) };
}

/** Every field has sentences of its own; what is left is a row, or the whole, that is no object at all. */
function sentenceOf(issue: z.core.$ZodIssue): string {
  const shapeless = issue.code === "invalid_type" && issue.expected === "object";
  return shapeless ? "This part of the sheet cannot be read: enter it again." : issue.message;
}
