import { data, redirect } from "react-router";
import { EditorPage } from "#app/components/board-edit/EditorPage";
import { GateForm } from "#app/components/board-edit/GateForm";
import { actOnEdits, lookAtGate } from "#app/lib/http/edit-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { editorOf } from "#app/lib/views/board-edit";
import { gateFormView } from "#app/lib/views/edit-gate";
import type { Route } from "./+types/_app.installs.$installId.set-up_.board_.gates.$gateId";

export const meta: Route.MetaFunction = () => [{ title: "Gate · Bladecount" }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e, me, installId, snapshot } = context.get(installContext);
  const gate = snapshot.gates.find((g) => g.id === params.gateId) ?? null;
  if (!gate && params.gateId !== "new") throw new Response("Not found", { status: 404 });
  return { view: gateFormView(e, me, gate), back: editorOf(installId), formId: newId() };
}

export async function action({ context, params, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const sent = await readForm(request);
  const own = params.gateId === "new" ? null : params.gateId;
  if (own && !install.snapshot.gates.some((g) => g.id === own)) throw new Response("Not found", { status: 404 });
  const acted = sent.get("intent") === "fields" ? lookAtGate(install, sent, own) : await actOnEdits(install, sent);
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${editorOf(install.installId)}#${acted.anchor}`, 303);
}

export default function EditGate({ loaderData, actionData }: Route.ComponentProps) {
  const { view, back, formId } = loaderData;
  return (
    <EditorPage
      title={view.title}
      state={view.key ? `gate ${view.key}${view.hidden ? ", hidden" : ""}` : "not on the board yet"}
      back={back}
      reply={actionData}
      commandId={formId}
      may={view.may}
      fixed={
        view.fixed
          ? "It looks back on one run: what it asks was fixed when that run started."
          : view.hidden
            ? "It is hidden. Show it again in the board editor first."
            : null
      }
      hide={view.hide ? { what: view.hide, name: view.title } : null}
    >
      <GateForm view={view} reply={actionData} />
    </EditorPage>
  );
}
