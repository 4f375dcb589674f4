import { useState } from "react";
import { NumberInput } from "#app/components/forms/NumberInput";
import { BandTold } from "#app/components/gate/BandTold";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import type { CriterionView } from "#app/lib/views/gate-parts";

interface MeasureFieldsProps extends PartProps {
  label: string;
  places: string[];
  criterion: CriterionView;
}

/** One value per place, the unit beside each, its band drawn and told at once. */
export function MeasureFields({ item, n, entry, units, label, places, criterion }: MeasureFieldsProps) {
  const name = `p${n}.value`;
  return (
    <fieldset className="part-fields">
      <legend className={places.length > 1 ? undefined : "sr-only"}>{label}</legend>
      {places.map((place, row) => (
        <ValueField
          key={place || row}
          id={controlId(item, name, row)}
          name={name}
          label={place || label}
          typed={typedIn(entry, name, row)}
          errors={errorsOf(entry, name, row)}
          criterion={criterion}
          units={units}
          withSource={row === 0}
        />
      ))}
    </fieldset>
  );
}

interface ValueFieldProps {
  id: string;
  name: string;
  label: string;
  typed: string;
  errors: string[];
  criterion: CriterionView;
  units: "si" | "us";
  withSource: boolean;
  onText?: (text: string) => void;
}

export function ValueField({ id, name, label, typed, errors, criterion, units, withSource, onText }: ValueFieldProps) {
  const [text, setText] = useState(typed);
  const take = (next: string) => {
    setText(next);
    onText?.(next);
  };
  return (
    <div className="value-field">
      <NumberInput id={id} name={name} label={label} unit={criterion.unit} size={7} defaultValue={typed} errors={errors} onChange={take} />
      <BandTold criterion={criterion} text={text} units={units} place={label} withSource={withSource} />
    </div>
  );
}
