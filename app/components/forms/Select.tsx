import { Field } from "#app/components/forms/Field";
import { type ControlProps, wire } from "#app/components/forms/types";

export interface SelectOption {
  value: string;
  label: string;
  disabled?: boolean;
}

interface SelectProps extends Omit<ControlProps, "maxLength" | "minLength" | "pattern" | "readOnly"> {
  options: SelectOption[];
  /** First, empty option: "choose a wrench". */
  empty?: string;
  value?: string;
  onChange?: (value: string) => void;
  className?: string;
}

export function Select(props: SelectProps) {
  const { id, name, label, hint, errors, labelHidden, optional, options, empty, onChange, className, ...rest } = props;
  const { control, aria } = wire(props);
  return (
    <Field {...{ id, name, label, hint, errors, labelHidden, optional, className }}>
      <span className="field-frame field-select">
        <select {...rest} {...aria} id={control} name={name} onChange={onChange && ((event) => onChange(event.currentTarget.value))}>
          {empty !== undefined && <option value="">{empty}</option>}
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
      </span>
    </Field>
  );
}
