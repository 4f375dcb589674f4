import { BandRule } from "#app/components/ui/BandRule";
import { fromSI } from "#app/lib/units/convert";
import { displayUnit, format, parseEntry } from "#app/lib/units/display";
import type { CriterionView } from "#app/lib/views/gate-parts";

interface BandToldProps {
  criterion: CriterionView;
  /** As typed; empty = nothing yet. */
  text: string;
  units: "si" | "us";
  place: string;
  /** Where the band is from: said once where several places have the same. */
  withSource?: boolean;
}

/** The band as a rule with the value's mark, and in words at once whether it is in. The server tells again. */
export function BandTold({ criterion, text, units, place, withSource = true }: BandToldProps) {
  const { quantity, band, bandText, from, isDefault } = criterion;
  const unit = displayUnit(quantity, units);
  const entry = text.trim() ? parseEntry(text, quantity, units) : null;
  const si = entry?.ok ? entry.si : null;
  const out = si !== null && band !== null && ((band.min !== null && si < band.min) || (band.max !== null && si > band.max));
  const shown = (n: number | null | undefined) => (n === null || n === undefined ? null : fromSI(n, unit));
  const told = si === null ? null : out ? "Out of the band" : "In the band";
  return (
    <div className="band-told">
      {band && (
        <BandRule
          min={shown(band.min)}
          max={shown(band.max)}
          value={si === null ? null : fromSI(si, unit)}
          label={`${place ? `${place}: ` : ""}${si === null ? "nothing entered" : format(quantity, si, units).text}, band ${bandText}`}
        />
      )}
      <p>
        <output className={out || entry?.ok === false ? "told told-out" : "told"}>{entry && !entry.ok ? entry.sentence : told}</output>
        <span>
          {bandText}
          {withSource && ", "}
          {withSource && (isDefault ? <b>default, not confirmed: {from}</b> : from)}
        </span>
      </p>
    </div>
  );
}
