/**
 * Resistance of copper wire by American Wire Gauge, and the voltage it loses.
 * Sources: AWG diameter formula (ASTM B258); copper 1/58 ohm mm²/m at 20 degC, 0.00393 per K (IEC 60028);
 * aircraft wire and allowed drops as in AC 43.13-1B, chapter 11.
 */
import { needNotNegative, needPositive } from "#app/lib/bench/compare";
import { toSI } from "#app/lib/units/convert";

/** Ohm metre at 20 degC, and its growth per kelvin. */
const COPPER = 1 / 58e6;
const COPPER_GROWTH = 0.00393;
const KFT = toSI(1000, "ft");

/** Gauges of aircraft wire with their resistance, ohm/1000 ft at 20 degC: AC 43.13-1B, table 11-9 (stranded, so above solid copper). */
export const AIRCRAFT_WIRE: readonly (readonly [gauge: number, ohmPer1000Feet: number])[] = [
  [22, 16.2],
  [20, 9.88],
  [18, 6.23],
  [16, 4.81],
  [14, 3.06],
  [12, 2.02],
  [10, 1.26],
  [8, 0.7],
  [6, 0.44],
  [4, 0.28],
  [2, 0.18],
  [0, 0.12],
];

/** Drop allowed between bus and equipment, V: AC 43.13-1B, table 11-6 (continuous read; intermittent from memory). */
export const ALLOWED_DROP = {
  "14": { continuous: 0.5, intermittent: 1 },
  "28": { continuous: 1, intermittent: 2 },
} as const;

export type Conductor = "aircraft" | "solid";

/** Diameter (m) of solid wire of `gauge` n: 0.127 mm x 92^((36 - n) / 39). 0 = 1/0, -1 = 2/0. RangeError outside -3 to 40, or not whole. */
export function wireDiameter(gauge: number): number {
  if (!(Number.isInteger(gauge) && gauge >= -3 && gauge <= 40))
    throw new RangeError(`gauge must be a whole number from -3 to 40, got ${gauge}`);
  return 0.127e-3 * 92 ** ((36 - gauge) / 39);
}

/** Resistance (ohm/m) of solid copper of `gauge` at 20 degC: rho / (pi d² / 4). */
export function solidResistance(gauge: number): number {
  return COPPER / ((Math.PI / 4) * wireDiameter(gauge) ** 2);
}

/** Resistance (ohm/m) at 20 degC of the table's wire, or of solid copper. RangeError for a gauge that the table does not have. */
export function wireResistance(gauge: number, conductor: Conductor): number {
  if (conductor === "solid") return solidResistance(gauge);
  const row = AIRCRAFT_WIRE.find(([known]) => known === gauge);
  if (!row) throw new RangeError(`no aircraft wire of gauge ${gauge} in the table`);
  return row[1] / KFT;
}

/** Resistance at `temperature` (K) from that at 20 degC: R (1 + 0.00393 (T - 293.15)). For -60 to +200 degC; RangeError outside. */
export function warmed(resistance: number, temperature: number): number {
  needNotNegative({ resistance });
  if (!(temperature >= 213.15 && temperature <= 473.15)) throw new RangeError(`temperature must be 213.15 to 473.15 K, got ${temperature}`);
  return resistance * (1 + COPPER_GROWTH * (temperature - 293.15));
}

/**
 * Voltage (V) lost in a wire: I x R. `perMetre` ohm/m, `length` one way (m), `ways` 2 where the current comes back by an equal wire,
 * 1 where a metal airframe brings it back (its own loss is not in it), `current` A.
 */
export function voltageDrop(perMetre: number, length: number, ways: 1 | 2, current: number): number {
  needPositive({ perMetre, length });
  needNotNegative({ current });
  return perMetre * length * ways * current;
}
