/**
 * What the Line is drawn from: plain data, made on the server from the evaluator's answer.
 * Geometry depends on ids, names and edges only; state, note, part and balloon never move it.
 */
import type { RunState, ValveState } from "#app/components/ui/states";

/** A valve that is not a gate of the network: post-run gate, service, release. */
export interface LineStop {
  state: ValveState;
  /** At most 13 signs on the drawing: "waits for run 2". The list and the spoken name say it in full. */
  note: string;
  href: string;
}

export interface LineGate {
  id: string;
  /** Template key, "FP". */
  key: string;
  name: string;
  /** At most 16 signs. */
  short: string;
  href: string;
  /** Ids or keys of other gates of this board; unknown ones are left out, so a gate that is not there breaks nothing. */
  needs: string[];
  after: string[];
  state: ValveState;
  /** Beside the valve, at most 13 signs (12 with a balloon): "lapsed 3 Dec", "7 of 10 done". */
  note: string;
  /** Share of the items that stand, 0 to 1. */
  part: number;
  /** Number in what stops us, null when it does not. */
  balloon: number | null;
  /** State and reason in full, without the name: "lapsed: fuel system opened 3 Dec 14:10 CET". */
  full: string;
}

export interface LineRun {
  id: string;
  /** Rung: "1" to "6", "L". */
  key: string;
  name: string;
  href: string;
  /** Planned highest speed with its unit: "1,375 rpm". */
  rpmText: string;
  /** Share of rated speed, 0 to 1: length of the blade. */
  share: number;
  state: RunState;
  /** HOLD or grounding: a spade across the pipe before this blade. */
  spade: boolean;
  /** Null where no post-run gate follows (scrubbed). */
  postRun: LineStop | null;
  /** Work that must stand before this run (service before run 6). */
  serviceBefore?: LineStop | null;
  balloon: number | null;
}

export interface LineProps {
  /** In the template's order, without the walk-round. */
  gates: LineGate[];
  /** Needs every gate; drawn on the run pipe just before the run that it is for. */
  walkRound: LineGate | null;
  runs: LineRun[];
  release: LineStop;
  /** No network: the picture is old, so the flow is broken into dashes. */
  stale?: boolean;
  /** Large display on a wall: wider lanes. */
  wall?: boolean;
}
