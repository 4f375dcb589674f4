// A program that asks with "Authorization: Bearer": who it asks for, and whether its token reaches that far.
import { and, eq, gt, isNull } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { apiTokens } from "#app/db/schema/api-tokens";
import { users } from "#app/db/schema/users";
import { type Actor, actorColumns } from "#app/lib/auth/actor.server";
import { addressNow, beginAttempt, waitInWords } from "#app/lib/auth/throttle.server";
import { isToken, tokenHash } from "#app/lib/auth/token.server";
import { now } from "#app/lib/clock";
import type { Scope } from "#app/lib/schemas/account";

/** Tokens begin so, that they are known for what they are wherever they turn up. */
export const PREFIX = "bladecount_";
const touchEvery = 60_000;

export type TokenAnswer = { ok: true; actor: Actor } | { ok: false; status: 401 | 403 | 429; code: string; message: string };

/** Null where the request carries no bearer token. */
export async function readApiToken(request: Request, scope: Scope): Promise<TokenAnswer | null> {
  const sent = /^Bearer\s+(\S+)\s*$/i.exec(request.headers.get("Authorization") ?? "")?.[1];
  if (sent === undefined) return null;
  const at = now();
  const found = sent.startsWith(PREFIX) && isToken(sent.slice(PREFIX.length)) ? await behind(tokenHash(sent), at) : undefined;
  if (!found) {
    // Only wrong ones are counted: a program that asks often writes nothing.
    const attempt = await beginAttempt("address", addressNow());
    return attempt.ok
      ? {
          ok: false,
          status: 401,
          code: "token-unknown",
          message: "This token is unknown, has run out, or was ended. Make a new one on your account page.",
        }
      : {
          ok: false,
          status: 429,
          code: "too-often",
          message: `Too many wrong tokens. Wait ${waitInWords(attempt.until)}, then try again.`,
        };
  }
  const { token, ...actor } = found;
  if (!token.scopes.includes(scope))
    return {
      ok: false,
      status: 403,
      code: "token-scope",
      message: `This token may not ${SCOPE_WORDS[scope]}. Make one that may on your account page.`,
    };
  if ((token.lastUsedAt ?? 0) < at - touchEvery)
    await write((tx) => tx.update(apiTokens).set({ lastUsedAt: at }).where(eq(apiTokens.id, token.id)));
  // No session: what belongs to one is not for programs.
  return { ok: true, actor: { ...actor, sessionId: "" } };
}

const SCOPE_WORDS: Record<Scope, string> = { read: "read a board", record: "record on a board" };

async function behind(hash: string, at: number) {
  const [row] = await db()
    .select({
      ...actorColumns,
      token: { id: apiTokens.id, scopes: apiTokens.scopes, lastUsedAt: apiTokens.lastUsedAt },
    })
    .from(apiTokens)
    .innerJoin(users, eq(users.id, apiTokens.userId))
    .where(and(eq(apiTokens.tokenHash, hash), gt(apiTokens.expiresAt, at), isNull(users.disabledAt)));
  return row;
}
