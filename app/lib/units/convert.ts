/**
 * Exact conversion between the units that people read and the SI units in which everything is stored.
 * Source of the factors: NIST SP 811 and the definitions behind it (1 in = 25.4 mm, 1 lb = 0.45359237 kg,
 * g = 9.80665 m/s², 1 US gal = 231 in³, 1 nautical mile = 1852 m); derived factors are products of these.
 */
import type { Quantity } from "#app/lib/units/quantity";

const INCH = 0.0254;
const POUND = 0.45359237;
const GRAVITY = 9.80665;
const POUND_FORCE = POUND * GRAVITY;
const PSI = POUND_FORCE / (INCH * INCH);
const US_GALLON = 231 * INCH ** 3;
const HORSEPOWER = 550 * 12 * INCH * POUND_FORCE;
const RANKINE = 5 / 9;

interface UnitDef {
  quantities: readonly Quantity[];
  symbol: string;
  /** SI value = value * factor + offset. */
  factor: number;
  offset?: number;
}

const unit = (symbol: string, factor: number, ...quantities: Quantity[]): UnitDef => ({ symbol, factor, quantities });

/** Every unit by key. The key is the symbol, save where two quantities share one ("°C" as a reading and as a difference). */
export const UNITS = {
  N·m: unit("N·m", 1, "torque"),
  "in-lb": unit("in-lb", POUND_FORCE * INCH, "torque"),
  "ft-lb": unit("ft-lb", POUND_FORCE * 12 * INCH, "torque"),
  Pa: unit("Pa", 1, "pressure"),
  hPa: unit("hPa", 100, "pressure"),
  kPa: unit("kPa", 1e3, "pressure"),
  bar: unit("bar", 1e5, "pressure"),
  psi: unit("psi", PSI, "pressure"),
  /** Conventional inch of mercury, 13 595.1 kg/m³ (NIST SP 811, appendix B.8). */
  inHg: unit("inHg", 13595.1 * GRAVITY * INCH, "pressure"),
  K: unit("K", 1, "temperature", "temperatureDifference"),
  "°C": { ...unit("°C", 1, "temperature"), offset: 273.15 },
  "°F": { ...unit("°F", RANKINE, "temperature"), offset: 459.67 * RANKINE },
  "Δ°C": unit("°C", 1, "temperatureDifference"),
  "Δ°F": unit("°F", RANKINE, "temperatureDifference"),
  "m³": unit("m³", 1, "volume"),
  L: unit("L", 1e-3, "volume"),
  "US gal": unit("US gal", US_GALLON, "volume"),
  "m³/s": unit("m³/s", 1, "volumeFlow"),
  "L/min": unit("L/min", 1e-3 / 60, "volumeFlow"),
  "L/h": unit("L/h", 1e-3 / 3600, "volumeFlow"),
  "US gal/h": unit("US gal/h", US_GALLON / 3600, "volumeFlow"),
  "kg/s": unit("kg/s", 1, "massFlow"),
  "kg/h": unit("kg/h", 1 / 3600, "massFlow"),
  "lb/h": unit("lb/h", POUND / 3600, "massFlow"),
  V: unit("V", 1, "voltage"),
  A: unit("A", 1, "current"),
  Ω: unit("Ω", 1, "resistance"),
  mΩ: unit("mΩ", 1e-3, "resistance"),
  rad: unit("rad", 1, "angle"),
  deg: unit("deg", Math.PI / 180, "angle"),
  m: unit("m", 1, "length"),
  mm: unit("mm", 1e-3, "length"),
  in: unit("in", INCH, "length"),
  ft: unit("ft", 12 * INCH, "length"),
  "m²": unit("m²", 1, "area"),
  "ft²": unit("ft²", (12 * INCH) ** 2, "area"),
  kg: unit("kg", 1, "mass"),
  lb: unit("lb", POUND, "mass"),
  N: unit("N", 1, "force"),
  kN: unit("kN", 1e3, "force"),
  lbf: unit("lbf", POUND_FORCE, "force"),
  "m/s": unit("m/s", 1, "speed"),
  "ft/s": unit("ft/s", 12 * INCH, "speed"),
  kt: unit("kt", 1852 / 3600, "speed"),
  W: unit("W", 1, "power"),
  kW: unit("kW", 1e3, "power"),
  hp: unit("hp", HORSEPOWER, "power"),
  s: unit("s", 1, "time"),
  min: unit("min", 60, "time"),
  h: unit("h", 3600, "time"),
  "1/s": unit("1/s", 1, "rotation"),
  rpm: unit("rpm", 1 / 60, "rotation"),
  "Pa/s": unit("Pa/s", 1, "pressureRate"),
  "kPa/min": unit("kPa/min", 1e3 / 60, "pressureRate"),
  "psi/min": unit("psi/min", PSI / 60, "pressureRate"),
  "kg/m³": unit("kg/m³", 1, "density"),
  "lb/US gal": unit("lb/US gal", POUND / US_GALLON, "density"),
  "kg/J": unit("kg/J", 1, "specificFuel"),
  "g/(kW·h)": unit("g/(kW·h)", 1e-3 / 3.6e6, "specificFuel"),
  "lb/(hp·h)": unit("lb/(hp·h)", POUND / (HORSEPOWER * 3600), "specificFuel"),
  "1": unit("", 1, "count", "ratio", "fraction"),
  "%": unit("%", 1e-2, "fraction", "ratio"),
  ppm: unit("ppm", 1e-6, "fraction"),
} satisfies Record<string, UnitDef>;

export type Unit = keyof typeof UNITS;

const defOf = (key: Unit): UnitDef => UNITS[key];

/** The sign printed after a number in this unit; empty for a bare number. */
export function symbolOf(key: Unit): string {
  return defOf(key).symbol;
}

/** Whether values of `quantity` can be given in this unit. */
export function measures(key: Unit, quantity: Quantity): boolean {
  return defOf(key).quantities.includes(quantity);
}

/** A value in `unit` as its SI value: toSI(160, "in-lb") = 18.0776 (N·m). */
export function toSI(value: number, unit: Unit): number {
  const { factor, offset = 0 } = defOf(unit);
  return value * factor + offset;
}

/** An SI value in `unit`: fromSI(300, "°C") = 26.85. */
export function fromSI(si: number, unit: Unit): number {
  const { factor, offset = 0 } = defOf(unit);
  return (si - offset) / factor;
}
