import { Form } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";

interface HoldFormProps {
  /** Address of the HOLD page, whose action takes it. */
  action: string;
  commandId: string;
  /** How many people are told. */
  told: number;
  errors?: string[];
  reason?: string;
}

/** One reason, one big act: any member may hold a run. */
export function HoldForm({ action, commandId, told, errors, reason }: HoldFormProps) {
  return (
    <Form method="post" action={action} className="flex flex-col gap-3">
      <HiddenIds commandId={`${commandId}-hold`} />
      <TextInput
        name="reason"
        label="Why"
        hint="In a few words, for the mail and the record."
        rows={2}
        maxLength={1000}
        errors={errors}
        defaultValue={reason}
        required
      />
      <Fitting size="act" variant="stop" note={`GO is over at once; ${told === 1 ? "1 person gets" : `${told} people get`} a mail`}>
        HOLD
      </Fitting>
    </Form>
  );
}
