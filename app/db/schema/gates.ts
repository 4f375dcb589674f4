// Gates as they are defined now. Nothing of a gate's state is stored: it is derived from the records each time.
import { integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { Gate } from "#app/lib/gates/snapshot";
import type { RequiredBy, SignPolicy, Validity } from "#app/lib/template/types";
import { installId } from "./columns";

export const gates = sqliteTable(
  "gates",
  {
    id: text("id").primaryKey(),
    installId: installId(),
    key: text("key").notNull(),
    position: integer("position").notNull(),
    name: text("name").notNull(),
    short: text("short").notNull(),
    revision: integer("revision").notNull().default(1),
    /** Gate ids. */
    needs: text("needs", { mode: "json" }).$type<string[]>().notNull(),
    after: text("after", { mode: "json" }).$type<string[]>().notNull(),
    requiredBy: text("required_by", { mode: "json" }).$type<RequiredBy>().notNull(),
    eachRun: integer("each_run", { mode: "boolean" }).notNull(),
    lookBack: text("look_back", { mode: "json" }).$type<NonNullable<Gate["lookBack"]>>(),
    validity: text("validity", { mode: "json" }).$type<Validity>(),
    policy: text("policy", { mode: "json" }).$type<SignPolicy>().notNull(),
    caution: text("caution"),
    hidden: integer("hidden", { mode: "boolean" }).notNull().default(false),
  },
  (t) => [uniqueIndex("gates_install_key").on(t.installId, t.key)],
);
