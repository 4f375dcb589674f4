// Work that one process at a time may do: the clock. A lease that is not renewed runs out, so that a process that died holds nothing.
import { integer, sqliteTable, text } from "drizzle-orm/sqlite-core";

export const leases = sqliteTable("leases", {
  name: text("name").primaryKey(),
  holder: text("holder").notNull(),
  until: integer("until").notNull(),
});
