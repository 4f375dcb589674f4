/**
 * The form of a bench sheet as data, so that one component draws every sheet and one reader takes it back.
 * A field in a repeating group is named "group.field" and sent once per row; an error there is at "group.row.field".
 */
import type { ValueKey } from "#app/lib/template/types";
import type { Unit } from "#app/lib/units/convert";
import type { UnitSystem } from "#app/lib/units/display";
import type { Quantity } from "#app/lib/units/quantity";

/** Where another unit than the usual one of the quantity is read (altitude in m or ft). */
export type UnitPair = Record<UnitSystem, Unit>;

/** Sources to fill a field from, first that has a value: a value of the install, its traits, the next run's highest rpm. */
export type Prefill = { kind: "value"; key: ValueKey } | { kind: "trait" } | { kind: "planned-rpm" };

interface FieldBase {
  name: string;
  label: string;
  help: string;
  /** May be left empty. */
  optional: boolean;
  /** Asked only while the choice field `field` (of the same row) holds `is`. */
  when: { field: string; is: string } | null;
  prefill: Prefill[];
}

export interface AmountField extends FieldBase {
  kind: "quantity";
  quantity: Quantity;
  as: UnitPair | null;
  /** SI, inclusive. */
  min: number;
  max: number;
  preset: number | null;
}

export interface ChoiceField extends FieldBase {
  kind: "choice";
  options: { value: string; label: string }[];
  preset: string | null;
}

export interface TextField extends FieldBase {
  kind: "text";
  maxLength: number;
  preset: string | null;
}

export type FormField = AmountField | ChoiceField | TextField;

export interface FormGroup {
  name: string;
  label: string;
  /** What one row is: "catch". */
  row: string;
  /** Rows drawn at first; an install value may say how many. */
  rows: number;
  rowsFrom: ValueKey | null;
  fields: FormField[];
}

export interface SheetForm {
  title: string;
  /** The formula in words. */
  formula: string;
  caution: string;
  fields: FormField[];
  groups: FormGroup[];
}

type Extra = Partial<Pick<FieldBase, "optional" | "when" | "prefill">>;
const base = (name: string, label: string, help: string, extra: Extra): FieldBase => ({
  name,
  label,
  help,
  optional: extra.optional ?? false,
  when: extra.when ?? null,
  prefill: extra.prefill ?? [],
});

/** A number with a unit; `range` is SI and inclusive. */
export function amountField(
  name: string,
  label: string,
  quantity: Quantity,
  range: readonly [min: number, max: number],
  help: string,
  extra: Extra & { preset?: number; as?: UnitPair } = {},
): AmountField {
  const [min, max] = range;
  return { ...base(name, label, help, extra), kind: "quantity", quantity, min, max, as: extra.as ?? null, preset: extra.preset ?? null };
}

/** One of several; `options` maps each value to its label. */
export function choiceField(
  name: string,
  label: string,
  options: Record<string, string>,
  help: string,
  extra: Extra & { preset?: string } = {},
): ChoiceField {
  const list = Object.entries(options).map(([value, text]) => ({ value, label: text }));
  return { ...base(name, label, help, extra), kind: "choice", options: list, preset: extra.preset ?? null };
}

export function textField(name: string, label: string, help: string, extra: Extra & { preset?: string } = {}): TextField {
  return { ...base(name, label, help, extra), kind: "text", maxLength: 80, preset: extra.preset ?? null };
}
