import { useState } from "react";
import { Field } from "#app/components/forms/Field";
import { type ControlProps, wire } from "#app/components/forms/types";
import { Fitting } from "#app/components/ui/Fitting";
import { useLive } from "#app/components/ui/useLive";

/** A password, with a button that shows it. Without scripts the button is left out. */
export function PasswordInput(props: ControlProps & { autoComplete: "current-password" | "new-password" }) {
  const { id, name, label, hint, errors, labelHidden, optional, ...rest } = props;
  const [shown, setShown] = useState(false);
  const scripted = useLive();
  const { control, aria } = wire(props);
  return (
    <Field {...{ id, name, label, hint, errors, labelHidden, optional }}>
      <span className="flex items-stretch gap-2">
        <span className="field-frame min-w-0 flex-1">
          <input {...rest} {...aria} id={control} name={name} type={shown ? "text" : "password"} autoCapitalize="none" spellCheck={false} />
        </span>
        {scripted && (
          <Fitting
            className="mt-1"
            type="button"
            label={shown ? "Hide the password" : "Show the password"}
            onClick={() => setShown(!shown)}
          >
            {shown ? "Hide" : "Show"}
          </Fitting>
        )}
      </span>
    </Field>
  );
}
