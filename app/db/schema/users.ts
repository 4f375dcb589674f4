// People. One row a person, on whatever installs they work; roles live with the install's members.
import { integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { MailChoice } from "../../lib/schemas/account";

export const users = sqliteTable("users", {
  id: text("id").primaryKey(),
  /** Lower case, so that the unique index is blind to case. */
  email: text("email").notNull().unique(),
  name: text("name").notNull(),
  passwordHash: text("password_hash").notNull(),
  pinHash: text("pin_hash"),
  units: text("units", { enum: ["si", "us"] })
    .notNull()
    .default("si"),
  theme: text("theme", { enum: ["auto", "apron", "hangar"] })
    .notNull()
    .default("auto"),
  /** Mails that the person does not want; those about runs on which they hold a place are not among them. */
  mailOff: text("mail_off", { mode: "json" }).$type<MailChoice[]>().notNull().default([]),
  isAdmin: integer("is_admin", { mode: "boolean" }).notNull().default(false),
  createdAt: integer("created_at").notNull(),
  disabledAt: integer("disabled_at"),
});

export type User = typeof users.$inferSelect;
