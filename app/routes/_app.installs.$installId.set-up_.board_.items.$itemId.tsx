import { data, redirect } from "react-router";
import { EditorPage } from "#app/components/board-edit/EditorPage";
import { ItemForm } from "#app/components/board-edit/ItemForm";
import { actOnEdits, lookAtItem } from "#app/lib/http/edit-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { editorOf } from "#app/lib/views/board-edit";
import { itemFormView } from "#app/lib/views/edit-item";
import type { Route } from "./+types/_app.installs.$installId.set-up_.board_.items.$itemId";

export const meta: Route.MetaFunction = () => [{ title: "Item · Bladecount" }];

export function loader({ context, params, url }: Route.LoaderArgs) {
  const { e, me, installId, snapshot } = context.get(installContext);
  const item = snapshot.items.find((i) => i.id === params.itemId) ?? null;
  const gate = url.searchParams.get("gate") ?? "";
  const view = !item && params.itemId !== "new" ? null : itemFormView(e, me, item, gate, me.units);
  if (!view) throw new Response("Not found", { status: 404 });
  const run = snapshot.gates.find((g) => g.id === view.gate.id)?.lookBack?.kind === "run";
  return { view, fixed: run, back: editorOf(installId), formId: newId() };
}

export async function action({ context, params, request, url }: Route.ActionArgs) {
  const install = context.get(installContext);
  const sent = await readForm(request);
  const own = params.itemId === "new" ? null : params.itemId;
  if (own && !install.snapshot.items.some((i) => i.id === own)) throw new Response("Not found", { status: 404 });
  const acted =
    sent.get("intent") === "fields" ? lookAtItem(install, sent, own, url.searchParams.get("gate") ?? "") : await actOnEdits(install, sent);
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${editorOf(install.installId)}#${acted.anchor}`, 303);
}

export default function EditItem({ loaderData, actionData }: Route.ComponentProps) {
  const { view, fixed, back, formId } = loaderData;
  return (
    <EditorPage
      title={view.title}
      state={view.hidden ? `hidden, in ${view.gate.name}` : `in ${view.gate.name}`}
      back={back}
      reply={actionData}
      commandId={formId}
      may={view.may}
      fixed={
        fixed
          ? "Its gate looks back on one run: what it asks was fixed when that run started."
          : view.hidden
            ? "It is hidden. Show it again in the board editor first."
            : null
      }
      hide={view.hide ? { what: view.hide, name: view.title } : null}
    >
      <ItemForm view={view} reply={actionData} />
    </EditorPage>
  );
}
