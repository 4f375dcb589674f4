/** The atmosphere sheet: pressure altitude, density altitude and density of the day, moist or dry. Formulas: atmosphere.ts. */
import { z } from "zod";
import { AIR_DENSITY, ALTITUDE, FAST, pressureField, RUN_UP_ALTITUDE, temperatureField } from "#app/lib/bench/air-fields";
import {
  ALTITUDE_RANGE,
  airDensity,
  densityAltitude,
  pressureAltitude,
  saturationPressure,
  soundSpeed,
  standardAir,
  stationPressure,
} from "#app/lib/bench/atmosphere";
import type { BenchDef, BenchResult } from "#app/lib/bench/bench-def";
import { amount, check, notChosen, type Outcome } from "#app/lib/bench/check";
import { atLeast, atMost } from "#app/lib/bench/compare";
import { amountField, choiceField, type SheetForm } from "#app/lib/bench/form";
import { figure } from "#app/lib/bench/sheet-result";
import { toSI } from "#app/lib/units/convert";

const station = { field: "known", is: "station" };
const setting = { field: "known", is: "setting" };
/** Dew points and temperatures over which the formula for water vapour holds. */
const MOIST = [toSI(-45, "°C"), toSI(55, "°C")] as const;
const FIELD = {
  known: choiceField(
    "known",
    "Pressure from",
    { station: "a gauge here", setting: "QNH and elevation" },
    "The manifold gauge with the engine off shows it; QNH is the altimeter setting.",
  ),
  pressure: pressureField("pressure", "Pressure at the field", "As it is here, not reduced to sea level.", { when: station }),
  setting: amountField("setting", "Altimeter setting", "pressure", [87_000, 108_500], "QNH, as the tower or a report gives it.", {
    when: setting,
    as: { si: "hPa", us: "inHg" },
  }),
  elevation: amountField("elevation", "Elevation of the field", "length", [-430, RUN_UP_ALTITUDE.max], "Above sea level.", {
    when: setting,
    as: ALTITUDE,
  }),
  temperature: temperatureField("temperature", "Air temperature", "In the shade."),
  moisture: choiceField(
    "moisture",
    "Moisture",
    { none: "left out", humidity: "relative humidity", dew: "dew point" },
    "Moist air is lighter: at 30 °C by up to a hundredth or two.",
    { preset: "none" },
  ),
  humidity: amountField("humidity", "Relative humidity", "fraction", [0, 1], "0 to 100 %.", {
    when: { field: "moisture", is: "humidity" },
  }),
  dewPoint: amountField("dewPoint", "Dew point", "temperature", MOIST, "At or below the air temperature.", {
    when: { field: "moisture", is: "dew" },
  }),
};

const form: SheetForm = {
  title: "Atmosphere",
  formula:
    "Standard air: temperature 288.15 K − 6.5 K per km, pressure 101325 Pa × (T / 288.15)^5.2559, density = pressure / (287.05 × T). Pressure altitude is where standard air has this pressure, density altitude where it has this density; water vapour e takes 0.378 × e off the pressure.",
  caution:
    "Density altitude is not in any engine or propeller maker's limits by itself. Their charts, with the pressure altitude and temperature that they ask for, come first.",
  fields: [FIELD.known, FIELD.pressure, FIELD.setting, FIELD.elevation, FIELD.temperature, FIELD.moisture, FIELD.humidity, FIELD.dewPoint],
  groups: [],
};

const pressures = z.discriminatedUnion(
  "known",
  [
    z.object({ known: z.literal("station"), pressure: amount(FIELD.pressure) }),
    z.object({ known: z.literal("setting"), setting: amount(FIELD.setting), elevation: amount(FIELD.elevation) }),
  ],
  { error: () => notChosen(FIELD.known) },
);
const moistures = z.discriminatedUnion(
  "moisture",
  [
    z.object({ moisture: z.literal("none") }),
    z.object({ moisture: z.literal("humidity"), humidity: amount(FIELD.humidity) }),
    z.object({ moisture: z.literal("dew"), dewPoint: amount(FIELD.dewPoint) }),
  ],
  { error: () => notChosen(FIELD.moisture) },
);
const schema = z
  .intersection(z.intersection(z.object({ temperature: amount(FIELD.temperature) }), pressures), moistures)
  .superRefine((inputs, at) => {
    if (inputs.known === "setting" && !atLeast(pressureAltitude(inputs.setting) + inputs.elevation, ALTITUDE_RANGE.min))
      at.addIssue({
        code: "custom",
        path: ["setting"],
        message: "With this elevation the air would be denser than at 1000 m (3281 ft) below sea level: check setting and elevation.",
      });
    if (inputs.moisture === "dew" && !atMost(inputs.dewPoint, inputs.temperature))
      at.addIssue({
        code: "custom",
        path: ["dewPoint"],
        message: "The dew point cannot be above the air temperature: check which is which.",
      });
    if (inputs.moisture === "humidity" && inputs.temperature < MOIST[0])
      at.addIssue({
        code: "custom",
        path: ["humidity"],
        message: "Below −45 °C (−49 °F) the formula for moisture does not hold, and there is next to none: leave it out.",
      });
  });

function compute(inputs: unknown): Outcome<BenchResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { value } = checked;
  const { temperature } = value;
  const pressure = value.known === "station" ? value.pressure : stationPressure(value.setting, value.elevation);
  const vapour =
    value.moisture === "dew"
      ? saturationPressure(value.dewPoint)
      : value.moisture === "humidity"
        ? value.humidity * saturationPressure(temperature)
        : 0;
  const density = airDensity(pressure, temperature, vapour);
  const altitude = pressureAltitude(pressure);
  const share = density / standardAir(0).density;
  return {
    ok: true,
    result: {
      passes: null,
      sentence: `The air is ${(100 * share).toFixed(1)} % as dense as standard air at sea level${vapour > 0 ? ", moisture counted" : ""}.`,
      figures: [
        figure("Density altitude", "length", densityAltitude(density), ALTITUDE),
        figure("Pressure altitude", "length", altitude, ALTITUDE),
        figure("Pressure at the field", "pressure", pressure, { si: "hPa", us: "inHg" }),
        figure("Air density", "density", density, AIR_DENSITY),
        figure("Over the density at sea level", "ratio", share),
        ...(vapour > 0
          ? [
              figure("Water vapour", "pressure", vapour, { si: "hPa", us: "inHg" }),
              figure("Density if it were dry", "density", airDensity(pressure, temperature), AIR_DENSITY),
            ]
          : []),
        figure("Warmer than standard air at this pressure by", "temperatureDifference", temperature - standardAir(altitude).temperature),
        figure("Speed of sound", "speed", soundSpeed(temperature), FAST),
      ],
      caution: form.caution,
    },
  };
}

export const ATMOSPHERE: BenchDef = {
  answers: "How thin is the air today: pressure altitude, density altitude, density?",
  criterion: "Nothing to judge by: the figures are for the other sheets and for the makers' charts.",
  source: "U.S. Standard Atmosphere 1976 up to 11 km; water vapour by the Magnus formula (WMO guide to instruments, from memory).",
  form,
  compute,
};
