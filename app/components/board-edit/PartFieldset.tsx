import { NumberInput } from "#app/components/forms/NumberInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { Choice } from "#app/components/ui/Choice";
import type { FieldProps } from "#app/lib/schemas/form-reply";
import type { ItemFormView, PartView } from "#app/lib/views/edit-item";

export interface FormHands {
  field: (name: string, otherwise?: string) => FieldProps;
  ticked: (name: string, otherwise: boolean) => boolean;
}

const BOX = "min-w-0 border-t border-line py-4";
const ROW = "flex flex-wrap items-start gap-x-4 gap-y-3";

/** One part of the evidence that the item asks for: its words, its band, or away with it. */
export function PartFieldset({ part, field, ticked }: { part: PartView } & FormHands) {
  const at = `p${part.n}`;
  return (
    <fieldset className={BOX}>
      <legend className="sr-only">{part.kind}</legend>
      <p className="pb-2">
        <b>{part.kind}</b>
        {part.places && <span className="text-ink-2">, at {part.places}</span>}
      </p>
      <div className={ROW}>
        {part.label !== null && (
          <TextInput {...field(`${at}.label`, part.label)} label={part.labelName} maxLength={200} className="min-w-0 flex-[1_1_16rem]" />
        )}
        {part.band && <Band at={at} band={part.band} field={field} />}
        {part.count !== null && (
          <NumberInput {...field(`${at}.count`, part.count)} label="Fasteners" inputMode="numeric" size={4} optional />
        )}
      </div>
      <div className={`${ROW} pt-3`}>
        {part.optional !== null && (
          <Choice kind="checkbox" name={`${at}.optional`} value="yes" defaultChecked={ticked(`${at}.optional`, part.optional)}>
            May stay empty
          </Choice>
        )}
        <Choice kind="checkbox" name={`${at}.drop`} value="yes" defaultChecked={ticked(`${at}.drop`, false)}>
          Ask for it no longer
        </Choice>
      </div>
    </fieldset>
  );
}

function Band({ at, band, field }: { at: string; band: NonNullable<PartView["band"]>; field: FormHands["field"] }) {
  return (
    <>
      <NumberInput {...field(`${at}.min`, band.min)} label="Least" unit={band.unit} size={7} optional />
      <NumberInput {...field(`${at}.max`, band.max)} label="Most" unit={band.unit} size={7} optional />
      <TextInput
        {...field(`${at}.source`, band.source)}
        label="Where it was read: paper, issue, page"
        hint={band.note || undefined}
        maxLength={200}
        className="min-w-0 max-w-[420px] flex-[1_1_16rem]"
      />
    </>
  );
}

/** One part more; none where no kind is chosen. */
export function NewPart({ view, field, open }: { view: ItemFormView; open: boolean } & Pick<FormHands, "field">) {
  return (
    <details className={BOX} open={open}>
      <summary className="min-h-hit py-3 font-semibold text-fitting-ink">Ask for something more</summary>
      <div className={`${ROW} pb-3`}>
        <Select {...field("new.kind")} label="Kind of evidence" options={view.kinds} empty="nothing more" />
        <TextInput
          {...field("new.label")}
          label="What is measured, shown or written down"
          hint="For a tick: what the maker’s papers must say, or nothing."
          maxLength={120}
          className="min-w-0 flex-[1_1_16rem]"
        />
      </div>
      <p className="max-w-[72ch] pb-2 text-ink-2">For a measurement, a torque or a reading:</p>
      <div className={ROW}>
        <Select {...field("new.quantity")} label="What it is" options={view.quantities} empty="choose one" />
        <NumberInput {...field("new.min")} label="Least" size={7} optional />
        <NumberInput {...field("new.max")} label="Most" size={7} optional />
        <NumberInput {...field("new.count")} label="Fasteners, of a torque" inputMode="numeric" size={4} optional />
        <TextInput {...field("new.source")} label="Where it was read" maxLength={200} className="min-w-0 flex-[1_1_14rem]" />
        <TextInput
          {...field("new.places")}
          label="Places, one on a line"
          rows={2}
          maxLength={400}
          optional
          className="min-w-0 flex-[1_1_14rem]"
        />
      </div>
    </details>
  );
}
