import { TextInput } from "#app/components/forms/TextInput";
import type { TypedControlProps } from "#app/components/forms/types";

interface NumberInputProps extends TypedControlProps {
  /** `decimal` brings up the pad with a point, `numeric` the one without. */
  inputMode?: "decimal" | "numeric";
  /** Characters of room. */
  size?: number;
  placeholder?: string;
  className?: string;
}

/** A text field with a number pad: a spinner would change the value under a gloved finger, and drops a comma as decimal mark. */
export function NumberInput({ inputMode = "decimal", size = 6, ...rest }: NumberInputProps) {
  return <TextInput {...rest} inputMode={inputMode} size={size} autoComplete="off" />;
}
