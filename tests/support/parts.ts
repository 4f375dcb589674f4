/** What snapshots of tests are made of: a coarse clock, an empty install, parts of items and evidence that meets them. */
import { DEFAULT_SETTINGS, type Evidence, type Instant, type Snapshot } from "#app/lib/gates/snapshot";
import type { CrewRule, Part, RunCard, Traits } from "#app/lib/template/types";
import { restraintEvidence } from "./sheets";

/** One tick of the coarse clock: a quarter of an hour, exact in hours. */
export const TICK = 15 * 60_000;
export const START: Instant = Date.UTC(2031, 4, 3, 6, 0, 0);
export const HOUR = 3_600_000;

const TRAITS: Traits = {
  delivery: "gravity", metering: "carb", ignition: "mag", computers: 0, cooling: "air", lubrication: "wet", drive: "direct", propeller: "fixed",
  gear: "nose", starter: "estart", history: "new", cycle: "4s", twoStrokeOil: null, return: false, pump2: false, mixctl: true, altair: false,
  low: false, turbo: false, elsys: true, lithium: false, blades: "wood", pusher: false, cabinheat: false,
}; // biome-ignore format: a list of traits

export const CARD: RunCard = { steps: [], cowl: "off", begin: [], end: [], calls: [], abort: { stop: [], kill: [], fire: [] } };
export const CREW: CrewRule = {
  people: 3,
  wanted: [
    { position: "operator", count: 1 },
    { position: "runlead", count: 1 },
    { position: "fireguard", count: 1 },
  ],
  mayAlso: [["runlead", "observer"]],
};

/** An install with nothing in it. */
export function emptySnapshot(): Snapshot {
  return {
    install: { id: "install", registration: "N0TEST", name: "Test install", timeZone: "UTC" },
    settings: { ...DEFAULT_SETTINGS },
    traits: { ...TRAITS },
    values: [], members: [], gates: [], items: [], proofs: [], confirmations: [], acceptances: [], keeps: [], signatures: [], openings: [],
    looseEnds: [], findings: [], tools: [], extinguishers: [], rungs: [], runs: [], releaseSignatures: [], editsWaiting: [],
  }; // biome-ignore format: a list of empty lists
}

/** Evidence that meets this part as it stands; a tally "in" repeats six in the one place that "out" counts. */
export function passing(part: Part, value = 10): Evidence | null {
  switch (part.kind) {
    case "tick":
      return { kind: "tick" };
    case "measure":
    case "reading":
      return { kind: part.kind, values: part.places.map(() => value) };
    case "torque":
      return { kind: "torque", values: part.places.map(() => value), count: part.count ?? 4, adapter: null, wrenchLength: null };
    case "tally":
      return { kind: "tally", places: [{ place: "plugs", out: 6, in: part.mode === "out" ? null : 6 }] };
    case "photo":
      return { kind: "photo", files: ["file"], stored: true };
    case "text":
      return { kind: "text", text: "seen" };
    case "crank":
      return { kind: "crank", bursts: [{ at: START, seconds: 8, pressureAfter: 5 }] };
    case "sheet":
      return part.sheet === "restraint" ? restraintEvidence() : null;
    case "computed":
      return null;
  }
}

export const tick: Part = { kind: "tick" };
export const measure = (min: number | null = 5, max: number | null = 15): Part => ({
  kind: "measure",
  label: "value",
  places: [""],
  criterion: { quantity: "pressure", band: { min, max }, basis: { kind: "maker" }, source: "manual p. 1" },
});
export const torque = (count: number | null = 4): Part => ({
  kind: "torque",
  label: "bolts",
  places: ["a", "b"],
  criterion: { quantity: "torque", band: { min: 5, max: 15 }, basis: { kind: "maker" }, source: "manual p. 2" },
  count,
});
