/**
 * The snapshot as the rules may take it: what a second person must have said is dropped where that person could not say it. (That no
 * proof counts later than it was recorded is seen to where proofs are tied to their items.) The product's own acts never write such a record; an import, a repair
 * or a damaged file might, and a wrong "yes" must not come of it. Records come out in the order in which they were made.
 */
import type { Instant, Member, Recorded, Role, Snapshot } from "#app/lib/gates/snapshot";

const compare = (a: number, b: number): number => (a < b ? -1 : a > b ? 1 : 0);
const joined = (m: Member): Instant => m.roles.reduce((first, r) => Math.min(first, r.from), Number.POSITIVE_INFINITY);

/** @returns the same snapshot, sorted by `seq` (members by when they joined) and without what does not count. Does not change its input. */
export function soundSnapshot(s: Snapshot): Snapshot {
  const bySeq = <T extends { seq: number }>(rows: T[]) => [...rows].sort((a, b) => a.seq - b.seq);
  const byId = <T extends { id: string }>(rows: T[]) => [...rows].sort((a, b) => (a.id < b.id ? -1 : 1));
  const members = new Map(s.members.map((m) => [m.id, m]));
  const another = (r: Recorded | null | undefined, than: string | undefined, roles: Role[]): boolean =>
    !!r &&
    r.by !== than &&
    roles.includes(r.as) &&
    (members.get(r.by)?.roles.some((p) => p.role === r.as && p.from <= r.recorded && (p.to === null || r.recorded < p.to)) ?? false);
  const SECOND: Role[] = ["builder", "lead", "inspector"];
  return {
    ...s,
    members: [...s.members].sort((a, b) => compare(joined(a), joined(b)) || (a.id < b.id ? -1 : 1)),
    extinguishers: byId(s.extinguishers),
    runs: byId(s.runs),
    findings: bySeq(s.findings).map((f) => (f.closed && !another(f.closed, f.fixed?.by, ["inspector"]) ? { ...f, closed: null } : f)),
    looseEnds: bySeq(s.looseEnds).map((l) => ({
      ...l,
      confirmed: l.confirmed && another(l.confirmed, l.restored?.by, SECOND) ? l.confirmed : null,
      accepted: l.accepted.filter((a) => another(a, l.by, ["inspector"])),
    })),
    openings: bySeq(s.openings).map((o) => {
      const seen = o.undisturbed?.confirmed;
      const counts = seen && another(seen, o.by, SECOND) && o.closed !== null && o.closed <= seen.recorded;
      return {
        ...o,
        mistake: o.mistake && another(o.mistake, o.by, ["inspector"]) ? o.mistake : null,
        undisturbed: o.undisturbed && { confirmed: counts ? seen : null },
      };
    }),
    rungs: s.rungs.map((r) => (r.leftOut && !another(r.leftOut, undefined, ["inspector"]) ? { ...r, leftOut: null } : r)),
    values: [...s.values].sort((a, b) => Number(b.key === "redline") - Number(a.key === "redline") || (a.key < b.key ? -1 : 1)),
  };
}
