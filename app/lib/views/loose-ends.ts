/** The loose ends of an install, by what they block soonest: when each is due, what it stops, and what this person may do about it. Pure. */

import { acceptedFor } from "#app/lib/gates/computed";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { allItems } from "#app/lib/gates/facts";
import { mayAcceptLooseEnd, mayConfirmRestored, mayConfirmUndisturbed, mayRaise, mayRestore } from "#app/lib/gates/happening-verdicts";
import type { LooseEnd, Rung } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import type { Viewer } from "#app/lib/views/board";
import { type May, mayOf } from "#app/lib/views/may";
import { anchorOfOpening } from "#app/lib/views/openings";
import { nameIn, rowAnchor } from "#app/lib/views/places";
import { lowerFirst, upperFirst } from "#app/lib/views/run-words";
import { type SystemChoice, systemsOn, systemWords } from "#app/lib/views/systems";
import { holdWords, lapsesByOpening, lapseWords } from "#app/lib/views/what-lapses";

export interface LooseEndRow {
  id: string;
  anchor: string;
  /** "L-2" */
  tag: string;
  /** "4 × injector plugs off" */
  title: string;
  why: string;
  photos: string[];
  /** System, when and who. */
  made: string;
  due: string;
  stops: string;
  accepted: string | null;
  ladder: DueLadderView;
  /** "Put back 3 Dec 14:10 CET by ...; a second person looks." */
  restored: string | null;
  /** Said of nothing having been disturbed, and not confirmed yet. */
  claims: ClaimView[];
  restore: May;
  confirm: May;
  accept: { may: May; rungs: { value: string; label: string }[] };
  /** What putting it back makes lapse; null where an item asked for it, for then it is no opening. */
  lapses: { hold: string | null; says: string } | null;
}

/** Its opening counts until a second person has confirmed that nothing was disturbed. */
export interface ClaimView {
  opening: string;
  looseEnd: string;
  form: string;
  says: string;
  may: May;
}

export interface DueLadderView {
  runs: { key: string; share: number; settled: boolean; due: boolean }[];
  /** Before which run the bar stands; 0 = before the first. */
  bar: number;
}

export interface LooseEndsView {
  title: string;
  state: string;
  fill: number;
  ends: LooseEndRow[];
  past: { id: string; anchor: string; says: string; claims: ClaimView[] }[];
  systems: SystemChoice[];
  due: { value: string; label: string }[];
  asking: { value: string; label: string }[];
  may: May;
}

/** What making a loose end would undo, shown once before it is made. */
export interface MakingShown {
  seen: string;
  hold: string | null;
  says: string;
}

export type LooseEndDetails = Record<string, { count: number; why: string; askedBy: string | null; photos: string[]; openings: string[] }>;

export const anchorOfLooseEnd = (id: string): string => rowAnchor("loose-ends", id);

export function looseEndsView(e: Evaluation, me: Viewer, details: LooseEndDetails): LooseEndsView {
  const all = e.facts.snapshot.looseEnds.map((l, i) => ({ l, tag: `L-${i + 1}`, blocks: blocksOf(e, l) }));
  const open = all.filter(({ l }) => !l.confirmed).sort((a, b) => a.blocks.rank - b.blocks.rank || a.l.seq - b.l.seq);
  const past = all.filter(({ l }) => l.confirmed).reverse();
  return {
    title: open.length ? count(open.length, "loose end") : "No loose ends",
    state: open.length
      ? stateOf(
          e,
          open.map(({ blocks }) => blocks),
        )
      : past.length
        ? `${past.length} put back, each seen by two`
        : "none so far",
    fill: open.length ? 0.06 : 1,
    ends: open.map(({ l, tag, blocks }) => rowOf(e, l, tag, blocks, me, details[l.id])),
    past: past.map(({ l, tag }) => ({
      id: l.id,
      anchor: anchorOfLooseEnd(l.id),
      says: pastWords(e, l, tag, details[l.id]?.count ?? 1),
      claims: claimsOf(e, l, me, details[l.id]),
    })),
    systems: systemsOn(e),
    due: dueChoices(e),
    asking: allItems(e.facts).flatMap((i) =>
      i.offersLooseEnd
        ? [{ value: i.id, label: `${i.key}: ${lowerFirst(i.offersLooseEnd.what)} (${systemWords([i.offersLooseEnd.system])})` }]
        : [],
    ),
    may: mayOf(mayRaise(e, { member: me.id })),
  };
}

interface Blocks {
  /** The lower, the sooner. */
  rank: number;
  gate: string | null;
  /** The first run that it stops. */
  run: Rung | null;
}

/** A gate that the next run requires comes before the run itself; a gate of the release comes last. */
function blocksOf(e: Evaluation, l: LooseEnd): Blocks {
  const run = e.facts.rungs.find((r) => !e.facts.settledBy.has(r.key) && !acceptedFor(e.facts, l, r.key)) ?? null;
  const gate = l.due.kind === "gate" ? l.due.gate : null;
  const stopsNext = gate !== null && (e.result.next?.requiredGates.includes(gate) ?? false);
  const next = e.facts.nextRung;
  const rank = stopsNext && next ? next.order - 0.5 : (run?.order ?? Number.MAX_SAFE_INTEGER);
  return { rank, gate, run: stopsNext ? next : run };
}

function stateOf(e: Evaluation, blocks: Blocks[]): string {
  const next = e.facts.nextRung;
  const now = blocks.filter((b) => next && b.run?.key === next.key).length;
  const later = blocks.length - now;
  const stops = next && now ? `${now} ${now === 1 ? "stops" : "stop"} run ${next.key}` : "";
  return [stops, later ? `${later} ${later === 1 ? "is" : "are"} due later` : ""].filter(Boolean).join(", ");
}

function rowOf(
  e: Evaluation,
  l: LooseEnd,
  tag: string,
  blocks: Blocks,
  me: Viewer,
  detail: LooseEndDetails[string] | undefined,
): LooseEndRow {
  const n = detail?.count ?? 1;
  const rungs = acceptable(e, l);
  const opens = detail?.askedBy ? null : lapsesByOpening(e, me, [l.system], true);
  const by = (r: { by: string; recorded: number }) => `${e.facts.when(r.recorded)} by ${nameIn(e.snapshot, r.by)}`;
  return {
    id: l.id,
    anchor: anchorOfLooseEnd(l.id),
    tag,
    title: `${n} × ${lowerFirst(l.what)}`,
    why: detail?.why ?? "",
    photos: detail?.photos ?? [],
    made: `${systemWords([l.system])}; ${by(l)}`,
    due: dueWords(e, l),
    stops: stopsWords(e, blocks),
    accepted: acceptedWords(e, l),
    ladder: ladderOf(e, l),
    restored: l.restored && `Put back ${by(l.restored)}. It counts once a second person has looked.`,
    claims: claimsOf(e, l, me, detail),
    restore: mayOf(mayRestore(e, { looseEnd: l.id, member: me.id })),
    confirm: mayOf(mayConfirmRestored(e, { looseEnd: l.id, member: me.id })),
    accept: {
      may: mayOf(mayAcceptLooseEnd(e, { looseEnd: l.id, member: me.id, rung: rungs[0]?.value ?? e.facts.rungs.at(-1)?.key ?? "" })),
      rungs,
    },
    lapses: opens && { hold: holdWords(opens), says: lapseWords(opens) },
  };
}

/** The first of its openings was its making, the second its restoring. */
function claimsOf(e: Evaluation, l: LooseEnd, me: Viewer, detail: LooseEndDetails[string] | undefined): ClaimView[] {
  return (detail?.openings ?? []).flatMap((id, n): ClaimView[] => {
    const o = e.facts.snapshot.openings.find((x) => x.id === id);
    if (!o?.undisturbed || o.undisturbed.confirmed) return [];
    const when = n === 0 ? "taking it off" : "putting it back";
    return [
      {
        opening: o.id,
        looseEnd: l.id,
        form: `${anchorOfOpening(o.id)}-undisturbed`,
        says: `${nameIn(e.snapshot, o.by)} says that ${when} disturbed nothing. It counts as an opening until a second person has looked and confirms that.`,
        may: mayOf(mayConfirmUndisturbed(e, { opening: o.id, member: me.id })),
      },
    ];
  });
}

const gateName = (e: Evaluation, id: string): string => e.snapshot.gates.find((g) => g.id === id)?.name ?? "a gate";

const dueWords = (e: Evaluation, l: LooseEnd): string =>
  l.due.kind === "gate" ? `due before ${gateName(e, l.due.gate)}` : `due before run ${l.due.rung}`;

function stopsWords(e: Evaluation, { gate, run }: Blocks): string {
  const name = gate && e.facts.gates.has(gate) ? gateName(e, gate) : null;
  if (name && run) return `stops ${name} and run ${run.key}`;
  if (name || run) return `stops ${name ?? `run ${run?.key}`}`;
  return "stops the release";
}

function acceptedWords(e: Evaluation, l: LooseEnd): string | null {
  const counting = l.accepted.filter((a) => acceptedFor(e.facts, l, a.rung));
  if (!counting.length) return null;
  const runs = [...new Set(counting.map((a) => a.rung))];
  const people = [...new Set(counting.map((a) => nameIn(e.snapshot, a.by)))];
  return `accepted for ${runs.length === 1 ? "run" : "runs"} ${listOf(runs)} by ${listOf(people)}: ${counting.at(-1)?.reason ?? ""}`;
}

/** Rungs that are still to run, before the one it is due at, for which nobody has accepted it. */
function acceptable(e: Evaluation, l: LooseEnd): { value: string; label: string }[] {
  const key = l.due.kind === "rung" ? l.due.rung : null;
  const end = e.facts.rungs.find((r) => r.key === key)?.order ?? Number.POSITIVE_INFINITY;
  return e.facts.rungs
    .filter((r) => r.order < end && !e.facts.settledBy.has(r.key) && !acceptedFor(e.facts, l, r.key))
    .map((r) => ({ value: r.key, label: `Run ${r.key}, ${lowerFirst(r.name)}` }));
}

function ladderOf(e: Evaluation, l: LooseEnd): DueLadderView {
  const { rungs, settledBy } = e.facts;
  const key = l.due.kind === "rung" ? l.due.rung : null;
  const next = rungs.findIndex((r) => !settledBy.has(r.key));
  const at = rungs.findIndex((r) => r.key === key);
  const bar = key === null ? (next < 0 ? rungs.length : next) : Math.max(at, 0);
  return { runs: rungs.map((r, i) => ({ key: r.key, share: r.share, settled: settledBy.has(r.key), due: i === bar })), bar };
}

function pastWords(e: Evaluation, l: LooseEnd, tag: string, n: number): string {
  const put = l.restored ? `put back ${e.facts.when(l.restored.recorded)} by ${nameIn(e.snapshot, l.restored.by)}` : "put back";
  return `${tag}, ${n} × ${lowerFirst(l.what)}: ${put}, seen by ${nameIn(e.snapshot, l.confirmed?.by ?? "")}`;
}

/** Runs still to come first, soonest first; then the gates. */
function dueChoices(e: Evaluation): { value: string; label: string }[] {
  const runs = e.facts.rungs.filter((r) => !e.facts.settledBy.has(r.key));
  const gates = [...e.facts.gates.values()].filter((g) => g.lookBack === null);
  return [
    ...runs.map((r) => ({ value: `rung:${r.key}`, label: `Run ${r.key}, ${lowerFirst(r.name)}` })),
    ...gates.map((g) => ({ value: `gate:${g.id}`, label: `Gate ${upperFirst(g.name)}` })),
  ];
}

const listOf = (keys: string[]): string => (keys.length < 2 ? (keys[0] ?? "") : `${keys.slice(0, -1).join(", ")} and ${keys.at(-1)}`);
