/**
 * Comparing a computed figure with its limit where both came through unit conversions.
 * 60 psi of 80 psi is a loss of exactly 25 %, but in pascals it can miss by the last binary digit.
 */

/** Relative room for the rounding of binary numbers; far below anything an instrument can show. */
const ROUNDING = 1e-9;

/** Whether `value` reaches `least` (inclusive). Same unit on both sides. */
export function atLeast(value: number, least: number): boolean {
  return value >= least - ROUNDING * Math.abs(least);
}

/** Whether `value` stays at or under `most` (inclusive). Same unit on both sides. */
export function atMost(value: number, most: number): boolean {
  return value <= most + ROUNDING * Math.abs(most);
}

/** Whether two figures in the same unit are one and the same, but for rounding. */
export const alike = (a: number, b: number): boolean => Math.abs(a - b) <= ROUNDING * Math.max(Math.abs(a), Math.abs(b));

/** Guards the domain of a formula: throws RangeError unless every value is a finite number above zero. */
export function needPositive(values: Record<string, number>): void {
  for (const [name, value] of Object.entries(values)) {
    if (!(Number.isFinite(value) && value > 0)) throw new RangeError(`${name} must be a finite number above 0, got ${value}`);
  }
}

/** Guards the domain of a formula: throws RangeError unless every value is a finite number of at least zero. */
export function needNotNegative(values: Record<string, number>): void {
  for (const [name, value] of Object.entries(values)) {
    if (!(Number.isFinite(value) && value >= 0)) throw new RangeError(`${name} must be a finite number of at least 0, got ${value}`);
  }
}
