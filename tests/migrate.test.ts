import { cpSync, existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { openDatabase } from "#app/db/client.server";
import { migrateDatabase } from "#app/db/migrate.server";
import { emptyDatabaseUrl, generateMigrations } from "./support/db";

const folder = mkdtempSync(join(tmpdir(), "bladecount-migrate-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

/** A folder of invented migrations, one statement each. */
function migrations(name: string, statements: string[]): string {
  const at = join(folder, name);
  mkdirSync(join(at, "meta"), { recursive: true });
  for (const [i, sql] of statements.entries()) writeFileSync(join(at, `${i}.sql`), sql);
  const entries = statements.map((_, idx) => ({ idx, version: "6", when: idx + 1, tag: String(idx), breakpoints: true }));
  writeFileSync(join(at, "meta", "_journal.json"), JSON.stringify({ version: "7", dialect: "sqlite", entries }));
  return at;
}
const first =
  "CREATE TABLE parents (id integer PRIMARY KEY);--> statement-breakpoint\nCREATE TABLE children (parent integer REFERENCES parents(id));";

describe("migrations", () => {
  it("build a new database without a copy, and copy one that holds something before they change it", async () => {
    const target = openDatabase(emptyDatabaseUrl());
    const backupFolder = join(folder, "backups");
    expect(await migrateDatabase({ target, backupFolder, folder: migrations("a", [first]) })).toBeUndefined();
    expect(existsSync(backupFolder)).toBe(false);
    expect(await migrateDatabase({ target, backupFolder, folder: migrations("a", [first]) })).toBeUndefined();

    await target.client.execute("INSERT INTO parents VALUES (7)");
    const copy = await migrateDatabase({ target, backupFolder, folder: migrations("b", [first, "ALTER TABLE parents ADD name text;"]) });
    const before = openDatabase(`file:${copy}`);
    expect((await before.client.execute("SELECT * FROM parents")).rows.map((r) => ({ ...r }))).toEqual([{ id: 7 }]);
    expect((await target.client.execute("SELECT * FROM parents")).rows.map((r) => ({ ...r }))).toEqual([{ id: 7, name: null }]);
    before.close();
    target.close();
  });

  it("refuse a database of a newer program", async () => {
    const target = openDatabase(emptyDatabaseUrl());
    await migrateDatabase({ target, folder: migrations("c", [first, "CREATE TABLE more (id integer);"]) });
    await expect(migrateDatabase({ target, folder: migrations("d", [first]) })).rejects.toThrow("newer version");
    target.close();
  });

  it("say so when they leave a reference to nothing", async () => {
    const target = openDatabase(emptyDatabaseUrl());
    const backupFolder = join(folder, "backups-e");
    await migrateDatabase({ target, folder: migrations("e", [first]) });
    await target.client.execute("INSERT INTO parents VALUES (1)");
    await target.client.execute("INSERT INTO children VALUES (1)");
    await expect(migrateDatabase({ target, backupFolder, folder: migrations("f", [first, "DELETE FROM parents;"]) })).rejects.toThrow(
      /1 broken references \(children\)\. The state before is in .*before-migration/,
    );
    target.close();
  });

  it("that are committed are those of the schema", () => {
    const copy = join(folder, "drizzle");
    cpSync("drizzle", copy, { recursive: true });
    const before = readdirSync(copy);
    generateMigrations(copy);
    expect(readdirSync(copy)).toEqual(before);
  });
});
