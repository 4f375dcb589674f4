/**
 * What the evaluator answers. Plain data, the same on screen, in mail, over the API and on the tablet.
 * A "no" is always a list of blockers; an instant `until` (null = time alone never ends it) goes with every "yes".
 */
import type { Cover, Instant, Role } from "#app/lib/gates/snapshot";

export type BlockerCode =
  // items
  | "item-to-do"
  | "item-failed"
  | "item-withdrawn"
  | "number-missing"
  | "out-of-band"
  | "evidence-missing"
  | "sheet-fails"
  | "sheet-outdated"
  | "tally-unequal"
  | "photo-not-stored"
  | "old-revision"
  | "tool-out-of-date"
  | "tool-doubtful"
  | "needs-second-eyes"
  | "needs-acceptance"
  | "system-open"
  | "system-opened-since"
  | "ran-out"
  | "follows"
  | "step-missing"
  | "step-too-old"
  | "step-ended"
  | "step-newer"
  | "after-gate"
  | "run-since"
  | "run-not-ended"
  | "na-not-allowed"
  | "extinguishers"
  | "loose-end"
  | "log-missing"
  | "exceedance"
  | "unconfirmed"
  | "opening-since-run"
  // gates
  | "gate-waits"
  | "grounding"
  | "not-signed"
  | "gate-in-work"
  | "gate-lapsed"
  | "gate-missing"
  // runs and release
  | "earlier-rung"
  | "review-first"
  | "other-run"
  | "limit-unconfirmed"
  | "clearance"
  | "position-empty"
  | "people"
  | "pair"
  | "not-active"
  | "not-acknowledged"
  | "no-answer"
  | "no-go"
  | "wind-missing"
  | "wind-over"
  | "not-planned"
  | "run-over"
  | "go-missing"
  | "go-over"
  | "answer-old"
  | "wind-old"
  | "planned-too-late"
  | "outcome-missing"
  | "rung-not-settled"
  | "finding-open"
  | "release-signatures"
  // acts
  | "not-your-role"
  | "own-work"
  | "stale"
  | "already"
  | "lead-only"
  | "order"
  | "not-found";

export type SubjectKind =
  | "item"
  | "gate"
  | "run"
  | "rung"
  | "finding"
  | "loose-end"
  | "value"
  | "member"
  | "tool"
  | "opening"
  | "install"
  | "release";

export interface Blocker {
  code: BlockerCode;
  subject: { kind: SubjectKind; id: string };
  /** Heading, "Fuel prime has lapsed". */
  title: string;
  /** One sentence: why, and what to do next. */
  sentence: string;
  owner: {
    role: Role;
    /** Members who can clear it, by id; never empty unless `next` says whom to invite or what comes first. */
    members: string[];
    next: string | null;
  };
  /** Where it is cleared: the page's kind and id; `item` = the row on a gate page. */
  link: {
    page: "gate" | "run" | "findings" | "loose-ends" | "crib" | "crew" | "set-up" | "build-up" | "board" | "openings";
    id: string | null;
    item: string | null;
  };
}

export type ItemState = "to do" | "done" | "not applicable" | "second eyes" | "lapsed";

export interface ItemResult {
  id: string;
  state: ItemState;
  stands: boolean;
  until: Instant | null;
  /** Current proof, standing or not. */
  proof: string | null;
  /** Every rule that fails, first cause first; empty when it stands. */
  blockers: Blocker[];
}

export type GateState = "signed" | "half signed" | "ready" | "lapsed" | "waiting" | "in work";

export interface GateResult {
  id: string;
  state: GateState;
  /** Hidden or without items: not on the board; its edges pass through it. */
  present: boolean;
  complete: boolean;
  ready: boolean;
  /** Stands signed. */
  stands: boolean;
  until: Instant | null;
  /** What a signer would cover now. */
  covers: Cover[];
  /** Ids of the signatures that hold, in order of the policy's places. */
  holding: string[];
  /** Items that stand, of all that it has. */
  done: number;
  of: number;
  /** Gate ids it waits for, after passing through hidden gates. */
  prerequisites: string[];
  /** Why it is not complete or not ready; then, when ready, which signature is missing. Empty when it stands. */
  blockers: Blocker[];
}

export interface ClearanceLimit {
  kind: "plan" | "redline" | "finding" | "restraint";
  id: string;
  label: string;
  /** Crankshaft revolutions per second. */
  rpm: number;
}

export interface Clearance {
  rpm: number;
  binds: ClearanceLimit | null;
  limits: ClearanceLimit[];
}

export type RunState = "planned" | "called" | "held" | "running" | "ended" | "reviewed" | "scrubbed";

export interface RunResult {
  /** Null where the next rung has no run planned yet. */
  id: string | null;
  rung: string;
  label: string;
  state: RunState;
  clear: boolean;
  until: Instant | null;
  clearance: Clearance;
  requiredGates: string[];
  /** What stops it, ranked. */
  blockers: Blocker[];
  /** GO in force at `at`, and when it ends. */
  go: { id: string; ends: Instant } | null;
  /** GO was called and its window is open, but the run is no longer clear: HOLD must be written. */
  goLost: boolean;
  /** What keeps it from being started now (on top of `blockers`); empty when it may start. */
  startBlockers: Blocker[];
  /** What is left to do after it ended; empty before and when reviewed. */
  reviewBlockers: Blocker[];
}

export interface RungResult {
  key: string;
  settled: boolean;
  /** The run that settled it. */
  by: string | null;
}

export interface ReleaseResult {
  state: "not yet" | "ready" | "half signed" | "released" | "lapsed";
  stands: boolean;
  until: Instant | null;
  holding: string[];
  covers: { items: Cover[]; signatures: string[] };
  blockers: Blocker[];
}

export interface BoardResult {
  at: Instant;
  rulesVersion: string;
  items: Record<string, ItemResult>;
  gates: Record<string, GateResult>;
  rungs: Record<string, RungResult>;
  /** Every run, and the next one first if it is not planned yet (then `id` is null). */
  runs: RunResult[];
  /** Key of the next rung to be settled, null when all are. */
  nextRung: string | null;
  /** The run that the board's answer speaks of. */
  next: RunResult | null;
  release: ReleaseResult;
}

export type Verdict = { ok: true } | { ok: false; blockers: Blocker[] };
