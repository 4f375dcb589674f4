/**
 * The bench sheets by key: how a saved sheet is judged, and how its form is read.
 * A saved sheet is never trusted: whoever judges it computes it again from its inputs.
 */
import type { FieldError, Outcome } from "#app/lib/bench/check";
import type { SheetForm } from "#app/lib/bench/form";
import { type Parse, readWith } from "#app/lib/bench/read-form";
import { COMPRESSION } from "#app/lib/bench/sheet-compression";
import { FUEL_FLOW } from "#app/lib/bench/sheet-fuel-flow";
import { RESTRAINT } from "#app/lib/bench/sheet-restraint";
import type { SheetDef, SheetResult, ValueUse } from "#app/lib/bench/sheet-result";
import type { SheetKey, Traits, ValueKey } from "#app/lib/template/types";

const SHEETS: Record<SheetKey, SheetDef> = { "fuel-flow": FUEL_FLOW, restraint: RESTRAINT, compression: COMPRESSION };

function bySheet<T>(pick: (sheet: SheetDef) => T): Record<SheetKey, T> {
  return { "fuel-flow": pick(FUEL_FLOW), restraint: pick(RESTRAINT), compression: pick(COMPRESSION) };
}

/** Version of each calculation; a sheet saved under another one is outdated. */
export const SHEET_VERSIONS: Record<SheetKey, string> = bySheet((sheet) => sheet.version);

/** The form of each sheet. */
export const SHEET_FORMS: Record<SheetKey, SheetForm> = bySheet((sheet) => sheet.form);

/** Install values a sheet takes, so that a changed value outdates the sheet. */
export function valuesTaken(sheet: SheetKey): ValueKey[] {
  return [...SHEETS[sheet].takes];
}

/** What a saved sheet computed with in place of the install's values, so that it can be held against them. */
export const valuesUsed = (sheet: SheetKey, inputs: Record<string, unknown>): ValueUse[] => SHEETS[sheet].uses(inputs);

/** Inputs that the install's traits decide, not the person: they go over whatever was typed or saved. */
export function traitInputs(sheet: SheetKey, traits: Pick<Traits, "delivery" | "gear">): Record<string, string> {
  if (sheet === "fuel-flow") return { supply: traits.delivery === "gravity" ? "gravity" : "pump" };
  return sheet === "restraint" ? { gear: traits.gear } : {};
}

/**
 * The result of a sheet from its inputs (SI, crankshaft rev/s), or a sentence for every bad input at its field ("straps.0.wll").
 * Never throws for bad input, never NaN or Infinity, fills in nothing that was not given.
 */
export function computeSheet(sheet: SheetKey, inputs: Record<string, unknown>): Outcome<SheetResult> {
  return SHEETS[sheet].compute(inputs);
}

/**
 * A sent form as inputs for `computeSheet`, or a sentence for every bad field ("catches.2.seconds", the row counted from 0).
 * `form` maps field names ("power", "catches.seconds") to what was sent, one entry per row; `parse` reads a number with its unit.
 * Rows in which nothing is typed beyond presets are left out. Inputs that come back compute without errors.
 */
export function readSheetForm(
  sheet: SheetKey,
  form: ReadonlyMap<string, readonly string[]>,
  parse: Parse,
): { ok: true; inputs: Record<string, unknown> } | { ok: false; errors: FieldError[] } {
  return readWith(SHEETS[sheet], form, parse);
}
