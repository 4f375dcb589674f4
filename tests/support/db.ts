// Real database files for tests. The migrated file is built once for a given set of migrations and copied for each test.
import { execFileSync } from "node:child_process";
import { createHash } from "node:crypto";
import { copyFileSync, existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, renameSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { type Database, openDatabase, setDatabase } from "#app/db/client.server";
import { migrateDatabase } from "#app/db/migrate.server";

const folder = mkdtempSync(join(process.env.TEST_FOLDER ?? tmpdir(), "bladecount-test-"));
const opened: Database[] = [];
let files = 0;

// Not every worker lives to do this; `run-folder.ts` takes away what is left.
process.on("exit", () => {
  for (const database of opened) database.close();
  rmSync(folder, { recursive: true, force: true });
});

/** A new migrated database file, made the process's database. */
export async function freshDatabase(): Promise<Database> {
  const file = join(folder, `${++files}.db`);
  copyFileSync(await migratedTemplate(), file);
  const database = openDatabase(pathToFileURL(file).href);
  opened.push(database);
  setDatabase(database);
  return database;
}

/** A new empty file beside the others: its `file:` URL. */
export const emptyDatabaseUrl = (): string => pathToFileURL(join(folder, `${++files}.db`)).href;

async function migratedTemplate(): Promise<string> {
  const migrations = migrationsOrGenerated();
  const hash = hashOf(migrations, ".sql");
  const template = join(tmpdir(), "bladecount-templates", `${hash}.db`);
  if (existsSync(template)) return template;
  mkdirSync(join(tmpdir(), "bladecount-templates"), { recursive: true });
  const building = join(folder, "template.db");
  const database = openDatabase(pathToFileURL(building).href);
  await migrateDatabase({ target: database, folder: migrations });
  await database.client.execute("PRAGMA wal_checkpoint(TRUNCATE)");
  database.close();
  renameSync(building, template);
  return template;
}

function hashOf(root: string, ending: string): string {
  const hash = createHash("sha256");
  for (const name of readdirSync(root)
    .filter((n) => n.endsWith(ending))
    .sort())
    hash.update(name).update(readFileSync(join(root, name)));
  return hash.digest("hex").slice(0, 16);
}

/** The committed migrations; before the first was generated, those of the schema as it is now. */
function migrationsOrGenerated(): string {
  if (existsSync("drizzle/meta/_journal.json")) return "drizzle";
  const out = join(tmpdir(), "bladecount-templates", `generated-${hashOf("app/db/schema", ".ts")}`);
  if (!existsSync(out)) {
    const building = join(folder, "generated");
    generateMigrations(building);
    mkdirSync(join(tmpdir(), "bladecount-templates"), { recursive: true });
    if (!existsSync(out)) renameSync(building, out);
  }
  return out;
}

/** Runs the migration generator on the schema into `out`. Returns what it printed. */
export function generateMigrations(out: string): string {
  return execFileSync(
    process.execPath,
    ["node_modules/drizzle-kit/bin.cjs", "generate", "--dialect", "turso", "--schema", "./app/db/schema/index.ts", "--out", out],
    { encoding: "utf8", stdio: ["ignore", "pipe", "pipe"] },
  );
}
