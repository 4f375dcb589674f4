// What the crib's page shows beyond the snapshot: serial numbers.
import { eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { tools } from "#app/db/schema/crib";

/** Serial numbers by tool id; empty where none was entered. */
export async function serialsOf(reader: Reader, installId: string): Promise<Record<string, string>> {
  const rows = await reader.select({ id: tools.id, serial: tools.serial }).from(tools).where(eq(tools.installId, installId));
  return Object.fromEntries(rows.map((r) => [r.id, r.serial]));
}
