/**
 * Whether evidence that is asked for anew asks for more, for less, or for the same in other words. What cannot be told apart from less
 * counts as less: it waits for an inspector.
 */
import { alike } from "#app/lib/bench/compare";
import { inSentence } from "#app/lib/gates/who";
import { same } from "#app/lib/template/carry-over";
import type { Criterion, Part } from "#app/lib/template/types";
import { formatBand, type UnitSystem } from "#app/lib/units/display";
import type { Band } from "#app/lib/units/quantity";

/** `more` counts at once; `less` and `words` wait; `order` changes nothing that is asked. */
export type Weight = "more" | "less" | "words" | "order";
export interface Change {
  weight: Weight;
  /** "Band of bolts: 22 to 24 N·m in place of 20 to 24 N·m". No full stop. */
  says: string;
}

const change = (weight: Weight, says: string): Change => ({ weight, says });

/** "a measurement", for each kind of evidence. */
export const PART_NAMES: Record<Part["kind"], string> = {
  tick: "a tick",
  measure: "a measurement in a band",
  torque: "a torque with its tool",
  tally: "a count",
  photo: "a photo",
  reading: "a reading without a band",
  text: "a note",
  crank: "the crank clock",
  sheet: "a bench sheet",
  computed: "worked out by the board",
};

const isOptional = (p: Part): boolean => (p.kind === "photo" || p.kind === "reading") && p.optional;

/** @param from as asked now, @param to as it would be; both in order. @param units for bands in words. */
export function partChanges(from: Part[], to: Part[], units: UnitSystem): Change[] {
  const changes: Change[] = [];
  for (let n = 0; n < Math.max(from.length, to.length); n++) {
    const [was, is] = [from[n], to[n]];
    if (!was && is) changes.push(change("more", `Asks also for ${named(is)}`));
    else if (was && !is) changes.push(change("less", `Asks no longer for ${named(was)}`));
    else if (was && is && !same(was, is)) changes.push(...between(was, is, units));
  }
  return changes;
}

const named = (part: Part): string => {
  const what = PART_NAMES[part.kind];
  const label = "label" in part ? part.label : part.kind === "photo" ? part.of : part.kind === "text" ? part.asks : "";
  return `${what}${label ? ` (${inSentence(label)})` : ""}${isOptional(part) ? ", which may stay empty" : ""}`;
};

function between(was: Part, is: Part, units: UnitSystem): Change[] {
  if (was.kind !== is.kind) return [change("less", `Asks for ${named(is)} in place of ${named(was)}`)];
  const list = wordChanges(was, is);
  if (isOptional(was) !== isOptional(is))
    list.push(
      isOptional(is) ? change("less", `${capital(named(was))} may stay empty`) : change("more", `${capital(named(is))} must be given`),
    );
  if ((was.kind === "measure" && is.kind === "measure") || (was.kind === "torque" && is.kind === "torque")) {
    list.push(...criterionChanges(is.label, was.criterion, is.criterion, units));
  }
  if (was.kind === "reading" && is.kind === "reading" && was.quantity !== is.quantity)
    list.push(change("less", `${is.label}: another kind of quantity`));
  if ("places" in was && "places" in is && !same(was.places, is.places))
    list.push(
      change(
        was.places.every((p) => is.places.includes(p)) ? "more" : "less",
        `${is.label}: at ${is.places.length} places in place of ${was.places.length}`,
      ),
    );
  if (was.kind === "torque" && is.kind === "torque" && was.count !== is.count)
    list.push(
      change(was.count === null ? "more" : "less", `${is.label}: ${is.count ?? "any number of"} fasteners, was ${was.count ?? "any"}`),
    );
  if (was.kind === "tally" && is.kind === "tally" && !same({ ...was, words: null }, { ...is, words: null })) {
    const only = was.expected === undefined && same({ ...was, words: null, expected: null }, { ...is, words: null, expected: null });
    list.push(change(only ? "more" : "less", "Another count"));
  }
  if (was.kind === "crank" && is.kind === "crank" && was.giveUpAfter !== is.giveUpAfter)
    list.push(
      change(is.giveUpAfter < was.giveUpAfter ? "more" : "less", `Give up cranking after ${is.giveUpAfter} s, was ${was.giveUpAfter} s`),
    );
  if (was.kind === "tick" && is.kind === "tick") list.push(...referenceChanges(was.reference, is.reference));
  if ((was.kind === "sheet" || was.kind === "computed") && !same(was, is)) list.push(change("less", "Another calculation"));
  // Whatever is different and was not named above is not passed over.
  return list.length ? list : [change("less", `${capital(named(is))} is asked differently`)];
}

const capital = (text: string): string => `${text[0]?.toUpperCase()}${text.slice(1)}`;

type Reference = Extract<Part, { kind: "tick" }>["reference"];
function referenceChanges(was: Reference, is: Reference): Change[] {
  if (!was && is) return [change("more", `Asks for the maker's word: ${is.asks}`)];
  if (was && !is) return [change("less", `Asks no longer for the maker's word: ${was.asks}`)];
  if (!was || !is) return [];
  const list: Change[] = was.asks === is.asks ? [] : [change("words", `“${is.asks}” in place of “${was.asks}”`)];
  if (was.text !== is.text) list.push(change(was.text === null ? "more" : "less", `The maker's word: ${is.text ?? "left open"}`));
  else if (was.source !== is.source) list.push(change("words", `Read in: ${is.source ?? "nowhere"}`));
  return list;
}

function wordChanges(was: Part, is: Part): Change[] {
  const words = (p: Part): string[] => {
    if ("label" in p) return [p.label];
    if (p.kind === "photo") return [p.of];
    if (p.kind === "text") return [p.asks];
    return p.kind === "tally" ? [p.words.out, p.words.in] : [];
  };
  return same(words(was), words(is)) ? [] : [change("words", `“${words(is).join(" / ")}” in place of “${words(was).join(" / ")}”`)];
}

function criterionChanges(label: string, was: Criterion, is: Criterion, units: UnitSystem): Change[] {
  if (was.quantity !== is.quantity) return [change("less", `${label}: another kind of quantity`)];
  if (!same([was.limit, was.otherLimit], [is.limit, is.otherLimit])) return [change("less", `${label}: judged by another limit`)];
  const words = (band: Band | null) => formatBand(was.quantity, band, units);
  if (!same(was.band, is.band)) {
    const weight = was.band === null || (is.band !== null && !lets(is.band, was.band)) ? "more" : "less";
    return [change(weight, `Band of ${inSentence(label)}: ${words(is.band)}${was.band ? ` in place of ${words(was.band)}` : ""}`)];
  }
  if (was.source !== is.source) return [change("words", `${label}: read in ${is.source ?? "nowhere"}`)];
  return same(was, is) ? [] : [change("less", `${label}: another criterion`)];
}

const below = (a: number, b: number): boolean => a < b && !alike(a, b);

/** Whether `band` lets something pass that `old` does not. Ends may come from entries in another unit, hence room for the last digit. */
export function lets(band: Band, old: Band): boolean {
  return (
    (old.min !== null && (band.min === null || below(band.min, old.min))) ||
    (old.max !== null && (band.max === null || below(old.max, band.max)))
  );
}
