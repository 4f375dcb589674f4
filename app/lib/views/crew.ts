/** The people of an install with their roles, and how many more the runs and the signatures need. Pure. */
import { POSITION_NAMES } from "#app/lib/gates/crew";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { heldAnyRole } from "#app/lib/gates/facts";
import { mayInvite } from "#app/lib/gates/set-up-verdicts";
import type { Member, Role } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import type { Viewer } from "#app/lib/views/board";

export interface MemberView {
  id: string;
  anchor: string;
  name: string;
  me: boolean;
  roles: { role: Role; since: string }[];
  /** Places on the next run: "fire guard on run 1". Null where they hold none. */
  place: string | null;
}

export interface NeedView {
  key: string;
  met: boolean;
  /** "enough", "too few", "nobody" */
  word: string;
  title: string;
  says: string;
}

export interface CrewPageView {
  state: string;
  fill: number;
  needs: NeedView[];
  members: MemberView[];
  /** Who held a role once: name, and what until when. */
  former: { id: string; name: string; says: string }[];
  may: { ok: boolean; why: string };
}

export const anchorOfMember = (id: string): string => `member-${id}`;

export function crewPageView(e: Evaluation, me: Viewer): CrewPageView {
  const here = e.snapshot.members.filter((m) => heldAnyRole(e.facts, m.id, e.at));
  const gone = e.snapshot.members.filter((m) => !here.includes(m) && m.roles.length > 0);
  const verdict = mayInvite(e, { member: me.id });
  const most = Math.max(0, ...openRungs(e).map((r) => r.crew.people));
  const short = most - here.length;
  return {
    state: `${count(here.length, "person", "people")}${most === 0 ? "" : short > 0 ? `, ${short} more needed for every run` : ", enough for every run"}`,
    fill: most ? Math.min(1, here.length / most) : 1,
    needs: [...peopleNeeds(e, here.length), ...roleNeeds(e, here)],
    members: here.map((m) => memberView(e, m, me.id)).sort((a, b) => a.name.localeCompare(b.name)),
    former: gone.map((m) => ({ id: m.id, name: m.name, says: formerWords(e, m) })),
    may: verdict.ok ? { ok: true, why: "" } : { ok: false, why: verdict.blockers[0]?.sentence ?? "" },
  };
}

/** Rungs that are not settled: the people are for these. */
const openRungs = (e: Evaluation) => e.facts.rungs.filter((r) => !e.facts.settledBy.has(r.key));

/** One line for the runs that need the same number of people. */
function peopleNeeds(e: Evaluation, here: number): NeedView[] {
  const groups = new Map<string, { people: number; runs: string[]; swinger: boolean }>();
  for (const rung of openRungs(e)) {
    const swinger = rung.crew.wanted.some((w) => w.position === "swinger");
    const key = `${rung.crew.people} ${swinger}`;
    const group = groups.get(key) ?? { people: rung.crew.people, runs: [], swinger };
    group.runs.push(rung.key);
    groups.set(key, group);
  }
  return [...groups.entries()]
    .sort(([, a], [, b]) => b.people - a.people)
    .map(([key, { people, runs, swinger }]) => ({
      key,
      met: here >= people,
      word: here >= people ? "enough" : "too few",
      title: `${runs.length === 1 ? `Run ${runs[0]} needs` : `Runs ${listOf(runs)} need`} ${count(people, "person", "people")}`,
      says: `${here >= people ? `${here} are here` : `${here} ${here === 1 ? "is" : "are"} here: bring in ${people - here} more`}${swinger ? ", the swinger counted" : ""}.`,
    }));
}

/** Places that nobody can fill, so that a gate or a GO would wait for ever. */
function roleNeeds(e: Evaluation, here: Member[]): NeedView[] {
  const holders = (role: Role) => here.filter((m) => rolesNow(e, m).includes(role));
  const missing: Record<"lead" | "builder" | "inspector", string> = {
    lead: "Nobody can plan a run or call GO. Make somebody lead.",
    builder: "Nobody can sign for the work. Add a builder.",
    inspector: "Nobody can countersign. Add an inspector, who does none of the work that they check.",
  };
  return (["lead", "builder", "inspector"] as const).map((role) => {
    const names = holders(role).map((m) => m.name);
    return {
      key: role,
      met: names.length > 0,
      word: names.length ? "enough" : "nobody",
      title: names.length ? count(names.length, role) : `No ${role}`,
      says: names.length ? `${listOf(names)}.` : missing[role],
    };
  });
}

const rolesNow = (e: Evaluation, m: Member): Role[] =>
  m.roles.filter((r) => r.from <= e.at && (r.to === null || e.at < r.to)).map((r) => r.role);

function memberView(e: Evaluation, m: Member, me: string): MemberView {
  return {
    id: m.id,
    anchor: anchorOfMember(m.id),
    name: m.name,
    me: m.id === me,
    roles: m.roles
      .filter((r) => r.from <= e.at && (r.to === null || e.at < r.to))
      .map((r) => ({ role: r.role, since: e.facts.when(r.from) })),
    place: placeOn(e, m.id),
  };
}

function placeOn(e: Evaluation, member: string): string | null {
  const run = e.result.next?.id ? e.facts.runs.get(e.result.next.id) : null;
  const places = (run?.plan?.positions ?? []).filter((p) => p.member === member).map((p) => POSITION_NAMES[p.position]);
  return run && places.length ? `${places.join(" and ")} on run ${run.run.label}` : null;
}

function formerWords(e: Evaluation, m: Member): string {
  return m.roles.map((r) => `${r.role}${r.to === null ? "" : ` until ${e.facts.when(r.to)}`}`).join(", ");
}

const listOf = (words: string[]): string => (words.length < 2 ? (words[0] ?? "") : `${words.slice(0, -1).join(", ")} and ${words.at(-1)}`);
