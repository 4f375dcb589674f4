/**
 * May this member plan a run, and is this plan one that the rules allow? How high, how much wind, who stands where.
 * The form shows each fault at its field, the service refuses by the same ones. Speeds in 1/s (crankshaft) and m/s (wind).
 */
import { rpmText } from "#app/lib/gates/clearance";
import { forbiddenPair, POSITION_NAMES } from "#app/lib/gates/crew";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { heldAnyRole, nameOf } from "#app/lib/gates/facts";
import { needsRole, no, notFound, OK, refuse, runOver } from "#app/lib/gates/permit";
import type { BlockerCode, Verdict } from "#app/lib/gates/result";
import type { PlanVersion, Rung } from "#app/lib/gates/snapshot";
import type { PositionKey, ValueKey } from "#app/lib/template/types";
import { format } from "#app/lib/units/display";

/** @param a.run null = a new run of `rung`. */
export function mayPlan(e: Evaluation, a: { run: string | null; rung: string; member: string }): Verdict {
  const role = needsRole(e, a.member, ["lead"], "plan a run");
  if (role) return role;
  if (!e.facts.rungs.some((r) => r.key === a.rung)) return notFound(e, "rung");
  if (a.run === null) return OK;
  const run = e.facts.runs.get(a.run);
  if (run?.run.rung !== a.rung) return notFound(e, "run");
  if (!run.start && !run.scrub) return OK;
  return runOver(e, a.run, e.result.runs.find((r) => r.id === a.run)?.state ?? "over");
}

export type PlanAsked = Pick<PlanVersion, "rpm" | "positions" | "windLimit" | "gustLimit">;

/** What a plan of one rung is judged by on this install; null = not entered, so it limits nothing here. */
export interface PlanRules {
  rung: Pick<Rung, "key" | "rpm" | "crew">;
  redline: number | null;
  /** The install's own limits; a plan may be stricter only. */
  windMost: number | null;
  gustMost: number | null;
  nameOf: (member: string) => string;
  isMember: (member: string) => boolean;
}

export interface PlanFault {
  code: BlockerCode;
  field: "rpm" | "windLimit" | "gustLimit" | { position: PositionKey };
  title: string;
  /** Why, and what to plan instead. */
  sentence: string;
}

export function planRules(e: Evaluation, rung: Rung): PlanRules {
  const value = (key: ValueKey) => e.facts.values.get(key)?.value ?? null;
  return {
    rung,
    redline: value("redline"),
    windMost: value("windLimit"),
    gustMost: value("gustLimit"),
    nameOf: (member) => nameOf(e.facts, member),
    isMember: (member) => heldAnyRole(e.facts, member, e.at),
  };
}

/** Room for the last digit of a figure that was typed in another unit. */
const ROOM = 1e-6;
const above = (value: number, most: number | null): most is number => most !== null && value > most + ROOM;
const kt = (speed: number): string => format("speed", speed, "si").text;

/** @returns every fault, field by field; empty = allowed. Places may stay empty: the run is not clear until they are filled. */
export function planFaults({ rung, redline, windMost, gustMost, ...people }: PlanRules, plan: PlanAsked): PlanFault[] {
  const out: PlanFault[] = [];
  const fault = (code: BlockerCode, field: PlanFault["field"], title: string, sentence: string) =>
    out.push({ code, field, title, sentence });
  if (above(plan.rpm, rung.rpm))
    fault(
      "clearance",
      "rpm",
      "Higher than its rung",
      `Run ${rung.key} goes to ${rpmText(rung.rpm)} and is not clear above. More is for a later run of the build-up.`,
    );
  if (above(plan.rpm, redline))
    fault("clearance", "rpm", "Over the redline", `That is over the redline of ${rpmText(redline)}. Plan a lower run.`);
  const own = (most: number) =>
    `The install’s own limit is ${kt(most)}. Plan that or less, or change the install’s limit with its source in Set-up.`;
  if (above(plan.windLimit, windMost)) fault("wind-over", "windLimit", "More wind than the install allows", own(windMost));
  if (above(plan.gustLimit, gustMost)) fault("wind-over", "gustLimit", "More gusts than the install allows", own(gustMost));
  if (plan.gustLimit < plan.windLimit - ROOM)
    fault(
      "wind-over",
      "gustLimit",
      "Gusts below the wind",
      "The gust limit is not below the wind limit. Raise it, or lower the wind limit.",
    );
  return [...out, ...crewFaults(plan.positions, rung.crew, people)];
}

function crewFaults(positions: PlanAsked["positions"], rule: Rung["crew"], people: Pick<PlanRules, "nameOf" | "isMember">): PlanFault[] {
  return [...new Set(positions.map((p) => p.member))].flatMap((member): PlanFault[] => {
    const mine = positions.filter((p) => p.member === member).map((p) => p.position);
    const [first] = mine;
    const name = people.nameOf(member);
    if (first && !people.isMember(member))
      return [
        {
          code: "not-active",
          field: { position: first },
          title: "No member here",
          sentence: `${name} is no member here now. Invite them first, or choose another person.`,
        },
      ];
    const twice = mine.find((p, n) => mine.indexOf(p) !== n);
    const pair = forbiddenPair([...new Set(mine)], rule);
    return [
      ...(twice
        ? [
            {
              code: "pair" as const,
              field: { position: twice },
              title: "Twice in one position",
              sentence: `${name} stands as ${POSITION_NAMES[twice]} twice. Choose another person, or leave one empty.`,
            },
          ]
        : []),
      ...(pair
        ? [
            {
              code: "pair" as const,
              field: { position: pair[1] },
              title: "Two places that one person cannot hold",
              sentence: `${name} cannot be ${POSITION_NAMES[pair[0]]} and ${POSITION_NAMES[pair[1]]} on this run. Give one of them to another person.`,
            },
          ]
        : []),
    ];
  });
}

/** Whether the member may plan this run so. */
export function mayPlanRun(e: Evaluation, a: { run: string | null; rung: string; member: string; plan: PlanAsked }): Verdict {
  const may = mayPlan(e, a);
  const rung = e.facts.rungs.find((r) => r.key === a.rung);
  if (!may.ok || !rung) return may;
  const at = { subject: ["rung", a.rung] as ["rung", string], page: a.run === null ? ("build-up" as const) : ("run" as const), id: a.run };
  const refusals = planFaults(planRules(e, rung), a.plan).map(({ field: _, ...fault }) => no(e, { ...at, ...fault, roles: ["lead"] }));
  return refusals.length ? refuse(...refusals.flatMap((r) => (r.ok ? [] : r.blockers))) : OK;
}
