// What a person chooses for themselves without a proof of who they are: which mails they want, and which browsers stay signed in.
import { eq } from "drizzle-orm";
import { write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { endAllSessions, endSession } from "#app/lib/auth/session.server";
import { log } from "#app/lib/log.server";
import { MAIL_CHOICES, type MailChoice } from "#app/lib/schemas/account";

export const chooseMails = (userId: string, want: MailChoice[]): Promise<unknown> =>
  write((tx) =>
    tx
      .update(users)
      .set({ mailOff: MAIL_CHOICES.filter((choice) => !want.includes(choice)) })
      .where(eq(users.id, userId)),
  );

export const endOneSession = (userId: string, session: string): Promise<void> => write((tx) => endSession(tx, userId, session));

/** @param keep the session that stays; left out: none does. */
export async function signOutEverywhere(userId: string, keep?: string): Promise<void> {
  await write((tx) => endAllSessions(tx, userId, keep));
  log.info({ user: userId, all: keep === undefined }, "sessions were ended by their owner");
}
