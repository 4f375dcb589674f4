import { useState } from "react";
import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import { Fitting } from "#app/components/ui/Fitting";

interface CrankFieldsProps extends PartProps {
  giveUpAfter: number;
  from: string;
  live: boolean;
}

const ROWS = 3;

/** The bursts of the starter, as they were: when each began, how long, and where pressure was seen. */
export function CrankFields({ item, n, entry, giveUpAfter, from, live }: CrankFieldsProps) {
  const at = (field: string) => `p${n}.${field}`;
  const [added, setAdded] = useState(0);
  const rows = Math.max(ROWS, entry.typed[at("began")]?.length ?? 0) + added + (live ? 0 : 3);
  return (
    <fieldset className="part-fields">
      <legend>Bursts of the starter</legend>
      <p className="field-hint">
        Stop and look for the cause when no pressure shows within {giveUpAfter} s of cranking in all ({from}). The starter maker’s on and
        rest times come first.
      </p>
      {Array.from({ length: rows }, (_, row) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: bursts are numbered
        <div className="field-row" key={row}>
          <b className="burst-no fig" aria-hidden="true">
            {row + 1}
          </b>
          <TextInput
            id={controlId(item, at("began"), row)}
            name={at("began")}
            type="time"
            label={`Burst ${row + 1} began`}
            size={8}
            defaultValue={typedIn(entry, at("began"), row)}
            errors={errorsOf(entry, at("began"), row)}
          />
          <NumberInput
            id={controlId(item, at("seconds"), row)}
            name={at("seconds")}
            label="Lasted"
            unit="s"
            size={4}
            defaultValue={typedIn(entry, at("seconds"), row)}
            errors={errorsOf(entry, at("seconds"), row)}
          />
          <NumberInput
            id={controlId(item, at("pressure"), row)}
            name={at("pressure")}
            label="Pressure seen after"
            unit="s"
            size={4}
            defaultValue={typedIn(entry, at("pressure"), row)}
            errors={errorsOf(entry, at("pressure"), row)}
          />
        </div>
      ))}
      {live && (
        <Fitting type="button" variant="quiet" onClick={() => setAdded(added + 1)}>
          One more burst
        </Fitting>
      )}
    </fieldset>
  );
}
