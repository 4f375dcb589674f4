import { useEffect, useState } from "react";
import { useParams } from "react-router";
import { readClock } from "#app/components/crank/crankStore";
import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import type { Burst } from "#app/lib/bench/crank";
import type { CrankClock } from "#app/lib/bench/crank-clock";

interface CrankFieldsProps extends PartProps {
  giveUpAfter: number;
  from: string;
  live: boolean;
}

const ROWS = 3;
const WHEN = {
  day: "numeric",
  month: "short",
  hour: "2-digit",
  minute: "2-digit",
  second: "2-digit",
  timeZoneName: "short",
} as const;

/** The bursts of the starter, as they were: when each began, how long, and where pressure was seen. */
export function CrankFields({ item, n, entry, giveUpAfter, from, live }: CrankFieldsProps) {
  const at = (field: string) => `p${n}.${field}`;
  const [added, setAdded] = useState(0);
  const { installId, gateId } = useParams();
  const [clock, setClock] = useState<CrankClock | null>(null);
  useEffect(() => setClock(readClock(item)), [item]);
  const rows = Math.max(ROWS, entry.typed[at("began")]?.length ?? 0) + added + (live ? 0 : 3);
  return (
    <fieldset className="part-fields">
      <legend>Bursts of the starter</legend>
      <p className="field-hint">
        Stop and look for the cause when no pressure shows within {giveUpAfter} s of cranking in all ({from}). The starter maker’s on and
        rest times come first.
      </p>
      {installId && gateId && (
        <Fitting href={`/installs/${installId}/gates/${gateId}/crank/${item}`} note="huge figures, works without network">
          Open the crank clock
        </Fitting>
      )}
      {clock && clock.bursts.length > 0 ? (
        <FromClock item={item} n={n} bursts={clock.bursts} onDrop={() => setClock(null)} />
      ) : (
        <>
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
        </>
      )}
    </fieldset>
  );
}

/** The bursts as the clock of this device has them, to the tenth of a second. */
function FromClock({ item, n, bursts, onDrop }: { item: string; n: number; bursts: Burst[]; onDrop: () => void }) {
  return (
    <div className="w-full">
      <p className="font-semibold">From the crank clock of this device:</p>
      <ol className="mt-1">
        {bursts.map((b, row) => (
          <li key={b.at} className="flex flex-wrap gap-x-5 border-b border-line py-2">
            <b className="fig">{row + 1}</b>
            <span>{new Date(b.at).toLocaleString("en-GB", WHEN)}</span>
            <Figure value={b.seconds.toFixed(1)} unit="s" />
            <span>{b.pressureAfter === null ? "no pressure" : `pressure after ${b.pressureAfter.toFixed(1)} s`}</span>
            <input type="hidden" name={`p${n}.began`} id={controlId(item, `p${n}.began`, row)} value={b.at} />
            <input type="hidden" name={`p${n}.seconds`} value={b.seconds} />
            <input type="hidden" name={`p${n}.pressure`} value={b.pressureAfter ?? ""} />
          </li>
        ))}
      </ol>
      <Fitting type="button" variant="quiet" onClick={onDrop}>
        Enter them by hand instead
      </Fitting>
    </div>
  );
}
