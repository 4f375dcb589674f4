// Mail that has to go out. A row is written in the transaction of the act that it tells about, and sent by the mail worker.
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";

/** One file of a mail. `content` is base64. A calendar entry is an attachment of type text/calendar with its `method`. */
export type StoredAttachment = { name: string; type: string; content: string; method?: "PUBLISH" | "REQUEST" | "CANCEL" };

export const outbox = sqliteTable(
  "outbox",
  {
    id: text("id").primaryKey(),
    installId: text("install_id"),
    kind: text("kind").notNull(),
    toUserId: text("to_user_id"),
    toAddress: text("to_address").notNull(),
    subject: text("subject").notNull(),
    text: text("text").notNull(),
    html: text("html"),
    attachments: text("attachments", { mode: "json" }).$type<StoredAttachment[]>().notNull().default([]),
    /** Stable over retries, so that a mail sent twice is shown once. */
    messageId: text("message_id").notNull().unique(),
    inReplyTo: text("in_reply_to"),
    references: text("references", { mode: "json" }).$type<string[]>().notNull().default([]),
    /** Two acts with one key make one mail. */
    dedupeKey: text("dedupe_key").notNull().unique(),
    createdAt: integer("created_at").notNull(),
    nextTryAt: integer("next_try_at").notNull(),
    tries: integer("tries").notNull().default(0),
    leaseUntil: integer("lease_until").notNull().default(0),
    leaseBy: text("lease_by"),
    sentAt: integer("sent_at"),
    failedAt: integer("failed_at"),
    lastError: text("last_error"),
  },
  (t) => [index("outbox_due").on(t.sentAt, t.failedAt, t.nextTryAt), index("outbox_install").on(t.installId, t.createdAt)],
);

export type OutboxRow = typeof outbox.$inferSelect;
