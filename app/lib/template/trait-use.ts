/**
 * Which items of the template an answer about the install bears on: what is asked, in which words, with which evidence.
 */
import { type Condition, parseCondition } from "#app/lib/template/condition";
import { gateOf, TEMPLATE } from "#app/lib/template/template";
import { type TraitWord, traitWords } from "#app/lib/template/trait-words";
import type { Traits } from "#app/lib/template/types";

const wordsIn = (c: Condition): TraitWord[] => (c.op === "word" ? [c.word] : c.op === "not" ? wordsIn(c.of) : c.of.flatMap(wordsIn));

/** Words that are true of one of the two and not of the other. */
export function changedWords(from: Traits, to: Traits): Set<TraitWord> {
  const [was, is] = [traitWords(from), traitWords(to)];
  return new Set([...was, ...is].filter((word) => was.has(word) !== is.has(word)));
}

/** Keys of the items whose rows name one of these words in any condition, their gate's among them. */
export function itemsUsing(words: ReadonlySet<TraitWord>): Set<string> {
  const gates = new Map([...TEMPLATE.gates, TEMPLATE.postRunGate].map((g) => [g.key, g]));
  const uses = (conditions: (string | undefined)[]) =>
    conditions.some((text) => text !== undefined && wordsIn(parseCondition(text)).some((word) => words.has(word)));
  const rows = [...TEMPLATE.items, ...TEMPLATE.postRunItems].filter((row) =>
    uses([gates.get(gateOf(row.key))?.when, row.when, row.runs?.unless, ...row.wordsWhen.map(([w]) => w), ...row.parts.map((p) => p.when)]),
  );
  return new Set(rows.map((row) => row.key));
}
