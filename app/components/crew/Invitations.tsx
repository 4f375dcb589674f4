import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { StateRow } from "#app/components/ui/StateRow";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { InvitationView } from "#app/lib/views/invitations";

interface InvitationsProps {
  invitations: InvitationView[];
  /** One was just sent. */
  written: boolean;
  formId: string;
  reply: FormReply | undefined;
}

/** For the leads: who was asked and has not answered. */
export function Invitations({ invitations, written, formId, reply }: InvitationsProps) {
  return (
    <section id="invitations" aria-labelledby="invitations-title">
      <h2 id="invitations-title" className="border-b-2 border-ink px-4 pt-6 pb-3 text-h3 tablet:px-6">
        Invited, not answered yet
      </h2>
      {written && (
        <div className="px-4 pt-3 tablet:px-6">
          <Notice kind="done" title="The invitation is on its way." role="status">
            They are a member when they accept. Whether the mail got through shows under Mail.
          </Notice>
        </div>
      )}
      {invitations.length === 0 && (
        <p className="px-4 py-3 text-ink-2 tablet:px-6">Nobody. Whoever you invite shows here until they accept.</p>
      )}
      <ul>
        {invitations.map(({ id, anchor, email, role, says, over }) => (
          <StateRow key={id} id={anchor} nut={over ? "lapsed" : "todo"} word={over ? "ran out" : "waits"}>
            <h3 className="text-lead break-words">
              {email}, <b>{role}</b>
            </h3>
            <p className="text-ink-2">{says}</p>
            <FormFaults faults={fieldsOf(anchor, reply).faults} />
            <div className="flex flex-wrap gap-3 pt-2">
              <Form method="post" preventScrollReset>
                <HiddenIds commandId={`${formId}-again-${id}`} intent="send-again" also={{ invitation: id }} />
                <Fitting label={`Send the invitation of ${email} as ${role} again`}>Send again</Fitting>
              </Form>
              <Form method="post" preventScrollReset>
                <HiddenIds commandId={`${formId}-off-${id}`} intent="withdraw" also={{ invitation: id }} />
                <Fitting label={`Withdraw the invitation of ${email} as ${role}`}>Withdraw</Fitting>
              </Form>
            </div>
          </StateRow>
        ))}
      </ul>
    </section>
  );
}
