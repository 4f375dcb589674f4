import { useState } from "react";
import { NumberInput } from "#app/components/forms/NumberInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";
import type { FieldView, SheetView } from "#app/lib/views/gate-parts";

interface SheetFieldsProps extends PartProps {
  sheet: SheetView;
  live: boolean;
}

/** A bench sheet inside the row, drawn from its definition. Fields that hang on a choice show once that choice is made, without scripts too. */
export function SheetFields({ item, n, entry, sheet, live, units }: SheetFieldsProps) {
  const prefix = `p${n}.s.`;
  return (
    <div className="sheet-fields">
      <h3>{sheet.title} sheet</h3>
      <CautionSlab title="work out, then look again.">{sheet.caution}</CautionSlab>
      <p className="field-hint">{sheet.formula}</p>
      <FieldSet item={item} entry={entry} units={units} n={n} prefix={prefix} fields={sheet.fields} row={0} />
      {sheet.groups.map((group) => (
        <Rows key={group.name} item={item} entry={entry} units={units} n={n} prefix={`${prefix}${group.name}.`} group={group} live={live} />
      ))}
    </div>
  );
}

function Rows({ group, prefix, live, ...rest }: PartProps & { group: SheetView["groups"][number]; prefix: string; live: boolean }) {
  const [added, setAdded] = useState(0);
  const sent = Math.max(0, ...group.fields.map((f) => rest.entry.typed[`${prefix}${f.name}`]?.length ?? 0));
  const rows = Math.max(group.rows, sent) + added + (live ? 0 : 1);
  return (
    <fieldset className="part-fields">
      <legend>{group.label}</legend>
      {Array.from({ length: rows }, (_, row) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: rows are numbered
        <fieldset className="sheet-row" key={row}>
          <legend>
            {group.row} {row + 1}
          </legend>
          <FieldSet {...rest} prefix={prefix} fields={group.fields} row={row} />
        </fieldset>
      ))}
      {live && (
        <Fitting type="button" variant="quiet" onClick={() => setAdded(added + 1)}>
          One more {group.row}
        </Fitting>
      )}
    </fieldset>
  );
}

type FieldSetProps = PartProps & { prefix: string; fields: FieldView[]; row: number };

function FieldSet({ item, entry, prefix, fields, row }: FieldSetProps) {
  return (
    <div className="field-row">
      {fields.map((field) => {
        const name = `${prefix}${field.name}`;
        if (field.fixed) return <input key={field.name} type="hidden" name={name} value={field.value} />;
        const common = {
          id: controlId(item, name, row),
          name,
          label: field.label,
          hint: field.help,
          optional: field.optional,
          errors: errorsOf(entry, name, row),
          defaultValue: typedIn(entry, name, row, field.value),
        };
        // Kept in the form while hidden, so that each row sends as many texts as the others.
        return (
          <div key={field.name} className="sheet-field" {...hangsOn(field, fields)}>
            {field.kind === "choice" ? (
              <Select {...common} options={field.options} empty="choose" />
            ) : field.kind === "quantity" ? (
              <NumberInput {...common} unit={field.unit} size={7} />
            ) : (
              <TextInput {...common} maxLength={80} />
            )}
          </div>
        );
      })}
    </div>
  );
}

/** Where the install has decided the choice, the field is there or not; else the style sheet shows it with the option that is chosen. */
function hangsOn({ name, when }: FieldView, fields: FieldView[]): { hidden?: boolean; "data-field": string; "data-when"?: string } {
  const choice = fields.find((f) => f.name === when?.field);
  if (!when || !choice) return { "data-field": name };
  return choice.fixed
    ? { "data-field": name, hidden: choice.value !== when.is }
    : { "data-field": name, "data-when": `${when.field}=${when.is}` };
}
