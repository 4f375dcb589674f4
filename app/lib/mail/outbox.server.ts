// Mail is written into the outbox in the transaction of the act that it tells about, so that one cannot happen without
// the other. The worker sends it afterwards.
import { and, eq, isNotNull, isNull } from "drizzle-orm";
import type { Tx } from "#app/db/client.server";
import { outbox, type StoredAttachment } from "#app/db/schema/outbox";
import { now } from "#app/lib/clock";
import { env } from "#app/lib/env.server";
import { newId } from "#app/lib/ids";

/** Kinds of mails whose link is a secret. */
export const LINK_MAILS = ["invitation", "reset", "new-address"];

export type Mail = {
  /** What it is about, in one word for the Mail page: "go", "hold", "pin-locked" ... */
  kind: string;
  installId?: string;
  to: { userId?: string; address: string };
  subject: string;
  text: string;
  html?: string;
  attachments?: StoredAttachment[];
  /** Message-IDs of earlier mails, as `enqueue` returned them: a HOLD answers its GO. */
  inReplyTo?: string;
  references?: string[];
  /** Two mails with one key are one mail. */
  dedupeKey: string;
};

/** Adds a mail. With a key that is there already it adds nothing and returns the first one's ids. */
export async function enqueue(tx: Tx, mail: Mail): Promise<{ id: string; messageId: string }> {
  const id = newId();
  const messageId = `<${id}@${mailDomain()}>`;
  const at = now();
  await tx
    .insert(outbox)
    .values({
      id,
      installId: mail.installId,
      kind: mail.kind,
      toUserId: mail.to.userId,
      toAddress: bareAddress(mail.to.address),
      subject: oneLine(mail.subject),
      text: mail.text,
      html: mail.html,
      attachments: mail.attachments ?? [],
      messageId,
      inReplyTo: mail.inReplyTo,
      references: mail.references ?? [],
      dedupeKey: mail.dedupeKey,
      createdAt: at,
      nextTryAt: at,
    })
    .onConflictDoNothing({ target: outbox.dedupeKey });
  const [row] = await tx.select({ id: outbox.id, messageId: outbox.messageId }).from(outbox).where(eq(outbox.dedupeKey, mail.dedupeKey));
  if (!row) throw new Error("The outbox lost a mail that it has just taken");
  return row;
}

/** Gives a mail that was given up another full set of tries, now. False when it was not given up. `installId` null: any mail of the instance. */
export async function tryAgain(tx: Tx, where: { id: string; installId: string | null }): Promise<boolean> {
  const revived = await tx
    .update(outbox)
    .set({ failedAt: null, tries: 0, nextTryAt: now(), leaseUntil: 0 })
    .where(
      and(
        eq(outbox.id, where.id),
        where.installId === null ? undefined : eq(outbox.installId, where.installId),
        isNotNull(outbox.failedAt),
        isNull(outbox.sentAt),
      ),
    )
    .returning({ id: outbox.id });
  return revived.length > 0;
}

function mailDomain(): string {
  return /@([A-Za-z0-9.-]+)>?\s*$/.exec(env.mailFrom)?.[1] ?? "bladecount.example";
}

/** A header is one line: line ends and other control characters become a space. Source: OWASP ASVS 5.0.0, 1.3.11. */
function oneLine(text: string): string {
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is taken out
  return text.replace(/[\u0000-\u001f\u007f\u2028\u2029]+/g, " ").trim();
}

/** One plain address. Anything that could name a second recipient or end the header is a bug in the caller's check. */
function bareAddress(address: string): string {
  if (!/^[^\s,;:<>"()[\]\\@]+@[^\s,;:<>"()[\]\\@]+$/.test(address)) throw new Error("Not one plain mail address");
  return address;
}
