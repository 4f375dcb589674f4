/**
 * The ladder of runs as data: each rung's share of rated speed and the steps of its card, from first start to hot restart.
 */
import { COOL, OFF_3, ON, type RungRow, START, USUAL, WARM, WARM_UP } from "#app/lib/template/build-up-steps";

const FIRST: RungRow = {
  key: "1",
  name: "First start",
  share: 0.5,
  cowl: OFF_3,
  stop: USUAL,
  steps: [
    ...START,
    { speed: WARM_UP, hold: 90, title: "Look and listen", see: "Even running, no leak, no smoke, straps and wheels still" },
    { speed: "idle", hold: null, title: "Idle", see: "Steady" },
    {
      speed: "idle",
      hold: null,
      when: "ground",
      title: "Ignition dies",
      see: "Each off in turn and all off for a moment: with all off it dies",
      marks: ["all off"],
    },
  ],
};

const WARM_UP_RUNG: RungRow = {
  key: "2",
  name: "Warm-up and change-over",
  share: 0.7,
  cowl: "Cowl on (off: 5 min at most, common practice)",
  stop: "Stop by the second means, not the usual one",
  steps: [
    ...START,
    WARM,
    { speed: WARM_UP, hold: null, when: "!oilsys", title: "Warm up", see: "Engine at the maker's temperature for power", marks: ["warm"] },
    {
      speed: [0.65, 0.65],
      hold: 5,
      when: "!diesel",
      title: "Each ignition alone",
      see: "5 s each: drop 175 rpm at most, 50 rpm apart at most; powered ignition: the maker's drop. No drop at all is a finding.",
      marks: ["change-over first", "change-over second", "both back"],
      source: "makers' manuals, as read",
    },
    {
      speed: [0.65, 0.65],
      hold: 10,
      when: "ecu2",
      title: "Each computer alone",
      see: "10 s each: runs on, no fault",
      marks: ["computer 1", "computer 2", "both back"],
    },
    {
      speed: [0.65, 0.65],
      hold: 20,
      when: "pump2",
      title: "Each pump alone",
      see: "20 s each: fuel pressure inside its limits",
      marks: ["pump 1", "pump 2", "both back"],
    },
    { speed: [0.65, 0.65], hold: null, when: "elsys", title: "Charging", see: "{busVoltsMin} to {busVoltsMax}" },
    {
      speed: [0.65, 0.65],
      hold: null,
      when: "carb",
      title: "Carburettor heat",
      see: "Speed falls with heat on, comes back with heat off",
      marks: ["heat on", "heat off"],
    },
    {
      speed: [0.65, 0.65],
      hold: null,
      title: "Tachometer",
      see: "Optical tachometer, read from behind, agrees inside 2 % (common practice)",
    },
    { speed: "idle", hold: null, title: "Idle", see: "Steady" },
    {
      speed: "idle",
      hold: null,
      when: "mixctl&!diesel",
      title: "Mixture rise",
      see: "Lever drawn back slowly: speed rises 10 to 50 rpm before it falls",
      marks: ["rise"],
      source: "makers' manuals, as read",
    },
  ],
};

const MIDDLE: RungRow = {
  key: "3",
  name: "Middle power",
  share: 0.85,
  cowl: ON,
  stop: USUAL,
  steps: [
    ...START,
    WARM,
    { speed: [0.5, 0.5], hold: 60, title: "Half speed", see: "Temperatures and pressures inside their limits" },
    { speed: [0.65, 0.65], hold: 60, title: "65 %", see: "Temperatures and pressures inside their limits" },
    { speed: [0.8, 0.8], hold: 120, title: "80 %", see: "Temperatures level off inside their limits" },
    { speed: [0.8, 0.8], hold: null, title: "Cockpit air", see: "Carbon monoxide 50 ppm at most", source: "14 CFR 121.219" },
    COOL,
  ],
};

const PROPELLER: RungRow = {
  key: "4",
  name: "Propeller",
  share: 0.75,
  cowl: ON,
  stop: USUAL,
  when: "cshyd|cselec",
  steps: [
    ...START,
    WARM,
    {
      speed: [0.65, 0.7],
      hold: null,
      when: "oilsys",
      title: "Pitch cycled three times",
      see: "Speed falls and returns as the maker says; oil pressure recovers",
      marks: ["cycle 1", "cycle 2", "cycle 3"],
    },
    {
      speed: [0.65, 0.7],
      hold: null,
      when: "!oilsys",
      title: "Pitch cycled three times",
      see: "Speed falls and returns as the maker says",
      marks: ["cycle 1", "cycle 2", "cycle 3"],
    },
    {
      speed: [0.65, 0.7],
      hold: null,
      when: "cselec",
      title: "Pitch by hand",
      see: "Moves both ways; with the breaker out it stays",
      marks: ["breaker out", "breaker in"],
    },
    { speed: [0.65, 0.7], hold: null, title: "Fine again", see: "Pitch back at fine, speed as before" },
  ],
};

const FULL: RungRow = {
  key: "5",
  name: "Full-power static",
  share: 1,
  cowl: ON,
  stop: USUAL,
  steps: [
    ...START,
    WARM,
    {
      speed: "full",
      hold: 10,
      title: "Up in 5 s, full",
      see: "Speed {staticRpmMin} to {staticRpmMax}; a fixed pitch does not reach rated speed tied down",
      marks: ["full 1"],
    },
    { speed: "idle", hold: 60, title: "Idle", see: "Steady, temperatures falling" },
    {
      speed: "full",
      hold: 20,
      title: "Full",
      see: "Speed {staticRpmMin} to {staticRpmMax}, fuel pressure inside its limits",
      marks: ["full 2"],
    },
    { speed: "full", hold: null, when: "cshyd|cselec", title: "Governor", see: "Holds the speed it is set to" },
    { speed: [0.65, 0.65], hold: null, title: "Idle to 65 %", see: "Picks up clean" },
    COOL,
  ],
};

const PROOF: RungRow = {
  key: "6",
  name: "Proof and hot restart",
  share: 0.7,
  cowl: ON,
  stop: USUAL,
  steps: [
    ...START,
    WARM,
    { speed: [0.65, 0.65], hold: 60, title: "65 %", see: "Temperatures and pressures inside their limits" },
    {
      speed: null,
      hold: 1200,
      title: "Stop, soak",
      see: "Usual stop, all off; 20 min standing hot (common practice); nobody near the propeller",
      marks: ["stopped"],
    },
    { speed: null, hold: null, title: "Hot restart", see: "Time to fire is noted", marks: ["starter on", "engine fires"], when: "estart" },
    {
      speed: null,
      hold: null,
      title: "Hot restart by hand",
      see: "Contact calls as for a start; swings to fire are noted",
      marks: ["engine fires"],
      when: "hand",
    },
    { speed: [0.45, 0.45], hold: 120, title: "45 %", see: "Runs even, no leak" },
  ],
};

/** The ladder, in order. */
export const BUILD_UP: RungRow[] = [FIRST, WARM_UP_RUNG, MIDDLE, PROPELLER, FULL, PROOF];

/** A rung that the lead adds at the end when something was opened after the last run. */
export const LEAK_CHECK: RungRow = {
  key: "L",
  name: "Leak check",
  share: 0.5,
  cowl: OFF_3,
  stop: USUAL,
  steps: [...START, { speed: [0.45, 0.45], hold: 120, title: "45 %", see: "No leak anywhere that was opened", marks: ["looked over"] }],
};
