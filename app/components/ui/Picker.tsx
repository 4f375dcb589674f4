export interface PickerProps {
  /** Says what is picked; hidden from sight. */
  legend: string;
  name: string;
  options: { value: string; label: string }[];
  value?: string;
  defaultValue?: string;
  onChange?: (value: string) => void;
}

/** One of a few, in a row: filters and switches of a view. */
export function Picker({ legend, name, options, value, defaultValue, onChange }: PickerProps) {
  return (
    <fieldset className="picker">
      <legend className="sr-only">{legend}</legend>
      {options.map((option) => (
        <label key={option.value}>
          <input
            type="radio"
            name={name}
            value={option.value}
            checked={value === undefined ? undefined : value === option.value}
            defaultChecked={value === undefined ? defaultValue === option.value : undefined}
            onChange={onChange && (() => onChange(option.value))}
            readOnly={value !== undefined && !onChange ? true : undefined}
          />
          <span>{option.label}</span>
        </label>
      ))}
    </fieldset>
  );
}
