import type { ReactNode } from "react";
import { type ControlProps, wire } from "#app/components/forms/types";
import { cx } from "#app/components/ui/cx";

interface FieldProps extends Pick<ControlProps, "id" | "name" | "label" | "hint" | "errors" | "labelHidden" | "optional"> {
  /** The control itself: give it the id and aria of `wire`. */
  children: ReactNode;
  /** Narrow fields stand beside each other. */
  className?: string;
}

/** Label, hint, control, errors, wired by ids in one place. */
export function Field({ id, name, label, hint, errors, labelHidden = false, optional = false, children, className }: FieldProps) {
  const { control, hintId, errorId } = wire({ id, name, hint, errors });
  return (
    <div className={cx("field", errors?.length && "field-bad", className)}>
      <label htmlFor={control} className={labelHidden ? "sr-only" : undefined}>
        {label}
        {optional && <span className="field-optional"> (may stay empty)</span>}
      </label>
      {hint && (
        <p id={hintId} className="field-hint">
          {hint}
        </p>
      )}
      {children}
      <FieldErrors id={errorId} errors={errors} />
    </div>
  );
}

export function FieldErrors({ id, errors }: { id: string; errors?: string[] }) {
  if (!errors?.length) return null;
  return (
    <ul id={id} className="field-errors">
      {errors.map((error) => (
        <li key={error}>{error}</li>
      ))}
    </ul>
  );
}
