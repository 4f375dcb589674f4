import { useState } from "react";
import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import { Fitting } from "#app/components/ui/Fitting";

interface TallyFieldsProps extends PartProps {
  mode: "pairs" | "out" | "in";
  places: { place: string; out: number | null }[];
  expected: number | null;
  words: { out: string; in: string };
  /** The page runs: rows can be added here. */
  live: boolean;
}

/** Counts place by place: what came out, what went in. */
export function TallyFields({ item, n, entry, mode, places, expected, words, live }: TallyFieldsProps) {
  const at = (field: string) => `p${n}.${field}`;
  const sent = entry.typed[at("place")]?.length ?? 0;
  const spare = mode === "in" ? 0 : live ? 0 : 2;
  const [added, setAdded] = useState(0);
  const rows = Math.max(places.length, sent) + spare + added;
  const capital = (s: string) => `${s[0]?.toUpperCase() ?? ""}${s.slice(1)}`;
  return (
    <fieldset className="part-fields">
      <legend>{expected === null ? "Count, place by place" : `Count, place by place: ${expected} in all`}</legend>
      {Array.from({ length: rows }, (_, row) => {
        const known = places[row];
        const label = known?.place || `place ${row + 1}`;
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: the row is the identity, its name is what is typed
          <div className="field-row" key={row}>
            {mode === "in" && known?.place ? (
              <p className="tally-was">
                <b>{known.place}</b>
                {known.out !== null && `${words.out}: ${known.out}`}
                <input type="hidden" name={at("place")} value={known.place} />
              </p>
            ) : (
              <TextInput
                id={controlId(item, at("place"), row)}
                name={at("place")}
                label="Place"
                size={12}
                maxLength={80}
                defaultValue={typedIn(entry, at("place"), row, known?.place ?? "")}
                errors={errorsOf(entry, at("place"), row)}
              />
            )}
            {mode !== "in" && (
              <NumberInput
                id={controlId(item, at("out"), row)}
                name={at("out")}
                label={capital(words.out)}
                inputMode="numeric"
                size={4}
                defaultValue={typedIn(entry, at("out"), row)}
                errors={errorsOf(entry, at("out"), row)}
              />
            )}
            {mode !== "out" && (
              <NumberInput
                id={controlId(item, at("in"), row)}
                name={at("in")}
                label={mode === "in" ? `${known?.place ?? ""} ${words.in}`.trim() : capital(words.in)}
                inputMode="numeric"
                size={4}
                defaultValue={typedIn(entry, at("in"), row)}
                errors={errorsOf(entry, at("in"), row)}
              />
            )}
            <span className="sr-only">{label}</span>
          </div>
        );
      })}
      {live && mode !== "in" && (
        <Fitting type="button" variant="quiet" onClick={() => setAdded(added + 1)}>
          One more place
        </Fitting>
      )}
    </fieldset>
  );
}
