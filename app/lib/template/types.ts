/**
 * What the readiness template is made of, and what generation makes of it for one install.
 * Plain data: these shapes are stored, sent to the tablet and read by the gate evaluator as they are.
 * All numbers are SI (see units/quantity.ts), rotation is crankshaft revolutions per second.
 */
import type { Unit } from "#app/lib/units/convert";
import type { Band, Quantity } from "#app/lib/units/quantity";

// ---------------------------------------------------------------- traits

export interface Traits {
  // page one
  delivery: "gravity" | "enginepump" | "boost" | "electric";
  metering: "carb" | "mechinj" | "efi";
  ignition: "mag" | "selfpow" | "batt" | "mixed" | "none";
  computers: 0 | 1 | 2;
  cooling: "air" | "liquid" | "airliquid";
  lubrication: "wet" | "dry" | "nosump";
  drive: "direct" | "geared";
  propeller: "fixed" | "groundadj" | "cshyd" | "cselec";
  gear: "nose" | "tail";
  starter: "estart" | "hand";
  history: "new" | "runbefore";
  // page two
  cycle: "4s" | "2s" | "rotary" | "diesel";
  /** How a two-stroke gets its oil; null where the engine has an oil system of its own. */
  twoStrokeOil: "premix" | "oilinj" | null;
  return: boolean;
  pump2: boolean;
  mixctl: boolean;
  altair: boolean;
  /** Cylinders below the crankcase (inverted, radial): they can fill and lock. */
  low: boolean;
  turbo: boolean;
  elsys: boolean;
  lithium: boolean;
  blades: "metal" | "wood" | "composite";
  pusher: boolean;
  cabinheat: boolean;
}

// ---------------------------------------------------------------- systems

export const SYSTEMS = [
  "mount",
  "fuelsup",
  "fueleng",
  "oil",
  "oilfill",
  "coolant",
  "drive",
  "ign",
  "plugs",
  "ecu",
  "map",
  "elec",
  "induct",
  "exh",
  "ctl",
  "air",
  "prop",
  "instr",
  "restr",
  "site",
  "crew",
  "bay",
] as const;
export type SystemKey = (typeof SYSTEMS)[number];

// ---------------------------------------------------------------- where a number comes from

/** Where a criterion comes from before anyone has confirmed it. A maker's number has none until it is entered. */
export type Basis = { kind: "standard"; source: string } | { kind: "maker" } | { kind: "common" };

/**
 * The band an item is judged by.
 * `band` null = the maker's number, not entered yet: nothing can meet it.
 * `source` = where somebody read it ("maker's manual p. 41"); null = still a default, marked so on every screen.
 * `limit` = one end comes from a value of the install, so that a changed limit changes the item.
 */
export interface Criterion {
  quantity: Quantity;
  band: Band | null;
  basis: Basis;
  source: string | null;
  limit?: { key: ValueKey; end: "min" | "max" };
  /** The other end, where that too comes from a value of the install (fuel pressure). */
  otherLimit?: { key: ValueKey; end: "min" | "max" };
}

// ---------------------------------------------------------------- evidence asked for

/** Names of the places that each want a value ("cylinder 1", ...). One nameless place is [""]. */
export type Places = string[];

export type SheetKey = "fuel-flow" | "restraint" | "compression";
export type ComputedRule = "extinguishers" | "loose-ends" | "log" | "release-record" | "release-openings";

export type Part =
  /** `reference`: a maker's instruction or mark that must be entered before anyone can tick ("level mark: ..."). */
  | { kind: "tick"; reference?: { asks: string; text: string | null; source: string | null } }
  | { kind: "measure"; label: string; places: Places; criterion: Criterion }
  /** Band applies to the true torque. `count` = fasteners expected; null = state how many. */
  | { kind: "torque"; label: string; places: Places; criterion: Criterion; count: number | null }
  /**
   * Counts by place. `pairs`: each place has its own out and in, which must be equal.
   * `out`: counts taken out; `expected` where known (cylinders). `in`: must equal the newest `out` of item `of`, place by place.
   */
  | { kind: "tally"; mode: "pairs" | "out" | "in"; of?: string; expected?: number; words: { out: string; in: string } }
  | { kind: "photo"; of: string; optional: boolean }
  | { kind: "reading"; label: string; places: Places; quantity: Quantity; optional: boolean }
  | { kind: "text"; asks: string }
  | { kind: "crank"; giveUpAfter: number; basis: Basis }
  | { kind: "sheet"; sheet: SheetKey }
  | { kind: "computed"; rule: ComputedRule };

// ---------------------------------------------------------------- items and gates

export interface ItemDef {
  /** Stable template key, "FP2". */
  key: string;
  gate: string;
  /** One action, one place, what good looks like; at most 120 characters. */
  words: string;
  killer: boolean;
  secondEyes: boolean;
  /** No passing proof while a prerequisite gate does not stand. */
  guarded: boolean;
  /** Printed on the run card (killer items of CR, TD, FI, WR). */
  onCard: boolean;
  systems: SystemKey[];
  parts: Part[];
  /** Keys of the items it follows, only those on this board. */
  follows: string[];
  /** Set on a step: true only while the work goes on. `endedBy` null = ended by nothing (a loose end takes over). */
  step: { endedBy: string | null } | null;
  /** Hours; an item's own validity stands before its gate's. */
  validity: Validity | null;
  caution: string | null;
  /** A step such as "coils made safe" offers this loose end, due before the named gate or rung. */
  offersLooseEnd: { what: string; system: SystemKey; dueGate?: string; dueRung?: string } | null;
  /** Made only for the runs of these rungs (post-run items); null = all. */
  runs: string[] | null;
  /** Published source of what is asked, where there is one beside a band's basis. */
  source?: string;
}

/** `hours` from the proof; `afterRunHours` (renewed by running) from the end of the newest completed run, where later. */
export interface Validity {
  hours: number | null;
  afterRunHours: number | null;
}

export type RequiredBy = { kind: "runs-and-release" } | { kind: "runs" } | { kind: "release" } | { kind: "rung-and-release"; rung: string };

export type SigningRole = "builder" | "inspector" | "lead";
/** In order; each place names the roles that may sign there. */
export type SignPolicy = SigningRole[][];

export interface GateDef {
  key: string;
  name: string;
  /** At most 16 characters, for the Line. */
  short: string;
  needs: string[];
  after: string[];
  requiredBy: RequiredBy;
  /** Walk-round: spent by each start. */
  eachRun: boolean;
  /** `run` = made for one run when it starts; `rung` = the run that settled this rung. */
  lookBack: { kind: "run" } | { kind: "rung"; rung: string } | null;
  validity: Validity | null;
  policy: SignPolicy;
  caution: string | null;
}

// ---------------------------------------------------------------- values of the install

export type ValueKey =
  | "ratedPower"
  | "ratedRpm"
  | "takeoffFlow"
  | "propDiameter"
  | "reductionRatio"
  | "mass"
  | "redline"
  | "idleRpm"
  | "staticRpmMin"
  | "staticRpmMax"
  | "avoidRpmMin"
  | "avoidRpmMax"
  | "oilPressureMin"
  | "oilPressureMax"
  | "oilTempMax"
  | "oilTempForPower"
  | "chtMax"
  | "egtMax"
  | "coolantMax"
  | "fuelPressureMin"
  | "fuelPressureMax"
  | "busVoltsMin"
  | "busVoltsMax"
  | "ecuVoltsMin"
  | "starterOn"
  | "starterRest"
  | "starterTries"
  | "coldStartMin"
  | "windLimit"
  | "gustLimit"
  | "groundMinutes"
  | "cylinders"
  | "plugs"
  | "wheelBase"
  | "tankFeedMin";

export interface ValueDef {
  key: ValueKey;
  label: string;
  quantity: Quantity;
  /** A starting point, or null where only the maker can say. */
  preset: number | null;
  basis: Basis;
  /** Redline and card limits stop every run until confirmed with a source; the others stop the release. */
  card: boolean;
  /** A limit (judged against) or a rating (computed with). */
  limit: boolean;
  help: string;
  /** Unit to show and type it in, where the quantity's own would read badly (minutes). */
  shownIn?: Unit;
}

export interface Value {
  key: ValueKey;
  value: number | null;
  /** Where it was read; null = not confirmed. */
  source: string | null;
}

// ---------------------------------------------------------------- runs

export interface CardStep {
  no: number;
  /** Crankshaft revolutions per second; null where the step is not a held speed. */
  rpm: { min: number; max: number } | null;
  /** Seconds; null = no hold. */
  hold: number | null;
  title: string;
  /** What must be seen. */
  see: string;
  /** Name of the mark that the recorder puts ("change-over left"). */
  marks: string[];
  /** Where a figure in `see` was published. */
  source?: string;
}

export type PositionKey = "operator" | "runlead" | "fireguard" | "areaguard" | "observer" | "recorder" | "swinger";

export interface PositionDef {
  key: PositionKey;
  name: string;
  /** One letter for the floor plan. */
  letter: string;
  place: string;
  duty: string;
}

export interface CrewRule {
  /** Distinct people at least. */
  people: number;
  /** How many of each position are wanted at least. */
  wanted: { position: PositionKey; count: number }[];
  /** Pairs that one person may hold together; every other pair is forbidden. */
  mayAlso: [PositionKey, PositionKey][];
}

export interface RunCard {
  steps: CardStep[];
  cowl: string;
  begin: string[];
  end: string[];
  calls: { call: string; by: string; answer: string }[];
  abort: { stop: string[]; kill: string[]; fire: string[] };
}

export interface RungDef {
  /** "1" to "6", "L". */
  key: string;
  name: string;
  /** Planned highest crankshaft speed, revolutions per second; null until the ratings are entered. */
  rpm: number | null;
  /** Share of rated speed that `rpm` came from, for the drawing. */
  share: number;
  card: RunCard;
  crew: CrewRule;
}

// ---------------------------------------------------------------- what generation returns

export interface GeneratedBoard {
  templateVersion: string;
  gates: GateDef[];
  items: ItemDef[];
  rungs: RungDef[];
  values: ValueDef[];
  positions: PositionDef[];
  /** Items of the template that these traits leave out, with the reason in words: listed at the first countersignature. */
  leftOut: { key: string; words: string; because: string }[];
  /** Post-run gate with all its items; a copy is made when run n starts (items whose `runs` names another rung are left out). */
  postRun: { gate: GateDef; items: ItemDef[]; policyByRung: Record<string, SignPolicy> };
}
