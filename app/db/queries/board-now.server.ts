// The board of an install as it is now, evaluated: what the loaders of its pages read.
import type { Reader } from "#app/db/client.server";
import { loadSnapshot } from "#app/db/queries/load-snapshot.server";
import { recordHead } from "#app/db/queries/record-lines.server";
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";

/** `clock` = now(); the board is judged then, but never before the newest record. Null where there is no such install; ask `memberOf` first who may see it. */
export async function boardNow(reader: Reader, installId: string, clock: number): Promise<Evaluation | null> {
  const head = await recordHead(reader, installId);
  const snapshot = await loadSnapshot(reader, installId);
  return snapshot && evaluate(snapshot, Math.max(clock, head.recorded));
}
