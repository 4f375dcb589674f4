import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import { type Database, db, openDatabase, sqliteCode, write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { freshDatabase } from "./support/db";

const person = (id: string) => ({ id, email: `${id}@n0100.example`, name: "0", passwordHash: "-", createdAt: 1 });
const later = () => new Promise((resolve) => setImmediate(resolve));

async function countUp(target: Database["write"]): Promise<void> {
  await target(async (tx) => {
    const [row] = await tx.select({ name: users.name }).from(users).where(eq(users.id, "counter"));
    await later();
    await tx
      .update(users)
      .set({ name: String(Number(row?.name) + 1) })
      .where(eq(users.id, "counter"));
  });
}
const counted = async () => Number((await db().select({ name: users.name }).from(users).where(eq(users.id, "counter")))[0]?.name);

describe("the write queue", () => {
  let database: Database;
  beforeEach(async () => {
    database = await freshDatabase();
    await write((tx) => tx.insert(users).values(person("counter")));
  });

  it("keeps the file in write-ahead mode", async () => {
    expect((await database.client.execute("PRAGMA journal_mode")).rows[0]?.journal_mode).toBe("wal");
  });

  it("loses nothing when fifty read, wait and write at once", async () => {
    await Promise.all(Array.from({ length: 50 }, () => countUp(write)));
    expect(await counted()).toBe(50);
  });

  it("loses nothing when two clients write to one file, one after the other", async () => {
    const other = openDatabase(database.url);
    for (let i = 0; i < 5; i++) {
      await countUp(write);
      await countUp(other.write);
    }
    other.close();
    expect(await counted()).toBe(10);
  });

  it("rolls a failing one back and goes on with the next", async () => {
    const failing = write(async (tx) => {
      await tx.insert(users).values(person("gone"));
      throw new Error("changed my mind");
    });
    const next = countUp(write);
    await expect(failing).rejects.toThrow("changed my mind");
    await next;
    expect(await counted()).toBe(1);
    expect(await db().select().from(users).where(eq(users.id, "gone"))).toEqual([]);
  });

  it("names SQLite's reason for a refused row", async () => {
    const error = await write((tx) => tx.insert(users).values({ ...person("second"), email: person("counter").email })).catch(
      (e: unknown) => e,
    );
    expect(sqliteCode(error)).toBe("SQLITE_CONSTRAINT_UNIQUE");
  });

  it("refuses a write inside a write, and reads beside it, instead of hanging", async () => {
    await expect(write(() => write(async () => 1))).rejects.toThrow("pass tx on");
    await expect(write(async () => db().select().from(users))).rejects.toThrow("use tx instead");
    await countUp(write);
    expect(await counted()).toBe(1);
  });

  it("lets work that a transaction started and left behind write once it is over", async () => {
    let begin = () => {};
    const signal = new Promise<void>((resolve) => {
      begin = resolve;
    });
    let left: Promise<void> = Promise.resolve();
    await write(async () => {
      left = signal.then(() => countUp(write));
    });
    begin();
    await left;
    expect(await counted()).toBe(1);
  });

  it("reads the newest rows again after the file was busy for too long", async () => {
    const other = openDatabase(database.url);
    const holder = await other.client.transaction("write");
    const hasty = openDatabase(database.url);
    await hasty.client.execute("PRAGMA busy_timeout = 0");
    await expect(hasty.write((tx) => tx.insert(users).values(person("late")))).rejects.toSatisfy((e) => sqliteCode(e) === "SQLITE_BUSY");
    await holder.execute("UPDATE users SET name = '7' WHERE id = 'counter'");
    await holder.commit();
    expect((await hasty.db.select().from(users).where(eq(users.id, "counter")))[0]?.name).toBe("7");
    other.close();
    hasty.close();
  });
});
