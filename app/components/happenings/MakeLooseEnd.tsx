import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { NumberInput } from "#app/components/forms/NumberInput";
import { PhotoInput } from "#app/components/forms/PhotoInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { Undisturbed } from "#app/components/happenings/LooseEndItem";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { LooseEndsView, MakingShown } from "#app/lib/views/loose-ends";
import type { CameFrom } from "#app/lib/views/record-links";

interface MakeLooseEndProps {
  view: LooseEndsView;
  came: CameFrom;
  commandId: string;
  reply: (FormReply & { making?: MakingShown }) | undefined;
}

/** Something off, capped or locked out for now. Where making it undoes something, that is shown once, then confirmed. */
export function MakeLooseEnd({ view, came, commandId, reply }: MakeLooseEndProps) {
  const { field, faults } = fieldsOf("make", reply);
  const making = reply?.form === "make" ? reply.making : undefined;
  return (
    <section aria-labelledby="new" className="border-t-2 border-ink px-4 py-5 tablet:px-6">
      <h2 id="new" className="scroll-mt-4 text-h3">
        New loose end
      </h2>
      <p className="max-w-[66ch] text-ink-2">
        Something removed, disconnected, capped, locked out or left off for now. Write it down before you walk away from it.
      </p>
      <Form method="post" encType="multipart/form-data" className="mt-4 flex max-w-[860px] flex-col items-start gap-4" preventScrollReset>
        <FormFaults faults={faults} />
        <HiddenIds commandId={commandId} intent="make" also={making ? { seen: making.seen } : {}} />
        <div className="flex w-full flex-wrap items-start gap-4">
          <NumberInput {...field("count", "1")} label="How many" inputMode="numeric" size={4} />
          <TextInput
            {...field("what", came.asks?.what)}
            label="What"
            hint="As somebody else would look for it: vent caps, plug leads, the pitch breaker."
            maxLength={200}
            className="min-w-0 flex-1 basis-[300px]"
          />
        </div>
        <TextInput {...field("why")} label="Why it is off" rows={2} maxLength={1000} className="w-full" />
        <div className="flex w-full flex-wrap items-start gap-4">
          <Select
            {...field("system", came.systems[0])}
            label="System"
            empty="choose a system"
            options={view.systems}
            className="min-w-0 flex-1 basis-[300px]"
          />
          <Select
            {...field("due", came.asks?.due)}
            label="Back before"
            empty="choose a run or gate"
            options={view.due}
            className="min-w-0 flex-1 basis-[300px]"
          />
        </div>
        {view.asking.length > 0 && (
          <Select
            {...field("askedBy", came.asks?.item)}
            label="Does an item of the board ask for it?"
            hint="If one does, taking it off and putting it back are not openings. If none does, each is an opening of its system."
            options={[{ value: "", label: "no: it counts as an opening" }, ...view.asking]}
            className="w-full"
          />
        )}
        {!came.asks && <Undisturbed {...field("undisturbed")} label="Taking it off disturbed nothing" />}
        <PhotoInput {...field("photos")} label="Photos" hint="As it is now, so that somebody else finds it." most={6} />
        {making && (
          <Notice kind={making.hold ? "hold" : "lapsed"} title={making.hold ?? "Look before it counts."} role="status">
            {making.says}
          </Notice>
        )}
        <Fitting
          size="act"
          className="tablet:min-w-96"
          note={making ? "you have read what lapses" : "what it makes lapse is shown first"}
          reason={view.may.ok ? undefined : view.may.why}
        >
          {making ? "Write it down now" : "Write it down"}
        </Fitting>
      </Form>
    </section>
  );
}
