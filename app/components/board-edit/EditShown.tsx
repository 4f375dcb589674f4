import { useEffect, useRef } from "react";
import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Lapses } from "#app/components/happenings/Lapses";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { ShownEdit } from "#app/lib/views/edit-shown";
import { holdWords, type WhatLapses } from "#app/lib/views/what-lapses";

interface EditShownProps {
  shown: ShownEdit;
  commandId: string;
  reply: FormReply | undefined;
}

/** What an edit changes, when it counts and what it makes lapse; making it is the form at its end. */
export function EditShown({ shown, commandId, reply }: EditShownProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  const { field, faults } = fieldsOf("make", reply);
  const { json } = shown;
  useEffect(() => {
    if (json && reply) heading.current?.focus();
  }, [json, reply]);
  const waits = shown.class === "waits";
  return (
    <section aria-labelledby="what-it-changes" className="border-t-2 border-ink bg-plate px-4 py-5 tablet:px-6">
      <h2 id="what-it-changes" ref={heading} tabIndex={-1} className="scroll-mt-4 text-h3">
        What it changes
      </h2>
      <p className="max-w-[72ch] pt-1">{shown.when}</p>
      <Changes changes={shown.changes} />
      {shown.lapses && <LapsesOfEdit lapses={shown.lapses} waits={waits} />}
      <Form method="post" className="flex flex-col items-start gap-3 pt-4">
        <FormFaults faults={faults} />
        <HiddenIds commandId={commandId} intent="make" also={{ what: json }} />
        <TextInput
          {...field("reason")}
          label={waits ? "Why, for the inspector and the record" : "Why, for the record"}
          optional={!waits}
          rows={2}
          maxLength={1000}
          className="w-full max-w-[720px]"
        />
        <Fitting size="act" className="tablet:min-w-80" note={waits ? "the old rule holds until then" : "into the record"}>
          {waits ? "Put it to an inspector" : "Change the board"}
        </Fitting>
      </Form>
    </section>
  );
}

export function Changes({ changes }: { changes: ShownEdit["changes"] }) {
  return (
    <ul className="my-3 border-b border-line">
      {changes.map((change) => (
        <li key={change.says} className="grid gap-x-4 border-t border-line py-2 tablet:grid-cols-[140px_minmax(0,1fr)]">
          <b>{change.word}</b>
          <span className="break-words">{change.says}</span>
        </li>
      ))}
    </ul>
  );
}

/** What an edit makes lapse, the HOLD first. */
export function LapsesOfEdit({ lapses, waits }: { lapses: WhatLapses; waits: boolean }) {
  const hold = holdWords(lapses);
  return (
    <div className="flex flex-col gap-3">
      <h3 className="text-lead">{waits ? "What lapses once it is accepted" : "What lapses"}</h3>
      {hold && (
        <Notice kind="hold" title={hold}>
          Everybody answers again before the next GO.
        </Notice>
      )}
      {lapses.releaseLapses && <Notice kind="lapsed" title="The release for taxi tests lapses." />}
      {lapses.clearance && (
        <p>
          Clearance falls from <b>{lapses.clearance.from}</b> to <b>{lapses.clearance.to}</b>.
        </p>
      )}
      {lapses.gates.length > 0 ? <Lapses gates={lapses.gates} /> : <p>Nothing that stands now lapses.</p>}
    </div>
  );
}
