// The first account of an instance. While nobody has one, each start of the server prints a link, and the newest of them makes
// whoever uses it the administrator. On an install an administrator has no right as such.
import { eq } from "drizzle-orm";
import { db, type Reader, write } from "#app/db/client.server";
import { accountLinks } from "#app/db/schema/account-links";
import { users } from "#app/db/schema/users";
import { hash } from "#app/lib/auth/hash.server";
import { judgePassword } from "#app/lib/auth/password.server";
import { hashPin, judgePin } from "#app/lib/auth/pin.server";
import { now } from "#app/lib/clock";
import { env } from "#app/lib/env.server";
import { newId } from "#app/lib/ids";
import { log } from "#app/lib/log.server";
import { makeLink, readLink, spendLink } from "#app/lib/services/account-links.server";
import { tryLink } from "#app/lib/services/link-try.server";
import { done, type Outcome, refuse } from "#app/lib/services/outcome";

/** It ends when it is used, or at the next start. */
const LASTS = 100 * 365 * 86_400_000;

export const isEmpty = async (reader: Reader = db()): Promise<boolean> =>
  (await reader.select({ id: users.id }).from(users).limit(1)).length === 0;

/** A link for the first person; null once somebody has an account. Earlier ones are over. */
export async function firstPersonLink(): Promise<string | null> {
  if (!(await isEmpty())) return null;
  const token = await write(async (tx) => {
    await tx.delete(accountLinks).where(eq(accountLinks.purpose, "start"));
    return makeLink(tx, { purpose: "start", userId: null, at: now(), lasts: LASTS });
  });
  return `${env.baseUrl}/start/${token}`;
}

export const isStartOpen = async (token: string): Promise<boolean> =>
  (await readLink(db(), "start", token, now())) !== null && (await isEmpty());

export interface FirstPerson {
  name: string;
  email: string;
  newPassword: string;
  pin: string;
}

export const makeFirstPerson = (token: string, person: FirstPerson): Promise<Outcome<{ userId: string }>> =>
  tryLink(() => make(token, person));

async function make(token: string, { name, email, newPassword, pin }: FirstPerson): Promise<Outcome<{ userId: string }>> {
  if (!(await isStartOpen(token))) return over;
  const [password, digits] = [judgePassword(newPassword, { name, email }), judgePin(pin)];
  if (!password.ok) return refuse(422, "password-weak", password.message);
  if (!digits.ok) return refuse(422, "pin-weak", digits.message);
  const [passwordHash, pinHash] = [await hash(newPassword), await hashPin(pin)];
  return write(async (tx) => {
    const at = now();
    if (!(await isEmpty(tx)) || !(await spendLink(tx, "start", token, at))) return over;
    const userId = newId();
    await tx.insert(users).values({ id: userId, email, name, passwordHash, pinHash, isAdmin: true, createdAt: at });
    log.info({ user: userId }, "the first account was made");
    return done({ userId });
  });
}

const over = refuse(
  409,
  "link-over",
  "This link is over: it was used, or the server was started again and printed a newer one. Somebody with an account can invite you.",
);
