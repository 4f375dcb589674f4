// Items of gates as they are defined now. What was defined before is in the events; a proof names the revision it was made for.
import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { Item } from "#app/lib/gates/snapshot";
import type { ItemDef, Part, SystemKey, Validity } from "#app/lib/template/types";
import { installId } from "./columns";
import { gates } from "./gates";

export const items = sqliteTable(
  "items",
  {
    id: text("id").primaryKey(),
    installId: installId(),
    gateId: text("gate_id")
      .notNull()
      .references(() => gates.id, { onDelete: "restrict" }),
    key: text("key").notNull(),
    position: integer("position").notNull(),
    revision: integer("revision").notNull().default(1),
    hidden: integer("hidden", { mode: "boolean" }).notNull().default(false),
    words: text("words").notNull(),
    killer: integer("killer", { mode: "boolean" }).notNull(),
    secondEyes: integer("second_eyes", { mode: "boolean" }).notNull(),
    guarded: integer("guarded", { mode: "boolean" }).notNull(),
    onCard: integer("on_card", { mode: "boolean" }).notNull(),
    systems: text("systems", { mode: "json" }).$type<SystemKey[]>().notNull(),
    parts: text("parts", { mode: "json" }).$type<Part[]>().notNull(),
    /** Item ids. */
    follows: text("follows", { mode: "json" }).$type<string[]>().notNull(),
    step: text("step", { mode: "json" }).$type<NonNullable<Item["step"]>>(),
    validity: text("validity", { mode: "json" }).$type<Validity>(),
    caution: text("caution"),
    /** Published source of what is asked, where there is one. */
    source: text("source"),
    offersLooseEnd: text("offers_loose_end", { mode: "json" }).$type<NonNullable<ItemDef["offersLooseEnd"]>>(),
  },
  (t) => [index("items_install").on(t.installId), uniqueIndex("items_gate_key").on(t.gateId, t.key)],
);
