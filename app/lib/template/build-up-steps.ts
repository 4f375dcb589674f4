/**
 * How the rungs of the build-up are written, and the steps that several of them share.
 * Speeds are shares of rated crankshaft speed. Braces in a text take a value of the install, in the unit it is read in.
 */

export interface StepRow {
  /** Shares of rated speed; one of the install's own speeds; null where no speed is held. */
  speed: readonly [min: number, max: number] | "idle" | "cool-down" | "full" | null;
  hold: number | null;
  title: string;
  see: string;
  marks?: string[];
  when?: string;
  source?: string;
}

export interface RungRow {
  key: string;
  name: string;
  share: number;
  cowl: string;
  stop: string;
  steps: StepRow[];
  when?: string;
}

export const USUAL = "Usual stop";
export const ON = "Cowl on";
export const OFF_3 = "Cowl off, 3 min at most (common practice)";
export const WARM_UP = [0.4, 0.45] as const;
const MAKERS_START = "makers' manuals, as read; yours comes first";

export const START: StepRow[] = [
  {
    speed: null,
    hold: null,
    when: "estart",
    title: "Start",
    see: "Fires inside {starterOn}, rest {starterRest}, {starterTries} tries at most, then 30 min; starter let go, amps fall. No start: fuel off, find the cause, walk round again.",
    marks: ["starter on", "engine fires"],
    source: MAKERS_START,
  },
  {
    speed: null,
    hold: null,
    when: "hand",
    title: "Contact calls",
    see: "Swinger calls, operator answers; swinger out of the arc before any power. No start: ignition and fuel off before the next word; the propeller is live.",
    marks: ["engine fires"],
  },
  {
    speed: "idle",
    hold: 30,
    when: "oilsys",
    title: "Oil pressure",
    see: "Moves inside 10 s, above {oilPressureMin} inside 30 s, else STOP",
    marks: ["pressure seen"],
    source: MAKERS_START,
  },
  {
    speed: "idle",
    hold: 30,
    when: "!oilsys",
    title: "Temperatures",
    see: "They move, and stay inside their limits",
    marks: ["temperatures seen"],
  },
];

export const COOL: StepRow = {
  speed: "cool-down",
  hold: 180,
  title: "Cool down",
  see: "3 min at one and a half times idle; with a turbocharger the maker's time",
  source: "makers' manuals, as read",
};

export const WARM: StepRow = {
  speed: WARM_UP,
  hold: null,
  when: "oilsys",
  title: "Warm up",
  see: "Oil at {oilTempForPower}",
  marks: ["warm"],
};
