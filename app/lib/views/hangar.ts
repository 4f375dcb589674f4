/**
 * The hangar: every install of one person, where each stands and what waits there for them, the one that waits most first.
 * Pure: evaluations in, plain data out.
 */
import type { ValveState } from "#app/components/ui/states";
import { rpmText } from "#app/lib/gates/clearance";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Instant, Role } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { answerOf, type Viewer } from "#app/lib/views/board";
import { type ActView, waitingFor } from "#app/lib/views/board-acts";
import { type LineRunView, lineOf } from "#app/lib/views/board-line";
import { boardOf, whoClears } from "#app/lib/views/places";
import { dayWhen } from "#app/lib/views/run-words";

export interface HangarRow {
  id: string;
  href: string;
  registration: string;
  name: string;
  /** "lead and builder" */
  roles: string;
  answer: { title: string; state: string; held: boolean };
  /** "Cleared to 1,375 rpm." where the run is clear, else what it would be. Null where no run is asked about any more. */
  clearance: string | null;
  /** "Run 1 is planned for Sat 5 Dec 09:30 CET." */
  planned: string | null;
  line: {
    gates: { state: ValveState; part: number }[];
    runs: Pick<LineRunView, "id" | "share" | "state" | "spade">[];
    released: boolean;
    label: string;
  };
  waits: ActView[];
  /** What comes first, and for whom, where nothing waits for this person. */
  first: string | null;
  changed: string;
  changedAt: Instant;
  /** Gates signed and rungs settled, to sort by. */
  progress: number;
  /** What a search looks through, in small letters. */
  words: string;
}

export interface HangarView {
  title: string;
  state: string;
  waits: number;
  rows: HangarRow[];
}

/** @param changedAt when the newest event of the record was written. */
export function hangarRow(e: Evaluation, me: Viewer, changedAt: Instant): HangarRow {
  const { install } = e.snapshot;
  const { title, state, tone } = answerOf(e);
  const line = lineOf(e, new Map());
  const gates = [...line.gates, ...(line.walkRound ? [line.walkRound] : [])].map(({ state, part }) => ({ state, part }));
  const signed = gates.filter((g) => g.state === "signed").length;
  const settled = e.facts.settledBy.size;
  const waits = waitingFor(e, me);
  const roles = rolesText(me.roles);
  return {
    id: install.id,
    href: boardOf(install.id),
    registration: install.registration,
    name: install.name,
    roles,
    answer: { title, state, held: tone === "held" },
    clearance: clearanceWords(e),
    planned: plannedWords(e),
    line: {
      gates,
      runs: line.runs.map(({ id, share, state, spade }) => ({ id, share, state, spade })),
      released: e.result.release.stands,
      label: `${signed} of ${count(gates.length, "gate")} signed, ${settled} of ${count(e.facts.rungs.length, "run")} settled`,
    },
    waits,
    first: waits.length ? null : firstOf(e, me.id),
    changed: e.facts.when(changedAt),
    changedAt,
    progress: signed + settled,
    words: [install.registration, install.name, roles, title, state, ...waits.map((w) => w.label)].join(" ").toLowerCase(),
  };
}

export function hangarView(rows: HangarRow[]): HangarView {
  const sorted = [...rows].sort(
    (a, b) => b.waits.length - a.waits.length || b.changedAt - a.changedAt || (a.registration < b.registration ? -1 : 1),
  );
  const waits = rows.reduce((sum, row) => sum + row.waits.length, 0);
  const on = rows.filter((row) => row.waits.length).length;
  if (!rows.length) return { title: "No installs yet", state: "yours will stand here", waits, rows: sorted };
  return {
    title: waits ? `${count(waits, "thing")} ${waits === 1 ? "waits" : "wait"} for you` : "Nothing to sign or answer",
    state: waits
      ? `on ${on} of your ${count(rows.length, "install")}`
      : `on any of your ${count(rows.length, "install")}`.replace("any of your 1 install", "your install"),
    waits,
    rows: sorted,
  };
}

/** "lead, builder and crew" */
export const rolesText = (roles: Role[]): string =>
  roles.length < 2 ? (roles[0] ?? "no role") : `${roles.slice(0, -1).join(", ")} and ${roles.at(-1)}`;

/** Beside "not clear" a bare figure would read as leave to run. */
function clearanceWords({ result: { next } }: Evaluation): string | null {
  if (!next) return null;
  if (next.clearance.rpm <= 0) return "Not cleared to any speed yet.";
  const speed = rpmText(next.clearance.rpm);
  return next.clear || next.go || next.state === "running" ? `Cleared to ${speed}.` : `Once nothing stops it: cleared to ${speed}.`;
}

function plannedWords(e: Evaluation): string | null {
  const { next } = e.result;
  const start = next?.id ? e.facts.runs.get(next.id)?.run.plannedStart : null;
  if (!next || start == null) return next ? `Run ${next.label} has no time yet.` : null;
  return `Run ${next.label} is planned for ${dayWhen(start, e.snapshot.install.timeZone)}.`;
}

function firstOf(e: Evaluation, me: string): string | null {
  const first = (e.result.next ?? e.result.release).blockers[0];
  if (!first) return null;
  if (first.owner.members.includes(me)) return `You can clear what comes first: ${first.title}.`;
  return `First: ${first.title}. ${whoClears(e.snapshot, first.owner, me)}`.trim();
}
