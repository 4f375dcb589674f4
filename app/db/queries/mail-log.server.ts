// What an install's mail came to: sent, still trying, given up. Newest first, without the bodies.
import { desc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";
import { users } from "#app/db/schema/users";

export interface MailLogRow {
  id: string;
  kind: string;
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
  return rows.map(({ failedAt, ...row }) => ({ ...row, state: row.sentAt !== null ? "sent" : failedAt !== null ? "given up" : "waiting" }));
}
