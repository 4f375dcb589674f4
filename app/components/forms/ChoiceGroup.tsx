import type { ReactNode } from "react";
import { FieldErrors } from "#app/components/forms/Field";
import { type ControlProps, wire } from "#app/components/forms/types";
import { Choice } from "#app/components/ui/Choice";
import { cx } from "#app/components/ui/cx";

export interface ChoiceOption {
  value: string;
  label: ReactNode;
  note?: ReactNode;
  disabled?: boolean;
}

interface ChoiceGroupProps extends Pick<ControlProps, "id" | "name" | "label" | "hint" | "errors" | "required" | "labelHidden" | "form"> {
  options: ChoiceOption[];
  kind?: "radio" | "checkbox";
  defaultValue?: string | string[];
  value?: string | string[];
  onChange?: (value: string, checked: boolean) => void;
  /** Number of the question, in figures. */
  no?: number;
  /** Not answered yet: a blue edge shows that it waits. */
  open?: boolean;
  /** One under the other, each over the whole width. */
  stacked?: boolean;
}

/** A question with its answers as fittings: a fieldset, so that the question is read with each answer. */
export function ChoiceGroup(props: ChoiceGroupProps) {
  const {
    id,
    name,
    label,
    hint,
    errors,
    options,
    kind = "radio",
    defaultValue,
    value,
    onChange,
    no,
    open = false,
    stacked = false,
  } = props;
  const { control, hintId, errorId, aria } = wire({ id, name, hint, errors });
  const held = (list: string | string[] | undefined, one: string) => (Array.isArray(list) ? list.includes(one) : list === one);
  return (
    <fieldset
      id={control}
      className={cx("choices", open && "choices-open", stacked && "choices-stacked")}
      aria-describedby={aria["aria-describedby"]}
    >
      <legend className={props.labelHidden ? "sr-only" : undefined}>
        {no !== undefined && <span className="fig choices-no">{no} </span>}
        {label}
      </legend>
      {hint && (
        <p id={hintId} className="field-hint">
          {hint}
        </p>
      )}
      <div className="choices-row">
        {options.map((option) => (
          <Choice
            key={option.value}
            id={`${control}-${option.value}`}
            name={name}
            value={option.value}
            kind={kind}
            note={option.note}
            disabled={option.disabled}
            form={props.form}
            required={kind === "radio" ? props.required : undefined}
            {...(value === undefined
              ? { defaultChecked: held(defaultValue, option.value) }
              : { checked: held(value, option.value), onChange: onChange ? undefined : () => undefined })}
            {...(onChange ? { onChange: (checked: boolean) => onChange(option.value, checked) } : {})}
          >
            {option.label}
          </Choice>
        ))}
      </div>
      <FieldErrors id={errorId} errors={errors} />
    </fieldset>
  );
}
