// Edits of the board: those that wait for an inspector, and those that were answered.
import { and, desc, eq, isNull } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { editAnswers, edits } from "#app/db/schema/edits";

export type WaitingEdit = typeof edits.$inferSelect;

/** Oldest first. */
export async function waitingEdits(reader: Reader, installId: string): Promise<WaitingEdit[]> {
  const rows = await reader
    .select({ edit: edits })
    .from(edits)
    .leftJoin(editAnswers, eq(editAnswers.editId, edits.id))
    .where(and(eq(edits.installId, installId), isNull(editAnswers.id)))
    .orderBy(edits.seq);
  return rows.map((r) => r.edit);
}

/** Newest answer first. */
export async function answeredEdits(reader: Reader, installId: string, most = 20) {
  return reader
    .select({ edit: edits, answer: editAnswers })
    .from(editAnswers)
    .innerJoin(edits, eq(editAnswers.editId, edits.id))
    .where(eq(editAnswers.installId, installId))
    .orderBy(desc(editAnswers.seq))
    .limit(most);
}
