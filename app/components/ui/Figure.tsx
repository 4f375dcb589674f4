import { Fragment } from "react";
import { cx } from "#app/components/ui/cx";

interface FigureProps {
  /** Already converted and formatted ("1,375", "5.4", "0:49"). */
  value: string | number;
  unit?: string;
  className?: string;
}

/** A value with its unit in the figures' type. Points and commas fill a whole cell there, so they are drawn tighter. */
export function Figure({ value, unit, className }: FigureProps) {
  return (
    <span className={cx("fig", className)}>
      {tight(String(value))}
      {unit && (
        <>
          {" "}
          <span className="fig-unit">{tight(unit)}</span>
        </>
      )}
    </span>
  );
}

function tight(text: string) {
  let at = 0;
  return text.split(/([.,:·])/).map((part) => {
    const key = at;
    at += part.length;
    return /^[.,:·]$/.test(part) ? (
      <span key={key} className="fig-point">
        {part}
      </span>
    ) : (
      <Fragment key={key}>{part}</Fragment>
    );
  });
}
