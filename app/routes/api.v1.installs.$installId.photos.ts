import { db } from "#app/db/client.server";
import { memberOf } from "#app/db/queries/membership.server";
import { actorOf } from "#app/lib/auth/actor.server";
import { requireUserOfApi } from "#app/lib/auth/guards.server";
import { readPhotoForm } from "#app/lib/http/multipart.server";
import { refusedJson } from "#app/lib/http/respond.server";
import { invalid, notFound } from "#app/lib/services/outcome";
import type { Route } from "./+types/api.v1.installs.$installId.photos";

export const middleware: Route.MiddlewareFunction[] = [requireUserOfApi("record")];

export function loader() {
  return Response.json({ code: "method", message: "A photo is sent by POST." }, { status: 405, headers: { Allow: "POST" } });
}

/** Stores one picture, for a record that will name it. Fields: commandId, photo. The same command again answers with the same file. */
export async function action({ request, params, context }: Route.ActionArgs) {
  if (!(await memberOf(db(), params.installId, actorOf(context).userId))) return refusedJson(notFound("That install"));
  const act = { installId: params.installId, actor: actorOf(context) };
  const { stored, refused } = await readPhotoForm(request, act, null);
  const [no] = refused;
  if (no) return refusedJson(no.outcome);
  const [file] = stored;
  return file ? Response.json({ file }, { status: 201 }) : refusedJson(invalid("No picture came with it. Choose one, then send it again."));
}
