/**
 * The air of the day as several calculators ask for it: pressure at the field and temperature.
 * Ranges: where aircraft are run up (-1000 to 5000 m of pressure altitude, -50 to +55 degC).
 */
import { standardAir } from "#app/lib/bench/atmosphere";
import { amountField } from "#app/lib/bench/form";
import { toSI } from "#app/lib/units/convert";

/** Where aircraft are run up, m. */
export const RUN_UP_ALTITUDE = { min: -1000, max: 5000 } as const;

export const pressureField = (name: string, label: string, help: string, extra: Parameters<typeof amountField>[5] = {}) =>
  amountField(name, label, "pressure", [standardAir(RUN_UP_ALTITUDE.max).pressure, standardAir(RUN_UP_ALTITUDE.min).pressure], help, {
    ...extra,
    as: { si: "hPa", us: "inHg" },
  });

export const temperatureField = (name: string, label: string, help: string) =>
  amountField(name, label, "temperature", [toSI(-50, "°C"), toSI(55, "°C")], help);

/** Density of air reads in kg/m³ in both systems: the US unit of fuel, lb/US gal, says nothing of air. */
export const AIR_DENSITY = { si: "kg/m³", us: "kg/m³" } as const;
export const ALTITUDE = { si: "m", us: "ft" } as const;
export const FAST = { si: "m/s", us: "ft/s" } as const;
