// One aircraft's powerplant install, and what its board was generated from.
import { integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { Settings } from "#app/lib/gates/snapshot";
import type { GeneratedBoard, Traits } from "#app/lib/template/types";
import { users } from "./users";

export const installs = sqliteTable("installs", {
  id: text("id").primaryKey(),
  registration: text("registration").notNull(),
  name: text("name").notNull(),
  /** IANA name. Days end and times are shown there. */
  timeZone: text("time_zone").notNull(),
  traits: text("traits", { mode: "json" }).$type<Traits>().notNull(),
  settings: text("settings", { mode: "json" }).$type<Settings>().notNull(),
  templateVersion: text("template_version").notNull(),
  positions: text("positions", { mode: "json" }).$type<GeneratedBoard["positions"]>().notNull(),
  leftOut: text("left_out", { mode: "json" }).$type<GeneratedBoard["leftOut"]>().notNull(),
  /** What a run's post-run gate is made from when the run starts. */
  postRun: text("post_run", { mode: "json" }).$type<GeneratedBoard["postRun"]>().notNull(),
  createdAt: integer("created_at").notNull(),
  createdBy: text("created_by")
    .notNull()
    .references(() => users.id, { onDelete: "restrict" }),
});

export type InstallRow = typeof installs.$inferSelect;
