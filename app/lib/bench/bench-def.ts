/**
 * What a page of the bench needs of a calculator. The evidence sheets fit it too; the others have no place on the board,
 * so nothing rests on them and some have no criterion at all.
 */
import type { Outcome } from "#app/lib/bench/check";
import type { SheetForm } from "#app/lib/bench/form";
import type { SheetResult } from "#app/lib/bench/sheet-result";
import type { SheetKey } from "#app/lib/template/types";
import type { UnitSystem } from "#app/lib/units/display";

export type BenchKey = SheetKey | "torque" | "crank" | "tip-speed" | "atmosphere" | "static-power" | "battery" | "wire-drop";

/** `passes` null: there is nothing to judge by, the figures are the answer. */
export type BenchResult = Omit<SheetResult, "passes" | "cap"> & { passes: boolean | null };

export interface BenchDef {
  /** The question it answers, one line. */
  answers: string;
  /** By what the result is judged. */
  criterion: string;
  /** Where formula and limits were published, or that they are common practice. */
  source: string;
  form: SheetForm;
  compute: (inputs: unknown) => Outcome<BenchResult>;
  /** The flat form as inputs, and where a path in the inputs is on the form. */
  fromForm?: (flat: Record<string, unknown>) => { inputs: Record<string, unknown>; locate: (path: string) => string };
}

/** A form of the bench as it was typed, to be read again: texts by field name ("straps.wll"), one entry per row, in one person's units. */
export interface TypedForm {
  units: UnitSystem;
  fields: Record<string, string[]>;
}
