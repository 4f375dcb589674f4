/** The static power sheet: full-throttle speed of today against an earlier run, corrected for the density of the air. Formulas: static-power.ts. */
import { z } from "zod";
import { AIR_DENSITY, pressureField, temperatureField } from "#app/lib/bench/air-fields";
import { airDensity } from "#app/lib/bench/atmosphere";
import type { BenchDef, BenchResult } from "#app/lib/bench/bench-def";
import { amount, check, notChosen, type Outcome } from "#app/lib/bench/check";
import { atLeast } from "#app/lib/bench/compare";
import { amountField, choiceField, type SheetForm } from "#app/lib/bench/form";
import { ceilText, figure, type SheetFigure } from "#app/lib/bench/sheet-result";
import { DENSITY_RANGE, expectedRotation, powerRatio, SPEED_DROP, thrustRatio } from "#app/lib/bench/static-power";
import { fromSI, toSI } from "#app/lib/units/convert";

const RPM = [toSI(200, "rpm"), toSI(12_000, "rpm")] as const;
const PULL = [10, 1e5] as const;
const FIELD = {
  breathing: choiceField(
    "breathing",
    "Engine breathes",
    { natural: "naturally", boosted: "by a charger that holds sea-level pressure" },
    "A charger that holds nothing like sea-level pressure fits neither.",
    { prefill: [{ kind: "trait" }] },
  ),
  rotationThen: amountField("rotationThen", "Static speed then", "rotation", RPM, "Full throttle, tied down, steady; crankshaft speed."),
  pressureThen: pressureField("pressureThen", "Pressure at the field then", "As it was there, not reduced to sea level."),
  temperatureThen: temperatureField("temperatureThen", "Air temperature then", "In the shade."),
  rotationNow: amountField("rotationNow", "Static speed today", "rotation", RPM, "The same throttle, mixture and blade angle as then."),
  pressureNow: pressureField("pressureNow", "Pressure at the field today", "As it is here, not reduced to sea level."),
  temperatureNow: temperatureField("temperatureNow", "Air temperature today", "In the shade."),
  drop: amountField(
    "drop",
    "Shortfall that is looked into",
    "fraction",
    [0.005, 0.1],
    "2 % of speed is about 6 % of power. Common practice.",
    {
      preset: SPEED_DROP,
    },
  ),
  least: amountField("least", "Least static speed", "rotation", RPM, "The install's limit at full throttle, where there is one.", {
    optional: true,
    prefill: [{ kind: "value", key: "staticRpmMin" }],
  }),
  thrustThen: amountField("thrustThen", "Pull measured then", "force", PULL, "By a scale in the strap, if there was one.", {
    optional: true,
  }),
  thrustNow: amountField("thrustNow", "Pull measured today", "force", PULL, "By the same scale.", { optional: true }),
};

const form: SheetForm = {
  title: "Static power",
  formula:
    "Expected speed = speed then × share today / share then, where share = √((1.132 σ − 0.132) / σ) for an engine that breathes naturally and √(1 / σ) for one that is boosted; σ = air density / 1.225 kg/m³. Power goes with speed³ in the same air, thrust with density × speed².",
  caution:
    "A full-throttle run on the ground is short and cooled: watch the temperatures, and never run above what the restraint sheet allows. The engine and propeller makers' limits come first. A figure inside the band is no proof of health.",
  fields: Object.values(FIELD),
  groups: [],
};

const schema = z
  .object({
    breathing: z.enum(["natural", "boosted"], { error: () => notChosen(FIELD.breathing) }),
    rotationThen: amount(FIELD.rotationThen),
    pressureThen: amount(FIELD.pressureThen),
    temperatureThen: amount(FIELD.temperatureThen),
    rotationNow: amount(FIELD.rotationNow),
    pressureNow: amount(FIELD.pressureNow),
    temperatureNow: amount(FIELD.temperatureNow),
    drop: amount(FIELD.drop),
    least: amount(FIELD.least).optional(),
    thrustThen: amount(FIELD.thrustThen).optional(),
    thrustNow: amount(FIELD.thrustNow).optional(),
  })
  .superRefine((inputs, at) => {
    const add = (path: string, message: string) => at.addIssue({ code: "custom", path: [path], message });
    for (const day of ["Then", "Now"] as const) {
      const density = airDensity(inputs[`pressure${day}`], inputs[`temperature${day}`]);
      if (!(density >= DENSITY_RANGE.min && density <= DENSITY_RANGE.max))
        add(
          `temperature${day}`,
          `Air of ${density.toFixed(2)} kg/m³ is outside the ${DENSITY_RANGE.min} to ${DENSITY_RANGE.max} kg/m³ for which the trend holds: check pressure and temperature.`,
        );
    }
    if ((inputs.thrustThen === undefined) !== (inputs.thrustNow === undefined))
      add(
        inputs.thrustThen === undefined ? "thrustThen" : "thrustNow",
        "A pull is compared with another: enter both, or leave both empty.",
      );
  });

const inRpm = (rotation: number): string => `${Math.round(fromSI(rotation, "rpm"))} rpm`;

function compute(inputs: unknown): Outcome<BenchResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { value } = checked;
  const then = { rotation: value.rotationThen, density: airDensity(value.pressureThen, value.temperatureThen) };
  const now = { rotation: value.rotationNow, density: airDensity(value.pressureNow, value.temperatureNow) };
  const expected = expectedRotation(then, now.density, value.breathing);
  const floor = expected * (1 - value.drop);
  const asExpected = atLeast(now.rotation, floor);
  const aboveLeast = value.least === undefined || atLeast(now.rotation, value.least);
  const pulls = pullFigures(value.thrustThen, value.thrustNow, thrustRatio({ rotation: expected, density: now.density }, then));
  const short = now.rotation < expected ? `${ceilText(100 * (1 - now.rotation / expected), 1)} % under` : "at or above";
  const look =
    "look at throttle travel, ignition, mixture, induction leaks, carburettor heat, tachometer and blade angle before the next run";
  const sentence = !aboveLeast
    ? `${inRpm(now.rotation)} is less than the install's least static speed of ${inRpm(value.least ?? 0)}: ${look}.`
    : asExpected
      ? `${inRpm(now.rotation)} is ${short} the ${inRpm(expected)} to be expected in today's air.`
      : `${inRpm(now.rotation)} is ${short} the ${inRpm(expected)} to be expected in today's air: ${look}.`;
  const atLowest = Math.max(floor, value.least ?? 0);
  return {
    ok: true,
    result: {
      passes: asExpected && aboveLeast,
      sentence,
      figures: [
        figure("Expected static speed today", "rotation", expected),
        figure("Least that is as expected", "rotation", floor),
        figure("Power over what was expected", "fraction", powerRatio(now.rotation, expected)),
        figure("Thrust over that of the earlier run, worked out", "fraction", thrustRatio(now, then)),
        ...pulls,
        figure("Air density then", "density", then.density, AIR_DENSITY),
        figure("Air density today", "density", now.density, AIR_DENSITY),
      ],
      caution: form.caution,
      margin: figure("Speed left to the least", "rotation", now.rotation - atLowest),
      rule: { quantity: "rotation", label: "Static speed today", value: now.rotation, min: atLowest, max: null },
    },
  };
}

/** What a scale showed, beside what density and speed let expect of the earlier pull. */
function pullFigures(then: number | undefined, now: number | undefined, ratio: number): SheetFigure[] {
  if (then === undefined || now === undefined) return [];
  return [
    figure("Pull to be expected today", "force", then * ratio),
    figure("Pull measured over what was expected", "fraction", now / (then * ratio)),
  ];
}

export const STATIC_POWER: BenchDef = {
  answers: "Does the engine still turn and pull as it did, the air of the day counted?",
  criterion: "Static speed not lower than expected by more than the shortfall entered, and not under the install's least.",
  source:
    "Propeller similarity (P ~ ρ n³ D⁵, T ~ ρ n² D⁴); power of the engine with density by Gagg and Ferrar (from memory). The shortfall is common practice, no source.",
  form,
  compute,
};
