// Asks for the signing PIN before an act that signs. Before the transaction, for it takes a quarter of a second.
import { verifyPin } from "#app/lib/auth/pin.server";
import { type Refusal, refuse } from "#app/lib/services/outcome";

/** Null when the PIN is right. */
export async function pinRefusal(userId: string, pin: string): Promise<Refusal | null> {
  const verdict = await verifyPin(userId, pin);
  return verdict.ok ? null : refuse(403, verdict.code, verdict.message);
}
