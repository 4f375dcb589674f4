import type { ReactNode } from "react";

interface FootProps {
  /** Where it stands, in one line: "3 items left before you can sign". */
  says: ReactNode;
  /** Which ones, or what follows. Hidden on a phone. */
  note?: ReactNode;
  /** The one next thing: a `Fitting` of size act. */
  children?: ReactNode;
}

/** Sticky foot with the one next thing, in the flow, so it never covers the last row. */
export function Foot({ says, note, children }: FootProps) {
  return (
    <footer className="foot">
      <p>
        <b>{says}</b> {note && <span>{note}</span>}
      </p>
      {children}
    </footer>
  );
}
