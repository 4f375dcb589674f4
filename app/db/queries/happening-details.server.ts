// What the pages of openings, loose ends and findings show beyond the snapshot: who closed and with which words, when it happened,
// how many, why, photos.
import { and, asc, eq, isNotNull } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { findingEvents, findings } from "#app/db/schema/findings";
import { looseEnds } from "#app/db/schema/loose-ends";
import { openingClosings, openings } from "#app/db/schema/openings";
import type { Finding, Instant } from "#app/lib/gates/snapshot";

export interface OpeningDetail {
  /** Who closed it, and what they noted. */
  closed: { by: string; note: string } | null;
  /** As a person typed it later. */
  happened: Instant | null;
  /** The loose end whose making or restoring it is. */
  looseEnd: string | null;
}

/** By opening. */
export async function openingDetails(reader: Reader, installId: string): Promise<Record<string, OpeningDetail>> {
  const [opened, closings] = await Promise.all([
    reader
      .select({ id: openings.id, happened: openings.happened, looseEnd: openings.looseEnd })
      .from(openings)
      .where(eq(openings.installId, installId)),
    reader.select().from(openingClosings).where(eq(openingClosings.installId, installId)),
  ]);
  const closed = new Map(closings.map(({ openingId, by, note }) => [openingId, { by, note }]));
  return Object.fromEntries(opened.map(({ id, ...rest }) => [id, { ...rest, closed: closed.get(id) ?? null }]));
}

export interface LooseEndDetail {
  count: number;
  why: string;
  /** An item's id. */
  askedBy: string | null;
  photos: string[];
  /** Openings by which it was made and restored, in that order. */
  openings: string[];
}

/** By loose end. */
export async function looseEndDetails(reader: Reader, installId: string): Promise<Record<string, LooseEndDetail>> {
  const [rows, opened] = await Promise.all([
    reader
      .select({ id: looseEnds.id, count: looseEnds.count, why: looseEnds.why, askedBy: looseEnds.askedBy, photos: looseEnds.photos })
      .from(looseEnds)
      .where(eq(looseEnds.installId, installId)),
    reader
      .select({ id: openings.id, looseEnd: openings.looseEnd })
      .from(openings)
      .where(and(eq(openings.installId, installId), isNotNull(openings.looseEnd)))
      .orderBy(asc(openings.seq)),
  ]);
  const of = (id: string) => opened.filter((o) => o.looseEnd === id).map((o) => o.id);
  return Object.fromEntries(rows.map(({ id, ...rest }) => [id, { ...rest, openings: of(id) }]));
}

export interface FindingDetail {
  photos: string[];
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
      .select({ id: findings.id, photo: findings.photo, morePhotos: findings.morePhotos, severity: findings.severity, cap: findings.cap })
      .from(findings)
      .where(eq(findings.installId, installId)),
    reader.select().from(findingEvents).where(eq(findingEvents.installId, installId)).orderBy(asc(findingEvents.seq)),
  ]);
  const details: Record<string, FindingDetail> = Object.fromEntries(
    raised.map(({ id, photo, morePhotos, ...rest }) => [
      id,
      { ...rest, photos: photo === null ? morePhotos : [photo, ...morePhotos], events: [] },
    ]),
  );
  for (const { findingId, kind, by, recorded, words, severity, cap } of happened)
    details[findingId]?.events.push({ kind, by, recorded, words, severity, cap });
  return details;
}
