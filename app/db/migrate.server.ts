// Brings a database up to the schema of this program: copy first, then Drizzle's migrator, then a check of every reference.
// Run in one process before it serves: the migrator reads the state outside its transaction.
import { existsSync, mkdirSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { migrate } from "drizzle-orm/libsql/migrator";
import { type Database, database } from "#app/db/client.server";
import { now } from "#app/lib/clock";
import { env } from "#app/lib/env.server";

/** The folder of migrations: `drizzle` beside package.json, found from the source tree and from the build alike. */
export function migrationsFolder(from = dirname(fileURLToPath(import.meta.url))): string {
  for (let folder = from; folder !== dirname(folder); folder = dirname(folder)) {
    if (existsSync(join(folder, "drizzle", "meta", "_journal.json"))) return join(folder, "drizzle");
  }
  throw new Error("The folder of database migrations (drizzle) is missing: install the program again from its package.");
}

export type MigrationOptions = { target?: Database; folder?: string; backupFolder?: string };

/** Resolves to the path of the copy made before, or undefined when nothing was to do or the database was new. */
export async function migrateDatabase(options: MigrationOptions = {}): Promise<string | undefined> {
  const target = options.target ?? database();
  const folder = options.folder ?? migrationsFolder();
  const journal = JSON.parse(readFileSync(join(folder, "meta", "_journal.json"), "utf8")) as { entries: unknown[] };
  const applied = await appliedMigrations(target);
  if (applied > journal.entries.length) {
    throw new Error("The database was written by a newer version of this program. Start that version, or restore a backup made before it.");
  }
  if (applied === journal.entries.length) return undefined;
  const copy = applied > 0 && target.url.startsWith("file:") ? await backupBefore(target, options.backupFolder) : undefined;
  await migrate(target.db, { migrationsFolder: folder });
  const broken = await target.client.execute("PRAGMA foreign_key_check");
  if (broken.rows.length > 0) {
    const tables = [...new Set(broken.rows.map((row) => String(row.table)))].join(", ");
    throw new Error(
      `The new database schema left ${broken.rows.length} broken references (${tables}).${copy ? ` The state before is in ${copy}.` : ""}`,
    );
  }
  return copy;
}

async function appliedMigrations(target: Database): Promise<number> {
  const table = await target.client.execute("SELECT name FROM sqlite_master WHERE type = 'table' AND name = '__drizzle_migrations'");
  if (table.rows.length === 0) return 0;
  const count = await target.client.execute("SELECT count(*) AS n FROM __drizzle_migrations");
  return Number(count.rows[0]?.n ?? 0);
}

async function backupBefore(target: Database, backupFolder = join(env.dataFolder, "backups")): Promise<string> {
  mkdirSync(backupFolder, { recursive: true, mode: 0o700 });
  const stamp = new Date(now()).toISOString().replaceAll(/[:.]/g, "-");
  const file = join(backupFolder, `before-migration-${stamp}.db`);
  await target.client.execute({ sql: "VACUUM INTO ?", args: [file] });
  return file;
}
