// Writes events at the end of an install's chain, inside the transaction of the act that they tell about.
import type { Tx } from "#app/db/client.server";
import type { Head } from "#app/db/queries/snapshot-cache.server";
import { events } from "#app/db/schema/events";
import type { Role } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import { canonical } from "#app/lib/record/canonical";
import { link } from "#app/lib/record/chain";
import { type EventBody, parseEvent } from "#app/lib/record/events";

/** The columns that every record shares, ready to be spread into its row. */
export interface RecordBase {
  id: string;
  installId: string;
  seq: number;
  recorded: number;
  by: string;
  as: Role;
}

export interface RecordWriter {
  /** The instant that counts for everything in this act: the clock, but later than the newest record. */
  now: number;
  /** Number and hash of the newest event. */
  head: () => { seq: number; hash: string };
  /** Appends one event and returns the base of the row that it tells about. `id` where the row has one already. */
  record: (who: { by: string; as: Role }, body: EventBody, id?: string) => Promise<RecordBase>;
}

/** A writer that goes on from `newest`, the chain's present end. `clock` in ms since 1970 UTC. */
export function recordWriter(tx: Tx, installId: string, newest: Head, clock: number): RecordWriter {
  // Each act is later than the one before, if only by a millisecond: the rules ask what is newer, and strictly so.
  const now = Math.max(clock, newest.recorded + 1);
  let head = { seq: newest.seq, hash: newest.hash };
  return {
    now,
    head: () => head,
    async record({ by, as }, body, id = newId()) {
      const seq = head.seq + 1;
      const event = parseEvent({ v: 1, install: installId, seq, recorded: now, by, as, id, ...body });
      const hash = link(head.hash, event);
      await tx
        .insert(events)
        .values({ installId, seq, recorded: now, by, type: event.type, body: canonical(event), prev: head.hash, hash });
      head = { seq, hash };
      return { id, installId, seq, recorded: now, by, as };
    },
  };
}
