import { actorOf } from "#app/lib/auth/actor.server";
import { requireUserOfApi } from "#app/lib/auth/guards.server";
import { loadInstall } from "#app/lib/http/install.server";
import { refusedJson } from "#app/lib/http/respond.server";
import { notFound } from "#app/lib/services/outcome";
import { boardAnswer, tagOf } from "#app/lib/views/board-answer";
import type { Route } from "./+types/api.v1.installs.$installId.board";

export const middleware: Route.MiddlewareFunction[] = [requireUserOfApi("read")];

export async function loader({ request, params, context }: Route.LoaderArgs) {
  const install = await loadInstall(params.installId, actorOf(context));
  if (!install) return refusedJson(notFound("That install"));
  const answer = boardAnswer(install.e, install.head);
  const tag = tagOf(answer);
  const headers = { ETag: tag, "Cache-Control": "private, no-cache" };
  // For a page that only asks whether anything has changed: no body worth the name when nothing has.
  if (new URL(request.url).searchParams.get("since") === tag) return Response.json({ unchanged: true }, { headers });
  const known = request.headers.get("If-None-Match")?.split(/\s*,\s*/) ?? [];
  // A proxy that compresses makes the tag a weak one: W/"...".
  if (known.some((k) => k.replace(/^W\//, "") === tag)) return new Response(null, { status: 304, headers });
  return Response.json(answer, { headers });
}

/** The page's own fetcher: where the network is gone, nothing is known to have changed, and the board stays on the screen. */
export async function clientLoader({ serverLoader }: Route.ClientLoaderArgs) {
  try {
    return await serverLoader();
  } catch {
    return { unchanged: true };
  }
}
