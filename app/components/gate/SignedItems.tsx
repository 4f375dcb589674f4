import type { ReactNode } from "react";

interface SignedItemsProps {
  /** Names the list, with how many it has. */
  title: ReactNode;
  /** Open from the beginning. */
  open?: boolean;
  items: { key: string; words: string; says: ReactNode }[];
  /** Above the list. */
  children?: ReactNode;
}

/** What a signature covers, or leaves out, item by item. */
export function SignedItems({ title, open, items, children }: SignedItemsProps) {
  return (
    <details className="sign-items" open={open}>
      <summary>{title}</summary>
      {children}
      <dl>
        {items.map((item) => (
          <div key={item.key}>
            <dt>
              <b>{item.key}</b> {item.words}
            </dt>
            <dd>{item.says}</dd>
          </div>
        ))}
      </dl>
    </details>
  );
}

/** Items that are signed: what was done, and by whom. */
export const doneBy = (items: { key: string; words: string; said: string; who: string }[]): SignedItemsProps["items"] =>
  items.map(({ key, words, said, who }) => ({
    key,
    words,
    says: (
      <>
        {said} <span>{who}</span>
      </>
    ),
  }));
