/**
 * May this member do this now? Acts on findings, loose ends, openings, rungs and the review of a run.
 * Bad news (raising, sharpening) is taken from any member; who confirms, accepts or closes is another person than who did it.
 */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { nameOf } from "#app/lib/gates/facts";
import { needsMember, needsRole, no, notFound, OK } from "#app/lib/gates/permit";
import type { Verdict } from "#app/lib/gates/result";
import type { Finding, LooseEnd, Role } from "#app/lib/gates/snapshot";

type Own = {
  subject: ["finding" | "loose-end" | "run" | "rung" | "opening", string];
  page: "findings" | "loose-ends" | "run" | "build-up" | "openings";
  id: string;
};

const own = (e: Evaluation, at: Own, by: string, what: string, roles: [Role, ...Role[]]): Verdict =>
  no(e, {
    ...at,
    code: "own-work",
    title: "Your own work",
    sentence: `You ${what} it yourself: another person must look.`,
    roles,
    barred: [by],
  });

const order = (e: Evaluation, at: Own, title: string, sentence: string, roles: [Role, ...Role[]]): Verdict =>
  no(e, { ...at, code: "order", title, sentence, roles });

const already = (e: Evaluation, at: Own, title: string, sentence: string): Verdict =>
  no(e, { ...at, code: "already", title, sentence, roles: ["inspector"] });

// ---------------------------------------------------------------- findings

export const mayRaise = (e: Evaluation, a: { member: string }): Verdict => needsMember(e, a.member) ?? OK;

const atFinding = (id: string): Own => ({ subject: ["finding", id], page: "findings", id });
const findingOf = (e: Evaluation, id: string) => e.snapshot.findings.find((f) => f.id === id);
const closedAlready = (e: Evaluation, f: Finding): Verdict | null =>
  f.closed
    ? already(
        e,
        atFinding(f.id),
        "Closed already",
        `${nameOf(e.facts, f.closed.by)} closed it on ${e.facts.when(f.closed.recorded)}. Raise a new one if it is back.`,
      )
    : null;

/** A builder says what was done. */
export function mayFix(e: Evaluation, a: { finding: string; member: string }): Verdict {
  const f = findingOf(e, a.finding);
  if (!f) return notFound(e, "finding");
  const cannot = closedAlready(e, f) ?? needsRole(e, a.member, ["builder"], "mark a finding fixed");
  if (cannot) return cannot;
  return f.fixed
    ? already(e, atFinding(f.id), "Marked fixed already", "An inspector must look and close it, or say that it is not fixed.")
    : OK;
}

/** An inspector who did not fix it closes it, or says that it is not fixed. */
export function mayClose(e: Evaluation, a: { finding: string; member: string }): Verdict {
  const f = findingOf(e, a.finding);
  if (!f) return notFound(e, "finding");
  const cannot = closedAlready(e, f) ?? needsRole(e, a.member, ["inspector"], "close a finding");
  if (cannot) return cannot;
  if (!f.fixed) return order(e, atFinding(f.id), "Not marked fixed", "A builder says first what was done about it.", ["builder"]);
  return f.fixed.by === a.member ? own(e, atFinding(f.id), a.member, "fixed", ["inspector"]) : OK;
}

const weight = (severity: Finding["severity"], cap: number | null): number =>
  severity === "grounding" ? Number.POSITIVE_INFINITY : severity === "limiting" ? 1 / (1 + (cap ?? 0)) : 0;

/** Anyone may make a finding sharper; only an inspector lowers it. @param a.cap crankshaft speed, 1/s, on limiting. */
export function mayGrade(
  e: Evaluation,
  a: { finding: string; member: string; severity: Finding["severity"]; cap: number | null },
): Verdict {
  const f = findingOf(e, a.finding);
  if (!f) return notFound(e, "finding");
  const cannot = closedAlready(e, f) ?? needsMember(e, a.member);
  if (cannot) return cannot;
  if (a.severity === "limiting" && !(a.cap !== null && Number.isFinite(a.cap) && a.cap >= 0))
    return order(e, atFinding(f.id), "No speed given", "A limiting finding needs the highest speed that it allows, in rpm, 0 or more.", [
      "inspector",
    ]);
  return weight(a.severity, a.cap) >= weight(f.severity, f.cap) ? OK : (needsRole(e, a.member, ["inspector"], "lower a finding") ?? OK);
}

// ---------------------------------------------------------------- loose ends

const atLooseEnd = (id: string): Own => ({ subject: ["loose-end", id], page: "loose-ends", id });
const looseEndOf = (e: Evaluation, id: string) => e.snapshot.looseEnds.find((l) => l.id === id);
const restoredAlready = (e: Evaluation, l: LooseEnd): Verdict | null =>
  l.confirmed
    ? already(
        e,
        atLooseEnd(l.id),
        "Restored already",
        `${nameOf(e.facts, l.confirmed.by)} saw it restored on ${e.facts.when(l.confirmed.recorded)}.`,
      )
    : null;

export function mayRestore(e: Evaluation, a: { looseEnd: string; member: string }): Verdict {
  const l = looseEndOf(e, a.looseEnd);
  if (!l) return notFound(e, "loose end");
  const cannot = restoredAlready(e, l) ?? needsRole(e, a.member, ["builder", "inspector"], "restore a loose end");
  if (cannot) return cannot;
  return l.restored ? already(e, atLooseEnd(l.id), "Restored already", "A second person must look and confirm.") : OK;
}

/** The second person who saw it restored. */
export function mayConfirmRestored(e: Evaluation, a: { looseEnd: string; member: string }): Verdict {
  const l = looseEndOf(e, a.looseEnd);
  if (!l) return notFound(e, "loose end");
  const roles: [Role, ...Role[]] = ["builder", "inspector", "lead"];
  const cannot = restoredAlready(e, l) ?? needsRole(e, a.member, roles, "confirm as the second person");
  if (cannot) return cannot;
  if (!l.restored)
    return order(e, atLooseEnd(l.id), "Not restored yet", "Somebody restores it first, then a second person looks.", [
      "builder",
      "inspector",
    ]);
  return l.restored.by === a.member ? own(e, atLooseEnd(l.id), a.member, "restored", roles) : OK;
}

/** An inspector accepts it for the runs of one rung; not from its due rung on. */
export function mayAcceptLooseEnd(e: Evaluation, a: { looseEnd: string; member: string; rung: string }): Verdict {
  const l = looseEndOf(e, a.looseEnd);
  if (!l) return notFound(e, "loose end");
  const rung = e.facts.rungs.find((r) => r.key === a.rung);
  if (!rung) return notFound(e, "rung");
  const cannot = restoredAlready(e, l) ?? needsRole(e, a.member, ["inspector"], "accept a loose end");
  if (cannot) return cannot;
  if (l.by === a.member) return own(e, atLooseEnd(l.id), a.member, "made", ["inspector"]);
  const due = l.due.kind === "rung" ? l.due.rung : null;
  const from = due === null ? null : e.facts.rungs.find((r) => r.key === due);
  return from && rung.order >= from.order
    ? order(e, atLooseEnd(l.id), `Due before run ${from.key}`, `From run ${from.key} on it cannot be accepted. Restore it.`, [
        "builder",
        "inspector",
      ])
    : OK;
}

// ---------------------------------------------------------------- openings, rungs, review

export const mayOpen = (e: Evaluation, a: { member: string }): Verdict => needsMember(e, a.member) ?? OK;
export const mayCloseOpening = (e: Evaluation, a: { member: string }): Verdict =>
  needsRole(e, a.member, ["builder", "inspector"], "close an opening") ?? OK;

/** An inspector marks an opening as recorded by mistake. */
export function mayMarkMistake(e: Evaluation, a: { opening: string; member: string }): Verdict {
  const o = e.snapshot.openings.find((x) => x.id === a.opening);
  if (!o) return notFound(e, "opening");
  const cannot = needsRole(e, a.member, ["inspector"], "mark an opening as a mistake");
  if (cannot) return cannot;
  const at: Own = { subject: ["opening", o.id], page: "openings", id: o.id };
  if (o.by === a.member) return own(e, at, a.member, "recorded", ["inspector"]);
  return o.mistake ? already(e, at, "Marked already", "An inspector marked it as recorded by mistake before.") : OK;
}

/** The second person who looked: nothing was disturbed, as whoever recorded the opening says. */
export function mayConfirmUndisturbed(e: Evaluation, a: { opening: string; member: string }): Verdict {
  const o = e.snapshot.openings.find((x) => x.id === a.opening);
  if (!o) return notFound(e, "opening");
  const at: Own = { subject: ["opening", o.id], page: "openings", id: o.id };
  const roles: [Role, ...Role[]] = ["builder", "inspector", "lead"];
  const cannot = needsRole(e, a.member, roles, "confirm as the second person");
  if (cannot) return cannot;
  if (!o.undisturbed)
    return order(e, at, "It was disturbed", "Whoever recorded it did not say that nothing was disturbed. Prove the system again.", roles);
  if (o.undisturbed.confirmed)
    return already(
      e,
      at,
      "Confirmed already",
      `${nameOf(e.facts, o.undisturbed.confirmed.by)} confirmed it on ${e.facts.when(o.undisturbed.confirmed.recorded)}.`,
    );
  if (o.closed === null) return order(e, at, "Still open", "Close it first, then a second person looks.", ["builder", "inspector"]);
  return o.by === a.member ? own(e, at, a.member, "recorded", roles) : OK;
}

/** An inspector accepts that a rung is not run. */
export function mayLeaveOut(e: Evaluation, a: { rung: string; member: string }): Verdict {
  if (!e.facts.rungs.some((r) => r.key === a.rung)) return notFound(e, "rung");
  const cannot = needsRole(e, a.member, ["inspector"], "accept that a rung is left out");
  if (cannot) return cannot;
  return e.result.rungs[a.rung]?.settled
    ? already(e, { subject: ["rung", a.rung], page: "build-up", id: a.rung }, "Settled already", "This rung is settled.")
    : OK;
}

/** Lead or inspector sets a rung back: what it proved is no longer so (engine or propeller changed). */
export const maySetBack = (e: Evaluation, a: { rung: string; member: string }): Verdict =>
  e.facts.rungs.some((r) => r.key === a.rung)
    ? (needsRole(e, a.member, ["lead", "inspector"], "set a rung back") ?? OK)
    : notFound(e, "rung");

/** The log of an ended run was read, or (`missing`) an inspector accepts why there is none. */
export function mayReadLog(e: Evaluation, a: { run: string; member: string; missing: boolean }): Verdict {
  const run = e.facts.runs.get(a.run);
  if (!run) return notFound(e, "run");
  const cannot = a.missing
    ? needsRole(e, a.member, ["inspector"], "accept that there is no log")
    : needsRole(e, a.member, ["lead", "builder", "inspector"], "read the log");
  if (cannot) return cannot;
  const at: Own = { subject: ["run", a.run], page: "run", id: a.run };
  return run.endedAt === null ? order(e, at, "Not ended", "Report the run ended first.", ["lead"]) : OK;
}

/** An exceedance is answered by a finding, or by an inspector's words that it needs none. */
export function mayAnswerExceedance(e: Evaluation, a: { exceedance: string; member: string; finding: string | null }): Verdict {
  const run = e.snapshot.runs.find((r) => r.exceedances.some((x) => x.id === a.exceedance));
  const exceedance = run?.exceedances.find((x) => x.id === a.exceedance);
  if (!run || !exceedance) return notFound(e, "exceedance");
  const finding = a.finding === null ? null : findingOf(e, a.finding);
  if (finding === undefined) return notFound(e, "finding");
  const cannot =
    a.finding === null
      ? needsRole(e, a.member, ["inspector"], "answer an exceedance without a finding")
      : needsRole(e, a.member, ["builder", "inspector", "lead"], "answer an exceedance");
  if (cannot) return cannot;
  const place: Own = { subject: ["run", run.id], page: "run", id: run.id };
  if (exceedance.answered !== null) return already(e, place, "Answered already", "A record answers it.");
  const started = e.facts.runs.get(run.id)?.start?.recorded ?? Number.POSITIVE_INFINITY;
  return finding?.closed && finding.closed.recorded < started
    ? order(
        e,
        place,
        "Closed before the run",
        "That finding was closed before this run: raise a new one, or choose one that is about this run.",
        ["builder", "inspector"],
      )
    : OK;
}
