import { Fitting } from "#app/components/ui/Fitting";
import { ItemNut } from "#app/components/ui/ItemNut";

interface StartListProps {
  items: string[];
  answered: number[];
  /** Null for whoever only listens. */
  onAnswer: ((n: number) => void) | null;
}

/** By challenge and answer: each is read out, answered by the one whose it is, and only then pressed. In order. */
export function StartList({ items, answered, onAnswer }: StartListProps) {
  const next = items.findIndex((_, n) => !answered.includes(n));
  return (
    <section className="px-4 py-4 tablet:px-6" aria-labelledby="start-list">
      <h2 id="start-list" className="text-h3">
        Before the start
      </h2>
      <p className="text-ink-2">Read each out; answer with what you see, not with “checked”. Interrupted? Begin again.</p>
      <ol className="mt-2 border-t border-line">
        {items.map((words, n) => (
          <li key={words} className="grid grid-cols-[52px_minmax(0,1fr)_auto] items-center gap-x-4 border-b border-line py-3">
            <ItemNut state={answered.includes(n) ? "done" : "todo"} size={44} />
            <p className="text-lead">{words}</p>
            {n === next && onAnswer && (
              <Fitting type="button" onClick={() => onAnswer(n)}>
                Answered
              </Fitting>
            )}
          </li>
        ))}
      </ol>
    </section>
  );
}
