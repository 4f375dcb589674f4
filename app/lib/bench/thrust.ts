/**
 * Thrust of a propeller at rest by momentum (actuator disc) theory, and how it goes with speed.
 * Source: Rankine-Froude momentum theory, as in any text on propellers; the figure of merit is a ratio of powers.
 */
import { needNotNegative, needPositive } from "#app/lib/bench/compare";

/** Share of the shaft power that ideal theory would need for the same thrust. Common practice, no source: a good propeller at rest, so thrust is not read low. */
export const FIGURE_OF_MERIT = 0.75;

const discArea = (diameter: number): number => (Math.PI * diameter * diameter) / 4;

/**
 * Static thrust (N): T = FM^(2/3) (2 rho A P^2)^(1/3), A = pi D^2 / 4.
 * `power` at the propeller shaft (W), `diameter` (m), `density` (kg/m³), `figureOfMerit` 0 to 1 (1 = ideal).
 * For one open propeller, standing still. RangeError for values that are not above 0.
 */
export function staticThrust(power: number, diameter: number, density: number, figureOfMerit: number): number {
  needPositive({ power, diameter, density, figureOfMerit });
  if (figureOfMerit > 1) throw new RangeError("figure of merit cannot be above 1");
  return Math.cbrt(2 * density * discArea(diameter) * (figureOfMerit * power) ** 2);
}

/** Velocity induced in the disc (m/s) at `thrust` (N): v = sqrt(T / (2 rho A)); far behind, the slipstream has twice that. */
export function inducedVelocity(thrust: number, diameter: number, density: number): number {
  needPositive({ diameter, density });
  needNotNegative({ thrust });
  return Math.sqrt(thrust / (2 * density * discArea(diameter)));
}

/** Thrust (N) at `rotation` from thrust at `reference` (both 1/s) for the same blade angle: T ~ n^2 (T = C_T rho n^2 D^4). */
export function thrustAt(rotation: number, reference: number, referenceThrust: number): number {
  needPositive({ reference, referenceThrust });
  needNotNegative({ rotation });
  return referenceThrust * (rotation / reference) ** 2;
}

/** Power (W) that the same propeller takes at `rotation`: P ~ n^3 (P = C_P rho n^3 D^5). */
export function powerAt(rotation: number, reference: number, referencePower: number): number {
  needPositive({ reference, referencePower });
  needNotNegative({ rotation });
  return referencePower * (rotation / reference) ** 3;
}
