// The edit that an inspector answers; once answered it is answered for good.

import { and, eq } from "drizzle-orm";
import { type WaitingEdit, waitingEdits } from "#app/db/queries/edits.server";
import { edits } from "#app/db/schema/edits";
import { notFound, type Refusal, refuse } from "#app/lib/services/outcome";
import type { Doing } from "#app/lib/services/perform.server";

export async function findWaiting(d: Doing, id: string): Promise<WaitingEdit | Refusal> {
  const found = (await waitingEdits(d.tx, d.installId)).find((w) => w.id === id);
  if (found) return found;
  const known = await d.tx.$count(edits, and(eq(edits.installId, d.installId), eq(edits.id, id)));
  return known
    ? refuse(409, "already", "This change has been answered by somebody already. Load the page again.")
    : notFound("That change");
}
