// A lost password: a link to the address of the account, good for one hour and once. Whoever asks is told the same, and as fast,
// whether the address belongs to an account or not.
import { and, eq, isNull } from "drizzle-orm";
import { db, type Tx, write } from "#app/db/client.server";
import { apiTokens } from "#app/db/schema/api-tokens";
import { users } from "#app/db/schema/users";
import { hash } from "#app/lib/auth/hash.server";
import { judgePassword } from "#app/lib/auth/password.server";
import { endAllSessions } from "#app/lib/auth/session.server";
import { askedTooOften, succeeded } from "#app/lib/auth/throttle.server";
import { now } from "#app/lib/clock";
import { env } from "#app/lib/env.server";
import { when } from "#app/lib/gates/when";
import { newId } from "#app/lib/ids";
import { log } from "#app/lib/log.server";
import { composeLetter } from "#app/lib/mail/compose/letter";
import { enqueue } from "#app/lib/mail/outbox.server";
import { makeLink, readLink, spendLink } from "#app/lib/services/account-links.server";
import { tryLink } from "#app/lib/services/link-try.server";
import { done, type Outcome, refuse } from "#app/lib/services/outcome";
import { tellOfChange } from "#app/lib/services/own-account.server";

export const RESET_LASTS = 60 * 60_000;

/**
 * Asks for a link. `sent` is done after the answer: whether there is an account shows neither in the answer nor in how long it takes.
 */
export async function askForReset(email: string): Promise<Outcome<{ sent: Promise<boolean> }>> {
  const wait = await askedTooOften("reset", email);
  if (wait) return refuse(429, "too-often", wait);
  const sent = sendReset(email).catch((error: unknown) => {
    log.error({ err: error }, "a mail for a new password could not be written");
    return false;
  });
  return done({ sent });
}

const sendReset = (email: string): Promise<boolean> =>
  write(async (tx) => {
    const [person] = await tx
      .select({ id: users.id, name: users.name, email: users.email })
      .from(users)
      .where(and(eq(users.email, email), isNull(users.disabledAt)));
    if (person) await mailReset(tx, person, null);
    return Boolean(person);
  });

/** @param by name of the administrator who sends it; null where the person asked. */
export async function mailReset(tx: Tx, person: { id: string; name: string; email: string }, by: string | null): Promise<void> {
  const at = now();
  const token = await makeLink(tx, { purpose: "reset", userId: person.id, at, lasts: RESET_LASTS });
  const letter = composeLetter({
    subject: "Choose a new password",
    reader: person.name,
    lead: [
      by
        ? `${by}, who administers this instance, sends you this link, with which you choose a new password.`
        : "With this link you choose a new password.",
      "Your password stays as it is until then. Choosing a new one signs you out everywhere, and ends your API tokens.",
    ],
    rows: [{ head: "Good to", text: `${when(at + RESET_LASTS, "UTC", true)}, one hour, once` }],
    button: { label: "Choose a new password", href: `${env.baseUrl}/reset/${token}` },
    small: [
      "If you did not ask for it, do nothing: nothing has changed, and the link runs out by itself. Give it to nobody. Your signing PIN is another one and stays.",
    ],
  });
  await enqueue(tx, { kind: "reset", to: { userId: person.id, address: person.email }, ...letter, dedupeKey: `reset:${newId()}` });
}

export const isResetOpen = async (token: string): Promise<boolean> => (await readLink(db(), "reset", token, now())) !== null;

/** Sets the new password. Every session and every token of the API ends; the person is told. */
export const resetPassword = (token: string, newPassword: string): Promise<Outcome<{ email: string }>> =>
  tryLink(() => reset(token, newPassword));

async function reset(token: string, newPassword: string): Promise<Outcome<{ email: string }>> {
  const link = await readLink(db(), "reset", token, now());
  const [person] = link?.userId ? await db().select().from(users).where(eq(users.id, link.userId)) : [];
  if (!person || person.disabledAt !== null) return over;
  const verdict = judgePassword(newPassword, person);
  if (!verdict.ok) return refuse(422, "password-weak", verdict.message);
  const passwordHash = await hash(newPassword);
  return write(async (tx) => {
    const at = now();
    if (!(await spendLink(tx, "reset", token, at))) return over;
    await tx.update(users).set({ passwordHash }).where(eq(users.id, person.id));
    await endAllSessions(tx, person.id);
    await tx.delete(apiTokens).where(eq(apiTokens.userId, person.id));
    await succeeded(tx, "account", person.email);
    await tellOfChange(tx, person, {
      key: `reset-done:${person.id}-${at}`,
      at,
      subject: "Your password was changed",
      lead: [
        "A new password was set with a link that went to this address.",
        "You were signed out everywhere, and your API tokens were ended.",
      ],
    });
    log.info({ user: person.id }, "a password was set by link");
    return done({ email: person.email });
  });
}

const over = refuse(409, "link-over", "This link is over: it was used, or an hour has passed. Ask for a new one.");
