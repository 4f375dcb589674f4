// The demo: nine invented people and three invented installs, their past worked through the services day by day, so that its
// records are chained like any other. One install is a step from its first start, one in mid build-up, one just set up.
import { eq } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { pastClock } from "#app/db/seed/clock";
import { daysBefore, workingZone } from "#app/db/seed/days";
import { sorrel, tansy, teasel } from "#app/db/seed/stories.server";
import { hash } from "#app/lib/auth/hash.server";
import { hashPin } from "#app/lib/auth/pin.server";
import { now } from "#app/lib/clock";
import { newId } from "#app/lib/ids";
import { PASSWORD, PEOPLE, PIN } from "../../fixtures/demo/people";

export interface SignIn {
  name: string;
  email: string;
  password: string;
  pin: string;
  role: string;
}

/** Loads the demo, unless its people are there already. Returns its sign-ins. */
export async function seedDemo(): Promise<SignIn[]> {
  const signIns = PEOPLE.map(({ name, email, role }) => ({ name, email, role, password: PASSWORD, pin: PIN }));
  const [there] = await db()
    .select({ id: users.id })
    .from(users)
    .where(eq(users.email, signIns[0]?.email ?? ""));
  if (there) return signIns;
  const present = now();
  const zone = workingZone(present);
  const ids = await letPeopleIn(daysBefore(present, 60, "12:00", zone));
  for (const story of [sorrel, teasel, tansy]) {
    const clock = pastClock(present);
    try {
      await story({ clock, ids, zone });
    } finally {
      clock.done();
    }
  }
  return signIns;
}

/** Accounts of the demo's people, by their keys. One password and one PIN for all: they are printed on the console anyway. */
async function letPeopleIn(createdAt: number): Promise<Map<string, string>> {
  const [passwordHash, pinHash] = [await hash(PASSWORD), await hashPin(PIN)];
  const rows = PEOPLE.map(({ key, name, email, admin }) => ({
    key,
    id: newId(),
    name,
    email,
    passwordHash,
    pinHash,
    isAdmin: admin,
    createdAt,
  }));
  await write((tx) => tx.insert(users).values(rows.map(({ key: _, ...row }) => row)));
  return new Map(rows.map((r) => [r.key, r.id]));
}
