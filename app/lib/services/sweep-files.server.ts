// Bytes that no row names: left by a crash between writing them and recording the act, or by an act that was refused. A day is kept
// between, for an act may still be on its way.
import { db } from "#app/db/client.server";
import { files } from "#app/db/schema/files";
import { now } from "#app/lib/clock";
import { byteStore, FILES, hashIn, THUMBS } from "#app/lib/storage/files.server";

const KEPT_FOR = 24 * 3600_000;

/** Returns how many were removed. */
export async function sweepFiles(): Promise<number> {
  const store = await byteStore();
  const before = now() - KEPT_FOR;
  const named = new Set((await db().selectDistinct({ hash: files.hash }).from(files)).map((f) => f.hash));
  let removed = 0;
  for (const prefix of [FILES, THUMBS])
    for await (const { key, changed } of store.list(prefix)) {
      if (changed >= before || named.has(hashIn(key) ?? "")) continue;
      await store.remove(key);
      removed++;
    }
  return removed;
}
