/** Words of a run that several of its pages share: what binds, a step in short, a time with its weekday. Pure. */

import { rpmText } from "#app/lib/gates/clearance";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemOf } from "#app/lib/gates/facts";
import type { Clearance, ClearanceLimit } from "#app/lib/gates/result";
import { when } from "#app/lib/gates/when";
import type { CardStep, RunCard } from "#app/lib/template/types";
import { gateOf, type Place } from "#app/lib/views/places";

const weekdays = new Map<string, Intl.DateTimeFormat>();

/** "Sat 5 Dec 09:30 CET" */
export function dayWhen(at: number, timeZone: string): string {
  let weekday = weekdays.get(timeZone);
  if (!weekday) {
    weekday = new Intl.DateTimeFormat("en-GB", { weekday: "short", timeZone });
    weekdays.set(timeZone, weekday);
  }
  return `${weekday.format(at)} ${when(at, timeZone)}`;
}

/** "09:12 CET" on the day of `now`, else "4 Dec 19:20 CET". */
export function timeOrWhen(at: number, now: number, timeZone: string): string {
  const [day, month, ...time] = when(at, timeZone).split(" ");
  const [nowDay, nowMonth] = when(now, timeZone).split(" ");
  return day === nowDay && month === nowMonth && Math.abs(now - at) < 86_400_000 ? time.join(" ") : when(at, timeZone);
}

/** Only digits and their commas: "1,375". */
export const rpmFigure = (perSecond: number): string => rpmText(perSecond).replace(" rpm", "");

export const lowerFirst = (text: string): string => text.replace(/^[A-Z](?=[a-z ])/, (letter) => letter.toLowerCase());
export const upperFirst = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

export interface ClearanceView {
  figure: string;
  /** "The plan binds." and what the next one would allow. */
  binds: string;
  next: string;
  limits: { name: string; source: string; rpm: number; text: string; binds: boolean }[];
  /** Where what binds can be raised, when it is not the plan itself. */
  raise: { words: string; place: Place } | null;
  /** Highest whole rpm that is clear, for a lower plan; null when the plan is clear or nothing is. */
  lower: number | null;
}

const NAMES: Record<ClearanceLimit["kind"], string> = {
  plan: "this run’s plan",
  redline: "redline",
  finding: "finding",
  restraint: "straps and surface",
};

export function clearanceView(e: Evaluation, clearance: Clearance): ClearanceView {
  const { binds, limits, rpm } = clearance;
  const plan = limits.find((l) => l.kind === "plan");
  const row = (l: ClearanceLimit) => {
    const at = l.label.indexOf(": ");
    const isFinding = l.kind === "finding" && at > 0;
    return {
      name: isFinding ? l.label.slice(at + 2) : NAMES[l.kind],
      source: isFinding ? "limiting finding" : sourceOf(e, l),
      rpm: l.rpm * 60,
      text: rpmFigure(l.rpm),
      binds: l === binds,
    };
  };
  const above = limits.filter((l) => l !== binds && l.rpm > rpm).sort((a, b) => a.rpm - b.rpm)[0];
  const short = binds !== null && binds.kind !== "plan";
  const next = short
    ? plan
      ? `The plan goes to ${rpmText(plan.rpm)}.`
      : ""
    : above
      ? `${upperFirst(above.kind === "finding" ? above.label : NAMES[above.kind])} would allow ${rpmText(above.rpm)}.`
      : "";
  return {
    figure: rpmFigure(rpm),
    binds: binds ? `${upperFirst(binds.kind === "plan" ? "the plan" : row(binds).name)} binds.` : "Nothing is planned.",
    next,
    limits: limits.map(row).sort((a, b) => a.rpm - b.rpm),
    raise: short ? raiseOf(e, binds) : null,
    lower: short && rpm > 0 ? Math.floor(rpm * 60 + 1e-6) : null,
  };
}

function sourceOf(e: Evaluation, l: ClearanceLimit): string {
  if (l.kind === "redline") return e.facts.values.get("redline")?.source ?? "not confirmed with a source";
  if (l.kind === "plan") return l.label.replace(/^plan, /, "");
  return l.kind === "restraint" ? (l.rpm === 0 ? "restraint sheet, does not stand" : "restraint sheet") : "";
}

function raiseOf(e: Evaluation, binds: ClearanceLimit): ClearanceView["raise"] {
  const install = e.snapshot.install.id;
  if (binds.kind === "finding")
    return {
      words: "A builder fixes the finding and an inspector closes it, or sets its limit higher.",
      place: { href: `/installs/${install}/findings`, label: "Findings" },
    };
  if (binds.kind === "redline")
    return {
      words: "The redline comes from the maker’s papers. Enter it where it is missing; never raise it to fit a run.",
      place: { href: `/installs/${install}/set-up`, label: "Set-up" },
    };
  const item = itemOf(e.facts, binds.id);
  return {
    words: "Do the restraint sheet again with what holds the aircraft now: more straps, better anchors, a surface that grips.",
    place: { href: item ? gateOf(install, item.gate, item.id) : `/installs/${install}`, label: "Restraint sheet" },
  };
}

export interface CardView {
  version: number | null;
  cowl: string;
  begin: string[];
  end: string[];
  steps: { no: number; title: string; rpm: string; hold: string; see: string }[];
  calls: { call: string; by: string; answer: string }[];
  abort: { word: "STOP" | "KILL" | "FIRE"; first: string; lines: string[] }[];
}

export function cardView(card: RunCard, version: number | null): CardView {
  const abort = (word: "STOP" | "KILL" | "FIRE", [first = "", ...lines]: string[]) => ({
    word,
    first: first.replace(`${word}: `, ""),
    lines,
  });
  return {
    version,
    cowl: card.cowl,
    begin: card.begin,
    end: card.end,
    steps: card.steps.map((s) => ({ no: s.no, title: s.title, rpm: stepSpeed(s), hold: holdText(s.hold), see: s.see })),
    calls: card.calls,
    abort: [abort("STOP", card.abort.stop), abort("KILL", card.abort.kill), abort("FIRE", card.abort.fire)].filter((a) => a.first),
  };
}

/** "900 rpm", "1,100 to 1,238 rpm", or nothing where no speed is held. */
export function stepSpeed({ rpm }: CardStep): string {
  if (!rpm) return "";
  const figure = (v: number) => Math.round(v * 60).toLocaleString("en");
  return rpm.min === rpm.max ? `${figure(rpm.max)} rpm` : `${figure(rpm.min)} to ${figure(rpm.max)} rpm`;
}

/** Minutes and seconds, "1:30"; nothing where there is no hold. */
export const holdText = (seconds: number | null): string =>
  seconds === null ? "" : `${Math.floor(seconds / 60)}:${String(Math.round(seconds % 60)).padStart(2, "0")}`;

/** The run in one sentence: "Start, oil pressure, 1,100 to 1,238 rpm for 1:30, idle." */
export const inShort = (card: RunCard): string =>
  `${upperFirst(card.steps.map((s) => [lowerFirst(s.title), stepSpeed(s)].filter(Boolean).join(" ") + (s.hold ? ` for ${holdText(s.hold)}` : "")).join(", "))}.`;

/** Share of the gates that the next run requires which stand signed; 1 when every rung is settled. */
export function gatesShare(e: Evaluation): number {
  const required = (e.result.next?.requiredGates ?? []).filter((id) => e.result.gates[id]?.present);
  return required.length ? required.filter((id) => e.result.gates[id]?.stands).length / required.length : 1;
}
