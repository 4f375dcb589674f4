// The password once more, before an account is changed: a tablet that was left signed in must not be enough to take it over.
// Source: OWASP ASVS 5.0.0, 7.5.1. Wrong ones count like wrong ones at the sign-in.
import { eq } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { matches } from "#app/lib/auth/hash.server";
import { addressNow, beginAttempt, succeeded, waitInWords } from "#app/lib/auth/throttle.server";
import { log } from "#app/lib/log.server";

export type PasswordCheck = { ok: true } | { ok: false; status: 403 | 429; code: "password-wrong" | "too-often"; message: string };

/** Not inside a transaction: it takes a quarter of a second. */
export async function checkPassword(userId: string, password: string): Promise<PasswordCheck> {
  const [person] = await db().select({ email: users.email, passwordHash: users.passwordHash }).from(users).where(eq(users.id, userId));
  if (!person) throw new Error("A signed-in person without an account");
  const address = addressNow();
  for (const [kind, value] of [["address", address] as const, ["account", person.email] as const]) {
    const attempt = await beginAttempt(kind, value);
    if (!attempt.ok)
      return {
        ok: false,
        status: 429,
        code: "too-often",
        message: `Too many wrong tries. Wait ${waitInWords(attempt.until)}, then try again.`,
      };
  }
  if (!(await matches(password, person.passwordHash))) {
    log.warn({ user: userId }, "a wrong password for a change of the account");
    return { ok: false, status: 403, code: "password-wrong", message: "That is not your password. Nothing was changed." };
  }
  await write(async (tx) => {
    await succeeded(tx, "account", person.email);
    await succeeded(tx, "address", address);
  });
  return { ok: true };
}
