/** What the plan form starts from and the rules it shows: who may stand where, how high, how much wind. Pure. */
import { rpmText } from "#app/lib/gates/clearance";
import { POSITION_NAMES } from "#app/lib/gates/crew";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { heldAnyRole } from "#app/lib/gates/facts";
import type { PlanVersion, Run, Rung } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { POSITIONS } from "#app/lib/template/positions";
import type { PositionKey } from "#app/lib/template/types";
import { format } from "#app/lib/units/display";
import { nameIn } from "#app/lib/views/places";
import { rpmFigure } from "#app/lib/views/run-words";

export interface PlanView {
  rung: string;
  rungName: string;
  label: string;
  /** "Times are those at the install: CET (Europe/Berlin)." */
  zone: string;
  rules: string[];
  rpmHint: string;
  windHint: string;
  members: { value: string; label: string }[];
  positions: { key: PositionKey; letter: string; name: string; duty: string; slots: { wanted: boolean; member: string }[] }[];
  start: { rpm: string; windLimit: string; gustLimit: string };
}

/** More than one of these may stand, one per manned extinguisher, one per open side. */
const EXTRA: Partial<Record<PositionKey, number>> = { fireguard: 2, areaguard: 1, observer: 1 };

export function planView(e: Evaluation, rung: Rung, run: Run | null): PlanView {
  const plan = [...(run?.plans ?? [])].sort((a, b) => a.version - b.version).at(-1) ?? null;
  const { crew } = rung;
  const values = e.facts.values;
  const wind = plan?.windLimit ?? values.get("windLimit")?.value ?? null;
  const gust = plan?.gustLimit ?? values.get("gustLimit")?.value ?? null;
  const kt = (v: number | null) => (v === null ? "" : format("speed", v, "si").value);
  const cleared = e.result.next?.rung === rung.key ? e.result.next.clearance : null;
  const rpm = plan?.rpm ?? rung.rpm;
  return {
    rung: rung.key,
    rungName: rung.name,
    label: run?.label ?? (e.snapshot.runs.some((r) => r.rung === rung.key) ? `${rung.key} again` : rung.key),
    zone: `Times are those at the install, ${e.snapshot.install.timeZone}.`,
    rules: rulesOf(rung),
    rpmHint: rpmHint(rung, cleared?.binds && cleared.binds.kind !== "plan" ? rpmText(cleared.rpm) : null),
    windHint: "In knots. The limit is the install’s own, or lower. No wind from behind, daylight only (common practice).",
    members: e.snapshot.members
      .filter((m) => heldAnyRole(e.facts, m.id, e.at))
      .map((m) => ({ value: m.id, label: m.name }))
      .sort((a, b) => a.label.localeCompare(b.label, "en")),
    positions: POSITIONS.flatMap((p) => {
      const wanted = crew.wanted.find((w) => w.position === p.key)?.count ?? 0;
      const held = heldBy(plan, p.key);
      const slots = Math.max(wanted === 0 ? 0 : wanted + (EXTRA[p.key] ?? 0), held.length);
      return slots === 0
        ? []
        : [
            {
              key: p.key,
              letter: p.letter,
              name: p.name,
              duty: `${p.place}. ${p.duty}`,
              slots: Array.from({ length: slots }, (_, i) => ({ wanted: i < wanted, member: held[i] ?? "" })),
            },
          ];
    }),
    start: { rpm: rpm === null ? "" : rpmFigure(rpm).replace(",", ""), windLimit: kt(wind), gustLimit: kt(gust) },
  };
}

const heldBy = (plan: PlanVersion | null, key: PositionKey): string[] =>
  plan?.positions.filter((p) => p.position === key).map((p) => p.member) ?? [];

function rpmHint(rung: Rung, cleared: string | null): string {
  if (rung.rpm === null) return "The rung has no speed yet: enter the ratings in Set-up.";
  const own = `Run ${rung.key} goes to ${rpmText(rung.rpm)}. Planned lower, it does not settle the rung.`;
  return cleared ? `${own} Today only ${cleared} is clear: above that the run is not clear.` : own;
}

function rulesOf({ crew }: Rung): string[] {
  const pairs = crew.mayAlso.map(([a, b]) => `${POSITION_NAMES[a]} and ${POSITION_NAMES[b]}`);
  return [
    `${count(crew.people, "person", "people")} at least.`,
    pairs.length
      ? `One person may be ${pairs.length > 1 ? `${pairs.slice(0, -1).join(", ")}, or ${pairs.at(-1)}` : pairs[0]}; no other two places.`
      : "Nobody holds two places on this run.",
    "One fire guard for each manned extinguisher.",
  ];
}

/** Who gets the mail about a run: everybody with a place on it, and every lead. */
export function mailReaders(e: Evaluation, runId: string): { id: string; name: string; places: string }[] {
  const plan = e.facts.runs.get(runId)?.plan ?? null;
  const crew = [...new Set(plan?.positions.map((p) => p.member) ?? [])];
  const leads = e.snapshot.members.filter((m) => m.roles.some((r) => r.role === "lead" && r.to === null)).map((m) => m.id);
  return [...new Set([...crew, ...leads])].map((id) => {
    const held = plan?.positions.filter((p) => p.member === id).map((p) => POSITION_NAMES[p.position]) ?? [];
    return { id, name: nameIn(e.snapshot, id), places: held.length ? held.join(", ") : "lead, no place" };
  });
}
