/**
 * The standard atmosphere up to 11 km and the density of the air on the day.
 * Source: U.S. Standard Atmosphere 1976 (the same constants as ISO 2533 in this layer); altitudes are geopotential.
 */
import { atLeast, atMost, needNotNegative, needPositive } from "#app/lib/bench/compare";

/** Sea level: K, Pa. Lapse rate K/m. Gravity m/s². Gas constant of dry air J/(kg·K) = 8314.32 / 28.9644. */
export const STANDARD = {
  temperature: 288.15,
  pressure: 101_325,
  lapse: 0.0065,
  gravity: 9.80665,
  gasConstant: 8314.32 / 28.9644,
  gamma: 1.4,
} as const;

/** Lowest and highest geopotential altitude for which these formulas are used, m. */
export const ALTITUDE_RANGE = { min: -1000, max: 11_000 } as const;

const { temperature: T0, pressure: P0, lapse, gravity, gasConstant, gamma } = STANDARD;
/** g / (R L), the exponent of pressure: 5.2559. */
const EXPONENT = gravity / (gasConstant * lapse);
/** Molar mass of water over that of dry air, 18.01528 / 28.9644. */
const WATER_RATIO = 18.01528 / 28.9644;

export interface Air {
  /** Pa */
  pressure: number;
  /** K */
  temperature: number;
  /** kg/m³ */
  density: number;
  /** m/s */
  soundSpeed: number;
}

/**
 * Standard air at geopotential altitude `h` (m): T = T0 - L h, p = p0 (T/T0)^(g/(R L)), rho = p/(R T), a = sqrt(gamma R T).
 * Range -1000 to 11 000 m; RangeError outside.
 */
export function standardAir(h: number): Air {
  if (!(atLeast(h, ALTITUDE_RANGE.min) && atMost(h, ALTITUDE_RANGE.max)))
    throw new RangeError(`altitude must be -1000 to 11000 m, got ${h}`);
  const temperature = T0 - lapse * h;
  const pressure = P0 * (temperature / T0) ** EXPONENT;
  return { pressure, temperature, density: airDensity(pressure, temperature), soundSpeed: soundSpeed(temperature) };
}

/** Speed of sound (m/s) in dry air at `temperature` (K): a = sqrt(gamma R T). RangeError unless above 0 K. */
export function soundSpeed(temperature: number): number {
  needPositive({ temperature });
  return Math.sqrt(gamma * gasConstant * temperature);
}

/**
 * Density (kg/m³) of air at `pressure` (Pa) and `temperature` (K) with water vapour at `vapour` (Pa, 0 = dry):
 * rho = (p - (1 - 0.62198) e) / (R T), ideal gases. RangeError when not physical (e >= p, T <= 0).
 */
export function airDensity(pressure: number, temperature: number, vapour = 0): number {
  needPositive({ pressure, temperature });
  needNotNegative({ vapour });
  if (vapour >= pressure) throw new RangeError("vapour pressure must be below the pressure of the air");
  return (pressure - (1 - WATER_RATIO) * vapour) / (gasConstant * temperature);
}

/**
 * Vapour pressure (Pa) of saturated air over water at `temperature` (K); at the dew point it is that of the air itself, and times
 * relative humidity at the air's own temperature as well. Magnus form with the coefficients 6.112 hPa, 17.62, 243.12 degC
 * (WMO guide to instruments, from memory). Range -45 to +60 degC; RangeError outside.
 */
export function saturationPressure(temperature: number): number {
  const celsius = temperature - 273.15;
  if (!(atLeast(celsius, -45) && atMost(celsius, 60))) throw new RangeError(`temperature must be -45 to +60 degC, got ${celsius}`);
  return 611.2 * Math.exp((17.62 * celsius) / (243.12 + celsius));
}

/** Pressure altitude (m) at `pressure` (Pa): h = (T0/L) (1 - (p/p0)^(R L/g)). RangeError outside the layer. */
export function pressureAltitude(pressure: number): number {
  needPositive({ pressure });
  return inLayer((T0 / lapse) * (1 - (pressure / P0) ** (1 / EXPONENT)));
}

/**
 * Pressure (Pa) at a field from an altimeter setting (QNH, Pa) and its elevation (m): an altimeter set to QNH reads the elevation there,
 * so pressure altitude = elevation + pressure altitude of QNH. Source: the altimeter's definition (ICAO Doc 7488, from memory).
 * RangeError outside the layer.
 */
export function stationPressure(setting: number, elevation: number): number {
  return standardAir(pressureAltitude(setting) + elevation).pressure;
}

/** Density altitude (m) of air of `density` (kg/m³): h = (T0/L) (1 - (rho/rho0)^(1/(g/(R L) - 1))). RangeError outside the layer. */
export function densityAltitude(density: number): number {
  needPositive({ density });
  return inLayer((T0 / lapse) * (1 - (density / airDensity(P0, T0)) ** (1 / (EXPONENT - 1))));
}

/** Below the layer's floor is dense cold air, which is real; above its ceiling the formula is another. */
function inLayer(h: number): number {
  if (!(h <= ALTITUDE_RANGE.max)) throw new RangeError("this air is thinner than the standard atmosphere at 11 km");
  return h;
}
