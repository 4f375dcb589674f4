import { data, redirect } from "react-router";
import { EditShown } from "#app/components/board-edit/EditShown";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { FormFaults } from "#app/components/forms/FormFaults";
import { AnswersForm } from "#app/components/new-install/AnswersForm";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { mayEditBoard } from "#app/lib/gates/edit-verdicts";
import { actOnEdits } from "#app/lib/http/edit-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { editorOf } from "#app/lib/views/board-edit";
import { answersView } from "#app/lib/views/edit-answers";
import { mayOf } from "#app/lib/views/may";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.set-up_.answers";

export const meta: Route.MetaFunction = () => [{ title: "Answers about the install · Bladecount" }];

export function loader({ context, url }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  const same = { kind: "traits", from: e.snapshot.traits, to: e.snapshot.traits, ids: {} } as const;
  return {
    view: answersView(e, me, url.searchParams, newId),
    may: mayOf(mayEditBoard(e, { member: me.id, edit: same })),
    home: boardOf(installId),
    formId: newId(),
  };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const acted = await actOnEdits(install, await readForm(request));
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${editorOf(install.installId)}#${acted.anchor}`, 303);
}

export default function Answers({ loaderData, actionData }: Route.ComponentProps) {
  const { view, may, home, formId } = loaderData;
  const { faults } = fieldsOf("make", actionData);
  return (
    <main id="main">
      <TitlePipe
        title="Answers about the install"
        state={view.changed.length ? `changed: ${view.changed.join(", ")}` : "as they stand"}
        aside={<Fitting href={`${home}/set-up`}>Set-up</Fitting>}
      />
      <CautionSlab title="an answer decides what is looked at.">
        Change one only where the aircraft is different from what stands here. Items come and go with it, and what uses it is proved again.
      </CautionSlab>
      {!may.ok && (
        <Notice kind="plain" title="You can look, not change" band>
          {may.why}
        </Notice>
      )}
      <div className="px-4 py-4 tablet:px-6">
        {faults.length > 0 && !actionData?.shown && <FormFaults faults={faults} />}
        <ErrorSummary errors={view.wrong} />
        <AnswersForm action={`${home}/set-up/answers`} questions={view.questions} errors={view.errors} carried={[]}>
          <p className="max-w-[72ch] pb-2 text-ink-2">
            Nothing is changed before you have seen below what comes, what goes and what lapses.
          </p>
        </AnswersForm>
        <Fitting form="answers" size="act" className="tablet:min-w-80" note="nothing is changed yet">
          Look at what it changes
        </Fitting>
      </div>
      {may.ok && view.shown && <EditShown shown={view.shown} commandId={formId} reply={actionData} />}
    </main>
  );
}
