// The install behind a request: who asks, the snapshot and what it means now, loaded once by the layout's middleware.
// An unknown install and somebody else's are the same 404.
import { createContext, type MiddlewareFunction } from "react-router";
import { db } from "#app/db/client.server";
import { boardNow } from "#app/db/queries/board-now.server";
import { memberOf } from "#app/db/queries/membership.server";
import { type Actor, actorOf } from "#app/lib/auth/actor.server";
import { now as clock } from "#app/lib/clock";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Instant, Role, Snapshot } from "#app/lib/gates/snapshot";
import type { UnitSystem } from "#app/lib/units/display";

export interface InstallContext {
  installId: string;
  snapshot: Snapshot;
  e: Evaluation;
  /** The person, with the roles held here now. */
  me: { id: string; name: string; roles: Role[]; units: UnitSystem };
  now: Instant;
  /** Newest event of the record. */
  head: { seq: number; hash: string };
}

export const installContext = createContext<InstallContext>();

/** Everything of the install as this person may see it, or null: not a member, or no such install. */
export async function loadInstall(installId: string, actor: Actor): Promise<InstallContext | null> {
  const member = await memberOf(db(), installId, actor.userId);
  const board = member && (await boardNow(db(), installId, clock()));
  if (!member || !board) return null;
  const { e, head } = board;
  const me = { id: member.id, name: member.name, roles: member.roles, units: actor.units };
  return { installId, snapshot: e.snapshot, e, me, now: e.at, head: { seq: head.seq, hash: head.hash } };
}

/** Stands before every page of an install. */
export const requireMember: MiddlewareFunction<Response> = async ({ params, context }, next) => {
  const loaded = await loadInstall(params.installId ?? "", actorOf(context));
  if (!loaded) throw new Response("Not found", { status: 404 });
  context.set(installContext, loaded);
  return next();
};
