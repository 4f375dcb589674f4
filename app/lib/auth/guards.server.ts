// Middleware that stands before routes: it finds out who asks, and turns away whom the route is not for.
import { type MiddlewareFunction, redirect } from "react-router";
import { actorContext, actorOf } from "#app/lib/auth/actor.server";
import { readApiToken } from "#app/lib/auth/api-token.server";
import { readSession } from "#app/lib/auth/session.server";
import type { Scope } from "#app/lib/schemas/account";

/** Pages: an anonymous visitor is sent to sign in, and comes back afterwards. */
export const requireUser: MiddlewareFunction<Response> = async ({ request, url, context }, next) => {
  const actor = await readSession(request);
  if (!actor) {
    const to = request.method === "GET" ? `?to=${encodeURIComponent(url.pathname + url.search)}` : "";
    throw redirect(`/sign-in${to}`);
  }
  context.set(actorContext, actor);
  return next();
};

/** Data for programs: by a token that reaches that far, or by session; an anonymous request is told so in JSON. */
export const requireUserOfApi =
  (scope: Scope): MiddlewareFunction<Response> =>
  async ({ request, context }, next) => {
    const token = await readApiToken(request, scope);
    if (token && !token.ok) return refusedApi(token.status, token.code, token.message);
    const actor = token ? token.actor : await readSession(request);
    if (!actor) return refusedApi(401, "signed-out", "You are signed out. Sign in, then send this again.");
    context.set(actorContext, actor);
    return next();
  };

function refusedApi(status: number, code: string, message: string): Response {
  // Source of the header: RFC 6750, 3.
  const headers = status === 401 ? { "WWW-Authenticate": 'Bearer realm="bladecount"' } : undefined;
  return Response.json({ code, message }, { status, headers });
}

/** The instance's own pages. For everybody else they are not there. Stands behind `requireUser`. */
export const requireAdmin: MiddlewareFunction<Response> = async ({ context }, next) => {
  if (!actorOf(context).isAdmin) throw new Response("Not found", { status: 404 });
  return next();
};
