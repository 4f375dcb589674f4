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

// ---------------------------------------------------------------- what counts

/** Words of a second person count only from one who could say them; nothing counts later than it was recorded. */
export function onlyWhatCounts(s: Snapshot): Snapshot {
  const copy = structuredClone(s);
  type Said = { by: string; as: Role; recorded: Instant } | null;
  const good = (said: Said, notBy: string | null, roles: Role[]) =>
    said !== null && said.by !== notBy && roles.includes(said.as) && heldRole(s, said.by, [said.as], said.recorded);
  for (const f of copy.findings) if (!good(f.closed, f.fixed?.by ?? null, ["inspector"])) f.closed = null;
  for (const l of copy.looseEnds) {
    if (!good(l.confirmed, l.restored?.by ?? null, ["builder", "lead", "inspector"])) l.confirmed = null;
    l.accepted = l.accepted.filter((a) => good(a, l.by, ["inspector"]));
  }
  for (const o of copy.openings) if (!good(o.mistake, o.by, ["inspector"])) o.mistake = null;
  // Where a second person saw, after it was closed, that nothing had been disturbed, it is as if it had never been.
  copy.openings = copy.openings.filter((o) => {
    const seen = o.undisturbed?.confirmed ?? null;
    const closedFirst = seen !== null && o.closed !== null && o.closed <= seen.recorded;
    return !(closedFirst && good(seen, o.by, ["builder", "lead", "inspector"]));
  });
  for (const r of copy.rungs) if (!good(r.leftOut, null, ["inspector"])) r.leftOut = null;
  for (const p of copy.proofs) p.counts = Math.min(p.counts, p.recorded);
  return copy;
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

/** An engine run that nobody started here stays cut short, whatever is said of it. */
export const isCompleted = (run: Run): boolean =>
  newestAct(run, "outcome")?.outcome === "completed" && newestAct(run, "start")?.unstarted !== true;

export function settlingRuns(s: Snapshot, key: string): Run[] {
  const rung = s.rungs.find((r) => r.key === key);
  if (!rung) return [];
  return s.runs
    .filter((run) => {
      const [plan, end] = [newestPlan(run), endOf(run)];
      if (run.rung !== key || plan === null || end === null || rung.rpm === null) return false;
      return isCompleted(run) && plan.rpm >= rung.rpm && rung.setBack.every((b) => end > b.recorded);
    })
    .sort((a, b) => (endOf(a) ?? 0) - (endOf(b) ?? 0));
}
export function isSettled(s: Snapshot, key: string): boolean {
  const leftOut = s.rungs.some(
    (r) => r.key === key && r.leftOut !== null && r.setBack.every((b) => b.recorded < (r.leftOut?.recorded ?? 0)),
  );
  return leftOut || settlingRuns(s, key).length > 0;
}
export const nextRung = (s: Snapshot) => [...s.rungs].sort((a, b) => a.order - b.order).find((r) => !isSettled(s, r.key)) ?? null;

export function defaultGates(s: Snapshot, rung: string | null): Gate[] {
  return presentGates(s).filter(
    ({ requiredBy: r }) => r.kind === "runs-and-release" || r.kind === "runs" || (r.kind === "rung-and-release" && r.rung === rung),
  );
}
export function requiredGates(s: Snapshot, run: Run): Gate[] {
  const planned = newestPlan(run)?.requiredGates ?? [];
  const today = defaultGates(s, run.rung);
  return presentGates(s).filter((g) => planned.includes(g.id) || today.includes(g));
}
/** What the next run requires, whichever comes first: every run that is planned and neither ended nor scrubbed, and the next rung. */
export function nextRequired(s: Snapshot): Gate[] {
  const open = s.runs.filter((r) => endOf(r) === null && !isScrubbed(r) && newestPlan(r) !== null);
  return [...defaultGates(s, nextRung(s)?.key ?? null), ...open.flatMap((run) => requiredGates(s, run))];
}
export const logIsDealtWith = (run: Run): boolean =>
  run.acts.some((a) => a.act === "log-read" || (a.act === "no-log" && a.as === "inspector")) &&
  run.exceedances.every((e) => e.answered !== null);
