/**
 * The gates of the template: what each needs, how long its proofs hold, who signs, what it is required by, and its caution.
 */
import type { RequiredBy, SignPolicy, Validity } from "#app/lib/template/types";

export interface GateRow {
  key: string;
  name: string;
  short: string;
  needs: { gate: string; when?: string }[];
  after: string[];
  requiredBy: RequiredBy;
  eachRun: boolean;
  lookBack: { kind: "run" } | { kind: "rung"; rung: string } | null;
  validity: Validity | null;
  policy: SignPolicy;
  caution: string;
  /** Holds for every item of the gate. */
  when?: string;
}

export const BUILDER_INSPECTOR: SignPolicy = [["builder"], ["inspector"]];
export const BUILDER_LEAD: SignPolicy = [["builder"], ["lead", "inspector"]];

const RUNS_AND_RELEASE: RequiredBy = { kind: "runs-and-release" };
const RUNS: RequiredBy = { kind: "runs" };

const hours = (first: number, afterRun: number | null = null): Validity => ({ hours: first, afterRunHours: afterRun });

type Extras = Partial<Omit<GateRow, "key" | "name" | "short" | "needs" | "caution">>;

function gate(
  key: string,
  name: string,
  short: string,
  needs: (string | { gate: string; when: string })[],
  caution: string,
  extras: Extras = {},
): GateRow {
  const plain = { after: [], requiredBy: RUNS_AND_RELEASE, eachRun: false, lookBack: null, validity: null, policy: BUILDER_INSPECTOR };
  return { key, name, short, needs: needs.map((need) => (typeof need === "string" ? { gate: need } : need)), caution, ...plain, ...extras };
}

const ofTheDay: Extras = { requiredBy: RUNS, validity: hours(12), policy: BUILDER_LEAD };

const INSTALLATION: GateRow[] = [
  gate("MF", "Mount and firewall", "Mount", [], "Hoist or stand under the engine before a mount bolt comes out."),
  gate("EC", "Engine controls", "Controls", ["MF"], "Hands are in the linkage: say so before you move a lever."),
  gate(
    "EL",
    "Electrical and starting",
    "Electrical",
    ["MF"],
    "Rings off. Earth lead off first, on last. No charging near open fuel. Arc clear when a starter wire is touched.",
  ),
  gate(
    "IG",
    "Ignition and computers",
    "Ignition",
    ["EL"],
    "The propeller is live, always. A magneto with its lead off is hot: plugs out first. Coil voltage can kill.",
  ),
  gate("IN", "Instruments and log", "Instruments", ["EL"], "What is wrong here makes every limit wrong."),
  gate("IX", "Induction, exhaust, cooling air", "Air and exhaust", ["MF"], "Whatever lies in the intake ends in a cylinder."),
  gate(
    "FS",
    "Fuel supply sound",
    "Fuel supply",
    ["MF"],
    "Doors open, no flame, no charger, aircraft and can bonded, extinguisher in reach, eyes covered.",
  ),
  gate(
    "OC",
    "Oil, coolant, gearbox",
    "Oil, coolant",
    ["MF"],
    "Never open a hot coolant cap. Turn geared and dry-sump engines only the way they run.",
  ),
  gate("PR", "Propeller", "Propeller", ["MF"], "Live, always: one plug out of each cylinder, chocks in."),
];

const PRIME: GateRow[] = [
  gate(
    "FP",
    "Fuel flow and prime",
    "Fuel prime",
    ["FS", { gate: "EL", when: "!gravity" }],
    "Fuel under pressure: ignition dead, extinguisher manned; wipe up and air the place before any switch.",
    { after: ["FS"], validity: hours(336, 720) },
  ),
  gate(
    "OP",
    "Oil prime",
    "Oil prime",
    ["OC", "PR", "IG", "EL"],
    "The propeller turns: arc clear, ignition and fuel dead, faces away from plug holes.",
    { validity: hours(72, 720), when: "oilsys" },
  ),
];

const OF_THE_DAY: GateRow[] = [
  gate("DY", "Fuel, oil, battery of the day", "Of the day", ["FP", "OP"], "No refuelling with anybody aboard or the engine hot.", ofTheDay),
  gate(
    "TD",
    "Tie-down",
    "Tie-down",
    ["PR"],
    "Straps on and off only with ignition off and propeller still. Never stand in line with a tight strap.",
    ofTheDay,
  ),
  gate("FI", "Fire and site", "Fire, site", [], "Up-wind is in front of the propeller: guards stand to the side.", ofTheDay),
  gate("CR", "Crew and stop drill", "Crew drill", ["EC", "IG", "FI"], "Master, fuel and ignition off while you rehearse.", ofTheDay),
];

const BEFORE_WALK_ROUND = [...INSTALLATION, ...PRIME, ...OF_THE_DAY];

/** Gates worked before a run, in the order of the Line; the walk-round needs all above it. */
export const BEFORE_RUN_GATES: GateRow[] = [
  ...BEFORE_WALK_ROUND,
  gate(
    "WR",
    "Walk-round",
    "Walk-round",
    BEFORE_WALK_ROUND.map(({ key }) => key),
    "Interrupted? Begin again.",
    {
      requiredBy: RUNS,
      eachRun: true,
      validity: hours(4),
      policy: BUILDER_LEAD,
    },
  ),
];

export const AFTER_RUN_GATES: GateRow[] = [
  gate("SV", "Service after full power", "Service", [], "Hot oil, and the propeller is live.", {
    requiredBy: { kind: "rung-and-release", rung: "6" },
    lookBack: { kind: "rung", rung: "5" },
  }),
  // The release itself asks for two signatures and for every post-run gate; this gate carries its items only.
  gate("RL", "Release for taxi tests", "Release", [], "Ready to taxi is not ready to fly.", {
    requiredBy: { kind: "release" },
    policy: [],
  }),
];

/** Made once for each run when it starts. */
export const POST_RUN_GATE: GateRow = gate("PO", "After the run", "After the run", [], "Hot parts, hot oil, live propeller: wait 10 min.", {
  requiredBy: { kind: "release" },
  lookBack: { kind: "run" },
});

/** Runs whose post-run gate an inspector signs; the others a lead or inspector. */
export const INSPECTOR_RUNGS = ["1", "5", "6", "L"];
