// Links that do one thing with an account, once: made here, read here, used up here. Only hashes are kept.
import { and, eq, gt } from "drizzle-orm";
import type { Reader, Tx } from "#app/db/client.server";
import { type AccountLink, accountLinks } from "#app/db/schema/account-links";
import { isToken, tokenHash } from "#app/lib/auth/token.server";
import { newToken } from "#app/lib/ids";

type Purpose = AccountLink["purpose"];

/** @param lasts milliseconds. Returns the token, which is in the link and nowhere else. */
export async function makeLink(
  tx: Tx,
  link: { purpose: Purpose; userId: string | null; address?: string; at: number; lasts: number },
): Promise<string> {
  const token = newToken();
  const { purpose, userId, address, at, lasts } = link;
  await tx.insert(accountLinks).values({ id: tokenHash(token), purpose, userId, address, createdAt: at, expiresAt: at + lasts });
  return token;
}

/** What is behind the token; null where there is nothing (any more). Reading uses nothing up: mail programs open links too. */
export async function readLink(reader: Reader, purpose: Purpose, token: string, at: number): Promise<AccountLink | null> {
  if (!isToken(token)) return null;
  const [link] = await reader
    .select()
    .from(accountLinks)
    .where(and(eq(accountLinks.id, tokenHash(token)), eq(accountLinks.purpose, purpose), gt(accountLinks.expiresAt, at)));
  return link ?? null;
}

/** Uses the link up, and with it every other one of the person for the same purpose. Null where it is over. */
export async function spendLink(tx: Tx, purpose: Purpose, token: string, at: number): Promise<AccountLink | null> {
  const link = await readLink(tx, purpose, token, at);
  if (!link) return null;
  await endLinks(tx, purpose, link.userId);
  await tx.delete(accountLinks).where(eq(accountLinks.id, link.id));
  return link;
}

export async function endLinks(tx: Tx, purpose: Purpose, userId: string | null): Promise<void> {
  if (userId) await tx.delete(accountLinks).where(and(eq(accountLinks.purpose, purpose), eq(accountLinks.userId, userId)));
}
