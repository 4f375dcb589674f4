import { Field } from "#app/components/forms/Field";
import { type TypedControlProps, wire } from "#app/components/forms/types";
import { cx } from "#app/components/ui/cx";

interface TextInputProps extends TypedControlProps {
  type?: "text" | "email" | "password" | "search" | "date" | "time" | "datetime-local" | "url" | "tel";
  /** More than one line. */
  rows?: number;
  /** In the figures' type: registrations, serial numbers. */
  figures?: boolean;
  /** Characters of room; full width without it. */
  size?: number;
  placeholder?: string;
  className?: string;
}

export function TextInput(props: TextInputProps) {
  const { id, name, label, hint, errors, labelHidden, optional, unit, rows, figures, onChange, type = "text", className, ...rest } = props;
  const { control, aria } = wire(props);
  const common = { ...rest, ...aria, id: control, name };
  return (
    <Field {...{ id, name, label, hint, errors, labelHidden, optional, className }}>
      {rows ? (
        <textarea
          {...withoutInputOnly(common)}
          rows={rows}
          style={{ minHeight: `calc(${rows}lh + 24px)` }}
          className="field-frame field-area"
          onChange={onChange && ((event) => onChange(event.currentTarget.value))}
        />
      ) : (
        <span className={cx("field-frame", figures && "field-figures", props.size && "field-sized")}>
          <input {...common} type={type} onChange={onChange && ((event) => onChange(event.currentTarget.value))} />
          {unit && <span className="field-unit">{unit}</span>}
        </span>
      )}
    </Field>
  );
}

function withoutInputOnly<T extends { size?: number; pattern?: string }>({ size: _size, pattern: _pattern, ...rest }: T) {
  return rest;
}
