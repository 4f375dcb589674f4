import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { ItemNut } from "#app/components/ui/ItemNut";
import type { RatingGroup, RatingRow } from "#app/lib/views/new-install-ratings";

type Field = "value" | "source";

export interface RatingFieldsProps {
  group: RatingGroup;
  /** What stands in a field: as typed, or as it starts. */
  initial: (key: string, field: Field) => string;
  errors: (key: string, field: Field) => string[] | undefined;
}

export const ratingName = (key: string, field: Field) => `values.${key}.${field}`;
export const ratingId = (key: string, field: Field) => `${key}-${field}`;

/** One group of ratings or limits: each with its number, its unit and where it was read. */
export function RatingFields({ group, initial, errors }: RatingFieldsProps) {
  return (
    <section aria-labelledby={group.id} className="border-t-2 border-ink">
      <div className="px-4 py-4 tablet:px-6">
        <h2 id={group.id} className="text-h3">
          {group.title}
        </h2>
        <p className="text-ink-2">{group.says}</p>
      </div>
      {group.rows.map((row) => (
        <fieldset
          key={row.key}
          className="grid grid-cols-[150px_minmax(0,1fr)] items-start gap-x-4 gap-y-2 border-t border-line px-4 py-3 tablet:grid-cols-[minmax(0,1fr)_190px_minmax(0,1fr)] tablet:items-center tablet:pr-6 tablet:pl-0 wide:grid-cols-[minmax(0,1fr)_220px_minmax(0,380px)]"
        >
          <legend className="sr-only">{row.label}</legend>
          <div className="col-span-2 grid grid-cols-[80px_minmax(0,1fr)] items-center gap-x-3 tablet:col-span-1 tablet:grid-cols-[104px_minmax(0,1fr)]">
            <State row={row} />
            <p>
              <b aria-hidden="true">{row.label}</b> <span className="block text-note text-ink-2">{row.help}</span>
              {row.basis && <span className="block text-note text-ink-2">Starting point: {row.basis}.</span>}
            </p>
          </div>
          <NumberInput
            id={ratingId(row.key, "value")}
            name={ratingName(row.key, "value")}
            label={row.unit ? `Value in ${row.unit}` : "How many"}
            unit={row.unit || undefined}
            inputMode={row.wholeNumber ? "numeric" : "decimal"}
            size={7}
            maxLength={20}
            defaultValue={initial(row.key, "value")}
            errors={errors(row.key, "value")}
          />
          <TextInput
            id={ratingId(row.key, "source")}
            name={ratingName(row.key, "source")}
            label="Where it was read"
            maxLength={200}
            autoComplete="off"
            defaultValue={initial(row.key, "source")}
            errors={errors(row.key, "source")}
          />
        </fieldset>
      ))}
    </section>
  );
}

function State({ row }: { row: RatingRow }) {
  return (
    <p className="flex flex-col items-center text-center text-note leading-tight font-[600]">
      <ItemNut state="todo" size={40} />
      <span className="max-w-[80px]">{row.preset ? "not confirmed" : "empty"}</span>
    </p>
  );
}
