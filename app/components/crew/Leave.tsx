import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";

/** A member's own way out. It says what follows before it is done. */
export function Leave({ commandId, reply, place }: { commandId: string; reply: FormReply | undefined; place: string | null }) {
  const { back, faults } = fieldsOf("leave", reply);
  return (
    <section aria-label="Leave" className="border-t border-line px-4 py-4 tablet:px-6">
      <details open={back}>
        <summary className="min-h-hit py-3 font-semibold text-fitting-ink">Leave this install</summary>
        <FormFaults faults={faults} />
        <p className="max-w-[62ch] pb-3">
          All your roles here end and you do not see the install any more. What you did and signed stays in the record.
          {place && ` You are ${place}: it waits for the place to be filled, and GO turns into HOLD.`} To come back you need a new
          invitation.
        </p>
        <Form method="post">
          <HiddenIds commandId={commandId} intent="leave" />
          <Fitting>Leave this install</Fitting>
        </Form>
      </details>
    </section>
  );
}
