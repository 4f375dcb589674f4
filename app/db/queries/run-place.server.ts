// Where a run is to be: text of the run that no rule judges, so that it is not in the snapshot.
import { and, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { runs } from "#app/db/schema/runs";

/** The place as typed; empty where the install has no such run. */
export async function placeOfRun(reader: Reader, installId: string, runId: string): Promise<string> {
  const [row] = await reader
    .select({ place: runs.place })
    .from(runs)
    .where(and(eq(runs.id, runId), eq(runs.installId, installId)));
  return row?.place ?? "";
}
