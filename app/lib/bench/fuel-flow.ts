/**
 * What an engine needs of its fuel supply, and what a timed catch shows that it gets.
 * Source of the factors: 14 CFR 23.955(b) and (c) before amendment 23-64 (a benchmark for homebuilts, not law for them).
 */
import { atMost, needPositive } from "#app/lib/bench/compare";

/** Flow asked for as a multiple of take-off consumption. */
export const FLOW_FACTOR = { gravity: 1.5, pump: 1.25 } as const;
export type Supply = keyof typeof FLOW_FACTOR;

/** Catches that differ by more than this ask for another. Common practice, no source. */
export const CATCH_SPREAD = 0.05;

export interface Catch {
  /** m³ */
  volume: number;
  /** s */
  seconds: number;
}

/**
 * Take-off consumption (m³/s) where the maker gives none: power (W) x specific consumption (kg/J) / density (kg/m³).
 * RangeError for values that are not above 0.
 */
export function consumption(power: number, specific: number, density: number): number {
  needPositive({ power, specific, density });
  return (power * specific) / density;
}

/** Flow (m³/s) the supply must give: factor x consumption (m³/s). */
export function requiredFlow(supply: Supply, takeoff: number): number {
  needPositive({ takeoff });
  return FLOW_FACTOR[supply] * takeoff;
}

/** Flow of one catch (m³/s): volume / time. */
export function catchFlow({ volume, seconds }: Catch): number {
  needPositive({ volume, seconds });
  return volume / seconds;
}

/** Volume (m³) of a weighed catch: mass (kg) / density (kg/m³). */
export function weighedVolume(mass: number, density: number): number {
  needPositive({ mass, density });
  return mass / density;
}

/** Longest time (s) that a catch of `volume` (m³) may take at the required `flow` (m³/s). */
export function longestCatch(volume: number, flow: number): number {
  needPositive({ volume, flow });
  return volume / flow;
}

/** (largest - least) / mean of flows, a fraction; 0 for a single one. RangeError for an empty list. */
export function spread(flows: readonly number[]): number {
  return (Math.max(...flows) - Math.min(...flows)) / mean(flows);
}

/** Arithmetic mean. RangeError for an empty list or values that are not above 0. */
export function mean(flows: readonly number[]): number {
  if (flows.length === 0) throw new RangeError("no catch was made");
  for (const flow of flows) needPositive({ flow });
  return flows.reduce((sum, flow) => sum + flow, 0) / flows.length;
}

/**
 * The newest catches (given in the order made) that agree with each other within `limit`: these are the measurement.
 * So a catch that did not agree is answered by making another, and stays on the sheet.
 */
export function agreeing(flows: readonly number[], limit = CATCH_SPREAD): number[] {
  let from = Math.max(flows.length - 1, 0);
  while (from > 0 && atMost(spread(flows.slice(from - 1)), limit)) from -= 1;
  return flows.slice(from);
}
