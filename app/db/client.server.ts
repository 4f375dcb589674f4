// The only door to the database, and the only place that opens a transaction.
// SQLite has one writer and libSQL's calls are synchronous: a second BEGIN IMMEDIATE while a transaction is open blocks the
// event loop for the whole busy timeout, so that the first can never commit. So all writes of a process go through one queue.
import { AsyncLocalStorage } from "node:async_hooks";
import { mkdirSync } from "node:fs";
import { dirname } from "node:path";
import { type Client, createClient, type ResultSet } from "@libsql/client";
import { drizzle, type LibSQLDatabase } from "drizzle-orm/libsql";
import type { BaseSQLiteDatabase } from "drizzle-orm/sqlite-core";
import { env } from "#app/lib/env.server";
import * as schema from "./schema/index";

export type Db = LibSQLDatabase<typeof schema>;
export type Tx = Parameters<Parameters<Db["transaction"]>[0]>[0];
/** What a query takes: `db()` outside a transaction, `tx` inside one. */
export type Reader = BaseSQLiteDatabase<"async", ResultSet, typeof schema>;

export type Database = {
  url: string;
  db: Db;
  client: Client;
  write: <T>(work: (tx: Tx) => Promise<T>) => Promise<T>;
  close: () => void;
};

// True while a transaction's own code runs; set false at its end, for code that it left running behind.
const inside = new AsyncLocalStorage<{ open: boolean }>();

/** Opens a database file (`file:` URL) or a remote libSQL server. The busy timeout is only ever waited on for other processes. */
export function openDatabase(url: string, authToken?: string): Database {
  const local = url.startsWith("file:");
  if (local) mkdirSync(dirname(decodeURIComponent(url.slice("file:".length))), { recursive: true });
  const client = createClient({ url, authToken, timeout: 5000 });
  const db = drizzle(client, { schema });
  // WAL is a property of the file, so one connection sets it for all. synchronous stays FULL, libSQL's default:
  // what was acknowledged survives a power cut.
  let tail: Promise<unknown> = local ? client.execute("PRAGMA journal_mode = WAL") : Promise.resolve();
  tail.catch(() => {});

  async function transact<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
    const scope = { open: true };
    try {
      return await inside.run(scope, () => db.transaction(work));
    } catch (error) {
      // After SQLITE_BUSY a pooled connection goes on reading an old snapshot, so none of them is kept.
      if (isBusy(error)) await client.reconnect();
      throw error;
    } finally {
      scope.open = false;
    }
  }

  function write<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
    if (inside.getStore()?.open) return Promise.reject(new Error("write() inside write() would wait for itself: pass tx on instead"));
    const run = tail.then(() => transact(work));
    tail = run.catch(() => {});
    return run;
  }
  return { url, db, client, write, close: () => client.close() };
}

/** SQLite's own code of a failed statement, such as SQLITE_CONSTRAINT_UNIQUE; undefined for any other error. */
export function sqliteCode(error: unknown): string | undefined {
  for (let e = error; e instanceof Error; e = e.cause) {
    const { extendedCode, code } = e as { extendedCode?: unknown; code?: unknown };
    const found = [extendedCode, code].find((c) => typeof c === "string" && c.startsWith("SQLITE_"));
    if (found) return String(found);
  }
  return undefined;
}

const isBusy = (error: unknown) => sqliteCode(error)?.startsWith("SQLITE_BUSY") ?? false;

// One per process; survives module reloads in development.
const holder = globalThis as typeof globalThis & { bladecountDatabase?: Database };

/** The process's database, opened at first use from the settings. */
export function database(): Database {
  holder.bladecountDatabase ??= openDatabase(env.databaseUrl, env.databaseAuthToken);
  return holder.bladecountDatabase;
}

/** Makes `next` the process's database. For tests and for scripts. */
export function setDatabase(next: Database | undefined): void {
  holder.bladecountDatabase = next;
}

/** Reads outside a transaction. Throws inside one, where it would not see what the transaction has written. */
export function db(): Db {
  if (inside.getStore()?.open) throw new Error("db() inside write() does not see the transaction: use tx instead");
  return database().db;
}

/**
 * Runs `work` in the one write transaction of this process, after all that were asked for before it. It commits when `work`
 * resolves and rolls back when it throws. Await nothing in it but `tx`: no mail, no files, no hashing.
 */
export function write<T>(work: (tx: Tx) => Promise<T>): Promise<T> {
  return database().write(work);
}
