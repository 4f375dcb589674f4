// Snapshots by the head of their record. Whatever changes a snapshot appends an event in the same transaction, so that install,
// number and hash of its newest event name one snapshot for good: nothing has to be thrown away when something changes,
// and several processes on one database agree. (A person's new name shows with the install's next event.)
import type { Reader } from "#app/db/client.server";
import { loadSnapshot } from "#app/db/queries/load-snapshot.server";
import { recordHead } from "#app/db/queries/record-lines.server";
import type { Snapshot } from "#app/lib/gates/snapshot";

export interface Head {
  seq: number;
  hash: string;
  /** Instant of the newest event, ms since 1970 UTC; 0 when there is none. */
  recorded: number;
}

const most = 40;
const kept = new Map<string, Snapshot>();
const keyOf = (installId: string, head: Head) => `${installId} ${head.seq} ${head.hash}`;

/** The snapshot at the head that `reader` sees. Only for a reader that has written nothing yet. Nobody changes what it returns. */
export async function snapshotNow(reader: Reader, installId: string): Promise<{ snapshot: Snapshot; head: Head } | null> {
  for (let head = await recordHead(reader, installId); ; ) {
    const known = kept.get(keyOf(installId, head));
    const snapshot = known ?? (await loadSnapshot(reader, installId));
    if (!snapshot) return null;
    if (known) return { snapshot, head };
    // Outside a transaction something may have been written while the tables were read.
    const after = await recordHead(reader, installId);
    if (after.hash === head.hash) {
      keep(keyOf(installId, head), snapshot);
      return { snapshot, head };
    }
    head = after;
  }
}

function keep(key: string, snapshot: Snapshot): void {
  const oldest = kept.keys().next();
  if (kept.size >= most && !oldest.done) kept.delete(oldest.value);
  kept.set(key, snapshot);
}
