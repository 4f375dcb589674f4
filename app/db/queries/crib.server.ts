// What the crib's page shows beyond the snapshot: serial numbers, the newest checks with their certificates, labels and places.
import { asc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { extinguishers, toolChecks, tools } from "#app/db/schema/crib";

export interface CribTold {
  /** By tool; empty where none was entered. */
  serials: Record<string, string>;
  /** By check. */
  checks: Record<string, { certificate: string; photo: string | null; note: string; by: string }>;
  /** By extinguisher. */
  bottles: Record<string, { rating: string; position: string }>;
}

export async function cribTold(reader: Reader, installId: string): Promise<CribTold> {
  const [toolRows, checkRows, bottleRows] = await Promise.all([
    reader.select({ id: tools.id, serial: tools.serial }).from(tools).where(eq(tools.installId, installId)),
    reader.select().from(toolChecks).where(eq(toolChecks.installId, installId)).orderBy(asc(toolChecks.seq)),
    reader
      .select({ id: extinguishers.id, rating: extinguishers.rating, position: extinguishers.position })
      .from(extinguishers)
      .where(eq(extinguishers.installId, installId)),
  ]);
  return {
    serials: Object.fromEntries(toolRows.map((r) => [r.id, r.serial])),
    checks: Object.fromEntries(checkRows.map(({ id, certificate, photo, note, by }) => [id, { certificate, photo, note, by }])),
    bottles: Object.fromEntries(bottleRows.map(({ id, ...rest }) => [id, rest])),
  };
}
