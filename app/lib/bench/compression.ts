/**
 * Differential compression: air is fed through a fixed orifice, and what the cylinder loses shows as a pressure below the supply.
 * Source: AC 43.13-1B, paragraph 8-14; the engine maker's method and limits come first.
 */
import { needNotNegative, needPositive } from "#app/lib/bench/compare";
import { toSI } from "#app/lib/units/convert";

/** Supply pressure of the standard test, Pa (80 psi). */
export const TEST_PRESSURE = toSI(80, "psi");

/** A loss in excess of this is suspect: 60 of 80 psi still passes. */
export const LOSS_LIMIT = 0.25;

/** Loss as a fraction of the supply: (P_in - P_cyl) / P_in, pressures above ambient in Pa. RangeError unless 0 <= P_cyl <= P_in. */
export function loss(supply: number, cylinder: number): number {
  needPositive({ supply });
  needNotNegative({ cylinder });
  if (cylinder > supply) throw new RangeError("a cylinder cannot hold more than the supply");
  return (supply - cylinder) / supply;
}

/** Orifice (m) of the standard tester for a cylinder of `bore` (m): 0.040 in under 5.00 in, 0.060 in from there on. Makers differ. */
export function orificeFor(bore: number): number {
  needPositive({ bore });
  return toSI(bore < toSI(5, "in") ? 0.04 : 0.06, "in");
}
