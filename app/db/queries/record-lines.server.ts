// An install's record as lines of its chain, oldest first: for the Record page, the export and the check of the chain.
import { and, asc, desc, eq, gt } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { events } from "#app/db/schema/events";
import { FIRST, type Line } from "#app/lib/record/chain";
import { parseEvent, type RecordEvent } from "#app/lib/record/events";

/** At most `most` lines after number `after`. */
export async function recordLines(reader: Reader, installId: string, { after = 0, most = 100_000 } = {}): Promise<Line<RecordEvent>[]> {
  const rows = await reader
    .select({ body: events.body, prev: events.prev, hash: events.hash })
    .from(events)
    .where(and(eq(events.installId, installId), gt(events.seq, after)))
    .orderBy(asc(events.seq))
    .limit(most);
  return rows.map(({ body, prev, hash }) => ({ event: parseEvent(JSON.parse(body)), prev, hash }));
}

/** The same lines as they were hashed, for the export: the text of each event, and its hash. */
export function recordBodies(reader: Reader, installId: string): Promise<{ body: string; hash: string }[]> {
  return reader
    .select({ body: events.body, hash: events.hash })
    .from(events)
    .where(eq(events.installId, installId))
    .orderBy(asc(events.seq))
    .all();
}

/** Number, hash and instant of the newest line. */
export async function recordHead(reader: Reader, installId: string): Promise<{ seq: number; hash: string; recorded: number }> {
  const [row] = await reader
    .select({ seq: events.seq, hash: events.hash, recorded: events.recorded })
    .from(events)
    .where(eq(events.installId, installId))
    .orderBy(desc(events.seq))
    .limit(1);
  return row ?? { seq: 0, hash: FIRST, recorded: 0 };
}
