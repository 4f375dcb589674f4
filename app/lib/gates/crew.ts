/** The people of a run: positions filled, pairs allowed, brief acknowledged, roll call answered. */
import { type Facts, heldAnyRole } from "#app/lib/gates/facts";
import type { Blocker } from "#app/lib/gates/result";
import type { RunFacts } from "#app/lib/gates/run-facts";
import type { Answer, Instant, Rung } from "#app/lib/gates/snapshot";
import { blocker, count, names, ownerOf, ownersAmong } from "#app/lib/gates/who";
import type { CrewRule, PositionKey } from "#app/lib/template/types";

export const POSITION_NAMES: Record<PositionKey, string> = {
  operator: "operator",
  runlead: "run lead",
  fireguard: "fire guard",
  areaguard: "area guard",
  observer: "observer",
  recorder: "recorder",
  swinger: "swinger",
};

/** Members of the newest plan, each once, in the order of the plan. */
export const crewOf = (run: RunFacts): string[] => [...new Set((run.plan?.positions ?? []).map((p) => p.member))];

/** The member's newest answer; of two at one instant the later recorded. */
export function newestAnswer(run: RunFacts, member: string): Answer | null {
  return run.run.answers.filter((a) => a.by === member).reduce<Answer | null>((m, a) => (!m || a.seq > m.seq ? a : m), null);
}

/** @returns what is wrong with the positions of the plan; `until` = when the first of the crew loses the last role. */
export function positionBlockers(facts: Facts, run: RunFacts, rung: Rung): Blocker[] {
  const out: Blocker[] = [];
  const positions = run.plan?.positions ?? [];
  const lead = () => ownerOf(facts, ["lead"]);
  const at = { page: "run" as const, id: run.run.id };
  for (const w of rung.crew.wanted) {
    const have = new Set(positions.filter((p) => p.position === w.position).map((p) => p.member)).size;
    if (have < w.count)
      out.push(
        blocker({
          code: "position-empty",
          subject: ["run", run.run.id],
          title: `No ${POSITION_NAMES[w.position]}`,
          sentence: `${count(w.count, POSITION_NAMES[w.position])} wanted, ${have} filled. The lead fills the place.`,
          owner: lead(),
          ...at,
        }),
      );
  }
  const crew = crewOf(run);
  if (crew.length < rung.crew.people)
    out.push(
      blocker({
        code: "people",
        subject: ["run", run.run.id],
        title: "Too few people",
        sentence: `${count(crew.length, "person", "people")} planned, this run needs ${rung.crew.people}.`,
        owner: lead(),
        ...at,
      }),
    );
  for (const member of crew) {
    if (!heldAnyRole(facts, member, facts.at))
      out.push(
        blocker({
          code: "not-active",
          subject: ["member", member],
          title: `${names(facts, [member])} is no longer a member`,
          sentence: "The lead fills the place with a member of this install.",
          owner: lead(),
          ...at,
        }),
      );
    const mine = [...new Set(positions.filter((p) => p.member === member).map((p) => p.position))];
    const bad = forbiddenPair(mine, rung.crew);
    if (bad)
      out.push(
        blocker({
          code: "pair",
          subject: ["member", member],
          title: `${names(facts, [member])} holds two places`,
          sentence: `${POSITION_NAMES[bad[0]]} and ${POSITION_NAMES[bad[1]]} cannot be one person on this run.`,
          owner: lead(),
          ...at,
        }),
      );
  }
  return out;
}

/** The first pair of positions that one person may not hold together; null = all pairs allowed. */
export function forbiddenPair(positions: PositionKey[], rule: CrewRule): [PositionKey, PositionKey] | null {
  for (const [n, a] of positions.entries())
    for (const b of positions.slice(n + 1)) if (!rule.mayAlso.some(([x, y]) => (x === a && y === b) || (x === b && y === a))) return [a, b];
  return null;
}

export function rollCallBlockers(facts: Facts, run: RunFacts): Blocker[] {
  const out: Blocker[] = [];
  const version = run.plan?.version ?? 0;
  const crew = crewOf(run);
  const own = (members: string[]) => ownersAmong(facts, members);
  const at = { page: "run" as const, id: run.run.id };
  const subject: ["run", string] = ["run", run.run.id];

  const noAck = crew.filter((m) => !run.run.acks.some((a) => a.by === m && a.version === version));
  if (noAck.length)
    out.push(
      blocker({
        code: "not-acknowledged",
        subject,
        title: `${count(noAck.length, "member")} have not read the card`.replace("1 member have", "1 member has"),
        sentence: `${names(facts, noAck)}: read the run card, version ${version}, and acknowledge it.`,
        owner: own(noAck),
        ...at,
      }),
    );

  const said = crew.map((m) => ({ m, answer: newestAnswer(run, m) }));
  for (const { m, answer } of said)
    if (answer?.answer === "no-go")
      out.push(
        blocker({
          code: "no-go",
          subject: ["member", m],
          title: `${names(facts, [m])} said no-go`,
          sentence: `${answer.reason || "No reason given"}. Clear it, then ask again.`,
          owner: own([m]),
          ...at,
        }),
      );
  const silent = said.filter(({ answer }) => answer?.answer !== "no-go" && !answerCounts(run, answer, version)).map((s) => s.m);
  if (silent.length)
    out.push(
      blocker({
        code: "no-answer",
        subject,
        title: `Roll call: ${count(crew.length - silent.length, "go")} of ${crew.length}`.replace("gos", "go"),
        sentence: `${names(facts, silent)}: answer the roll call${run.lastHold ? " (everyone again after a HOLD)" : ""}.`,
        owner: own(silent),
        ...at,
      }),
    );
  return out;
}

/** A go counts if it was said for this plan version, since the last HOLD, from a device with nothing left to send. */
export const answerCounts = (run: RunFacts, answer: Answer | null, version: number): boolean =>
  answer !== null &&
  answer.answer === "go" &&
  answer.version === version &&
  answer.queueEmpty &&
  answer.recorded >= (run.plan?.recorded ?? 0) &&
  (!run.lastHold || answer.seq > run.lastHold.seq);

/** When the first of the crew loses the last role, as far as is known now; null = nobody does. */
export function crewUntil(facts: Facts, run: RunFacts): Instant | null {
  let until: Instant | null = null;
  for (const member of crewOf(run)) {
    const ends = memberUntil(facts, member);
    if (ends !== null && (until === null || ends < until)) until = ends;
  }
  return until;
}

function memberUntil(facts: Facts, member: string): Instant | null {
  let until = facts.at;
  for (;;) {
    const now = (facts.members.get(member)?.roles ?? []).filter((r) => r.from <= until && (r.to === null || until < r.to));
    if (now.some((r) => r.to === null)) return null;
    if (!now.length) return until;
    until = Math.max(...now.map((r) => r.to as number));
  }
}
