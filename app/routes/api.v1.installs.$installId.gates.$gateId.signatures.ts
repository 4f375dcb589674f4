import { actorOf } from "#app/lib/auth/actor.server";
import { requireUserOfApi } from "#app/lib/auth/guards.server";
import { readJson } from "#app/lib/http/json.server";
import { refusedJson } from "#app/lib/http/respond.server";
import { signatureRequestSchema } from "#app/lib/schemas/board-api";
import { invalid } from "#app/lib/services/outcome";
import { signGates } from "#app/lib/services/sign-gates.server";
import type { Route } from "./+types/api.v1.installs.$installId.gates.$gateId.signatures";

export const middleware: Route.MiddlewareFunction[] = [requireUserOfApi("record")];

export function loader() {
  return Response.json(
    { code: "method", message: "A signature is given by POST. The board tells what stands." },
    { status: 405, headers: { Allow: "POST" } },
  );
}

/** The same service as the sign sheet, so a script is refused with the same sentence. */
export async function action({ request, params, context }: Route.ActionArgs) {
  const body = await readJson(request);
  if (!body.ok) return refusedJson(invalid(body.message));
  const sent = signatureRequestSchema.safeParse(body.value);
  if (!sent.success) {
    const [issue] = sent.error.issues;
    return refusedJson(
      invalid(
        `${issue?.path.join(".") || "The body"}: ${issue?.message ?? "cannot be read"}. See the description of this address in the README.`,
      ),
    );
  }
  const { commandId, as, pin, covers } = sent.data;
  const actor = actorOf(context);
  const outcome = await signGates({ installId: params.installId, actor, commandId }, { as, pin, gates: [{ gate: params.gateId, covers }] });
  return outcome.ok ? Response.json({ signatures: outcome.value.signatures }, { status: 201 }) : refusedJson(outcome);
}
