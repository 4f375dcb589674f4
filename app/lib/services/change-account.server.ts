// What a person changes about their own account: password, mail address, signing PIN. Each with the password once more, each told by mail.
import { and, eq, ne } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { hash } from "#app/lib/auth/hash.server";
import { judgePassword } from "#app/lib/auth/password.server";
import { hashPin, judgePin } from "#app/lib/auth/pin.server";
import { endAllSessions } from "#app/lib/auth/session.server";
import { askedTooOften, succeeded } from "#app/lib/auth/throttle.server";
import { now } from "#app/lib/clock";
import { env } from "#app/lib/env.server";
import { when } from "#app/lib/gates/when";
import { newId } from "#app/lib/ids";
import { log } from "#app/lib/log.server";
import { composeLetter } from "#app/lib/mail/compose/letter";
import { enqueue } from "#app/lib/mail/outbox.server";
import { endLinks, makeLink, readLink, spendLink } from "#app/lib/services/account-links.server";
import { tryLink } from "#app/lib/services/link-try.server";
import { done, type Outcome, refuse } from "#app/lib/services/outcome";
import { type OwnAct, onOwnAccount, tellOfChange } from "#app/lib/services/own-account.server";

export const ADDRESS_LASTS = 24 * 3600_000;

/** Every other session ends; the one that changes it stays. */
export async function changePassword(
  act: OwnAct,
  { password, newPassword, name, email }: { password: string; newPassword: string; name: string; email: string },
): Promise<Outcome<null>> {
  const verdict = judgePassword(newPassword, { name, email });
  if (!verdict.ok) return refuse(422, "password-weak", verdict.message);
  const passwordHash = await hash(newPassword);
  return onOwnAccount({ ...act, kind: "change-password", password }, async (tx, me, at) => {
    await tx.update(users).set({ passwordHash }).where(eq(users.id, me.id));
    await endAllSessions(tx, me.id, act.actor.sessionId);
    await endLinks(tx, "reset", me.id);
    await tellOfChange(tx, me, {
      key: act.commandId,
      at,
      subject: "Your password was changed",
      lead: ["Your password was changed on your account page.", "Every other browser was signed out. Your API tokens go on."],
    });
    log.info({ user: me.id }, "a password was changed");
    return done(null);
  });
}

export async function setPin(act: OwnAct, { password, pin }: { password: string; pin: string }): Promise<Outcome<null>> {
  const verdict = judgePin(pin);
  if (!verdict.ok) return refuse(422, "pin-weak", verdict.message);
  const pinHash = await hashPin(pin);
  return onOwnAccount({ ...act, kind: "set-pin", password }, async (tx, me, at) => {
    await tx.update(users).set({ pinHash }).where(eq(users.id, me.id));
    await succeeded(tx, "pin", me.id);
    await tellOfChange(tx, me, {
      key: act.commandId,
      at,
      subject: me.pinHash ? "Your signing PIN was changed" : "You have a signing PIN",
      lead: [me.pinHash ? "Your signing PIN was changed on your account page." : "A signing PIN was set on your account page."],
      notYou:
        "If this was not you, change your password and PIN on your account page at once, and tell the lead of your install: somebody could sign in your name.",
    });
    log.info({ user: me.id }, "a signing PIN was set");
    return done(null);
  });
}

/** Sends a link to the new address; until it is used, the old one stays. The answer is the same where the address is somebody else's. */
export async function askForAddress(act: OwnAct, { password, email }: { password: string; email: string }): Promise<Outcome<null>> {
  const wait = await askedTooOften("new-address", email, act.actor.userId);
  if (wait) return refuse(429, "too-often", wait);
  return onOwnAccount({ ...act, kind: "ask-for-address", password }, async (tx, me, at) => {
    if (email === me.email) return refuse(422, "address-same", "This is the address that you have.");
    await endLinks(tx, "new-address", me.id);
    const token = await makeLink(tx, { purpose: "new-address", userId: me.id, address: email, at, lasts: ADDRESS_LASTS });
    const taken = await tx.$count(users, and(eq(users.email, email), ne(users.id, me.id)));
    if (!taken) {
      const letter = composeLetter({
        subject: "Is this your new address?",
        reader: me.name,
        lead: ["You want your account to have this mail address.", "Open the link and confirm it. Until then the old one stays."],
        rows: [{ head: "Good to", text: `${when(at + ADDRESS_LASTS, "UTC", true)}, 24 hours, once` }],
        button: { label: "Confirm this address", href: `${env.baseUrl}/confirm-address/${token}` },
        small: ["If you know nothing of this, do nothing: somebody has mistyped their address, and the link runs out by itself."],
      });
      await enqueue(tx, { kind: "new-address", to: { userId: me.id, address: email }, ...letter, dedupeKey: `new-address:${newId()}` });
    }
    await tellOfChange(tx, me, {
      key: act.commandId,
      at,
      subject: "A new mail address for your account was asked for",
      lead: [
        `Your account is to have the address ${email} from now on.`,
        "It changes when the link that went there is used. This address then gets no more mail from here.",
      ],
    });
    return done(null);
  });
}

export interface AddressWaiting {
  name: string;
  address: string;
}

/** The change behind a link; null where the link is over. */
export async function readAddressLink(token: string): Promise<AddressWaiting | null> {
  const link = await readLink(db(), "new-address", token, now());
  const [person] = link?.userId
    ? await db().select({ name: users.name, disabledAt: users.disabledAt }).from(users).where(eq(users.id, link.userId))
    : [];
  return link?.address && person && person.disabledAt === null ? { name: person.name, address: link.address } : null;
}

/** The new address counts from here on; both addresses are told. */
export const confirmAddress = (token: string): Promise<Outcome<{ address: string }>> => tryLink(() => confirm(token));

function confirm(token: string): Promise<Outcome<{ address: string }>> {
  return write(async (tx) => {
    const at = now();
    const link = await spendLink(tx, "new-address", token, at);
    const [me] = link?.userId ? await tx.select().from(users).where(eq(users.id, link.userId)) : [];
    const email = link?.address;
    if (!me || !email || me.disabledAt !== null) return over;
    // Somebody else's by now: as if the link had never been.
    if (await tx.$count(users, and(eq(users.email, email), ne(users.id, me.id)))) return over;
    await tx.update(users).set({ email }).where(eq(users.id, me.id));
    // Links that went to the old address must not open this account any more.
    await endLinks(tx, "reset", me.id);
    for (const address of [me.email, email])
      await tellOfChange(
        tx,
        { ...me, email: address },
        {
          key: `address:${me.id}-${at}:${address}`,
          at,
          subject: "The mail address of your account was changed",
          lead: [`You sign in with ${email} from now on.`, `Before it was ${me.email}.`],
          notYou: "If this was not you, tell whoever administers this instance, and the lead of your install, at once.",
        },
      );
    log.info({ user: me.id }, "a mail address was changed");
    return done({ address: email });
  });
}

const over = refuse(409, "link-over", "This link is over: it was used, or a day has passed. Ask for a new one on your account page.");
