// Whether a GO still stands, by its acts alone: for a mail that waited, which must not tell of a GO that is over.
import { and, eq, gt, inArray } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { runActs } from "#app/db/schema/runs";

/** @param act id of the GO. True while its window is open and nothing came after it: no HOLD, SCRUB or start. */
export async function goStands(reader: Reader, act: string, at: number): Promise<boolean> {
  const [go] = await reader.select().from(runActs).where(eq(runActs.id, act));
  if (go?.act !== "go" || (go.detail as { ends: number }).ends <= at) return false;
  const after = await reader
    .select({ id: runActs.id })
    .from(runActs)
    .where(and(eq(runActs.runId, go.runId), gt(runActs.seq, go.seq), inArray(runActs.act, ["go", "hold", "scrub", "start", "take-back"])))
    .limit(1);
  return after.length === 0;
}
