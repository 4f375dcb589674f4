import type { ReactNode } from "react";

interface SignTagProps {
  kicker: string;
  title: string;
  /** What is signed. */
  children: ReactNode;
  /** Behind the perforation: PIN and the act. */
  stub: ReactNode;
}

/** A signing sheet is a tag on a wire: what is signed at the left, the PIN behind the perforation. */
export function SignTag({ kicker, title, children, stub }: SignTagProps) {
  return (
    <div className="sign-wrap">
      <div className="sign-tag">
        <div className="sign-paper" aria-hidden="true" />
        <svg className="sign-wire" width="116" height="120" viewBox="0 0 116 120" aria-hidden="true">
          <path d="M-22 10C14 14 34 40 46 66M-22 46C12 50 30 58 44 68" />
          <circle className="sign-eyelet" cx="58" cy="80" r="27" />
          <circle className="sign-hole" cx="58" cy="80" r="12" />
        </svg>
        <div className="sign-read">
          <p className="sign-kicker">{kicker}</p>
          <h1>{title}</h1>
          {children}
        </div>
        <div className="sign-stub">{stub}</div>
      </div>
    </div>
  );
}
