// A person's own templates. Nobody else sees them.
import { and, desc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { boardTemplates } from "#app/db/schema/board-templates";
import { installs } from "#app/db/schema/installs";

export const ownTemplates = (reader: Reader, owner: string) =>
  reader.select().from(boardTemplates).where(eq(boardTemplates.ownerId, owner)).orderBy(desc(boardTemplates.createdAt));

export async function ownTemplate(reader: Reader, owner: string, id: string) {
  const [row] = await reader
    .select()
    .from(boardTemplates)
    .where(and(eq(boardTemplates.ownerId, owner), eq(boardTemplates.id, id)));
  return row ?? null;
}

/** What a template of an install's board needs beside its snapshot. */
export async function templateBaseOf(reader: Reader, installId: string) {
  const [row] = await reader
    .select({ postRun: installs.postRun, templateVersion: installs.templateVersion })
    .from(installs)
    .where(eq(installs.id, installId));
  if (!row) throw new Error("An install that is not there");
  // An install made from an own template says so behind the version.
  return { postRun: row.postRun, templateVersion: /^\d+\.\d+\.\d+/.exec(row.templateVersion)?.[0] ?? "1.0.0" };
}
