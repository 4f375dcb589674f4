import { useState } from "react";
import { NumberInput } from "#app/components/forms/NumberInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";

export interface SheetField {
  kind: "quantity" | "choice" | "text";
  name: string;
  label: string;
  help: string;
  optional: boolean;
  when: { field: string; is: string } | null;
  unit: string;
  options: { value: string; label: string }[];
  value: string;
  /** Decided by the install: sent along, not asked. */
  fixed: boolean;
}

export interface Sheet {
  title: string;
  formula: string;
  caution: string;
  fields: SheetField[];
  groups: { name: string; label: string; row: string; rows: number; fields: SheetField[] }[];
}

interface SheetFieldsProps extends PartProps {
  sheet: Sheet;
  live: boolean;
}

/** A bench sheet inside the row, drawn from its definition. Fields that hang on a choice show once that choice is made. */
export function SheetFields({ item, n, entry, sheet, live, units }: SheetFieldsProps) {
  const prefix = `p${n}.s.`;
  return (
    <div className="sheet-fields">
      <h3>{sheet.title} sheet</h3>
      <CautionSlab title="work out, then look again.">{sheet.caution}</CautionSlab>
      <p className="field-hint">{sheet.formula}</p>
      <FieldSet item={item} entry={entry} units={units} n={n} prefix={prefix} fields={sheet.fields} row={0} live={live} />
      {sheet.groups.map((group) => (
        <Rows key={group.name} item={item} entry={entry} units={units} n={n} prefix={`${prefix}${group.name}.`} group={group} live={live} />
      ))}
    </div>
  );
}

function Rows({ group, prefix, live, ...rest }: PartProps & { group: Sheet["groups"][number]; prefix: string; live: boolean }) {
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
          <FieldSet {...rest} prefix={prefix} fields={group.fields} row={row} live={live} />
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

type FieldSetProps = PartProps & { prefix: string; fields: SheetField[]; row: number; live: boolean };

function FieldSet({ item, entry, prefix, fields, row, live }: FieldSetProps) {
  const [chosen, setChosen] = useState<Record<string, string>>({});
  const now = (field: string) =>
    chosen[field] ?? typedIn(entry, `${prefix}${field}`, row, fields.find((f) => f.name === field)?.value ?? "");
  return (
    <div className="field-row">
      {fields.map((field) => {
        const name = `${prefix}${field.name}`;
        if (field.fixed) return <input key={field.name} type="hidden" name={name} value={field.value} />;
        const hidden = live && field.when !== null && now(field.when.field) !== field.when.is;
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
          <div key={field.name} hidden={hidden} className="sheet-field">
            {field.kind === "choice" ? (
              <Select
                {...common}
                options={field.options}
                empty="choose"
                onChange={(value) => setChosen((c) => ({ ...c, [field.name]: value }))}
              />
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
