import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { NumberInput } from "#app/components/forms/NumberInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { GateFormView } from "#app/lib/views/edit-gate";

const GROUP = "min-w-0 border-t-2 border-ink py-4";
const ROW = "flex flex-wrap items-start gap-x-4 gap-y-3";
const PLACES = [
  { name: "sign1", label: "First signature" },
  { name: "sign2", label: "Second signature" },
  { name: "sign3", label: "Third signature" },
];
const EDGES = [
  { value: "needs", label: "needs it signed" },
  { value: "after", label: "needs it, and comes after its work" },
];

/** What a gate is called, waits for, and who signs it. Nothing is changed before what it makes lapse has been looked at. */
export function GateForm({ view, reply }: { view: GateFormView; reply: FormReply | undefined }) {
  const { field, faults } = fieldsOf("fields", reply);
  return (
    <Form method="post" className="px-4 pb-6 tablet:px-6" preventScrollReset>
      <FormFaults faults={faults} />
      <div className={`${ROW} py-4`}>
        <TextInput {...field("name", view.name)} label="Name" maxLength={60} className="min-w-0 flex-[1_1_16rem]" />
        <TextInput {...field("short", view.short)} label="On the Line" hint="At most 16 characters." maxLength={16} size={16} />
        {view.before.length > 0 && <Select {...field("before")} label="Place" options={view.before} empty="at the end" />}
        <TextInput {...field("caution", view.caution)} label="Caution" rows={2} maxLength={400} optional className="w-full max-w-[820px]" />
      </div>
      <section aria-labelledby="signs" className={GROUP}>
        <h2 id="signs" className="pb-2 text-h3">
          Who signs, and what asks for it
        </h2>
        <div className={ROW}>
          {view.signed ? (
            PLACES.map(({ name, label }, n) => (
              <Select key={name} {...field(name, view.places[n])} label={label} options={view.signers} empty="nobody" />
            ))
          ) : (
            <p>Nobody signs it but lead and inspector with the release.</p>
          )}
          <Select {...field("requiredBy", view.requiredBy)} label="Required by" options={view.required} />
        </div>
      </section>
      <section aria-labelledby="holds" className={GROUP}>
        <h2 id="holds" className="pb-2 text-h3">
          How long its proofs hold
        </h2>
        <div className={ROW}>
          <NumberInput {...field("hours", view.hours)} label="From the proof" unit="h" hint="Empty: without an end." size={6} optional />
          <NumberInput {...field("afterRun", view.afterRun)} label="From the end of a run" unit="h" size={6} optional />
        </div>
      </section>
      <section aria-labelledby="waits-for" className={GROUP}>
        <h2 id="waits-for" className="pb-2 text-h3">
          What it waits for
        </h2>
        <p className="max-w-[72ch] pb-3 text-ink-2">
          After its work: each proof here must be newer than what was done there on the same system. An edge that closes a circle is
          refused.
        </p>
        <div className="grid gap-x-6 gap-y-3 tablet:grid-cols-2">
          {view.edges.map((edge) => (
            <Select key={edge.id} {...field(`edge.${edge.id}`, edge.now)} label={edge.name} options={EDGES} empty="no edge" />
          ))}
        </div>
      </section>
      <div className="border-t-2 border-ink pt-4">
        <Fitting name="intent" value="fields" size="act" className="tablet:min-w-80" note="nothing is changed yet">
          Look at what it changes
        </Fitting>
      </div>
    </Form>
  );
}
