// Everything of one install that bears on readiness, for the gate evaluator: a fixed number of queries, whatever its size.
import { eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { waitingEdits } from "#app/db/queries/edits.server";
import { loadBoard } from "#app/db/queries/snapshot-board.server";
import { loadHappenings } from "#app/db/queries/snapshot-happenings.server";
import { loadRecords } from "#app/db/queries/snapshot-records.server";
import { loadRuns } from "#app/db/queries/snapshot-runs.server";
import { installs } from "#app/db/schema/installs";
import type { Snapshot } from "#app/lib/gates/snapshot";

/** The snapshot, or null where there is no such install. Whether the reader may see it is asked before, by `memberOf`. */
export async function loadSnapshot(reader: Reader, installId: string): Promise<Snapshot | null> {
  const [install] = await reader
    .select({
      registration: installs.registration,
      name: installs.name,
      timeZone: installs.timeZone,
      traits: installs.traits,
      settings: installs.settings,
    })
    .from(installs)
    .where(eq(installs.id, installId));
  if (!install) return null;
  const { traits, settings, ...named } = install;
  const [board, records, happenings, buildUp, waiting] = await Promise.all([
    loadBoard(reader, installId),
    loadRecords(reader, installId),
    loadHappenings(reader, installId),
    loadRuns(reader, installId),
    waitingEdits(reader, installId),
  ]);
  const editsWaiting = waiting.map(({ id, seq, recorded, by, as, subject, words }) => ({ id, seq, recorded, by, as, subject, words }));
  return { install: { id: installId, ...named }, settings, traits, ...board, ...records, ...happenings, ...buildUp, editsWaiting };
}
