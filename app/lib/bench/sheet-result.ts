/**
 * What a bench sheet says once it is computed. Sentences carry no unit that depends on a person's choice:
 * ratios, percent and rpm only; everything else is a figure with its quantity, shown in the reader's units.
 */
import type { Outcome } from "#app/lib/bench/check";
import type { SheetForm, UnitPair } from "#app/lib/bench/form";
import type { ValueKey } from "#app/lib/template/types";
import type { Band, Quantity } from "#app/lib/units/quantity";

export interface SheetFigure {
  label: string;
  quantity: Quantity;
  /** SI */
  value: number;
  /** Where another unit than the usual one of the quantity is read. */
  as?: UnitPair;
}

/** The result against its limits, for a rule with the value's mark on it. */
export interface ResultRule extends Band {
  quantity: Quantity;
  label: string;
  /** SI */
  value: number;
  as?: UnitPair;
}

export interface SheetResult {
  passes: boolean;
  /** The result against its criterion; when it does not pass, also what to do next. */
  sentence: string;
  /** Highest crankshaft speed it allows, 1/s; restraint only. */
  cap: number | null;
  figures: SheetFigure[];
  caution: string;
  /** What is left to the criterion; below zero = what is missing. */
  margin?: SheetFigure;
  rule?: ResultRule;
}

/** One input of a saved sheet and the values of the install that it may be, SI; `used` undefined = left empty. */
export interface ValueUse {
  keys: ValueKey[];
  used: number | undefined;
  /** "mass" in "did not use the install's mass". */
  label: string;
}

export const use = (label: string, input: unknown, ...keys: ValueKey[]): ValueUse => ({
  keys,
  used: typeof input === "number" ? input : undefined,
  label,
});

/** One kind of sheet: everything the registry needs of it. */
export interface SheetDef {
  /** Raised when the same inputs would be judged otherwise. */
  version: string;
  takes: ValueKey[];
  /** Which of its inputs speak of the install: each must be what the install says, where it says something. */
  uses: (inputs: Record<string, unknown>) => ValueUse[];
  form: SheetForm;
  compute: (inputs: unknown) => Outcome<SheetResult>;
  /** The flat form (groups as lists of rows) as inputs, and where a path in the inputs is on the form. */
  fromForm?: (flat: Record<string, unknown>) => { inputs: Record<string, unknown>; locate: (path: string) => string };
}

export const figure = (label: string, quantity: Quantity, value: number, as?: UnitPair): SheetFigure =>
  as ? { label, quantity, value, as } : { label, quantity, value };

/** `value` to `digits` decimals, never rounded up past a limit that it misses: 1.2499 is "1.24". */
export function floorText(value: number, digits: number): string {
  const scale = 10 ** digits;
  return (Math.floor(value * scale + 1e-6) / scale).toFixed(digits);
}

/** `value` to `digits` decimals, never rounded down past a limit that it breaks: 25.001 is "25.1". */
export function ceilText(value: number, digits: number): string {
  const scale = 10 ** digits;
  return (Math.ceil(value * scale - 1e-6) / scale).toFixed(digits);
}
