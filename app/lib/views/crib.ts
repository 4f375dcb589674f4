/** The crib as its page shows it: tools and extinguishers, in date or not, and what hangs on each. Pure. */

import { type CribDue, cribDues, toolEnds } from "#app/lib/gates/crib-dues";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { allItems, currentProof } from "#app/lib/gates/facts";
import { mayEditCrib } from "#app/lib/gates/set-up-verdicts";
import type { Extinguisher, Instant, Tool } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { format, type UnitSystem } from "#app/lib/units/display";
import { type DueState, type DueView, dateAfter, daysLeft, dayText, dueView, monthTicks, worstOf } from "#app/lib/views/crib-dates";
import { nameIn } from "#app/lib/views/places";
import type { WhatLapses } from "#app/lib/views/what-lapses";

export interface CribRow {
  id: string;
  anchor: string;
  name: string;
  /** "serial 4471", "CO2, 2.3 kg, class B" */
  detail: string;
  state: DueState;
  word: string;
  dues: DueView[];
  /** What hangs on it, in a sentence or two. */
  hangs: string;
  /** Changes with every check, so that a form that was taken comes back empty. */
  rev: string;
}

export interface ToolRow extends CribRow {
  /** Its newest check: day, certificate, who entered it, remark. Null = none. */
  last: { says: string; photo: string | null } | null;
  /** "its last good check, 1 Jun 2026": from when it is in doubt if found out of tolerance; null where it never had one. */
  doubtFrom: string | null;
  /** Proofs that fall if it is found out of tolerance now: "OP10, FP4". Null = none. */
  reach: string | null;
}

export interface BottleRow extends CribRow {
  withdrawn: boolean;
}

/** One date of the list of what runs out. */
export interface DueRow {
  key: string;
  anchor: string;
  name: string;
  /** "calibration", "monthly look", "yearly service" */
  what: string;
  word: string;
  until: string | null;
  state: DueState;
}

/** By ids, from the records beside the snapshot. */
export interface CribTold {
  serials: Record<string, string>;
  checks: Record<string, { certificate: string; photo: string | null; note: string; by: string }>;
  bottles: Record<string, { rating: string; position: string }>;
}

/** What a bad check would undo, shown once before it is recorded. */
export interface CheckShown {
  form: string;
  seen: string;
  lapses: WhatLapses;
}

export interface CribView {
  state: string;
  /** What runs out, out of date first, then the soonest. */
  due: DueRow[];
  fill: number;
  tools: ToolRow[];
  bottles: BottleRow[];
  /** Whether the extinguishers are enough for a run, in the words of the item that asks. Null where no item asks. */
  enough: { ok: boolean; says: string } | null;
  ticks: { share: number; label: string | null }[];
  /** Days to offer: today, a month on, a year on. */
  days: { today: string; look: string; service: string };
  may: { ok: boolean; why: string };
}

const AGENTS: Record<Extinguisher["agent"], string> = {
  co2: "CO2",
  clean: "clean agent",
  foam: "foam",
  powder: "powder",
  water: "water",
};
export const AGENT_CHOICES = Object.entries(AGENTS).map(([value, label]) => ({ value, label }));

export function cribView(e: Evaluation, member: string, units: UnitSystem, told: CribTold): CribView {
  const zone = e.snapshot.install.timeZone;
  const tools = e.snapshot.tools.map((t) => toolRow(e, t, told));
  const bottles = e.snapshot.extinguishers.map((x) => bottleRow(e, x, units, told));
  const rows = [...tools, ...bottles.filter((b) => !b.withdrawn)];
  const of = (state: DueState) => rows.filter((r) => r.state === state).length;
  const verdict = mayEditCrib(e, { member });
  return {
    state: rows.length ? stateWords(rows.length, of("out"), of("due soon")) : "no tool and no extinguisher yet",
    due: cribDues(e.snapshot).map((d) => dueRow(e, d)),
    fill: rows.length ? (rows.length - of("out")) / rows.length : 0,
    tools,
    bottles,
    enough: enoughOf(e),
    ticks: monthTicks(e.at, zone),
    days: { today: dateAfter(e.at, 0, zone), look: dateAfter(e.at, 1, zone), service: dateAfter(e.at, 12, zone) },
    may: verdict.ok ? { ok: true, why: "" } : { ok: false, why: verdict.blockers[0]?.sentence ?? "" },
  };
}

const stateWords = (all: number, out: number, soon: number): string =>
  out || soon
    ? [out ? `${out} not in date` : "", soon ? `${soon} due soon` : "", `${all - out - soon} in date`].filter(Boolean).join(", ")
    : `all ${all} in date`;

const WHAT: Record<CribDue["kind"], string> = { calibration: "calibration", look: "monthly look", service: "yearly service" };

function dueRow(e: Evaluation, { kind, id, name, ends, bad }: CribDue): DueRow {
  const zone = e.snapshot.install.timeZone;
  const { state } = dueView(WHAT[kind], ends, SOON[kind], e.at, zone);
  const row = { key: `${kind} ${id}`, anchor: anchorOfCrib(id), name, what: WHAT[kind], state };
  if (ends === null) return { ...row, word: bad ? "out of tolerance" : "never done", until: null };
  return { ...row, word: daysLeft(ends, e.at, zone), until: dayText(ends - 1, zone) };
}

export const anchorOfCrib = (id: string): string => `crib-${id}`;

/** Days before the end from which a date is "due soon": time to send a wrench away, and to walk round with the monthly look. */
const SOON = { calibration: 30, look: 7, service: 30 };

function toolRow(e: Evaluation, tool: Tool, told: CribTold): ToolRow {
  const { ends, bad } = toolEnds(tool);
  const serial = told.serials[tool.id];
  const due = dueView("calibration", ends, SOON.calibration, e.at, e.snapshot.install.timeZone);
  const word = bad ? "out of tolerance" : due.word === "never done" ? "no check" : due.word;
  const lastGood = tool.checks.filter((c) => c.good).reduce<Instant>((at, c) => Math.max(at, c.at), Number.NEGATIVE_INFINITY);
  const used = proofsWith(e, tool.id);
  const reach = used.filter((u) => u.stands && u.counts > lastGood).map((u) => u.key);
  return {
    id: tool.id,
    anchor: anchorOfCrib(tool.id),
    name: tool.name,
    detail: serial ? `serial ${serial}` : "",
    state: due.state,
    word,
    dues: [{ ...due, word }],
    hangs: toolHangs(e, tool.id, used),
    rev: String(tool.checks.length),
    last: lastCheck(e, tool, told),
    doubtFrom: Number.isFinite(lastGood) ? dayText(lastGood - 1, e.snapshot.install.timeZone) : null,
    reach: reach.length ? reach.join(", ") : null,
  };
}

/** Of several at one instant the one that was recorded last. */
function lastCheck(e: Evaluation, tool: Tool, told: CribTold): ToolRow["last"] {
  const last = tool.checks.reduce<Tool["checks"][number] | null>((newest, c) => (newest && newest.at > c.at ? newest : c), null);
  if (!last) return null;
  const { certificate = "", photo = null, note = "", by = "" } = told.checks[last.id] ?? {};
  const day = dayText(last.at - 1, e.snapshot.install.timeZone);
  const what = last.good ? `Checked ${day}` : `Found out of tolerance ${day}`;
  const since = last.since === null ? "" : `, in doubt since ${dayText(last.since, e.snapshot.install.timeZone)}`;
  const says = [
    `${what}${since}${by ? `, entered by ${nameIn(e.snapshot, by)}` : ""}.`,
    certificate ? `Certificate ${certificate}.` : "",
    note && !/[.!?]$/.test(note) ? `${note}.` : note,
  ];
  return { says: says.filter(Boolean).join(" "), photo };
}

interface Used {
  item: string;
  key: string;
  counts: Instant;
  stands: boolean;
}

/** Items whose present proof names the tool. */
function proofsWith(e: Evaluation, tool: string): Used[] {
  return allItems(e.facts).flatMap((item) => {
    const proof = currentProof(e.facts, item.id);
    if (!proof?.tools.includes(tool)) return [];
    return [{ item: item.id, key: item.key, counts: proof.counts, stands: e.result.items[item.id]?.stands ?? false }];
  });
}

function toolHangs(e: Evaluation, tool: string, used: Used[]): string {
  const times = e.snapshot.proofs.filter((p) => p.tools.includes(tool)).length;
  const fell = used.filter((u) =>
    e.result.items[u.item]?.blockers.some((b) => b.code === "tool-doubtful" || b.code === "tool-out-of-date"),
  );
  const words = times ? `Named in ${count(times, "proof")}.` : "Not used yet.";
  return fell.length ? `${words} ${count(fell.length, "proof")} to do again: ${fell.map((u) => u.key).join(", ")}.` : words;
}

function bottleRow(e: Evaluation, x: Extinguisher, units: UnitSystem, told: CribTold): BottleRow {
  const { rating = "", position = "" } = told.bottles[x.id] ?? {};
  const zone = e.snapshot.install.timeZone;
  const dues = x.withdrawn
    ? []
    : [dueView("monthly look", x.lookDue, SOON.look, e.at, zone), dueView("yearly service", x.serviceDue, SOON.service, e.at, zone)];
  const worst = worstOf(dues);
  return {
    id: x.id,
    anchor: anchorOfCrib(x.id),
    name: x.name,
    detail: [
      AGENTS[x.agent],
      format("mass", x.charge, units).text,
      rating ? `rated ${rating}` : x.classB ? "class B" : "not class B",
      position,
    ]
      .filter(Boolean)
      .join(", "),
    state: worst?.state ?? "out",
    word: x.withdrawn ? "withdrawn" : (worst?.word ?? ""),
    dues,
    hangs: x.withdrawn ? "Out of use. Add another one in its place." : bottleHangs(x, worst?.state),
    rev: `${x.lookDue} ${x.serviceDue} ${x.withdrawn}`,
    withdrawn: x.withdrawn,
  };
}

function bottleHangs(x: Extinguisher, state: DueState | undefined): string {
  if (!x.classB) return "Does not count: a fuel fire wants class B.";
  if (x.agent === "water") return "Does not count: water spreads a fuel fire.";
  return state === "out" ? "Does not count until look and service are in date." : "Counts for the fire stand-by.";
}

/** The evaluator's own answer to the item that asks for extinguishers. */
function enoughOf(e: Evaluation): CribView["enough"] {
  const item = allItems(e.facts).find((i) => i.parts.some((p) => p.kind === "computed" && p.rule === "extinguishers"));
  const judged = item && e.result.items[item.id];
  if (!judged) return null;
  return {
    ok: judged.stands,
    says: judged.stands
      ? `Enough for a run${judged.until === null ? "" : `, until ${e.facts.when(judged.until)}`}.`
      : (judged.blockers[0]?.sentence ?? "Not enough for a run."),
  };
}
