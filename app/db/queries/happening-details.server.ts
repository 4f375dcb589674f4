// What the pages of openings, loose ends and findings show beyond the snapshot: who closed and with which words, how many, why, photos.
import { asc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { findingEvents, findings } from "#app/db/schema/findings";
import { looseEnds } from "#app/db/schema/loose-ends";
import { openingClosings } from "#app/db/schema/openings";
import type { Finding, Instant } from "#app/lib/gates/snapshot";

/** By opening. */
export async function closingsOf(reader: Reader, installId: string): Promise<Record<string, { by: string; note: string }>> {
  const rows = await reader.select().from(openingClosings).where(eq(openingClosings.installId, installId));
  return Object.fromEntries(rows.map((r) => [r.openingId, { by: r.by, note: r.note }]));
}

/** By loose end. `askedBy` is an item's id. */
export async function looseEndDetails(
  reader: Reader,
  installId: string,
): Promise<Record<string, { count: number; why: string; askedBy: string | null }>> {
  const rows = await reader
    .select({ id: looseEnds.id, count: looseEnds.count, why: looseEnds.why, askedBy: looseEnds.askedBy })
    .from(looseEnds)
    .where(eq(looseEnds.installId, installId));
  return Object.fromEntries(rows.map(({ id, ...rest }) => [id, rest]));
}

export interface FindingDetail {
  photo: string | null;
  /** As it was raised; later severities are among the events. */
  severity: Finding["severity"];
  cap: number | null;
  /** In the order in which they were recorded. */
  events: {
    kind: "severity" | "fixed" | "not-fixed" | "closed";
    by: string;
    recorded: Instant;
    words: string;
    severity: Finding["severity"] | null;
    cap: number | null;
  }[];
}

/** By finding. */
export async function findingDetails(reader: Reader, installId: string): Promise<Record<string, FindingDetail>> {
  const [raised, happened] = await Promise.all([
    reader
      .select({ id: findings.id, photo: findings.photo, severity: findings.severity, cap: findings.cap })
      .from(findings)
      .where(eq(findings.installId, installId)),
    reader.select().from(findingEvents).where(eq(findingEvents.installId, installId)).orderBy(asc(findingEvents.seq)),
  ]);
  const details: Record<string, FindingDetail> = Object.fromEntries(raised.map(({ id, ...rest }) => [id, { ...rest, events: [] }]));
  for (const { findingId, kind, by, recorded, words, severity, cap } of happened)
    details[findingId]?.events.push({ kind, by, recorded, words, severity, cap });
  return details;
}
