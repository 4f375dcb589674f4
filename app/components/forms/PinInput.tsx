import { useEffect, useRef, useState } from "react";
import { FieldErrors } from "#app/components/forms/Field";
import { type ControlProps, wire } from "#app/components/forms/types";

interface PinInputProps extends Pick<ControlProps, "id" | "name" | "label" | "hint" | "errors" | "form" | "autoFocus"> {
  /** Fewest digits. */
  digits?: number;
  longest?: number;
  /** Big keys for a gloved finger; they come once the page runs, the field works without them. */
  keypad?: boolean;
  /** How many digits are in: for "2 more digits" on the act. */
  onLength?: (length: number) => void;
  autoComplete?: "off" | "new-password" | "current-password";
}

/** The signing PIN: a numeric password field, with hexagons that fill and, if wanted, keys of 92 px. */
export function PinInput(props: PinInputProps) {
  const { label, hint, errors, name, digits = 6, longest = 12, keypad = false, onLength, form, autoFocus, autoComplete = "off" } = props;
  const { control, hintId, errorId, aria } = wire(props);
  const [pin, setPin] = useState("");
  const [live, setLive] = useState(false);
  const field = useRef<HTMLInputElement>(null);
  // The field keeps its own value, so that digits typed before the page came alive are not lost.
  useEffect(() => {
    setLive(true);
    setPin(field.current?.value ?? "");
  }, []);
  const enter = (text: string) => {
    const next = text.replace(/\D/g, "").slice(0, longest);
    setPin(next);
    if (field.current && field.current.value !== next) field.current.value = next;
    onLength?.(next.length);
  };
  return (
    <div className="pin">
      <label htmlFor={control}>{label}</label>
      {hint && (
        <p id={hintId} className="field-hint">
          {hint}
        </p>
      )}
      <span className="field-frame pin-frame">
        <input
          {...aria}
          ref={field}
          id={control}
          name={name}
          type="password"
          inputMode="numeric"
          pattern="[0-9]*"
          minLength={digits}
          maxLength={longest}
          required
          form={form}
          // biome-ignore lint/a11y/noAutofocus: on a sign sheet the PIN is the one thing left to enter
          autoFocus={autoFocus}
          autoComplete={autoComplete}
          onChange={(event) => enter(event.currentTarget.value)}
        />
      </span>
      {live && <PinDots filled={pin.length} of={Math.max(digits, pin.length)} />}
      <FieldErrors id={errorId} errors={errors} />
      {keypad && live && <PinKeys pin={pin} enter={enter} />}
    </div>
  );
}

function PinDots({ filled, of }: { filled: number; of: number }) {
  return (
    <div className="pin-dots">
      <svg viewBox={`0 0 ${of * 32} 26`} height="30" role="img" aria-label={`${filled} of ${of} digits`}>
        {Array.from({ length: of }, (_, i) => i).map((i) => (
          <path
            key={i}
            className={i < filled ? "on" : undefined}
            transform={`translate(${i * 32 + 14} 13)`}
            d="M-11 0-5.5-9.5H5.5L11 0 5.5 9.5H-5.5Z"
          />
        ))}
      </svg>
    </div>
  );
}

function PinKeys({ pin, enter }: { pin: string; enter: (text: string) => void }) {
  return (
    <fieldset className="pin-keys">
      <legend className="sr-only">Digits</legend>
      {["1", "2", "3", "4", "5", "6", "7", "8", "9"].map((key) => (
        <button key={key} type="button" className="fig" onClick={() => enter(pin + key)}>
          {key}
        </button>
      ))}
      <button type="button" className="pin-word" onClick={() => enter("")}>
        Clear
      </button>
      <button type="button" className="fig" onClick={() => enter(`${pin}0`)}>
        0
      </button>
      <button type="button" className="pin-word" aria-label="Back, take one digit away" onClick={() => enter(pin.slice(0, -1))}>
        Back
      </button>
    </fieldset>
  );
}
