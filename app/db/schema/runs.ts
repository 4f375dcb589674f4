// Runs: plan versions, the crew's acknowledgements and answers, the wind, the acts from GO to the reading of the log.
import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { PlanVersion, Recorded, RunAct } from "#app/lib/gates/snapshot";
import type { RunCard } from "#app/lib/template/types";
import { installId, recordColumns } from "./columns";

type Without<T> = T extends unknown ? Omit<T, keyof Recorded | "act"> : never;
/** What an act says besides who and when; see RunAct. */
export type ActDetail = Without<RunAct>;

export const runs = sqliteTable(
  "runs",
  {
    id: text("id").primaryKey(),
    installId: installId(),
    rung: text("rung").notNull(),
    label: text("label").notNull(),
    place: text("place").notNull(),
    plannedStart: integer("planned_start"),
  },
  (t) => [uniqueIndex("runs_install_label").on(t.installId, t.label)],
);

const runId = () =>
  text("run_id")
    .notNull()
    .references(() => runs.id, { onDelete: "restrict" });

export const planVersions = sqliteTable(
  "plan_versions",
  {
    ...recordColumns(),
    runId: runId(),
    version: integer("version").notNull(),
    /** Crankshaft speed, 1/s. */
    rpm: real("rpm").notNull(),
    card: text("card", { mode: "json" }).$type<RunCard>().notNull(),
    positions: text("positions", { mode: "json" }).$type<PlanVersion["positions"]>().notNull(),
    windLimit: real("wind_limit").notNull(),
    gustLimit: real("gust_limit").notNull(),
    requiredGates: text("required_gates", { mode: "json" }).$type<string[]>().notNull(),
  },
  (t) => [uniqueIndex("plan_versions_seq").on(t.installId, t.seq), uniqueIndex("plan_versions_run").on(t.runId, t.version)],
);

export const acks = sqliteTable("acks", { ...recordColumns(), runId: runId(), version: integer("version").notNull() }, (t) => [
  uniqueIndex("acks_seq").on(t.installId, t.seq),
]);

export const answers = sqliteTable(
  "answers",
  {
    ...recordColumns(),
    runId: runId(),
    version: integer("version").notNull(),
    answer: text("answer", { enum: ["go", "no-go"] }).notNull(),
    reason: text("reason").notNull(),
    queueEmpty: integer("queue_empty", { mode: "boolean" }).notNull(),
  },
  (t) => [uniqueIndex("answers_seq").on(t.installId, t.seq)],
);

export const winds = sqliteTable(
  "winds",
  {
    ...recordColumns(),
    runId: runId(),
    /** m/s */
    speed: real("speed").notNull(),
    gust: real("gust").notNull(),
    tail: integer("tail", { mode: "boolean" }).notNull(),
    /** End of that day at the install. */
    dayEnds: integer("day_ends").notNull(),
  },
  (t) => [uniqueIndex("winds_seq").on(t.installId, t.seq)],
);

export const runActs = sqliteTable(
  "run_acts",
  {
    ...recordColumns(),
    runId: runId(),
    act: text("act").$type<RunAct["act"]>().notNull(),
    detail: text("detail", { mode: "json" }).$type<ActDetail>().notNull(),
  },
  (t) => [uniqueIndex("run_acts_seq").on(t.installId, t.seq), index("run_acts_run").on(t.runId)],
);
