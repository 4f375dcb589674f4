// What an install's mail came to: sent, still trying, given up. Newest first, without the bodies.
import { and, desc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";
import { users } from "#app/db/schema/users";

export interface MailLogRow {
  id: string;
  kind: string;
  /** Of the record that it tells about; "" where it tells about none. */
  act: string;
  to: string;
  name: string | null;
  subject: string;
  createdAt: number;
  state: "sent" | "waiting" | "given up";
  sentAt: number | null;
  nextTryAt: number;
  tries: number;
  lastError: string | null;
}

export async function mailLog(reader: Reader, installId: string, most = 200): Promise<MailLogRow[]> {
  const rows = await reader
    .select({
      id: outbox.id,
      kind: outbox.kind,
      dedupeKey: outbox.dedupeKey,
      to: outbox.toAddress,
      name: users.name,
      subject: outbox.subject,
      createdAt: outbox.createdAt,
      sentAt: outbox.sentAt,
      failedAt: outbox.failedAt,
      nextTryAt: outbox.nextTryAt,
      tries: outbox.tries,
      lastError: outbox.lastError,
    })
    .from(outbox)
    .leftJoin(users, eq(users.id, outbox.toUserId))
    .where(eq(outbox.installId, installId))
    .orderBy(desc(outbox.createdAt), desc(outbox.id))
    .limit(most);
  return rows.map(({ failedAt, dedupeKey, ...row }) => ({
    ...row,
    act: actOf(dedupeKey),
    state: row.sentAt !== null ? "sent" : failedAt !== null ? "given up" : "waiting",
  }));
}

/** One of this install's mails; null where it has no such one. */
export async function mailOf(reader: Reader, installId: string, id: string): Promise<{ id: string; kind: string; act: string } | null> {
  const [row] = await reader
    .select({ id: outbox.id, kind: outbox.kind, dedupeKey: outbox.dedupeKey })
    .from(outbox)
    .where(and(eq(outbox.id, id), eq(outbox.installId, installId)));
  return row ? { id: row.id, kind: row.kind, act: actOf(row.dedupeKey) } : null;
}

/** Crew mails are kept apart by "kind:act:reader". */
const actOf = (dedupeKey: string): string => dedupeKey.split(":")[1] ?? "";
