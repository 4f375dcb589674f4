// Findings, and what became of each: another severity, fixed, fix refused, closed.
import { index, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { SystemKey } from "#app/lib/template/types";
import { recordColumns } from "./columns";
import { files } from "./files";

export const SEVERITIES = ["grounding", "limiting", "watch"] as const;

export const findings = sqliteTable(
  "findings",
  {
    ...recordColumns(),
    system: text("system").$type<SystemKey>().notNull(),
    words: text("words").notNull(),
    photo: text("photo").references(() => files.id, { onDelete: "restrict" }),
    /** File ids of the photos after the first. */
    morePhotos: text("more_photos", { mode: "json" }).$type<string[]>().notNull().default([]),
    severity: text("severity", { enum: SEVERITIES }).notNull(),
    /** Highest crankshaft speed while open, 1/s; only on limiting. */
    cap: real("cap"),
  },
  (t) => [uniqueIndex("findings_seq").on(t.installId, t.seq)],
);

export const findingEvents = sqliteTable(
  "finding_events",
  {
    ...recordColumns(),
    findingId: text("finding_id")
      .notNull()
      .references(() => findings.id, { onDelete: "restrict" }),
    kind: text("kind", { enum: ["severity", "fixed", "not-fixed", "closed"] }).notNull(),
    severity: text("severity", { enum: SEVERITIES }),
    cap: real("cap"),
    /** Action taken, reason, or remark. */
    words: text("words").notNull(),
  },
  (t) => [uniqueIndex("finding_events_seq").on(t.installId, t.seq), index("finding_events_of").on(t.findingId)],
);
