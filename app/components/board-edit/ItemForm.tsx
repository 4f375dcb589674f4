import { Form } from "react-router";
import { NewPart, PartFieldset } from "#app/components/board-edit/PartFieldset";
import { FormFaults } from "#app/components/forms/FormFaults";
import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { Choice } from "#app/components/ui/Choice";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { ItemFormView } from "#app/lib/views/edit-item";

const GROUP = "min-w-0 border-t-2 border-ink py-4";
const CHOICES = "flex flex-wrap gap-3";

/** What an item says and asks for. Nothing is changed before what it makes lapse has been looked at. */
export function ItemForm({ view, reply }: { view: ItemFormView; reply: FormReply | undefined }) {
  const hands = fieldsOf("fields", reply);
  const { field, ticked, faults } = hands;
  const mark = (name: "killer" | "secondEyes" | "guarded", words: string, note: string) => (
    <Choice kind="checkbox" name={name} value="yes" defaultChecked={ticked(name, view[name])} note={note}>
      {words}
    </Choice>
  );
  return (
    <Form method="post" className="px-4 pb-6 tablet:px-6" preventScrollReset>
      <FormFaults faults={faults} />
      <div className="flex flex-col gap-3 py-4">
        <TextInput
          {...field("words", view.words)}
          label="What is to be done"
          hint="One action, one place, what good looks like."
          rows={2}
          maxLength={200}
          className="w-full max-w-[820px]"
        />
        <TextInput {...field("caution", view.caution)} label="Caution" rows={2} maxLength={400} optional className="w-full max-w-[820px]" />
      </div>
      {!view.computed && (
        <section aria-labelledby="asks" className={GROUP}>
          <h2 id="asks" className="pb-2 text-h3">
            Evidence it asks for
          </h2>
          {view.parts.map((part) => (
            <PartFieldset key={part.n} part={part} {...hands} />
          ))}
          <NewPart view={view} field={field} open={view.parts.length === 0 || Boolean(reply?.typed["new.kind"])} />
        </section>
      )}
      <fieldset className={GROUP}>
        <legend className="float-left w-full pb-2 text-h3 font-bold">Marks</legend>
        <div className={`${CHOICES} clear-both`}>
          {mark("secondEyes", "Second pair of eyes", "another person confirms it")}
          {mark("killer", "Guards a life", "never hidden, on the run card")}
          {mark("guarded", "Not before the gates in front stand", "no late entry either")}
        </div>
      </fieldset>
      <fieldset className={GROUP}>
        <legend className="float-left w-full pb-2 text-h3 font-bold">Systems</legend>
        <p className="clear-both max-w-[72ch] pb-3 text-ink-2">When one of these is opened, the item lapses.</p>
        <div className={CHOICES}>
          {view.systems.map((s) => (
            <Choice key={s.key} kind="checkbox" name={`sys.${s.key}`} value="yes" defaultChecked={ticked(`sys.${s.key}`, s.on)}>
              {s.name}
            </Choice>
          ))}
        </div>
      </fieldset>
      <section aria-labelledby="holds" className={GROUP}>
        <h2 id="holds" className="pb-2 text-h3">
          How long a proof holds
        </h2>
        <div className="flex flex-wrap items-start gap-x-6 gap-y-3">
          <NumberInput {...field("hours", view.hours)} label="From the proof" unit="h" hint="Empty: as its gate says." size={6} optional />
          <NumberInput {...field("afterRun", view.afterRun)} label="From the end of a run" unit="h" size={6} optional />
        </div>
      </section>
      {view.follows.length > 0 && (
        <fieldset className={GROUP}>
          <legend className="float-left w-full pb-2 text-h3 font-bold">Comes after, within {view.gate.name}</legend>
          <div className="clear-both flex flex-col gap-2">
            {view.follows.map((f) => (
              <Choice key={f.id} kind="checkbox" name={`follow.${f.id}`} value="yes" defaultChecked={ticked(`follow.${f.id}`, f.on)}>
                {f.key} {f.words}
              </Choice>
            ))}
          </div>
        </fieldset>
      )}
      <div className="border-t-2 border-ink pt-4">
        <Fitting name="intent" value="fields" size="act" className="tablet:min-w-80" note="nothing is changed yet">
          Look at what it changes
        </Fitting>
      </div>
    </Form>
  );
}
