import type { ReactNode } from "react";
import { Form } from "react-router";
import { EditShown } from "#app/components/board-edit/EditShown";
import { FormFaults } from "#app/components/forms/FormFaults";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { ShownEdit } from "#app/lib/views/edit-shown";
import type { May } from "#app/lib/views/may";

interface EditorPageProps {
  title: string;
  state: string;
  /** The list of gates and items. */
  back: string;
  reply: (FormReply & { shown?: ShownEdit }) | undefined;
  commandId: string;
  may: May;
  /** Why it takes no edit, whoever asks. */
  fixed: string | null;
  /** The edit that hides it, and what that is called. */
  hide: { what: string; name: string } | null;
  children: ReactNode;
}

/** One gate or item of the board editor: what an edit changes stands above the form, once it was asked for. */
export function EditorPage({ title, state, back, reply, commandId, may, fixed, hide, children }: EditorPageProps) {
  const { faults } = fieldsOf("make", reply);
  return (
    <main id="main">
      <TitlePipe title={title} state={state} aside={<Fitting href={back}>Board editor</Fitting>} />
      {(!may.ok || fixed) && (
        <Notice kind="plain" title="You can read this" band>
          {fixed ?? may.why}
        </Notice>
      )}
      {faults.length > 0 && !reply?.shown && (
        <div className="px-4 py-4 tablet:px-6">
          <FormFaults faults={faults} />
        </div>
      )}
      {reply?.shown && <EditShown shown={reply.shown} commandId={commandId} reply={reply} />}
      {may.ok && !fixed && children}
      {may.ok && !fixed && hide && (
        <section aria-labelledby="hide" className="border-t-2 border-ink px-4 py-5 tablet:px-6">
          <h2 id="hide" className="text-h3">
            Hide it
          </h2>
          <p className="max-w-[72ch] pb-3 text-ink-2">
            Nobody is asked for it any more. Nothing is deleted: it stays in the record, is listed in the dossier and can be shown again.
          </p>
          <Form method="post">
            <input type="hidden" name="what" value={hide.what} />
            <Fitting name="intent" value="look" note="nothing is changed yet">
              Look at what hiding {hide.name} changes
            </Fitting>
          </Form>
        </section>
      )}
    </main>
  );
}
