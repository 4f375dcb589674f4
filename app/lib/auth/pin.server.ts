// The signing PIN: asked for at each signature, separate from the password. Five wrong ones in a row lock it for a while,
// and its owner is told by mail.
import { eq } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { fits, hash, matches } from "#app/lib/auth/hash.server";
import { beginAttempt, pinTries, succeeded, waitInWords } from "#app/lib/auth/throttle.server";
import { log } from "#app/lib/log.server";
import { enqueue } from "#app/lib/mail/outbox.server";

export const leastDigits = 6;

export type PinVerdict = { ok: true } | { ok: false; code: "pin-wrong" | "pin-locked" | "pin-unset"; message: string };

/** Whether a new PIN may be used. The message says what to do instead. */
export function judgePin(pin: string): { ok: true } | { ok: false; message: string } {
  if (!/^[0-9]+$/.test(pin) || pin.length < leastDigits || !fits(pin))
    return { ok: false, message: `Use ${leastDigits} digits or more, and nothing but digits.` };
  const steps = new Set([...pin].slice(1).map((digit, i) => Number(digit) - Number(pin[i])));
  if (steps.size === 1 && [-1, 0, 1].includes([...steps][0] ?? 9)) {
    return { ok: false, message: "This PIN is one digit over and over, or digits in a row. Choose another." };
  }
  return { ok: true };
}

export const hashPin = hash;

/** Checks a person's PIN. Not inside a transaction: it takes a quarter of a second. */
export async function verifyPin(userId: string, pin: string): Promise<PinVerdict> {
  const [person] = await db()
    .select({ email: users.email, name: users.name, pinHash: users.pinHash })
    .from(users)
    .where(eq(users.id, userId));
  if (!person?.pinHash)
    return { ok: false, code: "pin-unset", message: "You have no signing PIN yet. Set one on your account page, then sign." };
  const attempt = await beginAttempt("pin", userId);
  if (!attempt.ok) return locked(attempt.until);
  if (await matches(pin, person.pinHash)) {
    await write((tx) => succeeded(tx, "pin", userId));
    return { ok: true };
  }
  log.warn({ user: userId, failures: attempt.failures }, "a wrong signing PIN");
  if (attempt.failures % pinTries !== 0) {
    const left = pinTries - (attempt.failures % pinTries);
    return {
      ok: false,
      code: "pin-wrong",
      message: `That is not your PIN. Nothing was signed. ${left === 1 ? "One try is" : `${left} tries are`} left before it is locked for a while.`,
    };
  }
  const { until } = attempt;
  const wait = waitInWords(until);
  await write((tx) =>
    enqueue(tx, {
      kind: "pin-locked",
      to: { userId, address: person.email },
      subject: "Your signing PIN is locked for a while",
      text: `${person.name},\n\n${attempt.failures} wrong signing PINs in a row were entered for you. The PIN is locked for ${wait}, and nothing was signed.\n\nIf that was you, wait and try again. If it was not, change your password and PIN on your account page and tell the lead of your install.\n`,
      dedupeKey: `pin-locked:${userId}:${until}`,
    }),
  );
  return locked(until);
}

function locked(until: number): PinVerdict {
  return {
    ok: false,
    code: "pin-locked",
    message: `Your PIN is locked after ${pinTries} wrong ones. Nothing was signed. Try again in ${waitInWords(until)}; you have been told by mail.`,
  };
}
