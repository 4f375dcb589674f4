// The board of an install as it is now, evaluated: what the loaders of its pages read.
import type { Reader } from "#app/db/client.server";
import { type Head, snapshotNow } from "#app/db/queries/snapshot-cache.server";
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";

/** `clock` = now(); the board is judged then, but never before its newest record. Null: no such install. Ask `memberOf` who may see it. */
export async function boardNow(reader: Reader, installId: string, clock: number): Promise<{ e: Evaluation; head: Head } | null> {
  const found = await snapshotNow(reader, installId);
  return found && { e: evaluate(found.snapshot, Math.max(clock, found.head.recorded)), head: found.head };
}
