import { FieldErrors } from "#app/components/forms/Field";
import { NumberInput } from "#app/components/forms/NumberInput";
import type { SelectOption } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { CrankFields } from "#app/components/gate/CrankFields";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import { MeasureFields } from "#app/components/gate/MeasureFields";
import { SheetFields } from "#app/components/gate/SheetFields";
import { TallyFields } from "#app/components/gate/TallyFields";
import { TorqueFields } from "#app/components/gate/TorqueFields";
import type { PartView } from "#app/lib/views/gate-parts";

interface PartFieldsProps extends PartProps {
  part: PartView;
  tools: SelectOption[];
  live: boolean;
}

/** The fields of one part of an item, by what evidence it asks for. */
export function PartFields({ part, tools, live, ...rest }: PartFieldsProps) {
  const { item, n, entry } = rest;
  switch (part.kind) {
    case "tick":
      return part.text ? (
        <p className="tick-reference">
          As the maker says: <b>{part.text}</b> <span>{part.from}</span>
        </p>
      ) : null;
    case "measure":
      return <MeasureFields {...rest} {...part} />;
    case "torque":
      return <TorqueFields {...rest} {...part} tools={tools} />;
    case "tally":
      return <TallyFields {...rest} {...part} live={live} />;
    case "crank":
      return <CrankFields {...rest} {...part} live={live} />;
    case "sheet":
      return <SheetFields {...rest} sheet={part.sheet} live={live} />;
    case "photo":
      return <PhotoField {...rest} of={part.of} optional={part.optional} />;
    case "text":
      return (
        <TextInput
          id={controlId(item, `p${n}.text`)}
          name={`p${n}.text`}
          label={part.asks}
          rows={2}
          maxLength={4000}
          defaultValue={typedIn(entry, `p${n}.text`, 0)}
          errors={errorsOf(entry, `p${n}.text`)}
        />
      );
    case "reading":
      return (
        <fieldset className="part-fields">
          <legend className={part.places.length > 1 ? undefined : "sr-only"}>{part.label}</legend>
          <div className="field-row">
            {part.places.map((place, row) => (
              <NumberInput
                key={place || row}
                id={controlId(item, `p${n}.value`, row)}
                name={`p${n}.value`}
                label={place || part.label}
                unit={part.unit}
                size={7}
                optional={part.optional}
                defaultValue={typedIn(entry, `p${n}.value`, row)}
                errors={errorsOf(entry, `p${n}.value`, row)}
              />
            ))}
          </div>
        </fieldset>
      );
    case "computed":
      return null;
  }
}

function PhotoField({ item, n, entry, of, optional }: PartProps & { of: string; optional: boolean }) {
  const name = `p${n}.photo`;
  const id = controlId(item, name);
  const errors = errorsOf(entry, name);
  const stored = (entry.typed[name] ?? []).filter(Boolean);
  return (
    <div className="field photo-field">
      <label htmlFor={id}>
        Photo: {of}
        {optional && <span className="field-optional"> (may stay empty)</span>}
      </label>
      <p className="field-hint" id={`${id}-hint`}>
        JPEG, PNG or WebP, up to 12 MB each. Place and device are taken out of it.
      </p>
      <input
        id={id}
        name={name}
        type="file"
        accept="image/jpeg,image/png,image/webp"
        capture="environment"
        multiple
        aria-describedby={`${id}-hint${errors.length ? ` ${id}-error` : ""}`}
        aria-invalid={errors.length > 0 || undefined}
      />
      {stored.map((file) => (
        <input key={file} type="hidden" name={name} value={file} />
      ))}
      {stored.length > 0 && <p>{stored.length === 1 ? "1 photo is here already." : `${stored.length} photos are here already.`}</p>}
      <FieldErrors id={`${id}-error`} errors={errors} />
    </div>
  );
}
