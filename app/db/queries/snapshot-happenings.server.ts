// The snapshot's openings, loose ends, findings and crib, each folded from the records that point at it. One query a table.
import { asc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { groupBy } from "#app/db/queries/group-by";
import { recorded } from "#app/db/queries/snapshot-records.server";
import { extinguisherChecks, extinguishers, toolChecks, tools } from "#app/db/schema/crib";
import { findingEvents, findings } from "#app/db/schema/findings";
import { looseEndEvents, looseEnds } from "#app/db/schema/loose-ends";
import { openingClosings, openingMistakes, openings, openingUndisturbed } from "#app/db/schema/openings";
import type { Finding, LooseEnd, Snapshot } from "#app/lib/gates/snapshot";

type Loaded = Pick<Snapshot, "openings" | "looseEnds" | "findings" | "tools" | "extinguishers">;

export async function loadHappenings(reader: Reader, installId: string): Promise<Loaded> {
  const [opened, closings, mistakes, seen, ends, endEvents, found, foundEvents, toolRows, checks, bottles, looks] = await Promise.all([
    reader.select().from(openings).where(eq(openings.installId, installId)).orderBy(asc(openings.seq)),
    reader.select().from(openingClosings).where(eq(openingClosings.installId, installId)),
    reader.select().from(openingMistakes).where(eq(openingMistakes.installId, installId)),
    reader.select().from(openingUndisturbed).where(eq(openingUndisturbed.installId, installId)),
    reader.select().from(looseEnds).where(eq(looseEnds.installId, installId)).orderBy(asc(looseEnds.seq)),
    reader.select().from(looseEndEvents).where(eq(looseEndEvents.installId, installId)).orderBy(asc(looseEndEvents.seq)),
    reader.select().from(findings).where(eq(findings.installId, installId)).orderBy(asc(findings.seq)),
    reader.select().from(findingEvents).where(eq(findingEvents.installId, installId)).orderBy(asc(findingEvents.seq)),
    reader.select().from(tools).where(eq(tools.installId, installId)).orderBy(asc(tools.name), asc(tools.id)),
    reader.select().from(toolChecks).where(eq(toolChecks.installId, installId)).orderBy(asc(toolChecks.seq)),
    reader
      .select()
      .from(extinguishers)
      .where(eq(extinguishers.installId, installId))
      .orderBy(asc(extinguishers.name), asc(extinguishers.id)),
    reader
      .select()
      .from(extinguisherChecks)
      .where(eq(extinguisherChecks.installId, installId))
      .orderBy(asc(extinguisherChecks.at), asc(extinguisherChecks.seq)),
  ]);
  const closed = new Map(closings.map((c) => [c.openingId, c.closed]));
  const mistaken = new Map(mistakes.map((m) => [m.openingId, { ...recorded(m), reason: m.reason }]));
  const confirmed = new Map(seen.map((s) => [s.openingId, recorded(s)]));
  const eventsOfEnd = groupBy(endEvents, (e) => e.looseEndId);
  const eventsOfFinding = groupBy(foundEvents, (e) => e.findingId);
  const checksOf = groupBy(checks, (c) => c.toolId);
  const looksAt = groupBy(looks, (l) => l.extinguisherId);
  return {
    openings: opened.map((o) => ({
      ...recorded(o),
      systems: o.systems,
      reason: o.reason,
      opened: o.opened,
      closed: closed.get(o.id) ?? null,
      mistake: mistaken.get(o.id) ?? null,
      undisturbed: o.claimed ? { confirmed: confirmed.get(o.id) ?? null } : null,
    })),
    looseEnds: ends.map((l) => foldLooseEnd(l, eventsOfEnd.get(l.id) ?? [])),
    findings: found.map((f) => foldFinding(f, eventsOfFinding.get(f.id) ?? [])),
    tools: toolRows.map((t) => ({
      id: t.id,
      name: t.name,
      checks: (checksOf.get(t.id) ?? []).map(({ id, at, good, due, since }) => ({ id, at, good, due, since })),
    })),
    extinguishers: bottles.map(({ id, name, agent, classB, charge }) => {
      const mine = looksAt.get(id) ?? [];
      const due = (kind: "look" | "service") => mine.filter((l) => l.kind === kind).at(-1)?.due ?? null;
      return {
        id,
        name,
        agent,
        classB,
        charge,
        lookDue: due("look"),
        serviceDue: due("service"),
        withdrawn: mine.some((l) => l.kind === "withdrawn"),
      };
    }),
  };
}

function foldLooseEnd(row: typeof looseEnds.$inferSelect, events: (typeof looseEndEvents.$inferSelect)[]): LooseEnd {
  const one = (kind: "restored" | "confirmed") => {
    const event = events.filter((e) => e.kind === kind).at(-1);
    return event ? recorded(event) : null;
  };
  const accepted = events.filter((e) => e.kind === "accepted").map((e) => ({ ...recorded(e), rung: e.rung ?? "", reason: e.reason ?? "" }));
  return {
    ...recorded(row),
    what: row.what,
    system: row.system,
    due: row.due,
    restored: one("restored"),
    confirmed: one("confirmed"),
    accepted,
  };
}

function foldFinding(row: typeof findings.$inferSelect, events: (typeof findingEvents.$inferSelect)[]): Finding {
  const finding: Finding = {
    ...recorded(row),
    system: row.system,
    words: row.words,
    severity: row.severity,
    cap: row.cap,
    fixed: null,
    closed: null,
  };
  for (const e of events) {
    if (e.kind === "severity" && e.severity) Object.assign(finding, { severity: e.severity, cap: e.cap });
    else if (e.kind === "fixed") finding.fixed = { ...recorded(e), action: e.words };
    else if (e.kind === "not-fixed") finding.fixed = null;
    else if (e.kind === "closed") finding.closed = recorded(e);
  }
  return finding;
}
