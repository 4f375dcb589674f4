import type { ReactNode } from "react";

interface AccountRowProps {
  title: ReactNode;
  children?: ReactNode;
  /** Fittings at the right. */
  acts?: ReactNode;
}

/** One thing of a list: what it is, what there is to say about it, what can be done. */
export function AccountRow({ title, children, acts }: AccountRowProps) {
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_auto] items-center gap-x-4 border-b border-line py-3 tablet:gap-x-6">
      <div className="min-w-0">
        <h3 className="text-lead break-words">{title}</h3>
        {children && <div className="text-ink-2 [overflow-wrap:anywhere]">{children}</div>}
      </div>
      {acts && <div className="flex flex-wrap gap-3">{acts}</div>}
    </li>
  );
}
