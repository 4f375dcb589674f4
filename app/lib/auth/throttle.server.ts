// Limits on wrong tries. A try is counted, in one transaction, before it is judged: a hundred sent at once get no more
// tries than a hundred sent in turn. What is right afterwards takes its count back.
// An account waits a minute at most, so that nobody can lock a person out for long; the address that tries many accounts
// waits up to a quarter of an hour. Source of the aims: OWASP ASVS 5.0.0, 6.1.1 and 6.3.1; figures: common practice, no source.
import { createHmac } from "node:crypto";
import { eq, lt, sql } from "drizzle-orm";
import { type Tx, write } from "#app/db/client.server";
import { attempts } from "#app/db/schema/attempts";
import { now } from "#app/lib/clock";
import { secret } from "#app/lib/env.server";
import { currentRequest } from "#app/lib/http/request.server";

export type AttemptKind = "account" | "address" | "pin" | "asks" | "mailbox";
/** `until`: the instant before which nothing more is tried, if this try turns out wrong; in the past when there is no wait. */
export type Attempt = { ok: true; failures: number; until: number } | { ok: false; until: number };

const second = 1_000;
const minute = 60 * second;
const day = 24 * 60 * minute;

/** Wrong PINs in a row before the PIN is locked. */
export const pinTries = 5;

/** Milliseconds to wait after the n-th wrong try in a row. */
const waitAfter: Record<AttemptKind, (failures: number) => number> = {
  account: (n) => (n < 5 ? 0 : Math.min(minute, second * 2 ** (n - 4))),
  address: (n) => (n < 20 ? 0 : Math.min(15 * minute, second * 2 ** (n - 19))),
  // Mails that somebody makes the instance send, whether wanted or not: nothing takes their count back but a day without any.
  asks: (n) => (n < 20 ? 0 : Math.min(15 * minute, second * 2 ** (n - 19))),
  mailbox: (n) => (n < 4 ? 0 : Math.min(60 * minute, minute * 2 ** (n - 3))),
  pin: (n) => (n % pinTries === 0 ? Math.min(day, 15 * minute * 2 ** (n / pinTries - 1)) : 0),
};

const keyOf = (kind: AttemptKind, value: string) => createHmac("sha256", secret("addresses")).update(`${kind}:${value}`).digest("hex");

/** Counts a try as wrong until `succeeded` says otherwise; refuses it while the wait of earlier ones runs. */
export function beginAttempt(kind: AttemptKind, value: string): Promise<Attempt> {
  const key = keyOf(kind, value);
  return write(async (tx) => {
    const at = now();
    const [row] = await tx.select().from(attempts).where(eq(attempts.key, key));
    if (row && row.blockedUntil > at) return { ok: false, until: row.blockedUntil };
    const failures = (row && row.lastAt > at - day ? row.failures : 0) + 1;
    const next = { failures, lastAt: at, blockedUntil: at + waitAfter[kind](failures) };
    await tx
      .insert(attempts)
      .values({ key, kind, ...next })
      .onConflictDoUpdate({ target: attempts.key, set: next });
    return { ok: true, failures, until: next.blockedUntil };
  });
}

/** The try was right: an account or PIN starts afresh; an address gets back this one try only, for it may hold many accounts. */
export async function succeeded(tx: Tx, kind: AttemptKind, value: string): Promise<void> {
  const key = keyOf(kind, value);
  if (kind === "address") {
    await tx
      .update(attempts)
      .set({ failures: sql`max(0, ${attempts.failures} - 1)`, blockedUntil: 0 })
      .where(eq(attempts.key, key));
  } else {
    await tx.delete(attempts).where(eq(attempts.key, key));
  }
  await tx.delete(attempts).where(lt(attempts.lastAt, now() - 2 * day));
}

/** The network address behind this request, as the server saw it. */
export const addressNow = (): string => currentRequest()?.address ?? "unknown";

/**
 * Counts a mail that somebody asks for: by their network address, by their account where they have one, and by the mailbox that it
 * goes to, for each kind of mail apart. Null when it may be sent, else the sentence that says how long to wait. It is the same whether
 * the mailbox belongs to an account or not.
 */
export async function askedTooOften(kind: string, mailbox: string, userId?: string): Promise<string | null> {
  const counts: [AttemptKind, string][] = [["asks", `address:${addressNow()}`]];
  if (userId) counts.push(["asks", `account:${userId}`]);
  counts.push(["mailbox", `${kind}:${mailbox}`]);
  for (const [what, value] of counts) {
    const attempt = await beginAttempt(what, value);
    if (attempt.ok) continue;
    const why = what === "mailbox" ? "Several mails went to this address lately" : "Many mails were asked for lately";
    return `${why}. Wait ${waitInWords(attempt.until)}, then try again; look among the unwanted mail too.`;
  }
  return null;
}

/** "12 seconds", "3 minutes": how long to wait, rounded up. */
export function waitInWords(until: number): string {
  const seconds = Math.max(1, Math.ceil((until - now()) / second));
  if (seconds < 90) return seconds === 1 ? "1 second" : `${seconds} seconds`;
  const minutes = Math.ceil(seconds / 60);
  return minutes < 120 ? `${minutes} minutes` : `${Math.ceil(minutes / 60)} hours`;
}
