import type { HTMLAttributes } from "react";

/** What every control takes. It fits what conform's `getInputProps` gives, spread on the component, and plain props without it. */
export interface ControlProps {
  name: string;
  /** Defaults to the name. */
  id?: string;
  label: string;
  /** Shown under the label, read with the field. */
  hint?: string;
  /** Each one says why and what to enter instead. */
  errors?: string[];
  defaultValue?: string | number;
  required?: boolean;
  readOnly?: boolean;
  disabled?: boolean;
  form?: string;
  autoFocus?: boolean;
  /** Hide the label from sight where the row already says it. */
  labelHidden?: boolean;
  /** Shown after the label of a field that may stay empty. */
  optional?: boolean;
  autoComplete?: string;
  maxLength?: number;
  minLength?: number;
  pattern?: string;
}

export interface TypedControlProps extends ControlProps {
  /** Written inside the field's frame at its right. */
  unit?: string;
  inputMode?: HTMLAttributes<HTMLInputElement>["inputMode"];
  value?: string;
  onChange?: (value: string) => void;
  onBlur?: () => void;
}

/** The ids that tie hint and errors to the control. */
export function wire({ id, name, hint, errors }: Pick<ControlProps, "id" | "name" | "hint" | "errors">) {
  const control = id ?? name;
  const hintId = `${control}-hint`;
  const errorId = `${control}-error`;
  const bad = Boolean(errors?.length);
  const described = [hint && hintId, bad && errorId].filter(Boolean).join(" ");
  return { control, hintId, errorId, aria: { "aria-describedby": described || undefined, "aria-invalid": bad || undefined } };
}
