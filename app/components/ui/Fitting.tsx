import type { ReactNode } from "react";
import { Anchor } from "#app/components/ui/Anchor";
import { cx } from "#app/components/ui/cx";

export interface FittingProps {
  /** What pressing it does, in two or three words. */
  children: ReactNode;
  /** Second line: what follows. */
  note?: ReactNode;
  /** A link when set, else a button. */
  href?: string;
  /** With `href`: a file, fetched by the browser itself. */
  document?: boolean;
  /** `act` 96 px (phones 72), for the acts that matter; `normal` 48. */
  size?: "act" | "normal";
  variant?: "filled" | "outline" | "quiet" | "stop";
  /** Why it cannot be pressed now. The reason is shown in place of the note; nothing happens when it is pressed. */
  reason?: ReactNode;
  /** Work is under way: announced, not pressable again. */
  busy?: boolean;
  centred?: boolean;
  type?: "submit" | "button" | "reset";
  name?: string;
  value?: string;
  form?: string;
  formAction?: string;
  onClick?: () => void;
  pressed?: boolean;
  describedBy?: string;
  label?: string;
  className?: string;
}

/** What can be pressed is a fitting: blue, three flats, a nut seen from the side. Nothing else is blue. */
export function Fitting(props: FittingProps) {
  const { children, note, size = "normal", variant = size === "act" ? "filled" : "outline", reason, busy = false, centred = false } = props;
  const barred = Boolean(reason) || busy;
  const look = cx(
    "fitting",
    `fitting-${size}`,
    barred ? "fitting-barred" : `fitting-${variant}`,
    centred && "fitting-centred",
    props.className,
  );
  const second = reason ?? note;
  const body = (
    <>
      <span className="fitting-says">{children}</span>
      {second && (
        <>
          {" "}
          <span className="fitting-note">{second}</span>
        </>
      )}
    </>
  );
  if (props.href && !barred)
    return (
      <Anchor href={props.href} document={props.document} className={look} aria-label={props.label} aria-describedby={props.describedBy}>
        {body}
      </Anchor>
    );
  return (
    <button
      type={barred ? "button" : (props.type ?? "submit")}
      className={look}
      name={barred ? undefined : props.name}
      value={props.value}
      form={props.form}
      formAction={props.formAction}
      onClick={barred ? undefined : props.onClick}
      aria-disabled={barred || undefined}
      aria-busy={busy || undefined}
      aria-pressed={props.pressed}
      aria-label={props.label}
      aria-describedby={props.describedBy}
    >
      {body}
    </button>
  );
}
