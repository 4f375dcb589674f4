// Boards that a person keeps as templates of their own. No install rests on one: what is made from it is a copy.
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { OwnTemplate } from "#app/lib/template/own-template";
import { userId } from "./columns";

export const boardTemplates = sqliteTable(
  "board_templates",
  {
    id: text("id").primaryKey(),
    ownerId: userId("owner_id"),
    name: text("name").notNull(),
    body: text("body", { mode: "json" }).$type<OwnTemplate>().notNull(),
    createdAt: integer("created_at").notNull(),
  },
  (t) => [index("board_templates_owner").on(t.ownerId)],
);
