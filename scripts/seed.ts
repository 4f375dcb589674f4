// Brings the database named by the settings up to date, fills it with the demo, and keeps the demo's sign-ins beside it in
// sign-ins.json. Refuses where people are already: these sign-ins are public.
import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { database, db } from "#app/db/client.server";
import { migrateDatabase } from "#app/db/migrate.server";
import { users } from "#app/db/schema/users";
import { seedDemo } from "#app/db/seed.server";
import { env } from "#app/lib/env.server";

await migrateDatabase();
if ((await db().select({ id: users.id }).from(users).limit(1)).length > 0) {
  console.error(`${env.dataFolder} already holds people, so no demo was loaded. Name an empty folder in DATA_DIR.`);
  process.exit(1);
}
const people = await seedDemo();
writeFileSync(join(env.dataFolder, "sign-ins.json"), JSON.stringify(people, null, 2));
console.log(`The demo is loaded into ${env.dataFolder}. Its ${people.length} sign-ins are in sign-ins.json there.`);
database().close();
