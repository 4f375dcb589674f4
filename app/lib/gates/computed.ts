/** Items that nobody ticks: extinguishers, loose ends, the engine log, and the release's own conditions. Judged at `facts.at`. */
import { allItems, disturbs, type Facts } from "#app/lib/gates/facts";
import type { Blocker, BlockerCode, ItemResult } from "#app/lib/gates/result";
import type { Gate, Instant, Item, LooseEnd, Role, SystemKey } from "#app/lib/gates/snapshot";
import { blocker, count, ownerOf } from "#app/lib/gates/who";
import { isComputed } from "#app/lib/gates/work-facts";

/** A reason why a computed item does not stand. */
export type Lack = {
  code: BlockerCode;
  sentence: string;
  roles: [Role, ...Role[]];
  barred?: string[];
  page: Blocker["link"]["page"];
  id?: string | null;
};
type Judged = { no: Lack[]; until: Instant | null };

/** @returns the state of a computed item: `done` or `to do`, with its blockers and the instant at which time alone ends it. */
export function computedItem(facts: Facts, gate: Gate, item: Item): ItemResult {
  const part = item.parts.find((p) => p.kind === "computed");
  const judged = part?.kind === "computed" ? judge(facts, gate, part.rule) : { no: [], until: null };
  const blockers = judged.no.map((f) =>
    blocker({
      code: f.code,
      subject: ["item", item.id],
      title: item.words,
      sentence: f.sentence,
      owner: ownerOf(facts, f.roles, f.barred),
      page: f.page,
      id: f.id ?? null,
      item: item.id,
    }),
  );
  const stands = blockers.length === 0;
  return { id: item.id, state: stands ? "done" : "to do", stands, until: stands ? judged.until : null, proof: null, blockers };
}

function judge(facts: Facts, gate: Gate, rule: string): Judged {
  if (rule === "extinguishers") return extinguishers(facts);
  if (rule === "loose-ends") return looseEnds(facts);
  if (rule === "log") return { no: logFindings(facts, gate.lookBack?.kind === "run" ? gate.lookBack.run : null), until: null };
  if (rule === "release-record") return { no: releaseRecord(facts), until: null };
  return { no: releaseOpenings(facts), until: null };
}

/**
 * Two or more class B extinguishers in date, one of them CO2 of at least 5 lb or a clean agent, none of water
 * (FAA-H-8083-30: CO2 of 5 lb at every start; looked at monthly and serviced yearly: NFPA 10).
 */
function extinguishers(facts: Facts): Judged {
  const LEAST_CO2 = 5 * 0.45359237;
  const ends = facts.snapshot.extinguishers
    .filter((x) => !x.withdrawn && x.classB && x.agent !== "water" && x.lookDue !== null && x.serviceDue !== null)
    .map((x) => ({ x, until: Math.min(x.lookDue as Instant, x.serviceDue as Instant) }))
    .filter((e) => facts.at < e.until)
    .sort((a, b) => b.until - a.until);
  // 5 lb as stamped on the bottle is often written 2.27 kg: a gram of rounding must not stop a run.
  const first = ends.filter((e) => e.x.agent === "clean" || (e.x.agent === "co2" && e.x.charge >= LEAST_CO2 - 0.005));
  const no: Lack[] = [];
  if (ends.length < 2 || !first.length)
    no.push({
      code: "extinguishers",
      sentence: `${count(ends.length, "class B extinguisher")} in date, 2 are needed${first.length ? "" : ", one of them CO2 of 5 lb (2.27 kg) or a clean agent"}. Enter its monthly look and yearly service in the crib.`,
      roles: ["builder", "lead"],
      page: "crib",
    });
  return { no, until: no.length ? null : Math.min(ends[1]?.until as Instant, first[0]?.until as Instant) };
}

/** Loose ends not restored, and not accepted for the next rung. */
function looseEnds(facts: Facts): Judged {
  const rung = facts.nextRung?.key ?? null;
  const no = facts.snapshot.looseEnds
    .filter((l) => !l.confirmed && !acceptedFor(facts, l, rung))
    .map(
      (l): Lack => ({
        code: "loose-end",
        ...looseEndSaid(l),
        page: "loose-ends",
        id: l.id,
      }),
    );
  return { no, until: null };
}

/** What to do about the first of `all` loose ends, and who may. */
function looseEndSaid(l: LooseEnd, all = 1): Pick<Lack, "sentence" | "roles" | "barred"> {
  const more = all > 1 ? `${count(all, "loose end")}, first: ` : "Loose end ";
  return l.restored
    ? {
        sentence: `${more}restored but not seen: ${l.what}. A second person must look and confirm.`,
        roles: ["builder", "inspector", "lead"],
        barred: [l.restored.by],
      }
    : { sentence: `${more}not restored: ${l.what}. Restore it, and have a second person confirm it.`, roles: ["builder", "inspector"] };
}

/** An inspector accepted the loose end for the rung. From its due rung on that counts no more: it must be restored. */
export function acceptedFor(facts: Facts, end: LooseEnd, rung: string | null): boolean {
  if (rung === null || !end.accepted.some((a) => a.as === "inspector" && a.rung === rung)) return false;
  if (end.due.kind !== "rung") return true;
  const orderOf = (key: string) => facts.rungs.find((r) => r.key === key)?.order ?? Number.NEGATIVE_INFINITY;
  return orderOf(rung) < orderOf(end.due.rung);
}

function logFindings(facts: Facts, runId: string | null): Lack[] {
  const run = runId ? facts.runs.get(runId) : undefined;
  const no: Lack[] = [];
  if (!run || run.endedAt === null)
    return [{ code: "run-not-ended", sentence: "The run has not ended yet.", roles: ["lead"], page: "run", id: runId }];
  if (!run.logRead && run.noLog?.as !== "inspector")
    no.push({
      code: "log-missing",
      sentence: "The engine log has not been read. Bring it in, or have an inspector accept why there is none.",
      roles: ["builder", "inspector"],
      page: "run",
      id: runId,
    });
  const open = run.run.exceedances.filter((x) => x.answered === null);
  if (open.length)
    no.push({
      code: "exceedance",
      sentence: `${count(open.length, "exceedance")} not answered: ${open[0]?.sentence}. Answer each by a record.`,
      roles: ["builder", "inspector"],
      page: "run",
      id: runId,
    });
  return no;
}

/** Nothing open, and every limit and every band of a marked item confirmed with a source. */
export function releaseRecord(facts: Facts): Lack[] {
  const no: Lack[] = [];
  const findings = facts.snapshot.findings.filter((f) => !f.closed);
  if (findings.length)
    no.push({
      code: "finding-open",
      sentence: `${count(findings.length, "finding")} not closed: ${findings[0]?.words}. ${findings[0]?.fixed ? "An inspector must look and close it." : "A builder fixes it and says how, then an inspector closes it."}`,
      roles: [findings[0]?.fixed ? "inspector" : "builder"],
      barred: findings[0]?.fixed ? [findings[0].fixed.by] : [],
      page: "findings",
    });
  const loose = facts.snapshot.looseEnds.filter((l) => !l.confirmed);
  if (loose[0])
    no.push({
      code: "loose-end",
      ...looseEndSaid(loose[0], loose.length),
      page: "loose-ends",
    });
  const values = facts.snapshot.values.filter((v) => (v.limit || v.card) && (v.value === null || v.source === null));
  if (values.length)
    no.push({
      code: "unconfirmed",
      sentence: `${count(values.length, "limit")} not confirmed with a source: ${values[0]?.label}.`,
      roles: ["lead", "builder"],
      page: "set-up",
    });
  const killers = allItems(facts).filter((i) => i.killer && !isComputed(i) && i.parts.some(defaultBand));
  if (killers.length)
    no.push({
      code: "unconfirmed",
      sentence: `${count(killers.length, "band")} of a marked item still a default: ${killers[0]?.words}. Enter where it was read.`,
      roles: ["lead", "builder"],
      page: "gate",
      id: killers[0]?.gate ?? null,
    });
  return no;
}

function defaultBand(part: Item["parts"][number]): boolean {
  if (part.kind === "measure" || part.kind === "torque") return part.criterion.source === null;
  return part.kind === "tick" && part.reference !== undefined && part.reference.source === null;
}

const RELEASE_SYSTEMS: SystemKey[] = ["fuelsup", "fueleng", "oil", "oilfill", "coolant", "drive", "prop"];

/** Nothing that holds a fluid or turns was opened since the engine last ran: what was opened is proved tight only by a run. */
export function releaseOpenings(facts: Facts): Lack[] {
  const since = facts.newestEnd ?? Number.NEGATIVE_INFINITY;
  return facts.snapshot.openings
    .filter(
      (o) =>
        disturbs(o) &&
        o.mistake?.as !== "inspector" &&
        o.systems.some((s) => RELEASE_SYSTEMS.includes(s)) &&
        (o.closed === null || o.closed >= since),
    )
    .map(
      (o): Lack => ({
        code: "opening-since-run",
        sentence: `Opened ${facts.when(o.opened)} and not run since: ${o.reason}. Add the leak check run, or have an inspector mark a mistaken record.`,
        roles: ["lead", "inspector"],
        page: "openings",
        id: o.id,
      }),
    );
}
