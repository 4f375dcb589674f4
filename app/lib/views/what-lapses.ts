/**
 * What an act would undo, shown before it counts: the board as it is against the board as it would be, both from the same
 * evaluator at the same instant. Pure.
 */

import type { ValveState } from "#app/components/ui/states";
import { rpmText } from "#app/lib/gates/clearance";
import { type Evaluation, evaluate, withOpening } from "#app/lib/gates/evaluate";
import { itemsIn } from "#app/lib/gates/facts";
import type { ItemResult } from "#app/lib/gates/result";
import type { Gate, Instant, LooseEnd, Opening, Snapshot } from "#app/lib/gates/snapshot";
import { quoted } from "#app/lib/gates/steps";
import { count } from "#app/lib/gates/who";
import { isComputed } from "#app/lib/gates/work-facts";
import type { SystemKey } from "#app/lib/template/types";
import type { Viewer } from "#app/lib/views/board";
import { gateOf } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { lowerFirst } from "#app/lib/views/run-words";
import { valveOf, waitsFor } from "#app/lib/views/shown-states";

export interface ShownGate {
  state: ValveState;
  part: number;
}

export interface LapsedGate {
  id: string;
  name: string;
  href: string;
  before: ShownGate;
  after: ShownGate;
  /** "signed to lapsed" */
  words: string;
  /** Items that no longer stand, or lapse. */
  items: { id: string; key: string; words: string; computed: boolean }[];
  /** What it then waits for, where no item of its own lapses. */
  waits: string | null;
}

export interface WhatLapses {
  /** GO in force that turns into HOLD, and how many get a mail. */
  hold: { run: string; told: number } | null;
  /** A run that is under way. */
  running: string | null;
  gates: LapsedGate[];
  /** Gates that stay as they are. */
  same: number;
  items: number;
  /** Gates that stand signed now, and then no longer. */
  fallen: number;
  /** The next run's clearance where it falls. */
  clearance: { from: string; to: string } | null;
  releaseLapses: boolean;
}

export function whatLapses(before: Evaluation, after: Evaluation): WhatLapses {
  const present = before.snapshot.gates.filter((g) => before.result.gates[g.id]?.present);
  const gates = present.flatMap((gate) => lapsedGate(before, after, gate) ?? []);
  const called = before.result.runs.find((r) => r.go !== null);
  const held = called && !after.result.runs.find((r) => r.id === called.id)?.clear ? called : null;
  const from = before.result.next?.clearance.rpm ?? 0;
  const to = after.result.next?.clearance.rpm ?? 0;
  return {
    hold: held?.id ? { run: held.label, told: mailReaders(before, held.id).length } : null,
    running: before.result.runs.find((r) => r.state === "running")?.label ?? null,
    gates,
    same: present.length - gates.length,
    items: gates.reduce((n, g) => n + g.items.length, 0),
    fallen: gates.filter((g) => g.before.state === "signed" && g.after.state !== "signed").length,
    clearance: to < from ? { from: rpmText(from), to: rpmText(to) } : null,
    releaseLapses: before.result.release.stands && !after.result.release.stands,
  };
}

function lapsedGate(before: Evaluation, after: Evaluation, gate: Gate): LapsedGate | null {
  const was = before.result.gates[gate.id];
  const is = after.result.gates[gate.id];
  if (!was || !is) return null;
  const items = itemsIn(before.facts, gate.id).filter((i) => lapses(before.result.items[i.id], after.result.items[i.id]));
  if (was.state === is.state && items.length === 0) return null;
  const waits = waitsFor(after.result.gates, is).map((id) => lowerFirst(before.facts.gates.get(id)?.name ?? "another gate"));
  const shown = (r: typeof was): ShownGate => ({ state: valveOf(r.state), part: r.of ? r.done / r.of : 0 });
  return {
    id: gate.id,
    name: gate.name,
    href: gateOf(before.snapshot.install.id, gate.id),
    before: shown(was),
    after: shown(is),
    words: was.state === is.state ? `stays ${is.state}` : `${was.state} to ${is.state}`,
    items: items.map((item) => ({ id: item.id, key: item.key, words: quoted(item), computed: isComputed(item) })),
    waits: items.length === 0 && waits.length > 0 ? listed(waits) : null,
  };
}

const lapses = (was: ItemResult | undefined, is: ItemResult | undefined): boolean =>
  !!was && !!is && ((was.stands && !is.stands) || (is.state === "lapsed" && was.state !== "lapsed"));

const listed = (names: string[], most = 3): string =>
  names.length > most
    ? `${names.slice(0, most - 1).join(", ")} and ${names.length - most + 1} more`
    : names.length < 2
      ? (names[0] ?? "")
      : `${names.slice(0, -1).join(", ")} and ${names.at(-1)}`;

// ---------------------------------------------------------------- records that are not written yet

/** Newer than every record there is. */
const NEWEST = Number.MAX_SAFE_INTEGER;
const draft = (e: Evaluation, me: Viewer) => ({ id: "not-recorded", seq: NEWEST, recorded: e.at, by: me.id, as: me.roles[0] ?? "crew" });

export function draftOpening(e: Evaluation, me: Viewer, systems: SystemKey[], closed: boolean): Opening {
  return { ...draft(e, me), systems, reason: "", opened: e.at, closed: closed ? e.at : null, mistake: null, undisturbed: null };
}

/** What recording this opening now would undo. */
export const lapsesByOpening = (e: Evaluation, me: Viewer, systems: SystemKey[], closed: boolean): WhatLapses =>
  whatLapses(e, evaluate(withOpening(e.snapshot, draftOpening(e, me, systems, closed)), e.at));

/** What making this loose end now would undo; where no item asks for it, making it is an opening of its system too. */
export function lapsesByLooseEnd(e: Evaluation, me: Viewer, end: Pick<LooseEnd, "what" | "system" | "due">, asked: boolean): WhatLapses {
  const made: LooseEnd = { ...draft(e, me), ...end, restored: null, confirmed: null, accepted: [] };
  const withEnd: Snapshot = { ...e.snapshot, looseEnds: [...e.snapshot.looseEnds, made] };
  const next = asked ? withEnd : withOpening(withEnd, draftOpening(e, me, [end.system], true));
  return whatLapses(e, evaluate(next, e.at));
}

/** What this tool's having been found out of tolerance would undo. @param check instants of the finding and of the first doubt. */
export function lapsesByBadCheck(e: Evaluation, tool: string, check: { at: Instant; since: Instant | null }): WhatLapses {
  const made = { id: "not-recorded", good: false, due: null, ...check };
  const tools = e.snapshot.tools.map((t) => (t.id === tool ? { ...t, checks: [...t.checks, made] } : t));
  return whatLapses(e, evaluate({ ...e.snapshot, tools }, e.at));
}

// ---------------------------------------------------------------- in words

/** "GO for run 3 turns into HOLD: 6 people get a mail.", or null. */
export const holdWords = ({ hold }: WhatLapses): string | null =>
  hold && `GO for run ${hold.run} turns into HOLD: ${count(hold.told, "person gets", "people get")} a mail.`;

/** "2 signed gates fall: Fuel prime and Walk-round. FP3 “Purge the line” lapses: do it again afterwards.", or that nothing does. */
export function lapseWords(w: WhatLapses): string {
  const fallen = w.gates.filter((g) => g.before.state === "signed" && g.after.state !== "signed").map((g) => g.name);
  const items = w.gates.flatMap((g) => g.items);
  const named = (computed: boolean) => items.filter((i) => i.computed === computed).map((i) => `${i.key} “${i.words}”`);
  const [proved, worked] = [named(false), named(true)];
  const parts = [
    fallen.length ? `${count(fallen.length, "signed gate falls", "signed gates fall")}: ${listed(fallen, 4)}.` : "",
    proved.length ? `${listed(proved, 4)} ${proved.length === 1 ? "lapses: do it" : "lapse: do them"} again afterwards.` : "",
    worked.length
      ? `${listed(worked, 4)} ${worked.length === 1 ? "stands" : "stand"} no longer: the board works ${worked.length === 1 ? "it" : "them"} out again once the cause is put right.`
      : "",
    w.releaseLapses ? "The release lapses." : "",
  ].filter(Boolean);
  return parts.length ? parts.join(" ") : "Nothing that stands now lapses.";
}
