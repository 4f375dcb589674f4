// The person's own choice of units. No install's record speaks of it: values are kept in SI whatever is shown.
import { eq } from "drizzle-orm";
import { write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import type { UnitSystem } from "#app/lib/units/display";

export const setUnits = (userId: string, units: UnitSystem): Promise<unknown> =>
  write((tx) => tx.update(users).set({ units }).where(eq(users.id, userId)));
