import { useEffect, useRef } from "react";

export interface SummaryError {
  /** Id of the control, for the link to it; null = about the whole form. */
  field: string | null;
  message: string;
}

interface ErrorSummaryProps {
  errors: SummaryError[];
  /** "2 things to put right before this can be saved". Counted when left off. */
  title?: string;
  /** Take the focus when it appears after a refused submit. */
  focus?: boolean;
}

/** What is wrong with a form, in one place above it; takes the focus, and each line leads to its field. */
export function ErrorSummary({ errors, title, focus = true }: ErrorSummaryProps) {
  const box = useRef<HTMLDivElement>(null);
  const shown = errors.map((error) => error.message).join("\n");
  useEffect(() => {
    if (focus && shown) box.current?.focus();
  }, [focus, shown]);
  if (errors.length === 0) return null;
  return (
    <div ref={box} className="error-summary" role="alert" tabIndex={-1}>
      <h2>{title ?? (errors.length === 1 ? "One thing to put right" : `${errors.length} things to put right`)}</h2>
      <ul>
        {errors.map((error) => (
          <li key={`${error.field}${error.message}`}>{error.field ? <a href={`#${error.field}`}>{error.message}</a> : error.message}</li>
        ))}
      </ul>
    </div>
  );
}
