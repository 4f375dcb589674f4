import { FieldErrors } from "#app/components/forms/Field";
import type { FieldProps } from "#app/lib/schemas/form-reply";

interface PhotoInputProps extends FieldProps {
  label: string;
  hint?: string;
  /** How many may be chosen. */
  most?: number;
}

/** Pictures to go with a record. Those that arrived with a form that came back stay in it by their file ids, parted by commas. */
export function PhotoInput({ id, name, label, hint, most = 1, defaultValue, errors }: PhotoInputProps) {
  const here = defaultValue.split(",").filter(Boolean).length;
  return (
    <div className="field photo-field">
      <label htmlFor={id}>
        {label} <span className="field-optional">(may stay empty)</span>
      </label>
      <p className="field-hint" id={`${id}-hint`}>
        {hint && `${hint} `}JPEG, PNG or WebP, up to 12 MB{most > 1 ? ` each, ${most} at most` : ""}. Place and device are taken out of it.
      </p>
      <input
        id={id}
        name={name}
        type="file"
        accept="image/jpeg,image/png,image/webp"
        multiple={most > 1}
        capture={most > 1 ? undefined : "environment"}
        aria-describedby={`${id}-hint${errors?.length ? ` ${id}-error` : ""}`}
        aria-invalid={Boolean(errors?.length) || undefined}
      />
      {here > 0 && (
        <>
          <input type="hidden" name={name} value={defaultValue} />
          <p>{here === 1 ? "1 photo is here already." : `${here} photos are here already.`}</p>
        </>
      )}
      <FieldErrors id={`${id}-error`} errors={errors} />
    </div>
  );
}
