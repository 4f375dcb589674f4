// Keys for a person's own programs: made with the password, shown once, ended at any time.
import { and, eq, lt } from "drizzle-orm";
import { write } from "#app/db/client.server";
import { apiTokens } from "#app/db/schema/api-tokens";
import { PREFIX } from "#app/lib/auth/api-token.server";
import { tokenHash } from "#app/lib/auth/token.server";
import { newId, newToken } from "#app/lib/ids";
import { log } from "#app/lib/log.server";
import type { Scope } from "#app/lib/schemas/account";
import { done, type Outcome, refuse } from "#app/lib/services/outcome";
import { type OwnAct, onOwnAccount, tellOfChange } from "#app/lib/services/own-account.server";

const DAY = 86_400_000;
/** Of one person at a time. */
export const MOST_TOKENS = 20;

export interface NewToken {
  name: string;
  scopes: Scope[];
  /** Days that it is good for. */
  days: number;
  password: string;
}

/** The token itself is in the answer, and nowhere else: a repeated command finds it gone. */
export async function makeApiToken(act: OwnAct, { name, scopes, days, password }: NewToken): Promise<Outcome<{ token: string }>> {
  const token = `${PREFIX}${newToken()}`;
  const outcome = await onOwnAccount<{ made: string }>({ ...act, kind: "make-api-token", password }, async (tx, me, at) => {
    await tx.delete(apiTokens).where(and(eq(apiTokens.userId, me.id), lt(apiTokens.expiresAt, at - 30 * DAY)));
    if ((await tx.$count(apiTokens, eq(apiTokens.userId, me.id))) >= MOST_TOKENS)
      return refuse(409, "too-many", `You have ${MOST_TOKENS} tokens, as many as one person may. End one first.`);
    const id = newId();
    await tx
      .insert(apiTokens)
      .values({ id, userId: me.id, name, tokenHash: tokenHash(token), scopes, createdAt: at, expiresAt: at + days * DAY });
    await tellOfChange(tx, me, {
      key: act.commandId,
      at,
      subject: "An API token was made for your account",
      lead: [
        `“${name}” lets a program ask in your name for ${days} days.`,
        scopes.includes("record")
          ? "It may read your boards and record on them; signing still takes your PIN."
          : "It may read your boards, and change nothing.",
      ],
    });
    log.info({ user: me.id, scopes }, "an API token was made");
    return done({ made: tokenHash(token) });
  });
  if (!outcome.ok) return outcome;
  return outcome.value.made === tokenHash(token)
    ? done({ token })
    : refuse(409, "already", "This token was made already and is shown only once. If you have not copied it, end it and make another.");
}

/** A token of somebody else is left alone. */
export const endApiToken = (userId: string, token: string): Promise<unknown> =>
  write((tx) => tx.delete(apiTokens).where(and(eq(apiTokens.id, token), eq(apiTokens.userId, userId))));
