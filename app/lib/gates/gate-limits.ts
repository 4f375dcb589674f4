/** Which gates a run requires, what a gate waits for, and the newer-than rules that a gate puts on its proofs. */
import type { Facts } from "#app/lib/gates/facts";
import type { GateLimits } from "#app/lib/gates/items";
import type { RunFacts } from "#app/lib/gates/run-facts";
import type { Gate, Instant, Rung } from "#app/lib/gates/snapshot";
import { isComputed } from "#app/lib/gates/work-facts";

/** Gates that a run of the rung requires where no plan says otherwise. `rung` null = all rungs are settled. */
export function defaultRequired(facts: Facts, rung: Rung | null): string[] {
  const wanted = (g: Gate) =>
    g.requiredBy.kind === "runs-and-release" ||
    g.requiredBy.kind === "runs" ||
    (g.requiredBy.kind === "rung-and-release" && g.requiredBy.rung === rung?.key);
  return [...facts.gates.values()].filter(wanted).map((g) => g.id);
}

const isOpen = (r: RunFacts): boolean => r.plan !== null && !r.scrub && r.endedAt === null;

/** Runs of the next rung that are planned and neither ended nor scrubbed, newest plan first. */
export function plannedNext(facts: Facts): RunFacts[] {
  const open = [...facts.runs.values()].filter((r) => r.run.rung === facts.nextRung?.key && isOpen(r));
  return open.sort((a, b) => (b.plan?.recorded ?? 0) - (a.plan?.recorded ?? 0) || (a.run.id < b.run.id ? -1 : 1));
}

/** Ids of the gates that the run requires: those of its plan and those that its rung asks for today. */
export function requiredBy(facts: Facts, run: RunFacts | null, rung: Rung | null): string[] {
  const today = defaultRequired(facts, rung);
  if (!run?.plan) return today;
  // A gate that came onto the board since the plan was made is asked at once.
  return [...new Set([...run.plan.requiredGates.filter((id) => facts.gates.has(id)), ...today])];
}

/**
 * What each gate waits for. A walk-round waits for all other gates that the next run requires; where other runs are planned beside
 * it (another attempt, a settled rung once more), for theirs too: it is the walk-round of whichever comes first.
 */
export function prerequisites(facts: Facts): Map<string, string[]> {
  const next = [
    ...requiredBy(facts, null, facts.nextRung),
    ...[...facts.runs.values()].filter(isOpen).flatMap((r) => requiredBy(facts, r, facts.rungs.find((g) => g.key === r.run.rung) ?? null)),
  ];
  const all = new Map<string, string[]>();
  for (const { gate, edges } of facts.gateFacts.values()) {
    const own = edges.all;
    all.set(gate.id, gate.eachRun ? [...new Set([...own, ...next])].filter((id) => id !== gate.id) : own);
  }
  return all;
}

/**
 * Gates in an order in which each comes after what it waits for; what is left over waits in a circle.
 * (The product refuses an edit that closes a circle; data that has one all the same must not hang or stand.)
 */
export function inOrder(ids: string[], before: (id: string) => readonly string[]): { order: string[]; circle: string[] } {
  const place = new Map<string, number>();
  for (const id of ids) place.set(id, place.size);
  const waiting = new Int32Array(ids.length);
  const feeds: (number[] | undefined)[] = new Array(ids.length);
  const order: string[] = [];
  for (let n = 0; n < ids.length; n++) {
    for (const other of before(ids[n] as string)) {
      const from = place.get(other);
      if (from === undefined) continue;
      waiting[n] = (waiting[n] as number) + 1;
      const list = feeds[from];
      if (list) list.push(n);
      else feeds[from] = [n];
    }
    if (waiting[n] === 0) order.push(ids[n] as string);
  }
  for (let n = 0; n < order.length; n++)
    for (const target of feeds[place.get(order[n] as string) as number] ?? []) {
      waiting[target] = (waiting[target] as number) - 1;
      if (waiting[target] === 0) order.push(ids[target] as string);
    }
  return { order, circle: order.length === ids.length ? [] : ids.filter((_, n) => (waiting[n] as number) > 0) };
}

/** Newest happening in a gate: any proof (withdrawn or not) and any signature. */
export function newestWork(facts: Facts, gate: string): Instant | null {
  let newest: Instant | null = null;
  const take = (at: Instant) => {
    if (newest === null || at > newest) newest = at;
  };
  const work = facts.gateFacts.get(gate);
  for (const { newest: last } of work?.items ?? []) if (last) take(last.counts);
  for (const s of work?.signatures ?? []) take(s.recorded);
  return newest;
}

/** The newer-than rules of a gate. `work` is the memo of `newestWork`. */
export function gateLimits(facts: Facts, gate: Gate, waitsFor: string[], work: (gate: string) => Instant | null): GateLimits {
  return { ...newerThan(facts, gate, waitsFor, work), after: afterLimits(facts, gate) };
}

function newerThan(
  facts: Facts,
  gate: Gate,
  waitsFor: string[],
  work: (gate: string) => Instant | null,
): Pick<GateLimits, "newerThan" | "noRunYet"> {
  if (gate.lookBack) {
    const id = gate.lookBack.kind === "run" ? gate.lookBack.run : facts.settledBy.get(gate.lookBack.rung);
    const end = id ? facts.runs.get(id)?.endedAt : null;
    if (end === null || end === undefined) {
      const leftOut = gate.lookBack.kind === "rung" && facts.settledBy.has(gate.lookBack.rung);
      const sentence = leftOut
        ? "The run that it looks back on was left out. Mark it not applicable with that reason, and have an inspector accept it."
        : "It looks back on a run that has not ended yet.";
      return { newerThan: null, noRunYet: { code: "run-not-ended", sentence, roles: [leftOut ? "builder" : "lead"] } };
    }
    return {
      newerThan: {
        at: end,
        cause: { code: "run-since", sentence: `The run ended on ${facts.when(end)}, after this was seen. Look again.` },
      },
      noRunYet: null,
    };
  }
  const end = facts.newestEnd;
  const runCause =
    end === null
      ? null
      : {
          at: end,
          cause: { code: "run-since" as const, sentence: `A run ended on ${facts.when(end)}, after this was done. Do it again.` },
        };
  if (gate.requiredBy.kind === "release" && !gate.eachRun) return { newerThan: runCause, noRunYet: null };
  if (!gate.eachRun) return { newerThan: null, noRunYet: null };
  let limit: GateLimits["newerThan"] = runCause;
  // An engine or propeller was changed: the next run may ask for less, but not for a look from before the change.
  for (const { at, name } of facts.rungs.flatMap((r) => r.setBack.map((s) => ({ at: s.recorded, name: r.name }))))
    if (limit === null || at > limit.at)
      limit = { at, cause: { code: "run-since", sentence: `${name} was set back on ${facts.when(at)}, after this. Walk round again.` } };
  const lookBacks = [...facts.gates.values()].filter((g) => g.lookBack).map((g) => g.id);
  for (const id of new Set([...waitsFor, ...lookBacks])) {
    const at = id === gate.id ? null : work(id);
    if (at !== null && (limit === null || at > limit.at))
      limit = {
        at,
        cause: {
          code: "after-gate",
          sentence: `${facts.gates.get(id)?.name} was worked or signed on ${facts.when(at)}, after this. Walk round again.`,
        },
      };
  }
  return { newerThan: limit, noRunYet: null };
}

const NO_LIMITS: GateLimits["after"] = new Map();

function afterLimits(facts: Facts, gate: Gate): GateLimits["after"] {
  const after = facts.gateFacts.get(gate.id)?.edges.after ?? [];
  if (!after.length) return NO_LIMITS;
  const limits = new Map<string, { at: Instant; gate: string }>();
  for (const id of after)
    for (const { item, newest: proof } of facts.gateFacts.get(id)?.items ?? []) {
      if (item.step || isComputed(item)) continue;
      // Withdrawn or not: taking a proof back must never let a later one count again.
      if (!proof || proof.state === "na") continue;
      for (const system of item.systems) {
        const known = limits.get(system);
        if (!known || proof.counts > known.at) limits.set(system, { at: proof.counts, gate: id });
      }
    }
  return limits;
}
