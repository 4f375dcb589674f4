import { useId } from "react";
import { cx } from "#app/components/ui/cx";

export interface StampSignature {
  /** Meaning and role: "signed as builder", "inspector". */
  role: string;
  name: string;
  /** With zone; or "asked 10:51 CET" while it waits. */
  time: string;
  /** First digits of the signature's hash, in groups. */
  hash?: string;
  /** Not given yet: a dotted outline. */
  waits?: boolean;
}

interface StampProps {
  /** In signing order. One makes the whole nut, two a half each; from the third on each has a nut of its own below. */
  signatures: StampSignature[];
  /** Upright and stacked, for narrow places. */
  compact?: boolean;
}

type Side = "left" | "right" | "whole";

const HEX = "M55 4 104 32V88L55 116 6 88V32Z";
const EDGE: Record<Side, string> = { left: "M55 4 6 32V88L55 116Z", right: "M55 4 104 32V88L55 116Z", whole: HEX };
const LINE: Record<Side, string> = { left: "M-2 92 55 60", right: "M55 60 112 28", whole: "M-2 92 112 28" };

/** Two signatures, one nut: only both halves make it whole and carry the line across. */
export function Stamp({ signatures, compact = false }: StampProps) {
  const [first, second, ...more] = signatures;
  if (!first) return null;
  return (
    <ul className={cx("stamps", compact && "stamps-compact")}>
      <Half signature={first} side={second ? "left" : "whole"} />
      {second && <Half signature={second} side="right" />}
      {more.map((signature) => (
        <Half key={signature.role + signature.name} signature={signature} side="whole" />
      ))}
    </ul>
  );
}

function Half({ signature, side }: { signature: StampSignature; side: Side }) {
  const clip = useId();
  const { role, name, time, hash, waits } = signature;
  return (
    <li className={cx("stamp", `stamp-${side}`, waits && "stamp-waits")}>
      <svg viewBox="0 0 110 120" width="110" height="120" aria-hidden="true">
        <clipPath id={clip}>
          <rect x={side === "right" ? 55 : 0} width={side === "whole" ? 110 : 55} height="120" />
        </clipPath>
        {waits ? (
          <path className="stamp-ghost" d={HEX} clipPath={`url(#${clip})`} />
        ) : (
          <>
            <path className="stamp-fill" d={HEX} clipPath={`url(#${clip})`} />
            <path className="stamp-edge" d={EDGE[side]} />
          </>
        )}
        <path className={cx("stamp-line", waits && "stamp-line-open")} d={LINE[side]} />
      </svg>
      <p>
        <span className="stamp-role">{role}</span> <b>{name}</b> <span>{time}</span> {hash && <span className="fig text-note">{hash}</span>}
      </p>
    </li>
  );
}
