// What the template has and an install's traits left out, with the reason: shown at the first countersignature.
import { eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { installs } from "#app/db/schema/installs";
import type { GeneratedBoard } from "#app/lib/template/types";

export async function leftOutOf(reader: Reader, installId: string): Promise<GeneratedBoard["leftOut"]> {
  const [row] = await reader.select({ leftOut: installs.leftOut }).from(installs).where(eq(installs.id, installId));
  return row?.leftOut ?? [];
}
