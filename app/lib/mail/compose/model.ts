/**
 * What a mail to a crew is written from: plain data, gathered once for a run and then worded for each reader.
 * Instants in ms since 1970 UTC, everything else SI, rotation in crankshaft revolutions per second.
 */
import type { Clearance } from "#app/lib/gates/result";
import type { CardStep, PositionDef, RunCard } from "#app/lib/template/types";
import type { UnitSystem } from "#app/lib/units/display";
import type { Quantity } from "#app/lib/units/quantity";

export type RunMailKind = "go" | "no-go" | "hold" | "scrub" | "runs-out";

export interface RunMailModel {
  install: { id: string; registration: string; name: string; timeZone: string };
  run: { id: string; label: string; rung: string; place: string; plannedStart: number | null; rpm: number; version: number };
  clearance: Clearance;
  wind: { limit: number; gustLimit: number; newest: { speed: number; gust: number; recorded: number } | null };
  crew: { member: string; name: string; positions: Pick<PositionDef, "name" | "letter" | "place" | "duty">[] }[];
  card: Pick<RunCard, "cowl" | "begin" | "end" | "abort"> & { steps: CardStep[] };
  limits: { label: string; quantity: Quantity; value: number | null; confirmed: boolean }[];
  /** What stops it; empty on a GO. `who` = names of those who can clear it, `next` = what comes first where nobody can. */
  stops: { title: string; sentence: string; who: string[]; next: string | null }[];
  /** On a GO: when it ends. */
  goEnds: number | null;
  /** Who called it; `reason` in their words, or why the board held it. `auto` = the board did. */
  act: { by: string; at: number; reason: string; auto: boolean };
  /** The record's newest line, so that a history rewritten afterwards shows. */
  head: { seq: number; hash: string };
  links: { run: string; board: string };
  cautions: string[];
}

export interface RunMailReader {
  member: string;
  name: string;
  units: UnitSystem;
}

export interface RunMailText {
  subject: string;
  text: string;
  html?: string;
}
