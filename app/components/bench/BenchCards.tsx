import { Anchor } from "#app/components/ui/Anchor";
import { cx } from "#app/components/ui/cx";
import type { BenchCard } from "#app/lib/views/bench";

/** Each calculator with the question that it answers and what came out last. */
export function BenchCards({ cards }: { cards: BenchCard[] }) {
  return (
    <ul className="bench-cards">
      {cards.map((card) => (
        <li key={card.key}>
          <Anchor className="bench-card" href={card.href}>
            <b className="bench-card-title">{card.title}</b>
            <span className="bench-card-asks">{card.answers}</span>
          </Anchor>
          {card.last ? (
            <p className="bench-card-last">
              <b className={cx("bench-word", wordLook(card.last.passes))}>{card.last.word}</b>
              <span>{card.last.sentence}</span>
              <span className="bench-card-kept">{card.last.kept}</span>
            </p>
          ) : (
            <p className="bench-card-last bench-card-none">Nothing kept yet.</p>
          )}
        </li>
      ))}
    </ul>
  );
}

const wordLook = (passes: boolean | null): string =>
  passes === null ? "bench-word-plain" : passes ? "bench-word-within" : "bench-word-outside";
