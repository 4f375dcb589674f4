import type { ReactNode } from "react";
import { cx } from "#app/components/ui/cx";
import { ItemNut } from "#app/components/ui/ItemNut";
import type { NutState } from "#app/components/ui/states";

interface StateRowProps {
  id?: string;
  nut: NutState;
  /** The state in words, under the nut. */
  word: string;
  /** Asks for somebody: on the plate, with a heavier title. */
  open?: boolean;
  children: ReactNode;
}

/** A wide row of a register: its state at the left end, in shape and word. */
export function StateRow({ id, nut, word, open = false, children }: StateRowProps) {
  return (
    <li
      id={id}
      className={cx(
        "grid grid-cols-[84px_minmax(0,1fr)] scroll-mt-2 border-b border-line target:shadow-[inset_6px_0_0_var(--ink)] tablet:grid-cols-[104px_minmax(0,1fr)]",
        open && "bg-plate",
      )}
    >
      <div
        className={cx(
          "flex flex-col items-center justify-start gap-1 border-r border-line px-1 pt-3 pb-2 text-center text-note font-[640] leading-tight",
          nut === "lapsed" ? "bg-seal-wash text-seal-ink" : nut === "done" ? "text-ink" : "text-ink-2",
        )}
      >
        <ItemNut state={nut} size={44} />
        {word}
      </div>
      <div className="min-w-0 px-3 py-3 tablet:px-6">{children}</div>
    </li>
  );
}
