import { NumberInput } from "#app/components/forms/NumberInput";
import { PhotoInput } from "#app/components/forms/PhotoInput";
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
      return (
        <PhotoInput
          id={controlId(item, `p${n}.photo`)}
          name={`p${n}.photo`}
          label={`Photo: ${part.of}`}
          optional={part.optional}
          defaultValue={(entry.typed[`p${n}.photo`] ?? []).filter(Boolean).join(",")}
          joined={false}
          errors={errorsOf(entry, `p${n}.photo`)}
        />
      );
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
