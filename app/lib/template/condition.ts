/**
 * The condition language of the template: trait words joined by `!`, then `&`, then `|`, as in "efi|low|2s" or "powered&!diesel".
 * It answers whether a condition holds for an install, and if it does not, why, in words for the list of what was left out.
 */
import { TRAIT_WORDS, type TraitWord } from "#app/lib/template/trait-words";

export type Condition =
  | { op: "word"; word: TraitWord }
  | { op: "not"; of: Condition }
  | { op: "and"; of: Condition[] }
  | { op: "or"; of: Condition[] };

const isTraitWord = (text: string): text is TraitWord => Object.hasOwn(TRAIT_WORDS, text);

/** Parses a condition. Throws with the text and the reason where it is empty or names an unknown word. */
export function parseCondition(text: string): Condition {
  const alternatives = text.split("|").map((part) => {
    const terms = part.split("&").map((term) => parseTerm(term.trim(), text));
    return joined("and", terms);
  });
  return joined("or", alternatives);
}

function joined(op: "and" | "or", of: Condition[]): Condition {
  const [first] = of;
  return of.length === 1 && first ? first : { op, of };
}

function parseTerm(term: string, whole: string): Condition {
  if (term.startsWith("!")) return { op: "not", of: parseTerm(term.slice(1).trim(), whole) };
  if (!isTraitWord(term)) throw new Error(`"${whole}": "${term}" is not a word about an install.`);
  return { op: "word", word: term };
}

/** Whether the condition holds for the words that are true of an install. */
export function holds(condition: Condition, words: ReadonlySet<TraitWord>): boolean {
  if (condition.op === "word") return words.has(condition.word);
  if (condition.op === "not") return !holds(condition.of, words);
  if (condition.op === "and") return condition.of.every((part) => holds(part, words));
  return condition.of.some((part) => holds(part, words));
}

/** Whether a condition as written holds; none always does. */
export function applies(text: string | undefined, words: ReadonlySet<TraitWord>): boolean {
  return text === undefined || holds(parseCondition(text), words);
}

/** The facts that make the condition hold, or not hold, for these words: "there is a fuel return line". */
function facts(condition: Condition, words: ReadonlySet<TraitWord>): string[] {
  if (condition.op === "word") {
    const phrases = TRAIT_WORDS[condition.word];
    return [words.has(condition.word) ? phrases.present : phrases.absent];
  }
  if (condition.op === "not") return facts(condition.of, words);
  const outcome = holds(condition, words);
  const telling = condition.of.filter((part) => holds(part, words) === outcome);
  return telling.flatMap((part) => facts(part, words));
}

/** What makes these conditions hold or not hold, each fact once; empty where there are none. */
export const why = (texts: string[], words: ReadonlySet<TraitWord>): string =>
  [...new Set(texts.flatMap((text) => facts(parseCondition(text), words)))].join(" and ");

/** Why the condition does not hold, in words: "no carburettor and no alternate air". Empty where it holds. */
export const whyNot = (text: string, words: ReadonlySet<TraitWord>): string => (applies(text, words) ? "" : why([text], words));
