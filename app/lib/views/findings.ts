/** The findings of an install: open ones first, what each does to the runs in words, and what this person may do about it. Pure. */

import { rpmText } from "#app/lib/gates/clearance";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemsIn } from "#app/lib/gates/facts";
import { mayClose, mayFix, mayGrade, mayRaise } from "#app/lib/gates/happening-verdicts";
import type { Finding, Instant } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import type { Viewer } from "#app/lib/views/board";
import { type May, mayOf } from "#app/lib/views/may";
import { nameIn, rowAnchor } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { type SystemChoice, systemsOn, systemWords } from "#app/lib/views/systems";

export type Severity = Finding["severity"];
export const SEVERITIES: Severity[] = ["grounding", "limiting", "watch"];

/** What the records beside the snapshot tell of one finding. */
export interface FindingTold {
  photos: string[];
  severity: Severity;
  cap: number | null;
  events: {
    kind: "severity" | "fixed" | "not-fixed" | "closed";
    by: string;
    recorded: Instant;
    words: string;
    severity: Severity | null;
    cap: number | null;
  }[];
}

export interface TrailStep {
  name: "raised" | "fixed" | "closed";
  done: boolean;
  who: string;
  when: string;
}

export interface FindingRow {
  id: string;
  anchor: string;
  /** "F-7" */
  tag: string;
  words: string;
  severity: Severity;
  system: string;
  /** "Caps run 3 at 4,000 rpm." */
  effect: string;
  state: "open" | "fixed" | "closed";
  since: string;
  trail: TrailStep[];
  photos: string[];
  /** What was said and done since it was raised, oldest first. */
  told: string[];
  fix: May;
  close: May;
  /** One per severity: whether this person may set it, with some cap. */
  grades: { severity: Severity; may: May }[];
  /** In rpm, as it would be typed. */
  cap: string;
}

export interface FindingsView {
  title: string;
  state: string;
  fill: number;
  held: boolean;
  open: FindingRow[];
  closed: FindingRow[];
  systems: SystemChoice[];
  may: May;
  /** What a new one does to the GO in force. */
  goWarning: string | null;
}

export const anchorOfFinding = (id: string): string => rowAnchor("findings", id);

const WEIGHT: Record<Severity, number> = { grounding: 0, limiting: 1, watch: 2 };

export function findingsView(e: Evaluation, me: Viewer, told: Record<string, FindingTold>): FindingsView {
  const rows = e.facts.snapshot.findings.map((f, i) => ({ f, row: rowOf(e, f, `F-${i + 1}`, me, told[f.id]) }));
  const open = rows
    .filter(({ f }) => !f.closed)
    .sort(
      (a, b) =>
        Number(!!a.f.fixed) - Number(!!b.f.fixed) ||
        WEIGHT[a.f.severity] - WEIGHT[b.f.severity] ||
        capOf(a.f) - capOf(b.f) ||
        b.f.seq - a.f.seq,
    )
    .map(({ row }) => row);
  const closed = rows.filter(({ f }) => f.closed).reverse();
  const grounding = rows.some(({ f }) => !f.closed && f.severity === "grounding");
  return {
    title: open.length ? `${count(open.length, "finding")} open` : rows.length ? "No finding open" : "No findings",
    state: open.length ? stateOf(e, open) : closed.length ? `${closed.length} closed` : "none open, none closed",
    fill: open.length ? 0.06 : 1,
    held: grounding,
    open,
    closed: closed.map(({ row }) => row),
    systems: systemsOn(e),
    may: mayOf(mayRaise(e, { member: me.id })),
    goWarning: goWarning(e),
  };
}

const capOf = (f: Finding): number => f.cap ?? Number.POSITIVE_INFINITY;

function stateOf(e: Evaluation, open: FindingRow[]): string {
  const next = e.result.next;
  const grounding = open.filter((r) => r.severity === "grounding").map((r) => r.tag);
  if (grounding.length) return `${listOf(grounding)} ${grounding.length === 1 ? "stops" : "stop"} every run`;
  const binds = next?.clearance.binds;
  const plan = next?.clearance.limits.find((l) => l.kind === "plan");
  if (next && binds?.kind === "finding" && plan && binds.rpm < plan.rpm) {
    const row = open.find((r) => r.id === binds.id);
    return `${row?.tag ?? "One"} caps run ${next.label} at ${rpmText(binds.rpm)}`;
  }
  return next ? `none stops run ${next.label}; each is closed before the release` : "each is closed before the release";
}

function rowOf(e: Evaluation, f: Finding, tag: string, me: Viewer, told: FindingTold | undefined): FindingRow {
  const closing = told?.events.findLast((x) => x.kind === "closed");
  return {
    id: f.id,
    anchor: anchorOfFinding(f.id),
    tag,
    words: f.words,
    severity: f.severity,
    system: systemWords([f.system]),
    effect: effectOf(e, f),
    state: f.closed ? "closed" : f.fixed ? "fixed" : "open",
    since: e.facts.when((f.closed ?? f.fixed ?? f).recorded),
    trail: [
      step(e, "raised", f, ""),
      step(e, "fixed", f.fixed, "A builder says what was done"),
      step(e, "closed", f.closed ?? closing ?? null, f.fixed ? waitsFor(e, f.fixed.by) : "An inspector looks"),
    ],
    photos: told?.photos ?? [],
    told: (told?.events ?? []).map((x) => eventWords(e, x)),
    fix: mayOf(mayFix(e, { finding: f.id, member: me.id })),
    close: mayOf(mayClose(e, { finding: f.id, member: me.id })),
    grades: SEVERITIES.map((severity) => ({
      severity,
      // The lowest cap is the sharpest: whether any cap can pass.
      may: mayOf(mayGrade(e, { finding: f.id, member: me.id, severity, cap: severity === "limiting" ? 0 : null })),
    })),
    cap: f.cap === null ? "" : String(Math.floor(f.cap * 60 + 1e-6)),
  };
}

function step(e: Evaluation, name: TrailStep["name"], done: { by: string; recorded: Instant } | null, waits: string): TrailStep {
  return done
    ? { name, done: true, who: nameIn(e.snapshot, done.by), when: e.facts.when(done.recorded) }
    : { name, done: false, who: waits, when: "not yet" };
}

function waitsFor(e: Evaluation, fixer: string): string {
  const names = e.snapshot.members
    .filter((m) => m.id !== fixer && m.roles.some((r) => r.role === "inspector" && r.from <= e.at && (r.to === null || e.at < r.to)))
    .map((m) => m.name);
  return names.length ? `Waits for ${names.join(" or ")}` : "Waits for an inspector who did not fix it";
}

/** What it does now, in words. Fixed counts as open. */
function effectOf(e: Evaluation, f: Finding): string {
  if (f.closed)
    return f.severity === "limiting" && f.cap !== null
      ? `Capped the runs at ${rpmText(f.cap)} while it was open.`
      : "Stops nothing any more.";
  const next = e.result.next;
  if (f.severity === "watch") return "Stops no run; looked at again after each one, and closed before the release.";
  if (f.severity === "grounding") {
    const gates = [...e.facts.gates.values()]
      .filter((g) => !g.lookBack && itemsIn(e.facts, g.id).some((i) => i.systems.includes(f.system)))
      .map((g) => g.short);
    return `Stops every run${gates.length ? `, and these gates: ${listOf(gates)}` : ""}.`;
  }
  const cap = rpmText(f.cap ?? 0);
  const plan = next?.clearance.limits.find((l) => l.kind === "plan")?.rpm;
  if (!next || plan === undefined) return `Caps every run at ${cap}.`;
  return plan > (f.cap ?? 0)
    ? `Caps run ${next.label} at ${cap}; its plan goes to ${rpmText(plan)}.`
    : `Caps every run at ${cap}; run ${next.label} stays below, with ${rpmText(plan)}.`;
}

function eventWords(e: Evaluation, x: FindingTold["events"][number]): string {
  const grade = `set to ${x.severity ?? ""}${x.cap === null ? "" : `, at most ${rpmText(x.cap)}`}`;
  const what = { severity: grade, fixed: "fixed", "not-fixed": "not fixed", closed: "closed" }[x.kind];
  return `${e.facts.when(x.recorded)}, ${nameIn(e.snapshot, x.by)}, ${what}: ${x.words}`;
}

function goWarning(e: Evaluation): string | null {
  const called = e.result.runs.find((r) => r.go);
  if (!called?.id) return null;
  const told = mailReaders(e, called.id).length;
  const plan = called.clearance.limits.find((l) => l.kind === "plan")?.rpm ?? 0;
  return `GO stands for run ${called.label}. A grounding finding, or a limit under ${rpmText(plan)}, turns it into HOLD: ${count(told, "person gets", "people get")} a mail.`;
}

const listOf = (words: string[]): string => (words.length < 2 ? (words[0] ?? "") : `${words.slice(0, -1).join(", ")} and ${words.at(-1)}`);
