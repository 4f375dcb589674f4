// One file of an install, for whoever is a member of it: asked in SQL, so that another install's file is not there.
import { and, eq, exists, isNull } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { type FileRow, files } from "#app/db/schema/files";
import { memberRoles } from "#app/db/schema/members";

export async function fileFor(reader: Reader, fileId: string, userId: string): Promise<FileRow | null> {
  const member = reader
    .select({ id: memberRoles.id })
    .from(memberRoles)
    .where(and(eq(memberRoles.installId, files.installId), eq(memberRoles.userId, userId), isNull(memberRoles.to)));
  const [row] = await reader
    .select()
    .from(files)
    .where(and(eq(files.id, fileId), exists(member)));
  return row ?? null;
}
