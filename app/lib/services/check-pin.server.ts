// Asks for the signing PIN before an act that signs. Before the transaction, for it takes a quarter of a second.
import { db } from "#app/db/client.server";
import { memberOf } from "#app/db/queries/membership.server";
import { verifyPin } from "#app/lib/auth/pin.server";
import { notFound, type Refusal, refuse } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";

/** Null when the PIN is right. Whoever is no member learns only that there is no such install, whatever the PIN. */
export async function pinRefusal({ installId, actor: { userId } }: Act, pin: string): Promise<Refusal | null> {
  if (!(await memberOf(db(), installId, userId))) return notFound("That install");
  const verdict = await verifyPin(userId, pin);
  return verdict.ok ? null : refuse(403, verdict.code, verdict.message);
}
