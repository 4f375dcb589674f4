import { db } from "#app/db/client.server";
import { fileFor } from "#app/db/queries/files.server";
import { actorOf } from "#app/lib/auth/actor.server";
import { requireUser } from "#app/lib/auth/guards.server";
import { readBytes, readThumb } from "#app/lib/storage/files.server";
import type { Route } from "./+types/files.$fileId";

export const middleware: Route.MiddlewareFunction[] = [requireUser];

const endings: Record<string, string> = { "image/jpeg": "jpg", "image/png": "png", "image/webp": "webp" };

/** A photo of an install, for its members alone. It never runs as a page: sandboxed, with no right to load anything. */
export async function loader({ request, params, context }: Route.LoaderArgs) {
  const file = await fileFor(db(), params.fileId, actorOf(context).userId);
  const ending = file && endings[file.type];
  if (!file || !ending)
    return new Response("This photo is not on an install of yours.", {
      status: 404,
      headers: { "Content-Type": "text/plain; charset=utf-8" },
    });
  // A small copy for lists: `?small`.
  const small = new URL(request.url).searchParams.has("small");
  const tag = `"${file.hash}${small ? "-small" : ""}"`;
  const headers = new Headers({
    ETag: tag,
    "Cache-Control": "private, max-age=86400, immutable",
    Vary: "Cookie",
    "Content-Type": small ? "image/webp" : file.type,
    "Content-Disposition": `inline; filename="photo-${file.id}.${small ? "webp" : ending}"`,
    "Content-Security-Policy": "default-src 'none'; sandbox",
  });
  if (request.headers.get("If-None-Match") === tag) return new Response(null, { status: 304, headers });
  const bytes = await (small ? readThumb(file.hash) : readBytes(file.hash));
  headers.set("Content-Length", String(bytes.length));
  return new Response(new Uint8Array(bytes), { headers });
}
