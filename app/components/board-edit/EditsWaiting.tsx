import { Form } from "react-router";
import { LapsesOfEdit } from "#app/components/board-edit/EditShown";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { StateRow } from "#app/components/ui/StateRow";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { ShownWaiting } from "#app/lib/views/edit-shown";

interface EditsWaitingProps {
  edits: ShownWaiting[];
  commandId: string;
  reply: FormReply | undefined;
}

/** Edits that ask for less: an inspector accepts or rejects each with a reason; until then the old rule holds. */
export function EditsWaiting({ edits, commandId, reply }: EditsWaitingProps) {
  if (!edits.length) return null;
  return (
    <section id="waiting" aria-labelledby="waiting-title" className="scroll-mt-4 border-b-2 border-ink">
      <div className="border-b border-line px-4 py-4 tablet:px-6">
        <h2 id="waiting-title" className="text-h3">
          Edits that wait
        </h2>
        <p className="max-w-[72ch] text-ink-2">
          They ask for less than the board does, or say it anew. None of them counts before an inspector, another person than its maker, has
          accepted it.
        </p>
      </div>
      <ul>
        {edits.map((edit) => (
          <WaitingRow key={edit.id} edit={edit} commandId={`${commandId}-${edit.id}`} reply={reply} />
        ))}
      </ul>
    </section>
  );
}

function WaitingRow({ edit, commandId, reply }: { edit: ShownWaiting; commandId: string; reply: FormReply | undefined }) {
  const { field, faults } = fieldsOf(`${edit.anchor}-answer`, reply);
  const about = <span className="sr-only">: {edit.subject}</span>;
  return (
    <StateRow id={edit.anchor} nut="second-eyes" word="waits" open>
      <h3 className="text-lead">{edit.subject}</h3>
      <ul className="list-disc pl-5">
        {edit.says.map((line) => (
          <li key={line} className="break-words">
            {line}
          </li>
        ))}
      </ul>
      <p className="pt-1">“{edit.reason}”</p>
      <p className="text-note text-ink-2">{edit.by}</p>
      {edit.lapses && (
        <details>
          <summary className="min-h-hit py-3 font-semibold text-fitting-ink">What lapses once it is accepted{about}</summary>
          <div className="pb-3">
            <LapsesOfEdit lapses={edit.lapses} waits />
          </div>
        </details>
      )}
      {edit.mayReject.ok ? (
        <Form method="post" id={`${edit.anchor}-answer`} className="flex flex-col items-start gap-3 pt-2 pb-2" preventScrollReset>
          <FormFaults faults={faults} />
          <HiddenIds commandId={commandId} also={{ edit: edit.id }} />
          <TextInput {...field("reason")} label="Why" maxLength={1000} className="w-full max-w-[560px]" />
          <div className="flex w-full flex-wrap gap-x-10 gap-y-3">
            <Answers edit={edit} />
          </div>
        </Form>
      ) : (
        <p className="pt-2">{edit.mayReject.why}</p>
      )}
    </StateRow>
  );
}

/** Accepting stands a gap apart from its opposite. */
function Answers({ edit }: { edit: ShownWaiting }) {
  const { mayAccept, wordsOnly, own, subject } = edit;
  return (
    <>
      {wordsOnly && mayAccept.ok && (
        <Fitting name="intent" value="accept-words" note="proofs stay" label={`Accept as words only: ${subject}. Proofs stay.`}>
          Accept as words only
        </Fitting>
      )}
      {!own && (
        <Fitting
          name="intent"
          value="accept"
          note={wordsOnly ? "it asks for something else: proofs lapse" : "it counts from then on"}
          reason={mayAccept.ok ? undefined : mayAccept.why}
          label={`Accept: ${subject}. ${mayAccept.ok ? "It counts from then on." : mayAccept.why}`}
        >
          Accept
        </Fitting>
      )}
      <Fitting
        name="intent"
        value="reject"
        variant="outline"
        note="nothing changes"
        label={`${own ? "Take it back" : "Reject"}: ${subject}`}
      >
        {own ? "Take it back" : "Reject"}
      </Fitting>
    </>
  );
}
