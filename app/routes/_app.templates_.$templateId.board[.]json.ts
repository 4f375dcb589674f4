import { db } from "#app/db/client.server";
import { ownTemplate } from "#app/db/queries/own-templates.server";
import { actorOf } from "#app/lib/auth/actor.server";
import type { Route } from "./+types/_app.templates_.$templateId.board[.]json";

/** One of the person's own templates as a file, to be read in again here or elsewhere. */
export async function loader({ context, params }: Route.LoaderArgs) {
  const kept = await ownTemplate(db(), actorOf(context).userId, params.templateId);
  if (!kept) throw new Response("Not found", { status: 404 });
  const name = kept.name.replace(/[^A-Za-z0-9]+/g, "-").replace(/^-|-$/g, "");
  return new Response(`${JSON.stringify(kept.body, null, 1)}\n`, {
    headers: {
      "Content-Type": "application/json; charset=utf-8",
      "Content-Disposition": `attachment; filename="board-${name || "template"}.json"`,
      "Cache-Control": "private, no-store",
    },
  });
}
