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
  /** Given, and no longer good: the nut is split and empty, the line broken. Its role says so too. */
  lapsed?: boolean;
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
/** The nut split along a crack: each side keeps its own edge. */
const SPLIT: Record<Side, string> = {
  left: "M49 8 6 32V88L55 116 61 92 47 70 59 46 49 8Z",
  right: "M61 8 104 32V88L67 110 73 92 59 70 71 46 61 8Z",
  whole: "M47 9 6 32V88L51 114 57 92 43 70 55 46ZM59 9 104 32V88L63 114 69 92 55 70 67 46Z",
};
const BROKEN: Record<Side, string> = { left: "M-2 92 34 72", right: "M78 48 112 28", whole: "M-2 92 32 72M78 48 112 28" };
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
  const { role, name, time, hash, waits, lapsed } = signature;
  return (
    <li className={cx("stamp", `stamp-${side}`, waits && "stamp-waits", lapsed && "stamp-lapsed")}>
      <svg viewBox="0 0 110 120" width="110" height="120" aria-hidden="true">
        <clipPath id={clip}>
          <rect x={side === "right" ? 55 : 0} width={side === "whole" ? 110 : 55} height="120" />
        </clipPath>
        {waits ? (
          <path className="stamp-ghost" d={HEX} clipPath={`url(#${clip})`} />
        ) : lapsed ? (
          <path className="stamp-split" d={SPLIT[side]} />
        ) : (
          <>
            <path className="stamp-fill" d={HEX} clipPath={`url(#${clip})`} />
            <path className="stamp-edge" d={EDGE[side]} />
          </>
        )}
        <path className={cx("stamp-line", waits && "stamp-line-open")} d={lapsed ? BROKEN[side] : LINE[side]} />
      </svg>
      <p>
        <span className="stamp-role">{role}</span> <b>{name}</b> <span>{time}</span> {hash && <span className="fig text-note">{hash}</span>}
      </p>
    </li>
  );
}
