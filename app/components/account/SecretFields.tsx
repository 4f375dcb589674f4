import { PasswordInput } from "#app/components/forms/PasswordInput";
import { PinInput } from "#app/components/forms/PinInput";
import type { FieldProps } from "#app/lib/schemas/form-reply";

type Fields = { field: (name: string, otherwise?: string) => FieldProps };

/** What is secret goes out of a page and never comes back into it. */
const blank = ({ defaultValue: _, ...rest }: FieldProps) => rest;

export function NewPassword({ field }: Fields) {
  return (
    <PasswordInput
      {...blank(field("newPassword"))}
      label="New password"
      hint="At least 15 characters. Four or five words that do not belong together are easy to remember; spaces count."
      autoComplete="new-password"
      required
    />
  );
}

export function PresentPassword({ field }: Fields) {
  return (
    <PasswordInput
      {...blank(field("password"))}
      label="Your password"
      hint="The one with which you sign in: it shows that it is you."
      autoComplete="current-password"
      required
    />
  );
}

export function NewPin({ field }: Fields) {
  return (
    <>
      <PinInput
        {...blank(field("pin"))}
        label="Signing PIN"
        hint="6 digits or more. You enter it each time that you sign: it stands for your signature, so nobody else may know it."
        autoComplete="new-password"
      />
      <PinInput {...blank(field("pinAgain"))} label="The same PIN once more" autoComplete="new-password" />
    </>
  );
}
