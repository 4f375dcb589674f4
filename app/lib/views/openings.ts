/** The openings of an install: open ones first, each with who may close it or mark it a mistake, and the choices of a new one. Pure. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { mayCloseOpening, mayConfirmUndisturbed, mayMarkMistake, mayOpen } from "#app/lib/gates/happening-verdicts";
import type { Instant, Opening } from "#app/lib/gates/snapshot";
import { count, inSentence } from "#app/lib/gates/who";
import { NOT_OPENINGS } from "#app/lib/template/systems";
import type { SystemKey } from "#app/lib/template/types";
import type { Viewer } from "#app/lib/views/board";
import { type May, mayOf } from "#app/lib/views/may";
import { nameIn, rowAnchor } from "#app/lib/views/places";
import { presetsOn, type SystemChoice, systemsOn, systemWords } from "#app/lib/views/systems";
import type { WhatLapses } from "#app/lib/views/what-lapses";

export interface OpeningRow {
  id: string;
  anchor: string;
  title: string;
  reason: string;
  state: "open" | "closed" | "mistake" | "undisturbed";
  /** "3 Dec 14:10 CET by ..."; where it was typed later, when it happened and when it was recorded. */
  opened: string;
  closed: string | null;
  mistake: string | null;
  /** What is said of nothing having been disturbed; `may` while a second person is asked. */
  undisturbed: { says: string; may: May | null } | null;
  close: May;
  mark: May;
}

export interface OpeningsView {
  state: string;
  /** 0 while one is open. */
  fill: number;
  open: OpeningRow[];
  past: OpeningRow[];
  systems: SystemChoice[];
  presets: { key: string; name: string; systems: SystemKey[] }[];
  notOpenings: string[];
  may: May;
  /** "now, 3 Dec 14:10 CET" */
  now: string;
  person: string;
}

/** By opening, from the records beside the snapshot: who closed it and what they noted, when it happened as typed later. */
export type OpeningTold = Record<string, { closed: { by: string; note: string } | null; happened: Instant | null }>;

/** The form of a new opening as it comes back: what is chosen, and what that makes lapse. */
export interface OpenShown {
  /** New with each answer of the server. */
  stamp: string;
  asked: "preset" | "preview";
  systems: string[];
  chosen: { systems: SystemKey[]; closed: boolean; lapses: WhatLapses; seen: string } | null;
}

export const anchorOfOpening = (id: string): string => rowAnchor("openings", id);

export function openingsView(e: Evaluation, me: Viewer, told: OpeningTold): OpeningsView {
  const rows = [...e.facts.snapshot.openings].sort((a, b) => b.seq - a.seq).map((o) => rowOf(e, o, me, told));
  const open = rows.filter((r) => r.state === "open");
  const past = rows.filter((r) => r.state !== "open");
  return {
    state: open.length
      ? `${open.length} ${open.length === 1 ? "is" : "are"} open now`
      : past.length
        ? `none open, ${past.length} closed`
        : "none so far",
    fill: open.length ? 0 : 1,
    open,
    past,
    systems: systemsOn(e),
    presets: presetsOn(e),
    notOpenings: NOT_OPENINGS,
    may: mayOf(mayOpen(e, { member: me.id })),
    now: `now, ${e.facts.when(e.at)}`,
    person: nameIn(e.snapshot, me.id),
  };
}

function rowOf(e: Evaluation, o: Opening, me: Viewer, told: OpeningTold): OpeningRow {
  const closing = told[o.id]?.closed;
  const by = (id: string, at: number) => `${e.facts.when(at)} by ${nameIn(e.snapshot, id)}`;
  return {
    id: o.id,
    anchor: anchorOfOpening(o.id),
    title: systemWords(o.systems),
    reason: o.reason,
    state: stateOf(o),
    opened: openedWords(e, o, told[o.id]?.happened ?? null),
    closed: o.closed === null ? null : `${by(closing?.by ?? o.by, o.closed)}${closing?.note ? `: ${closing.note}` : ""}`,
    mistake: o.mistake && `${by(o.mistake.by, o.mistake.recorded)}: ${o.mistake.reason}`,
    undisturbed: undisturbedOf(e, o, me),
    close: mayOf(mayCloseOpening(e, { member: me.id })),
    mark: mayOf(mayMarkMistake(e, { opening: o.id, member: me.id })),
  };
}

function stateOf(o: Opening): OpeningRow["state"] {
  if (o.closed === null) return "open";
  return o.undisturbed?.confirmed ? "undisturbed" : o.mistake ? "mistake" : "closed";
}

/** It counts from when it was recorded: both are named where they differ as clocks show them. */
function openedWords(e: Evaluation, o: Opening, happened: Instant | null): string {
  const [counted, typed] = [e.facts.when(o.opened), happened === null ? null : e.facts.when(happened)];
  const who = nameIn(e.snapshot, o.by);
  return typed === null || typed === counted ? `opened ${counted} by ${who}` : `happened ${typed}, recorded ${counted} by ${who}`;
}

function undisturbedOf(e: Evaluation, o: Opening, me: Viewer): OpeningRow["undisturbed"] {
  if (!o.undisturbed) return null;
  const who = nameIn(e.snapshot, o.by);
  const seen = o.undisturbed.confirmed;
  if (seen)
    return {
      says: `${who} says that nothing was disturbed; ${nameIn(e.snapshot, seen.by)} confirmed it ${e.facts.when(seen.recorded)}. It makes nothing lapse.`,
      may: null,
    };
  return {
    says: `${who} says that nothing was disturbed. It counts as an opening until a second person has looked and confirms that.`,
    may: mayOf(mayConfirmUndisturbed(e, { opening: o.id, member: me.id })),
  };
}

/** What a preview showed; the confirmation counts only for the same choice and the same GO. */
export const seenOf = (e: Evaluation, systems: SystemKey[], closed: boolean): string =>
  [[...systems].sort().join("+"), closed ? "closed" : "open", e.result.runs.find((r) => r.go)?.id ?? ""].join("|");

/** "Open fuel, forward of the firewall", or how many. */
export const openWords = (systems: SystemKey[]): string =>
  systems.length === 1 ? `Open ${inSentence(systemWords(systems))}` : `Open ${count(systems.length, "system")}`;
