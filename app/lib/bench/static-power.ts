/**
 * What a propeller that stands still may be expected to turn and pull today, from a run on another day at full throttle.
 * Source: P = C_P rho n^3 D^5 and T = C_T rho n^2 D^4 with the same blade angle; power of a naturally aspirated piston engine at
 * full throttle by Gagg and Ferrar, 1.132 sigma - 0.132 at one speed (from memory), taken in proportion to speed between two days.
 */
import { needPositive } from "#app/lib/bench/compare";

/** Density of the standard atmosphere at sea level, kg/m³. */
const RHO0 = 1.225;

/** Densities for which these trends are used, kg/m³: about -1000 m in hard frost to 5000 m on a hot day. */
export const DENSITY_RANGE = { min: 0.6, max: 1.7 } as const;

/** How far static speed may fall short before it is looked into. Common practice, no source; 2 % of speed is 6 % of power. */
export const SPEED_DROP = 0.02;

export type Breathing = "natural" | "boosted";

/**
 * Torque at full throttle over that at sea level, for air of `density` (kg/m³): 1.132 sigma - 0.132 with sigma = rho / 1.225;
 * 1 for an engine whose charger holds sea-level pressure. RangeError outside 0.6 to 1.7 kg/m³.
 */
export function torqueShare(density: number, breathing: Breathing): number {
  if (!(density >= DENSITY_RANGE.min && density <= DENSITY_RANGE.max))
    throw new RangeError(`density must be 0.6 to 1.7 kg/m3, got ${density}`);
  return breathing === "boosted" ? 1 : 1.132 * (density / RHO0) - 0.132;
}

/** Static speed in air of `density` over that at sea level: sqrt(torque share / sigma), 0.9893 at 5000 ft when naturally aspirated. */
export function staticSpeedShare(density: number, breathing: Breathing): number {
  return Math.sqrt(torqueShare(density, breathing) / (density / RHO0));
}

export interface StaticRun {
  /** Static crankshaft speed at full throttle, 1/s. */
  rotation: number;
  /** kg/m³ */
  density: number;
}

/** Static speed (1/s) to expect in air of `density` from a run `then`: n x share(density) / share(then). */
export function expectedRotation(then: StaticRun, density: number, breathing: Breathing): number {
  needPositive({ rotation: then.rotation });
  return (then.rotation * staticSpeedShare(density, breathing)) / staticSpeedShare(then.density, breathing);
}

/** Thrust now over thrust then, from densities and speeds: (rho / rho') (n / n')^2. */
export function thrustRatio(now: StaticRun, then: StaticRun): number {
  needPositive({ rotation: now.rotation, earlier: then.rotation, density: now.density, earlierDensity: then.density });
  return (now.density / then.density) * (now.rotation / then.rotation) ** 2;
}

/** Power that the propeller takes now over that which it would take at the expected speed in the same air: (n / n_expected)^3. */
export function powerRatio(rotation: number, expected: number): number {
  needPositive({ rotation, expected });
  return (rotation / expected) ** 3;
}
