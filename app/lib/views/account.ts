/** A person's own account in words: where they are signed in, which programs ask for them, which mails they want. Pure. */
import { when } from "#app/lib/gates/when";
import type { MailChoice, Scope } from "#app/lib/schemas/account";

export interface SessionView {
  id: string;
  browser: string;
  here: boolean;
  says: string;
}

interface SessionRow {
  id: string;
  userAgent: string;
  createdAt: number;
  lastSeenAt: number;
  expiresAt: number;
}

/** Times in UTC: an account is at no place. */
const utc = (at: number) => when(at, "UTC");

export function sessionView({ id, userAgent, createdAt, lastSeenAt, expiresAt }: SessionRow, here: string): SessionView {
  const says = `signed in ${utc(createdAt)}, last used ${utc(lastSeenAt)}, ends ${utc(expiresAt)}`;
  return { id, browser: userAgent || "A browser", here: id === here, says };
}

export const MAIL_WORDS: Record<MailChoice, { label: string; note: string }> = {
  runs: { label: "Runs on which you hold no place", note: "GO, no-go, HOLD and SCRUB, as lead" },
  "runs-out": { label: "Proofs that run out", note: "a day before a planned run needs them, as lead or builder" },
  due: { label: "Dates in the crib", note: "calibrations and extinguishers, before they run out, as lead or builder" },
};

export const SCOPE_WORDS: Record<Scope, { label: string; note: string }> = {
  read: { label: "Read boards", note: "of every install on which you are" },
  record: { label: "Read and record", note: "photos and signatures too; signing takes your PIN as well" },
};

export interface TokenView {
  id: string;
  name: string;
  may: string;
  says: string;
  over: boolean;
}

interface TokenRow {
  id: string;
  name: string;
  scopes: Scope[];
  createdAt: number;
  expiresAt: number;
  lastUsedAt: number | null;
}

export function tokenView({ id, name, scopes, createdAt, expiresAt, lastUsedAt }: TokenRow, now: number): TokenView {
  const over = expiresAt <= now;
  const used = lastUsedAt === null ? "never used" : `last used ${utc(lastUsedAt)}`;
  const ends = `${over ? "ran out" : "good to"} ${when(expiresAt, "UTC", true)}`;
  const may = SCOPE_WORDS[scopes.includes("record") ? "record" : "read"].label.toLowerCase();
  return { id, name, may, says: `made ${utc(createdAt)}, ${used}, ${ends}`, over };
}
