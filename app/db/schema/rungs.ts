// Rungs of the build-up, and the records that leave one out or set it back.
import { integer, primaryKey, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { CrewRule, RunCard } from "#app/lib/template/types";
import { installId, recordColumns } from "./columns";

export const rungs = sqliteTable(
  "rungs",
  {
    installId: installId(),
    key: text("key").notNull(),
    position: integer("position").notNull(),
    name: text("name").notNull(),
    /** Planned highest crankshaft speed, 1/s; null until the ratings are entered. */
    rpm: real("rpm"),
    share: real("share").notNull(),
    card: text("card", { mode: "json" }).$type<RunCard>().notNull(),
    crew: text("crew", { mode: "json" }).$type<CrewRule>().notNull(),
    /** The answers about the install ask for it no more, and no run of it was planned. */
    hidden: integer("hidden", { mode: "boolean" }).notNull().default(false),
  },
  (t) => [primaryKey({ columns: [t.installId, t.key] })],
);

export const rungEvents = sqliteTable(
  "rung_events",
  {
    ...recordColumns(),
    rung: text("rung").notNull(),
    kind: text("kind", { enum: ["left-out", "set-back"] }).notNull(),
    reason: text("reason").notNull(),
  },
  (t) => [uniqueIndex("rung_events_seq").on(t.installId, t.seq)],
);
