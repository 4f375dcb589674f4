/** The tip speed sheet: Mach number of the propeller's tip at a speed, and the speed at which it meets the ceiling. Formulas: tip-speed.ts. */
import { z } from "zod";
import { FAST, temperatureField } from "#app/lib/bench/air-fields";
import { soundSpeed } from "#app/lib/bench/atmosphere";
import type { BenchDef, BenchResult } from "#app/lib/bench/bench-def";
import { amount, check, notChosen, type Outcome } from "#app/lib/bench/check";
import { atMost } from "#app/lib/bench/compare";
import { amountField, choiceField, type SheetForm } from "#app/lib/bench/form";
import { figure } from "#app/lib/bench/sheet-result";
import { MACH_CEILING, machNumber, rotationAtMach, tipSpeed } from "#app/lib/bench/tip-speed";
import { fromSI, toSI } from "#app/lib/units/convert";

const rpm = (n: number) => toSI(n, "rpm");
const FIELD = {
  rotation: amountField("rotation", "Engine speed", "rotation", [rpm(200), rpm(12_000)], "Crankshaft speed, as the tachometer shows it.", {
    prefill: [
      { kind: "value", key: "redline" },
      { kind: "value", key: "ratedRpm" },
    ],
  }),
  reduction: amountField("reduction", "Reduction ratio", "ratio", [0.5, 6], "Engine speed over propeller speed; 1 for direct drive.", {
    preset: 1,
    prefill: [{ kind: "value", key: "reductionRatio" }],
  }),
  diameter: amountField("diameter", "Propeller diameter", "length", [0.5, 5], "Tip to tip.", {
    prefill: [{ kind: "value", key: "propDiameter" }],
  }),
  forward: amountField("forward", "Forward speed", "speed", [0, toSI(400, "kt")], "True airspeed; 0 for a run-up.", { preset: 0 }),
  temperature: temperatureField("temperature", "Air temperature", "The coldest day counts: sound is slower in cold air."),
  blades: choiceField(
    "blades",
    "Blades",
    { metal: "metal", wood: "wood", composite: "composite" },
    "Usual ceiling: 0.85 metal, 0.80 wood; composite has none but the maker's.",
    { prefill: [{ kind: "trait" }] },
  ),
  ceiling: amountField("ceiling", "Highest tip Mach number, the maker's", "ratio", [0.3, 1], "Left empty, the usual one counts.", {
    optional: true,
  }),
};

const form: SheetForm = {
  title: "Tip speed",
  formula:
    "Propeller speed = engine speed / reduction. Tip speed = √((π × diameter × propeller speed)² + forward speed²). Mach = tip speed / speed of sound, which is √(1.4 × 287.05 J/(kg·K) × temperature).",
  caution:
    "Too fast a tip is noise, lost thrust and load on the blades; it is not the propeller's limit. The propeller maker's highest rpm comes first, whatever the Mach number.",
  fields: [FIELD.rotation, FIELD.reduction, FIELD.diameter, FIELD.forward, FIELD.temperature, FIELD.blades, FIELD.ceiling],
  groups: [],
};

const schema = z.object({
  rotation: amount(FIELD.rotation),
  reduction: amount(FIELD.reduction),
  diameter: amount(FIELD.diameter),
  forward: amount(FIELD.forward),
  temperature: amount(FIELD.temperature),
  blades: z.enum(["metal", "wood", "composite"], { error: () => notChosen(FIELD.blades) }),
  ceiling: amount(FIELD.ceiling).optional(),
});

function compute(inputs: unknown): Outcome<BenchResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { rotation, reduction, diameter, forward, temperature, blades, ceiling } = checked.value;
  const speed = tipSpeed(diameter, rotation / reduction, forward);
  const mach = machNumber(speed, temperature);
  const limit = ceiling ?? (blades === "composite" ? null : MACH_CEILING[blades]);
  const figures = [
    figure("Mach number of the tip", "ratio", mach),
    figure("Tip speed, helical", "speed", speed, FAST),
    figure("Propeller speed", "rotation", rotation / reduction),
    figure("Tip speed from turning alone", "speed", tipSpeed(diameter, rotation / reduction), FAST),
    figure("Speed of sound", "speed", soundSpeed(temperature), FAST),
  ];
  const says = `The tip goes at Mach ${mach.toFixed(3)}`;
  if (limit === null) {
    const sentence = `${says}. Composite blades have no usual ceiling: ask the propeller maker and enter it.`;
    return { ok: true, result: { passes: null, sentence, figures, caution: form.caution } };
  }
  const most = rotationAtMach(limit, diameter, temperature, forward) * reduction;
  const passes = atMost(mach, limit);
  const reached = `${Math.floor(fromSI(most, "rpm") + 1e-6)} rpm`;
  return {
    ok: true,
    result: {
      passes,
      sentence: passes
        ? `${says}, the ceiling is ${limit}; the engine would reach that at ${reached}.`
        : `${says}, above the ceiling of ${limit}: stay at or below ${reached}, or ask the propeller maker.`,
      figures: [...figures, figure("Engine speed at the ceiling", "rotation", most)],
      caution: form.caution,
      margin: figure("Mach number left to the ceiling", "ratio", limit - mach),
      rule: { quantity: "ratio", label: "Mach number of the tip", value: mach, min: null, max: limit },
    },
  };
}

export const TIP_SPEED: BenchDef = {
  answers: "How close to the speed of sound does the propeller's tip come?",
  criterion: "Mach number at or under the maker's ceiling, else 0.85 (metal) or 0.80 (wood).",
  source: "Geometry of a helix and the speed of sound of the U.S. Standard Atmosphere 1976. Ceilings from memory, no source read.",
  form,
  compute,
};
