import { data, redirect } from "react-router";
import { BoardLadder, HiddenList } from "#app/components/board-edit/BoardLadder";
import { EditShown } from "#app/components/board-edit/EditShown";
import { EditsWaiting } from "#app/components/board-edit/EditsWaiting";
import { KeepTemplate } from "#app/components/board-edit/KeepTemplate";
import { FormFaults } from "#app/components/forms/FormFaults";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { waitingEdits } from "#app/db/queries/edits.server";
import { actOnEdits } from "#app/lib/http/edit-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { boardEditView, editorOf } from "#app/lib/views/board-edit";
import { shownWaiting } from "#app/lib/views/edit-shown";
import { TEMPLATES } from "#app/lib/views/own-templates";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.set-up_.board";

export const meta: Route.MetaFunction = () => [{ title: "Board editor · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  const waiting = await waitingEdits(db(), installId);
  return {
    view: boardEditView(e, me),
    waiting: waiting.map((w) => shownWaiting(e, me, w, me.units)),
    home: boardOf(installId),
    formId: newId(),
  };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const acted = await actOnEdits(install, await readForm(request));
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(acted.anchor === "kept" ? TEMPLATES : `${editorOf(install.installId)}#${acted.anchor}`, 303);
}

export default function BoardEditor({ loaderData, actionData }: Route.ComponentProps) {
  const { view, waiting, home, formId } = loaderData;
  const { faults } = fieldsOf("make", actionData);
  return (
    <>
      <main id="main">
        <TitlePipe title="Board editor" state={view.state} aside={<Fitting href={`${home}/set-up`}>Set-up</Fitting>} />
        <CautionSlab title="what is not asked is not looked at.">
          Before you hide or widen anything, read what the engine, propeller or kit maker asks for. Their papers, local rules and licensed
          judgement come before this board.
        </CautionSlab>
        <p className="max-w-[72ch] border-b border-line px-4 py-4 tablet:px-6">
          {view.free
            ? "Nothing has been proved yet: the lead shapes the board freely."
            : "What asks for more counts at once. What asks for less waits for an inspector; until then the old rule holds."}
        </p>
        {!view.may.ok && (
          <Notice kind="plain" title="You can read the board" band>
            {view.may.why}
          </Notice>
        )}
        {faults.length > 0 && !actionData?.shown && (
          <div className="px-4 py-4 tablet:px-6">
            <FormFaults faults={faults} />
          </div>
        )}
        {actionData?.shown && <EditShown shown={actionData.shown} commandId={`${formId}-make`} reply={actionData} />}
        <EditsWaiting edits={waiting} commandId={formId} reply={actionData} />
        <BoardLadder gates={view.gates} commandId={formId} may={view.may.ok} />
        <HiddenList rows={view.hidden} may={view.may.ok} />
        <KeepTemplate commandId={`${formId}-keep`} reply={actionData} />
      </main>
      <Foot
        says={waiting.length ? `${waiting.length} ${waiting.length === 1 ? "waits" : "wait"} for an inspector` : "No edit waits"}
        note="Every change stands in the record."
      >
        {view.may.ok ? (
          <Fitting href={view.addGate} size="act" note="with its edges and who signs">
            Add a gate
          </Fitting>
        ) : (
          <Fitting href={home} size="act" note="where the install stands">
            Board
          </Fitting>
        )}
      </Foot>
    </>
  );
}
