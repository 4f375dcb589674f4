// A session is a row; the cookie holds a random token and nothing else, and the row holds only the token's hash.
// Signed in for 14 days at most, 7 days without use: a hangar tablet outlives a weekend, and each signature asks for the
// PIN anyway. Source: OWASP ASVS 5.0.0, 3.3 and 7.2 to 7.4; the figures are this product's own.
import { createHash } from "node:crypto";
import { and, desc, eq, gt, isNull, lt, ne, or } from "drizzle-orm";
import { db, type Tx, write } from "#app/db/client.server";
import { sessions } from "#app/db/schema/sessions";
import { users } from "#app/db/schema/users";
import { type Actor, actorColumns } from "#app/lib/auth/actor.server";
import { now } from "#app/lib/clock";
import { env } from "#app/lib/env.server";
import { hasBearerToken } from "#app/lib/http/origin";
import { newToken } from "#app/lib/ids";

const day = 24 * 60 * 60_000;
export const absoluteLimit = 14 * day;
export const idleLimit = 7 * day;
const touchEvery = 60_000;

// "__Host-" makes the browser refuse the cookie from anything but this host over https; it cannot be had on plain http.
const cookieName = env.https ? "__Host-bladecount" : "bladecount";
const attributes = `Path=/; HttpOnly; SameSite=Lax${env.https ? "; Secure" : ""}`;

const idOf = (token: string) => createHash("sha256").update(token).digest("hex");

/** Starts a session. Returns the Set-Cookie header that signs the browser in. */
export async function startSession(tx: Tx, userId: string, userAgent: string | null): Promise<string> {
  const token = newToken();
  const at = now();
  await tx.insert(sessions).values({
    id: idOf(token),
    userId,
    createdAt: at,
    lastSeenAt: at,
    expiresAt: at + absoluteLimit,
    userAgent: browserInWords(userAgent ?? ""),
  });
  await tx.delete(sessions).where(or(lt(sessions.expiresAt, at), lt(sessions.lastSeenAt, at - idleLimit)));
  return `${cookieName}=${token}; Max-Age=${absoluteLimit / 1000}; ${attributes}`;
}

/** The Set-Cookie header that signs the browser out. */
export const endedCookie = `${cookieName}=; Max-Age=0; ${attributes}`;

/** The person whose session the request carries; null when there is none, it has run out, or the account is disabled. */
export async function readSession(request: Request): Promise<Actor | null> {
  // A request with a bearer token is judged by that token alone: it is exempt from the origin check.
  if (hasBearerToken(request.headers)) return null;
  const token = tokenIn(request.headers.get("Cookie"));
  if (!token) return null;
  const at = now();
  const [row] = await db()
    .select({
      ...actorColumns,
      sessionId: sessions.id,
      lastSeenAt: sessions.lastSeenAt,
    })
    .from(sessions)
    .innerJoin(users, eq(users.id, sessions.userId))
    .where(
      and(eq(sessions.id, idOf(token)), gt(sessions.expiresAt, at), gt(sessions.lastSeenAt, at - idleLimit), isNull(users.disabledAt)),
    );
  if (!row) return null;
  const { lastSeenAt, ...actor } = row;
  if (lastSeenAt < at - touchEvery)
    await write((tx) => tx.update(sessions).set({ lastSeenAt: at }).where(eq(sessions.id, actor.sessionId)));
  return actor;
}

/** Ends one session of a person. A session of somebody else is left alone. */
export async function endSession(tx: Tx, userId: string, sessionId: string): Promise<void> {
  await tx.delete(sessions).where(and(eq(sessions.id, sessionId), eq(sessions.userId, userId)));
}

/** Ends all sessions of a person, or all but the one they are using. */
export async function endAllSessions(tx: Tx, userId: string, keep = ""): Promise<void> {
  await tx.delete(sessions).where(and(eq(sessions.userId, userId), ne(sessions.id, keep)));
}

/** A person's live sessions, the last used first. */
export function sessionsOf(userId: string) {
  const at = now();
  return db()
    .select()
    .from(sessions)
    .where(and(eq(sessions.userId, userId), gt(sessions.expiresAt, at), gt(sessions.lastSeenAt, at - idleLimit)))
    .orderBy(desc(sessions.lastSeenAt));
}

function tokenIn(cookies: string | null): string | undefined {
  const pair = cookies?.split(/;\s*/).find((c) => c.startsWith(`${cookieName}=`));
  const token = pair?.slice(cookieName.length + 1);
  return token && /^[0-9A-Za-z]{43}$/.test(token) ? token : undefined;
}

/** "Firefox on Android". Enough to know one's own browsers apart, and nothing that tells people apart. */
function browserInWords(userAgent: string): string {
  const first = (names: [RegExp, string][]) => names.find(([pattern]) => pattern.test(userAgent))?.[1];
  const browser = first([
    [/Edg\//, "Edge"],
    [/Firefox\//, "Firefox"],
    [/Chrom(e|ium)\//, "Chrome"],
    [/Safari\//, "Safari"],
  ]);
  const system = first([
    [/Android/, "Android"],
    [/iPad|iPhone/, "iOS"],
    [/Windows/, "Windows"],
    [/Mac OS X/, "macOS"],
    [/Linux/, "Linux"],
  ]);
  return [browser ?? "A browser", system && `on ${system}`].filter(Boolean).join(" ");
}
