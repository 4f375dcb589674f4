// Hashes of the texts that were signed, for the stamps of one gate. The snapshot does without them: standing compares ids.
import { eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { signatures } from "#app/db/schema/signatures";

export async function signatureHashes(reader: Reader, gateId: string): Promise<Record<string, string>> {
  const rows = await reader.select({ id: signatures.id, hash: signatures.shownHash }).from(signatures).where(eq(signatures.gateId, gateId));
  return Object.fromEntries(rows.map((r) => [r.id, r.hash]));
}
