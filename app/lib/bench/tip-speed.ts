/**
 * How fast the tip of a propeller goes through the air, and its Mach number.
 * Source: kinematics of a helix; speed of sound as in atmosphere.ts. Propeller turns, not the crankshaft's: geared installs divide first.
 */
import { soundSpeed } from "#app/lib/bench/atmosphere";
import { needNotNegative, needPositive } from "#app/lib/bench/compare";

/** Usual ceilings of the tip's Mach number, the low end of 0.85 to 0.88 for metal (from memory, no source read). Composite: the maker's. */
export const MACH_CEILING = { metal: 0.85, wood: 0.8 } as const;

/**
 * Speed of the tip through the air (m/s): sqrt((pi D n)^2 + V^2).
 * `diameter` D (m), `propeller` n (propeller turns, 1/s), `forward` V (m/s, 0 = standing). RangeError for D not above 0, or n, V below 0.
 */
export function tipSpeed(diameter: number, propeller: number, forward = 0): number {
  needPositive({ diameter });
  needNotNegative({ propeller, forward });
  return Math.hypot(Math.PI * diameter * propeller, forward);
}

/** Mach number of `speed` (m/s) in air at `temperature` (K): v / sqrt(gamma R T). */
export function machNumber(speed: number, temperature: number): number {
  needNotNegative({ speed });
  return speed / soundSpeed(temperature);
}

/**
 * Propeller turns (1/s) at which the tip reaches `mach`: sqrt((M a)^2 - V^2) / (pi D); 0 where flying alone is as fast.
 * `temperature` K, `forward` m/s, `diameter` m.
 */
export function rotationAtMach(mach: number, diameter: number, temperature: number, forward = 0): number {
  needPositive({ mach, diameter });
  needNotNegative({ forward });
  const tip = mach * soundSpeed(temperature);
  return Math.sqrt(Math.max(0, tip ** 2 - forward ** 2)) / (Math.PI * diameter);
}
