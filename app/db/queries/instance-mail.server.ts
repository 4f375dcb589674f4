// The outbox of the whole instance, for administrators: to whom, when, what became of it. What is in it is not for them; of an install's
// mails not even the subject is.
import { and, count, desc, isNotNull, isNull } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";

export type MailState = "sent" | "waiting" | "given up";

export interface InstanceMailRow {
  id: string;
  kind: string;
  to: string;
  /** "" for an install's. */
  subject: string;
  createdAt: number;
  sentAt: number | null;
  nextTryAt: number;
  tries: number;
  lastError: string | null;
  state: MailState;
}

const STATE = {
  sent: isNotNull(outbox.sentAt),
  waiting: and(isNull(outbox.sentAt), isNull(outbox.failedAt)),
  "given up": and(isNull(outbox.sentAt), isNotNull(outbox.failedAt)),
};

/** The newest first. */
export async function instanceMail(reader: Reader, state: MailState, most = 100): Promise<InstanceMailRow[]> {
  const rows = await reader.select().from(outbox).where(STATE[state]).orderBy(desc(outbox.createdAt), desc(outbox.id)).limit(most);
  return rows.map(({ id, kind, toAddress, subject, installId, createdAt, sentAt, nextTryAt, tries, lastError }) => {
    const to = toAddress;
    return { id, kind, to, subject: installId ? "" : subject, createdAt, sentAt, nextTryAt, tries, lastError, state };
  });
}

export async function mailCounts(reader: Reader): Promise<Record<MailState, number>> {
  const of = async (state: MailState) => (await reader.select({ n: count() }).from(outbox).where(STATE[state]))[0]?.n ?? 0;
  return { sent: await of("sent"), waiting: await of("waiting"), "given up": await of("given up") };
}
