import { db } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { log } from "#app/lib/log.server";

// The process can do its work: its database is there and has the tables.
export async function loader() {
  const headers = { "Content-Type": "text/plain; charset=utf-8" };
  try {
    await db().select({ id: users.id }).from(users).limit(1);
    return new Response("ready\n", { headers });
  } catch (error) {
    log.error({ err: error }, "not ready: the database cannot be read");
    return new Response("not ready: the database cannot be read\n", { status: 503, headers });
  }
}
