/**
 * Facts of the board and of its runs for the second evaluator: who held which role, what is on the board, which edges lead where,
 * which runs count. Plain loops, no caches.
 */
import type { Gate, Instant, Item, Role, Run, RunAct, Snapshot } from "#app/lib/gates/snapshot";

export const bySeq = <T extends { seq: number }>(list: T[]): T[] => [...list].sort((a, b) => a.seq - b.seq);

export function heldRole(s: Snapshot, member: string, roles: Role[], at: Instant): boolean {
  const roleNow = s.members.find((m) => m.id === member)?.roles.filter((r) => r.from <= at && (r.to === null || at < r.to)) ?? [];
  return roleNow.some((r) => roles.includes(r.role));
}

// ---------------------------------------------------------------- what is on the board

export const itemsOf = (s: Snapshot, gate: Gate): Item[] => s.items.filter((i) => i.gate === gate.id && !i.hidden);
export const isPresent = (s: Snapshot, gate: Gate): boolean => !gate.hidden && itemsOf(s, gate).length > 0;
export const presentGates = (s: Snapshot): Gate[] => s.gates.filter((g) => isPresent(s, g));
export const isComputed = (item: Item): boolean => item.parts.some((p) => p.kind === "computed");

/** Gates at the far end of these edges: an absent gate passes them on to whatever it needs or comes after. */
export function throughAbsent(s: Snapshot, ids: string[], path: string[] = []): string[] {
  const found: string[] = [];
  for (const id of ids) {
    const gate = s.gates.find((g) => g.id === id);
    if (!gate || path.includes(id)) continue;
    if (isPresent(s, gate)) found.push(id);
    else found.push(...throughAbsent(s, [...gate.needs, ...gate.after], [...path, id]));
  }
  return [...new Set(found)];
}

// ---------------------------------------------------------------- runs, as far as proofs ask for them

type Act<K extends RunAct["act"]> = Extract<RunAct, { act: K }>;

export function newestAct<K extends RunAct["act"]>(run: Run, ...kinds: K[]): Act<K> | null {
  return (
    (bySeq(run.acts)
      .filter((a) => (kinds as string[]).includes(a.act))
      .at(-1) as Act<K> | undefined) ?? null
  );
}
export const isStarted = (run: Run): boolean => newestAct(run, "start", "take-back")?.act === "start";
export const endOf = (run: Run): Instant | null => (isStarted(run) ? (newestAct(run, "ended")?.at ?? null) : null);
export const isScrubbed = (run: Run): boolean => !isStarted(run) && newestAct(run, "scrub") !== null;
export const newestPlan = (run: Run) => [...run.plans].sort((a, b) => a.version - b.version).at(-1) ?? null;

export function settlingRuns(s: Snapshot, key: string): Run[] {
  const rung = s.rungs.find((r) => r.key === key);
  if (!rung) return [];
  return s.runs
    .filter((run) => {
      const [plan, end] = [newestPlan(run), endOf(run)];
      if (run.rung !== key || plan === null || end === null || rung.rpm === null) return false;
      const completed = newestAct(run, "outcome")?.outcome === "completed";
      return completed && plan.rpm >= rung.rpm && rung.setBack.every((b) => end > b.recorded);
    })
    .sort((a, b) => (endOf(a) ?? 0) - (endOf(b) ?? 0));
}
export function isSettled(s: Snapshot, key: string): boolean {
  return s.rungs.some((r) => r.key === key && r.leftOut !== null) || settlingRuns(s, key).length > 0;
}
export const nextRung = (s: Snapshot) => [...s.rungs].sort((a, b) => a.order - b.order).find((r) => !isSettled(s, r.key)) ?? null;

export function defaultGates(s: Snapshot, rung: string | null): Gate[] {
  return presentGates(s).filter(
    ({ requiredBy: r }) => r.kind === "runs-and-release" || r.kind === "runs" || (r.kind === "rung-and-release" && r.rung === rung),
  );
}
export function requiredGates(s: Snapshot, run: Run): Gate[] {
  const plan = newestPlan(run);
  return plan === null ? defaultGates(s, run.rung) : presentGates(s).filter((g) => plan.requiredGates.includes(g.id));
}
/** What the next run requires: the plans of the runs of the next rung that are neither ended nor scrubbed, else the default. */
export function nextRequired(s: Snapshot): Gate[] {
  const rung = nextRung(s);
  const open = s.runs.filter((r) => rung !== null && r.rung === rung.key && endOf(r) === null && !isScrubbed(r) && newestPlan(r) !== null);
  return open.length > 0 ? open.flatMap((run) => requiredGates(s, run)) : defaultGates(s, rung?.key ?? null);
}
export const logIsDealtWith = (run: Run): boolean =>
  run.acts.some((a) => a.act === "log-read" || (a.act === "no-log" && a.as === "inspector")) &&
  run.exceedances.every((e) => e.answered !== null);
