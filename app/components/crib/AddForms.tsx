import { Form } from "react-router";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { Choice } from "#app/components/ui/Choice";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import { AGENT_CHOICES } from "#app/lib/views/crib";

interface AddProps {
  commandId: string;
  reply: FormReply | undefined;
  /** Nothing of its kind is there yet: the form stands open. */
  first: boolean;
}

const SUMMARY = "min-h-hit px-4 py-4 text-lead font-semibold text-fitting-ink tablet:px-6";
const FORM = "flex max-w-[760px] flex-col items-start gap-4 px-4 pb-6 tablet:px-6";

export function AddTool({ commandId, reply, first }: AddProps) {
  const { field, back, faults } = fieldsOf("add-tool", reply);
  return (
    <details open={first || back}>
      <summary className={SUMMARY}>Add a tool</summary>
      <Form method="post" className={FORM} preventScrollReset>
        <FormFaults faults={faults} />
        <HiddenIds commandId={commandId} intent="add-tool" />
        <TextInput
          {...field("name")}
          label="Name"
          hint="As people call it, with its range: torque wrench TW-5, 5 to 60 N·m."
          maxLength={120}
          className="w-full"
        />
        <TextInput {...field("serial")} label="Serial number" optional figures maxLength={80} className="w-full max-w-[360px]" />
        <Fitting size="act" className="tablet:min-w-80" note="then enter its check">
          Add the tool
        </Fitting>
      </Form>
    </details>
  );
}

export function AddExtinguisher({ commandId, reply, first, unit }: AddProps & { unit: string }) {
  const { field, ticked, back, faults } = fieldsOf("add-extinguisher", reply);
  return (
    <details open={first || back}>
      <summary className={SUMMARY}>Add an extinguisher</summary>
      <Form method="post" className={FORM} preventScrollReset>
        <FormFaults faults={faults} />
        <HiddenIds commandId={commandId} intent="add-extinguisher" />
        <TextInput
          {...field("name")}
          label="Name or number"
          hint="As written on the bottle."
          maxLength={120}
          className="w-full max-w-[460px]"
        />
        <ChoiceGroup {...field("agent")} label="Agent" options={AGENT_CHOICES} />
        <TextInput
          {...field("rating")}
          label="Rating"
          optional
          hint="As on its label, such as 10-B:C or 113B."
          figures
          maxLength={40}
          className="w-full max-w-[320px]"
        />
        <Choice
          kind="checkbox"
          id="add-extinguisher-classB"
          name="classB"
          value="on"
          defaultChecked={ticked("classB", false)}
          note="its label says B: burning liquids, such as fuel"
        >
          Class B
        </Choice>
        <NumberInput {...field("charge")} label="Charge" hint="Mass of agent, on the label." unit={unit} size={6} />
        <TextInput
          {...field("position")}
          label="Where it stands"
          optional
          hint="Left of the hangar door; by the fire guard on run days."
          maxLength={120}
          className="w-full max-w-[560px]"
        />
        <Fitting size="act" className="tablet:min-w-80" note="then enter its look and service">
          Add the extinguisher
        </Fitting>
      </Form>
    </details>
  );
}
