/**
 * Everything of one install that bears on readiness, as plain data: the only input of the evaluator besides an instant.
 * Made by db/queries on the server, from the cached copy plus the queue on the tablet, and by hand in tests.
 * Instants are milliseconds since the epoch (UTC); every other number is SI, rotation in crankshaft revolutions per second.
 */
import type {
  CrewRule,
  ItemDef,
  Part,
  PositionKey,
  RequiredBy,
  RunCard,
  SheetKey,
  SigningRole,
  SignPolicy,
  SystemKey,
  Traits,
  Validity,
  Value,
  ValueDef,
  ValueKey,
} from "#app/lib/template/types";

export type Instant = number;
export type Role = "lead" | "builder" | "inspector" | "crew";

/** What every record has. `seq` is unique in the install and grows with `recorded`; `as` is the role that the act named. */
export interface Recorded {
  id: string;
  seq: number;
  /** Server clock, never backwards. */
  recorded: Instant;
  by: string;
  as: Role;
}

export interface Member {
  id: string;
  name: string;
  /** Periods in which the person held a role; `to` null = still. A removed member has none open. */
  roles: { role: Role; from: Instant; to: Instant | null }[];
}

export interface Gate {
  id: string;
  key: string;
  name: string;
  short: string;
  revision: number;
  needs: string[];
  after: string[];
  requiredBy: RequiredBy;
  eachRun: boolean;
  /** `run`: the id of the run looked back on. `rung`: the run that settled this rung (key). */
  lookBack: { kind: "run"; run: string } | { kind: "rung"; rung: string } | null;
  validity: Validity | null;
  policy: SignPolicy;
  caution: string | null;
  hidden: boolean;
}

export interface Item extends Omit<ItemDef, "gate" | "follows" | "step" | "runs"> {
  id: string;
  /** Gate id. */
  gate: string;
  revision: number;
  /** Item ids. In a `tally` part of mode "in", `of` is an item id too. */
  follows: string[];
  step: { endedBy: string | null } | null;
  hidden: boolean;
}

// ---------------------------------------------------------------- proofs

/** One entry per part of the item, in the order of the parts; null where an optional part was not given. */
export type Evidence =
  | { kind: "tick" }
  | { kind: "measure"; values: number[] }
  /** `values` are true torques, one per place; `adapter` is the adapter's effective length in m, signed, null = none. */
  | { kind: "torque"; values: number[]; count: number; adapter: number | null; wrenchLength: number | null }
  | { kind: "tally"; places: { place: string; out: number | null; in: number | null }[] }
  /** `stored` says whether every file named has arrived. */
  | { kind: "photo"; files: string[]; stored: boolean }
  | { kind: "reading"; values: number[] }
  | { kind: "text"; text: string }
  /** Seconds of each burst, and the seconds into that burst at which pressure was seen. */
  | { kind: "crank"; bursts: { at: Instant; seconds: number; pressureAfter: number | null }[] }
  /** `took` = values of the install that the sheet used, as they were. */
  | { kind: "sheet"; sheet: SheetKey; version: string; inputs: Record<string, unknown>; took: Partial<Record<ValueKey, number>> };

export interface Proof extends Recorded {
  item: string;
  /** Revision of the item that it was made for. */
  revision: number;
  /** Who did it; `by` is who recorded it. */
  did: string;
  /** The instant that counts (see the rules on instants). */
  counts: Instant;
  /** Typed by a person after the fact: needs a second person. */
  late: boolean;
  state: "done" | "failed" | "na";
  evidence: (Evidence | null)[];
  /** Ids of the measuring tools used. */
  tools: string[];
  /** Remark, or the reason of "not applicable". */
  note: string;
  withdrawn: Recorded | null;
}

/** A second person saw this very proof. */
export interface Confirmation extends Recorded {
  proof: string;
}
/** An inspector accepted the reason of a "not applicable" proof. */
export interface Acceptance extends Recorded {
  proof: string;
  reason: string;
}
/** An inspector states, with a reason, that this lapsed proof is still true. */
export interface Keep extends Recorded {
  proof: string;
  reason: string;
}

export interface Cover {
  item: string;
  revision: number;
  /** Current proof, standing or not; null = none. */
  proof: string | null;
}

export interface Signature extends Recorded {
  gate: string;
  gateRevision: number;
  covers: Cover[];
  as: SigningRole;
  meaning: string;
  rulesVersion: string;
  withdrawn: Recorded | null;
}

// ---------------------------------------------------------------- what happens to an install

export interface Opening extends Recorded {
  systems: SystemKey[];
  reason: string;
  /** Instants that count. */
  opened: Instant;
  closed: Instant | null;
  /** An inspector, with a reason, marked it as recorded by mistake (matters for the release only). */
  mistake: (Recorded & { reason: string }) | null;
  /**
   * Whoever recorded it says that nothing was disturbed; null = nobody does. Once a second person has confirmed that after the closing
   * it is no opening any more.
   */
  undisturbed: { confirmed: Recorded | null } | null;
}

export interface LooseEnd extends Recorded {
  what: string;
  system: SystemKey;
  due: { kind: "gate"; gate: string } | { kind: "rung"; rung: string };
  restored: Recorded | null;
  /** The second person who saw it restored; until then it is not restored. */
  confirmed: Recorded | null;
  /** Accepted by an inspector for named rungs (keys). */
  accepted: (Recorded & { rung: string; reason: string })[];
}

export interface Finding extends Recorded {
  system: SystemKey;
  words: string;
  severity: "grounding" | "limiting" | "watch";
  /** Highest crankshaft speed allowed while open; only on limiting. */
  cap: number | null;
  fixed: (Recorded & { action: string }) | null;
  closed: Recorded | null;
}

export interface Tool {
  id: string;
  name: string;
  /**
   * Good checks carry the instant at which they run out; `good: false` = found out of tolerance then, which reaches back to the last
   * good check, and to `since` where that is further back.
   */
  checks: { id: string; at: Instant; good: boolean; due: Instant | null; since: Instant | null }[];
}

export interface Extinguisher {
  id: string;
  name: string;
  agent: "co2" | "clean" | "foam" | "powder" | "water";
  classB: boolean;
  /** Mass of agent, kg. */
  charge: number;
  /** Ends of the present monthly look and yearly service; null = none done. */
  lookDue: Instant | null;
  serviceDue: Instant | null;
  withdrawn: boolean;
}

// ---------------------------------------------------------------- runs

export interface Rung {
  key: string;
  name: string;
  order: number;
  rpm: number | null;
  share: number;
  card: RunCard;
  crew: CrewRule;
  leftOut: (Recorded & { reason: string }) | null;
  /** Lead or inspector set the rung back (engine or propeller changed). */
  setBack: Recorded[];
}

export interface PlanVersion {
  version: number;
  recorded: Instant;
  /** Planned highest crankshaft speed. */
  rpm: number;
  card: RunCard;
  positions: { position: PositionKey; member: string }[];
  /** m/s */
  windLimit: number;
  gustLimit: number;
  /** Gate ids. The walk-round is among them. */
  requiredGates: string[];
}

export interface Answer extends Recorded {
  answer: "go" | "no-go";
  reason: string;
  version: number;
  /** The device that answered had nothing left to send. */
  queueEmpty: boolean;
}

export interface Wind extends Recorded {
  /** m/s */
  speed: number;
  gust: number;
  tail: boolean;
  /** End of that day at the install. */
  dayEnds: Instant;
}

export type RunAct =
  | (Recorded & { act: "go"; version: number; plannedStart: Instant; ends: Instant; cap: number; signatures: string[] })
  /** `auto` = written by the server because the run was no longer clear. */
  | (Recorded & { act: "hold"; reason: string; auto: boolean })
  | (Recorded & { act: "scrub"; reason: string })
  /** `unstarted` = recorded afterwards as bad news: the engine ran and nobody had started it here. */
  | (Recorded & { act: "start"; unstarted: boolean })
  | (Recorded & { act: "take-back" })
  | (Recorded & { act: "ended"; at: Instant })
  | (Recorded & { act: "outcome"; outcome: "completed" | "cut short" })
  | (Recorded & { act: "log-read" })
  | (Recorded & { act: "no-log"; reason: string });

export interface Exceedance {
  id: string;
  sentence: string;
  /** The record that answered it; null = open. Late records that would have kept the run from being clear are listed here too. */
  answered: string | null;
}

export interface Run {
  id: string;
  rung: string;
  /** "2", then "2b". */
  label: string;
  plans: PlanVersion[];
  plannedStart: Instant | null;
  /** Acknowledgements of the brief. */
  acks: (Recorded & { version: number })[];
  answers: Answer[];
  winds: Wind[];
  acts: RunAct[];
  exceedances: Exceedance[];
}

/** One of the release's two signatures. */
export interface ReleaseSignature extends Recorded {
  as: "lead" | "inspector";
  meaning: string;
  rulesVersion: string;
  covers: { items: Cover[]; signatures: string[] };
  withdrawn: Recorded | null;
}

// ---------------------------------------------------------------- the whole

export interface Settings {
  /** A step's proof may be older by at most this than the proof that rests on it; ms. */
  stepWindow: number;
  /** Answers and wind may be at most this old at the start; ms. */
  freshness: number;
  /** GO's window from the planned start; ms. */
  goWindow: number;
}

export const DEFAULT_SETTINGS: Settings = { stepWindow: 12 * 3600_000, freshness: 60 * 60_000, goWindow: 4 * 3600_000 };

export interface Snapshot {
  install: { id: string; registration: string; name: string; timeZone: string };
  settings: Settings;
  traits: Traits;
  values: (ValueDef & Value)[];
  members: Member[];
  gates: Gate[];
  items: Item[];
  proofs: Proof[];
  confirmations: Confirmation[];
  acceptances: Acceptance[];
  keeps: Keep[];
  signatures: Signature[];
  openings: Opening[];
  looseEnds: LooseEnd[];
  findings: Finding[];
  tools: Tool[];
  extinguishers: Extinguisher[];
  rungs: Rung[];
  runs: Run[];
  releaseSignatures: ReleaseSignature[];
  /** Edits that wait for an inspector: shown, without effect on what stands. */
  editsWaiting: (Recorded & { subject: string; words: string })[];
}

export type { Part, PositionKey, SigningRole, SystemKey };
