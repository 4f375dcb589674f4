import { useState } from "react";
import { Form } from "react-router";
import { NumberInput } from "#app/components/forms/NumberInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { useLive } from "#app/components/ui/useLive";
import type { BenchView } from "#app/lib/views/bench";
import type { BenchField, BenchGroup } from "#app/lib/views/bench-form";

/** The calculator's form, sent in the address. Each field says where its value came from; fields that hang on a choice show with it, without scripts too. */
export function BenchForm({ view, id }: { view: BenchView; id: string }) {
  return (
    <Form method="get" id={id} className="bench-form" noValidate>
      <input type="hidden" name="units" value={view.units} />
      <Fields fields={view.fields} />
      {view.groups.map((group) => (
        <Rows key={group.name} group={group} />
      ))}
    </Form>
  );
}

function Rows({ group }: { group: BenchGroup }) {
  const live = useLive();
  const [added, setAdded] = useState(0);
  const more = Array.from({ length: live ? added : 1 }, (_, n) => renumbered(group, group.rows.length + n));
  return (
    <fieldset className="bench-group">
      <legend>{group.label}</legend>
      {[...group.rows, ...more].map((row, n) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: rows are numbered
        <fieldset className="bench-row" key={n}>
          <legend>
            {group.row} {n + 1}
          </legend>
          <Fields fields={row} />
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

const renumbered = (group: BenchGroup, n: number): BenchField[] =>
  group.blank.map((field) => ({ ...field, id: `bench-${group.name}-${n}-${field.name.split(".").at(-1)}` }));

function Fields({ fields }: { fields: BenchField[] }) {
  return (
    <div className="bench-fields">
      {fields.map((field) => (
        <Field key={field.id} field={field} />
      ))}
    </div>
  );
}

function Field({ field }: { field: BenchField }) {
  const { id, name, label, help, optional, errors, unit, options, kind, origin, value, when } = field;
  const [typed, setTyped] = useState(false);
  const from = typed ? "typed" : origin;
  const common = { id, name, label, hint: help, optional, errors, defaultValue: value, onChange: () => setTyped(true) };
  const own = name.split(".").at(-1);
  return (
    <div className="bench-field" data-field={own} data-when={when ? `${when.field}=${when.is}` : undefined}>
      {kind === "choice" ? (
        <Select {...common} options={options} empty="choose" />
      ) : kind === "quantity" ? (
        <NumberInput {...common} unit={unit} size={8} />
      ) : (
        <TextInput {...common} maxLength={80} />
      )}
      <p className={from ? "bench-origin" : "bench-origin-none"}>{from || "\u00a0"}</p>
    </div>
  );
}
