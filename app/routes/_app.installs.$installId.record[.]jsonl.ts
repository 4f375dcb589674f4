import { db } from "#app/db/client.server";
import { recordBodies } from "#app/db/queries/record-lines.server";
import { installContext } from "#app/lib/http/install.server";
import type { Route } from "./+types/_app.installs.$installId.record[.]jsonl";

/** The record as JSON lines, oldest first: each event as it was hashed, and its hash. `npm run verify-record` checks such a file. */
export async function loader({ context }: Route.LoaderArgs) {
  const { installId, snapshot } = context.get(installContext);
  const lines = await recordBodies(db(), installId);
  const text = lines.map(({ body, hash }) => `{"event":${body},"hash":"${hash}"}\n`).join("");
  const name = snapshot.install.registration.replace(/[^A-Za-z0-9-]/g, "");
  return new Response(text, {
    headers: {
      "Content-Type": "application/jsonl; charset=utf-8",
      "Content-Disposition": `attachment; filename="record-${name || "install"}.jsonl"`,
      "Cache-Control": "private, no-store",
    },
  });
}
