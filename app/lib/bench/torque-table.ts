/**
 * Standard torques for general hardware, where the maker gives none (AC 43.13-1B, paragraph 7-40).
 * Source: AC 43.13-1B, table 7-1, in-lb, dry cadmium-plated threads. Not for engine, propeller or kit fasteners with a maker's value.
 */
import { toSI } from "#app/lib/units/convert";
import type { Band } from "#app/lib/units/quantity";

export const TORQUE_TABLE_SOURCE = "AC 43.13-1B, table 7-1 (dry cadmium threads); the maker's value comes first";

export type NutType = "tension" | "shear";

type Range = readonly [min: number, max: number];
export interface TorqueRow {
  thread: string;
  series: "fine" | "coarse";
  /** in-lb; null where public copies of the table differ: read the circular itself. */
  tension: Range | null;
  shear: Range | null;
  /** Highest torque allowed with a tension nut, in-lb; null where not given here. */
  maxTension: number | null;
}

const fine = (thread: string, tension: Range, shear: Range | null, maxTension: number): TorqueRow => ({
  thread,
  series: "fine",
  tension,
  shear,
  maxTension,
});
const coarse = (thread: string, tension: Range, shear: Range | null): TorqueRow => ({
  thread,
  series: "coarse",
  tension,
  shear,
  maxTension: null,
});

export const TORQUE_TABLE: readonly TorqueRow[] = [
  fine("8-36", [12, 15], [7, 9], 20),
  fine("10-32", [20, 25], [12, 15], 40),
  fine("1/4-28", [50, 70], [30, 40], 100),
  fine("5/16-24", [100, 140], [60, 85], 225),
  fine("3/8-24", [160, 190], [95, 110], 390),
  fine("7/16-20", [450, 500], [270, 300], 840),
  fine("1/2-20", [480, 690], [290, 410], 1100),
  fine("9/16-18", [800, 1000], [480, 600], 1600),
  fine("5/8-18", [1100, 1300], null, 2400),
  fine("3/4-16", [2300, 2500], [1300, 1500], 5000),
  fine("7/8-14", [2500, 3000], [1500, 1800], 7000),
  fine("1-14", [3700, 5500], [2200, 3300], 10_000),
  fine("1-1/8-12", [5000, 7000], [3000, 4200], 15_000),
  fine("1-1/4-12", [9000, 11_000], [5400, 6600], 25_000),
  coarse("8-32", [12, 15], [7, 9]),
  coarse("10-24", [20, 25], [12, 15]),
  coarse("1/4-20", [40, 50], [25, 30]),
  coarse("5/16-18", [80, 90], [48, 55]),
  coarse("3/8-16", [160, 185], null),
  coarse("7/16-14", [235, 255], [140, 155]),
  coarse("1/2-13", [400, 480], [240, 290]),
  coarse("9/16-12", [500, 700], [300, 420]),
  coarse("5/8-11", [700, 900], [420, 540]),
  coarse("3/4-10", [1150, 1600], [700, 950]),
  coarse("7/8-9", [2200, 3000], [1300, 1800]),
];

/** Band in N·m for a thread ("3/8-24") and kind of nut; null where the table has none or public copies differ. */
export function standardTorque(thread: string, nut: NutType): Band | null {
  const range = TORQUE_TABLE.find((row) => row.thread === thread)?.[nut] ?? null;
  return range === null ? null : { min: toSI(range[0], "in-lb"), max: toSI(range[1], "in-lb") };
}
