// Files that belong to an install's record. The bytes lie in the data folder under their hash; a row is their only way in.
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { installId, userId } from "./columns";

export const files = sqliteTable(
  "files",
  {
    id: text("id").primaryKey(),
    installId: installId(),
    /** SHA-256 of the stored bytes, hex. */
    hash: text("hash").notNull(),
    type: text("type").notNull(),
    size: integer("size").notNull(),
    /** The name it came with, for display alone. */
    name: text("name").notNull(),
    createdAt: integer("created_at").notNull(),
    by: userId("by"),
  },
  (t) => [index("files_install").on(t.installId, t.hash)],
);

export type FileRow = typeof files.$inferSelect;
