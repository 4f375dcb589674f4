// Whether the photos that a record names have arrived and belong to its install.
import { and, eq, inArray } from "drizzle-orm";
import { files } from "#app/db/schema/files";
import { invalid, type Refusal } from "#app/lib/services/outcome";
import type { Doing } from "#app/lib/services/perform.server";

/** Null when every one of them is here. @param photos file ids. @param without the act with no photo, as it reads after "or". */
export async function photosMissing(d: Doing, photos: string[], without: string): Promise<Refusal | null> {
  const wanted = [...new Set(photos)];
  if (!wanted.length) return null;
  const found = await d.tx
    .select({ id: files.id })
    .from(files)
    .where(and(inArray(files.id, wanted), eq(files.installId, d.installId)));
  if (found.length === wanted.length) return null;
  return invalid(
    wanted.length === 1
      ? `The photo has not arrived. Send it again, or ${without} without it.`
      : `Not every photo has arrived. Send them again, or ${without} without them.`,
  );
}
