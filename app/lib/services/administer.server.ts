// What administrators do: accounts are disabled and enabled, a lost password is helped with, mail that was given up is tried again.
// They never choose a password, and nothing here reaches into an install.
import { and, eq, isNotNull, isNull } from "drizzle-orm";
import { db, type Tx, write } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";
import { type User, users } from "#app/db/schema/users";
import { endAllSessions } from "#app/lib/auth/session.server";
import { askedTooOften } from "#app/lib/auth/throttle.server";
import { now } from "#app/lib/clock";
import { log } from "#app/lib/log.server";
import { tryAgain } from "#app/lib/mail/outbox.server";
import { done, type Outcome, type Refusal, refuse } from "#app/lib/services/outcome";
import { tellOfChange } from "#app/lib/services/own-account.server";
import { mailReset } from "#app/lib/services/reset-password.server";

type By = { userId: string };

/** Asked again in each transaction: the right may have gone since the page was drawn. */
async function administrator(tx: Tx, by: By): Promise<User | null> {
  const [me] = await tx
    .select()
    .from(users)
    .where(and(eq(users.id, by.userId), eq(users.isAdmin, true), isNull(users.disabledAt)));
  return me ?? null;
}

const notAdmin: Refusal = refuse(403, "not-admin", "Only an administrator of this instance does this.");

/** Ends every session. What the person did and signed stays; they come back when the account is enabled. */
export function disableAccount(by: By, person: string): Promise<Outcome<{ person: string }>> {
  return write(async (tx) => {
    const me = await administrator(tx, by);
    if (!me) return notAdmin;
    // So one administrator at least is always left.
    if (person === me.id) return refuse(409, "own-account", "Nobody disables their own account. Another administrator can.");
    const at = now();
    const [them] = await tx
      .update(users)
      .set({ disabledAt: at })
      .where(and(eq(users.id, person), isNull(users.disabledAt)))
      .returning();
    if (!them) return already(tx, person, "disabled");
    await endAllSessions(tx, them.id);
    await tellOfChange(tx, them, {
      key: `disabled:${them.id}-${at}`,
      at,
      subject: "Your account was disabled",
      lead: [
        `${me.name}, who administers this instance, disabled your account.`,
        "You cannot sign in. What you did and signed stays in the record.",
      ],
      notYou: "If this is a mistake, ask them, or the lead of your install.",
    });
    log.info({ user: them.id, by: me.id }, "an account was disabled");
    return done({ person: them.id });
  });
}

export function enableAccount(by: By, person: string): Promise<Outcome<{ person: string }>> {
  return write(async (tx) => {
    const me = await administrator(tx, by);
    if (!me) return notAdmin;
    const at = now();
    const [them] = await tx
      .update(users)
      .set({ disabledAt: null })
      .where(and(eq(users.id, person), isNotNull(users.disabledAt)))
      .returning();
    if (!them) return already(tx, person, "enabled");
    await tellOfChange(tx, them, {
      key: `enabled:${them.id}-${at}`,
      at,
      subject: "Your account was enabled again",
      lead: [`${me.name}, who administers this instance, enabled your account again.`, "You sign in with the password that you had."],
    });
    log.info({ user: them.id, by: me.id }, "an account was enabled");
    return done({ person: them.id });
  });
}

async function already(tx: Tx, person: string, state: string): Promise<Refusal> {
  const there = await tx.$count(users, eq(users.id, person));
  return there ? refuse(409, "already", `This account is ${state} already.`) : refuse(404, "not-found", "That account is not here.");
}

/** The person gets the same link as if they had asked for it themselves; the administrator sees nothing of it. */
export async function sendReset(by: By, person: string): Promise<Outcome<{ person: string }>> {
  const [them] = await db().select({ email: users.email }).from(users).where(eq(users.id, person));
  if (!them) return refuse(404, "not-found", "That account is not here.");
  const wait = await askedTooOften("reset", them.email, by.userId);
  if (wait) return refuse(429, "too-often", wait);
  return write(async (tx) => {
    const me = await administrator(tx, by);
    if (!me) return notAdmin;
    const [now] = await tx
      .select()
      .from(users)
      .where(and(eq(users.id, person), isNull(users.disabledAt)));
    if (!now) return refuse(409, "disabled", "This account is disabled. Enable it first.");
    await mailReset(tx, now, me.name);
    log.info({ user: person, by: me.id }, "an administrator sent a link for a new password");
    return done({ person });
  });
}

/** Another full set of tries. Whether a GO is still in force is for its leads to know, so its mail is theirs to send again. */
export function tryMailAgain(by: By, mail: string): Promise<Outcome<{ mail: string }>> {
  return write(async (tx) => {
    if (!(await administrator(tx, by))) return notAdmin;
    const [row] = await tx.select({ kind: outbox.kind }).from(outbox).where(eq(outbox.id, mail));
    if (!row) return refuse(404, "not-found", "That mail is not here.");
    if (row.kind === "go") return refuse(409, "go-over", "A GO mail is sent again by a lead of its install, while the GO is in force.");
    return (await tryAgain(tx, { id: mail, installId: null }))
      ? done({ mail })
      : refuse(409, "already", "This mail is not given up: it went out, or it waits for its next try. Nothing is left to do.");
  });
}
