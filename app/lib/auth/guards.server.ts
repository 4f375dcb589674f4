// Middleware that stands before routes: it finds out who asks, and turns away whom the route is not for.
import { type MiddlewareFunction, redirect } from "react-router";
import { actorContext } from "#app/lib/auth/actor.server";
import { readSession } from "#app/lib/auth/session.server";

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

/** Data for programs: an anonymous request is told so in JSON. */
export const requireUserOfApi: MiddlewareFunction<Response> = async ({ request, context }, next) => {
  const actor = await readSession(request);
  if (!actor) return Response.json({ code: "signed-out", message: "You are signed out. Sign in, then send this again." }, { status: 401 });
  context.set(actorContext, actor);
  return next();
};
