import type { ReactNode } from "react";
import { cx } from "#app/components/ui/cx";
import { ItemNut } from "#app/components/ui/ItemNut";
import { SpadeSign } from "#app/components/ui/Spade";
import { NetworkSign } from "#app/components/ui/Strip";

interface NoticeProps {
  /** `lapsed` orange, `hold` and `danger` red, `refused` plain with a heavy edge, `offline` hatched, `done` primer, `plain` for advice. */
  kind: "lapsed" | "hold" | "danger" | "refused" | "offline" | "done" | "plain";
  /** First words, in bold. */
  title: ReactNode;
  /** Why, and what to do next. */
  children?: ReactNode;
  /** A fitting or link. */
  action?: ReactNode;
  /** Full width under the title pipe, with its sign; else a block in the text. */
  band?: boolean;
  /** `alert` interrupts the reader: only for what has just gone wrong. `status` is read when there is time. */
  role?: "alert" | "status";
  id?: string;
}

/** Lapsed, HOLD, refused, offline: says what happened, why, and what to do next. */
export function Notice({ kind, title, children, action, band = false, role, id }: NoticeProps) {
  return (
    <div id={id} role={role} className={cx("notice", `notice-${kind}`, band && "notice-band")}>
      {band && <span className="notice-sign">{SIGN[kind]}</span>}
      <div className="notice-says">
        <p className="notice-title">{title}</p>
        {children && <div>{children}</div>}
      </div>
      {action && <div className="notice-action">{action}</div>}
    </div>
  );
}

const SIGN: Record<NoticeProps["kind"], ReactNode> = {
  lapsed: <ItemNut state="lapsed" size={56} />,
  hold: <SpadeSign />,
  danger: <SpadeSign />,
  refused: <ItemNut state="na" size={56} />,
  offline: <NetworkSign state="offline" size={44} />,
  done: <ItemNut state="done" size={56} />,
  plain: <ItemNut state="todo" size={56} />,
};
