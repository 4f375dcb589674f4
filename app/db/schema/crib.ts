// The crib: measuring tools and extinguishers of an install, with their checks.
import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { installId, recordColumns } from "./columns";
import { files } from "./files";

export const AGENTS = ["co2", "clean", "foam", "powder", "water"] as const;

export const tools = sqliteTable(
  "tools",
  { id: text("id").primaryKey(), installId: installId(), name: text("name").notNull(), serial: text("serial").notNull() },
  (t) => [index("tools_install").on(t.installId)],
);

export const toolChecks = sqliteTable(
  "tool_checks",
  {
    ...recordColumns(),
    toolId: text("tool_id")
      .notNull()
      .references(() => tools.id, { onDelete: "restrict" }),
    at: integer("at").notNull(),
    good: integer("good", { mode: "boolean" }).notNull(),
    /** End of the last day in date, at the install; null on a bad check. */
    due: integer("due"),
    /** On a bad check: in doubt since then, where that is further back than its last good check. */
    since: integer("since"),
    /** Number and picture of the certificate. */
    certificate: text("certificate").notNull().default(""),
    photo: text("photo").references(() => files.id, { onDelete: "restrict" }),
    note: text("note").notNull(),
  },
  (t) => [uniqueIndex("tool_checks_seq").on(t.installId, t.seq), index("tool_checks_tool").on(t.toolId)],
);

export const extinguishers = sqliteTable(
  "extinguishers",
  {
    id: text("id").primaryKey(),
    installId: installId(),
    name: text("name").notNull(),
    agent: text("agent", { enum: AGENTS }).notNull(),
    classB: integer("class_b", { mode: "boolean" }).notNull(),
    /** kg */
    charge: real("charge").notNull(),
    /** As its label says: "10-B:C", "113B". */
    rating: text("rating").notNull().default(""),
    /** Where it stands or hangs. */
    position: text("position").notNull().default(""),
  },
  (t) => [index("extinguishers_install").on(t.installId)],
);

export const extinguisherChecks = sqliteTable(
  "extinguisher_checks",
  {
    ...recordColumns(),
    extinguisherId: text("extinguisher_id")
      .notNull()
      .references(() => extinguishers.id, { onDelete: "restrict" }),
    kind: text("kind", { enum: ["look", "service", "withdrawn"] }).notNull(),
    at: integer("at").notNull(),
    /** End of the last day in date, at the install; null on `withdrawn`. */
    due: integer("due"),
    note: text("note").notNull(),
  },
  (t) => [uniqueIndex("extinguisher_checks_seq").on(t.installId, t.seq), index("extinguisher_checks_of").on(t.extinguisherId)],
);
