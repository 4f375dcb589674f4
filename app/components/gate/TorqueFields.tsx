import { useState } from "react";
import { NumberInput } from "#app/components/forms/NumberInput";
import { Select, type SelectOption } from "#app/components/forms/Select";
import { controlId, errorsOf, type PartProps, typedIn } from "#app/components/gate/entry";
import { ValueField } from "#app/components/gate/MeasureFields";
import { Figure } from "#app/components/ui/Figure";
import { wrenchSetting } from "#app/lib/bench/torque";
import { format, parseEntry } from "#app/lib/units/display";
import type { CriterionView } from "#app/lib/views/gate-parts";

interface TorqueFieldsProps extends PartProps {
  label: string;
  places: string[];
  criterion: CriterionView;
  count: number | null;
  lengthUnit: string;
  tools: SelectOption[];
}

/** True torque per place, the wrench with its due date, and what to set it to when an adapter is on. */
export function TorqueFields(props: TorqueFieldsProps) {
  const { item, n, entry, units, label, places, criterion, count, lengthUnit, tools } = props;
  const at = (field: string) => `p${n}.${field}`;
  const typed = (field: string, otherwise = "") => typedIn(entry, at(field), 0, otherwise);
  const [torques, setTorques] = useState(places.map((_, row) => typedIn(entry, at("value"), row)));
  const [adapter, setAdapter] = useState(typed("adapter"));
  const [length, setLength] = useState(typed("wrench"));
  return (
    <fieldset className="part-fields">
      <legend>{label}, true torque at the fastener</legend>
      {places.map((place, row) => (
        <ValueField
          key={place || row}
          id={controlId(item, at("value"), row)}
          name={at("value")}
          label={place || "True torque"}
          typed={typedIn(entry, at("value"), row)}
          errors={errorsOf(entry, at("value"), row)}
          criterion={criterion}
          units={units}
          withSource={row === 0}
          onText={(text) => setTorques((before) => before.map((t, i) => (i === row ? text : t)))}
        />
      ))}
      <div className="field-row">
        <Select
          id={controlId(item, at("tool"))}
          name={at("tool")}
          label="Wrench"
          empty={tools.length ? "choose a wrench" : "the crib has none yet"}
          options={tools}
          defaultValue={typed("tool")}
          errors={errorsOf(entry, at("tool"))}
        />
        <NumberInput
          id={controlId(item, at("count"))}
          name={at("count")}
          label="How many fasteners"
          inputMode="numeric"
          size={4}
          defaultValue={typed("count", count === null ? "" : String(count))}
          errors={errorsOf(entry, at("count"))}
        />
        <NumberInput
          id={controlId(item, at("adapter"))}
          name={at("adapter")}
          label="Adapter"
          optional
          unit={lengthUnit}
          size={5}
          defaultValue={typed("adapter")}
          errors={errorsOf(entry, at("adapter"))}
          onChange={setAdapter}
        />
        <NumberInput
          id={controlId(item, at("wrench"))}
          name={at("wrench")}
          label="Wrench length"
          optional
          unit={lengthUnit}
          size={5}
          defaultValue={typed("wrench")}
          errors={errorsOf(entry, at("wrench"))}
          onChange={setLength}
        />
      </div>
      <SetTo torques={torques} places={places} adapter={adapter} length={length} units={units} />
      <p className="field-hint">
        An adapter in line with the wrench lengthens it, one folded back is negative. At a right angle it changes nothing: leave it empty
        (AC 43.13-1B, 7-40). The band is for the true torque.
      </p>
    </fieldset>
  );
}

function SetTo({
  torques,
  places,
  adapter,
  length,
  units,
}: {
  torques: string[];
  places: string[];
  adapter: string;
  length: string;
  units: "si" | "us";
}) {
  const settings = torques.flatMap((text, row) => {
    const torque = parseEntry(text, "torque", units);
    if (!torque.ok) return [];
    const extension = adapter.trim() ? parseEntry(adapter, "length", units) : null;
    if (!extension || (extension.ok && extension.si === 0)) return [{ row, si: torque.si, sentence: null }];
    const own = parseEntry(length, "length", units);
    if (!extension.ok || !own.ok) return [];
    const set = wrenchSetting(torque.si, { wrenchLength: own.si, extension: extension.si, angle: 0 });
    return [set.ok ? { row, si: set.result, sentence: null } : { row, si: null, sentence: set.errors[0]?.sentence ?? "" }];
  });
  if (!settings.length) return null;
  return (
    <p className="set-to" aria-live="polite">
      Set the wrench to{" "}
      {settings.map((s, i) => {
        const shown = s.si === null ? null : format("torque", s.si, units);
        return (
          <span key={s.row}>
            {i > 0 && ", "}
            {places.length > 1 && `${places[s.row]} `}
            {shown ? <Figure className="font-bold" value={shown.value} unit={shown.unit} /> : s.sentence}
          </span>
        );
      })}
    </p>
  );
}
