/**
 * How full a rested battery is by its voltage, and what is left for the computers while the starter turns.
 * Source: none; the figures are common practice, as battery makers print them for about 20 to 25 degC. The maker's come first.
 */
import { needPositive } from "#app/lib/bench/compare";

export type Chemistry = "lead" | "lifepo4";

/** Rest voltage (V) of one 12 V battery (six lead cells, four lithium iron phosphate cells) and the share of charge that goes with it. */
export const REST_VOLTS: Record<Chemistry, readonly (readonly [volts: number, charge: number])[]> = {
  lead: [
    [12.2, 0.5],
    [12.4, 0.75],
    [12.6, 1],
  ],
  lifepo4: [
    [12.8, 0.2],
    [13, 0.3],
    [13.2, 0.4],
    [13.4, 0.9],
    [13.6, 0.99],
  ],
};

/** Above this a 12 V battery is not at rest: it is on charge, or was a moment ago (V). Common practice, no source. */
export const NOT_AT_REST: Record<Chemistry, number> = { lead: 13.1, lifepo4: 14 };

/** Hours without charge or load after which the voltage says something. Common practice, no source. */
export const REST_TIME = 2 * 3600;

/** State of charge asked before starting, where nothing else is entered. Common practice, no source. */
export const LEAST_CHARGE = 0.75;

export interface Charge {
  /** 0 to 1. */
  charge: number;
  /** `under`: the voltage is below what the figures cover, so there is less than `charge`; `over`: at or above the fullest. */
  side: "under" | "within" | "over";
}

/**
 * State of charge by rest voltage, straight lines between the figures. `volts` of the whole bank, `blocks` = 12 V batteries in series.
 * RangeError unless both are above 0. Good to about a tenth for lead; of little use for lithium iron phosphate, whose curve is flat.
 */
export function stateOfCharge(chemistry: Chemistry, volts: number, blocks: number): Charge {
  needPositive({ volts, blocks });
  const table = REST_VOLTS[chemistry];
  const each = volts / blocks;
  const next = table.findIndex(([at]) => each < at);
  const [upper, lower] = [table[next], table[next - 1]];
  if (upper && !lower) return { charge: upper[1], side: "under" };
  if (!upper || !lower) return { charge: table.at(-1)?.[1] ?? 0, side: "over" };
  const share = (each - lower[0]) / (upper[0] - lower[0]);
  return { charge: lower[1] + share * (upper[1] - lower[1]), side: "within" };
}
