/** When each tool and extinguisher of the crib runs out: what the crib lists, and what is mailed beforehand. */
import type { Extinguisher, Instant, Snapshot, Tool } from "#app/lib/gates/snapshot";

const DAY = 86_400_000;

/** Days before the end at which a mail goes out, the longest first. */
export const LEADS = [14, 3] as const;
export type Lead = (typeof LEADS)[number];

export interface CribDue {
  kind: "calibration" | "look" | "service";
  /** Of the tool or extinguisher. */
  id: string;
  name: string;
  /** First instant at which it is no longer in date; null = never done, or found out of tolerance. */
  ends: Instant | null;
  /** Found out of tolerance, and no good check since. */
  bad: boolean;
}

export interface DueSoon extends CribDue {
  ends: Instant;
  /** The shortest lead time that has begun, days. */
  lead: Lead;
}

/** How a tool stands by its newest check; of several at one instant the worst. */
export function toolEnds(tool: Tool): { ends: Instant | null; bad: boolean } {
  const newest = tool.checks.reduce<Instant | null>((at, c) => (at === null || c.at > at ? c.at : at), null);
  const last = tool.checks.filter((c) => c.at === newest);
  const bad = last.some((c) => !c.good);
  return { bad, ends: last.length && !bad ? Math.min(...last.map((c) => c.due ?? 0)) : null };
}

const bottleDues = ({ id, name, withdrawn, lookDue, serviceDue }: Extinguisher): CribDue[] =>
  withdrawn
    ? []
    : [
        { kind: "look", id, name, ends: lookDue, bad: false },
        { kind: "service", id, name, ends: serviceDue, bad: false },
      ];

/** Every date of the crib: what is out already first, then the soonest. What was withdrawn from use has none. */
export function cribDues(s: Pick<Snapshot, "tools" | "extinguishers">): CribDue[] {
  const all = [
    ...s.tools.map((t): CribDue => ({ kind: "calibration", id: t.id, name: t.name, ...toolEnds(t) })),
    ...s.extinguishers.flatMap(bottleDues),
  ];
  const rank = (d: CribDue) => d.ends ?? Number.NEGATIVE_INFINITY;
  return all.sort((a, b) => (rank(a) < rank(b) ? -1 : rank(a) > rank(b) ? 1 : 0) || (a.name < b.name ? -1 : a.name > b.name ? 1 : 0));
}

/** @returns what is in date at `now` and runs out within the longest lead time, soonest first. What is out already is no news. */
export const dueSoon = (s: Pick<Snapshot, "tools" | "extinguishers">, now: Instant): DueSoon[] =>
  cribDues(s).flatMap((d): DueSoon[] => {
    const { ends } = d;
    if (ends === null || ends <= now) return [];
    const lead = LEADS.filter((days) => ends <= now + days * DAY).at(-1);
    return lead === undefined ? [] : [{ ...d, ends, lead }];
  });
