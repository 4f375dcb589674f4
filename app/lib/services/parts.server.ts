// Small parts of services: which role an act names, and the state "stale".
import type { CurrentMember } from "#app/db/queries/membership.server";
import type { Role } from "#app/lib/gates/snapshot";
import { type Refusal, refuse } from "#app/lib/services/outcome";

/** The first of `wanted` that the member holds now; where they hold none, their first role (bad news is taken from any member). */
export const roleOf = (member: CurrentMember, ...wanted: Role[]): Role =>
  wanted.find((r) => member.roles.includes(r)) ?? member.roles[0] ?? "crew";

/** What the person saw is no longer so. */
export const stale = (message: string): Refusal => refuse(409, "stale", message);
