import { useState } from "react";
import { PinInput } from "#app/components/forms/PinInput";
import { Fitting } from "#app/components/ui/Fitting";

interface PinStubProps {
  form: string;
  /** Over the keys: whose PIN. */
  pin?: string;
  /** On the act. */
  label: string;
  note: string;
  errors?: string[];
  busy: boolean;
  live: boolean;
}

const DIGITS = 6;

/** PIN and act of a sign sheet. The act says how many digits are still missing. */
export function PinStub({ form, pin = "Your signing PIN", label, note, errors, busy, live }: PinStubProps) {
  const [length, setLength] = useState(0);
  const missing = live ? Math.max(0, DIGITS - length) : 0;
  return (
    <>
      <PinInput id="pin" name="pin" form={form} label={pin} keypad errors={errors} onLength={setLength} />
      <Fitting
        size="act"
        centred
        form={form}
        busy={busy}
        reason={missing ? `${missing} more ${missing === 1 ? "digit" : "digits"}` : undefined}
        note={note}
      >
        {label}
      </Fitting>
    </>
  );
}
