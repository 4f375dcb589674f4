import type { ReactNode } from "react";

export interface ChoiceProps {
  name: string;
  value: string;
  children: ReactNode;
  /** Second line inside the fitting. */
  note?: ReactNode;
  /** One of several, or any of several. */
  kind?: "radio" | "checkbox";
  id?: string;
  defaultChecked?: boolean;
  checked?: boolean;
  onChange?: (checked: boolean) => void;
  required?: boolean;
  disabled?: boolean;
  describedBy?: string;
  form?: string;
}

/** A radio or checkbox as a fitting; chosen = filled blue with a filled hexagon. */
export function Choice({ children, note, kind = "radio", describedBy, onChange, ...input }: ChoiceProps) {
  return (
    <label className="choice">
      <input
        type={kind}
        {...input}
        onChange={onChange && ((event) => onChange(event.currentTarget.checked))}
        aria-describedby={describedBy}
      />
      <svg viewBox="-13 -13 26 26" width="26" height="26" aria-hidden="true">
        <path d="M-11 0-5.5-9.5H5.5L11 0 5.5 9.5H-5.5Z" />
      </svg>
      <span>
        {children}
        {note && <span className="choice-note">{note}</span>}
      </span>
    </label>
  );
}
