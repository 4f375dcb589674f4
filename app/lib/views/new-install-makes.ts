/** What the answers about a new install make: how many gates and items, what they add and what they leave out, and why. Pure. */
import { why } from "#app/lib/template/condition";
import { generate } from "#app/lib/template/generate";
import { gateOf, TEMPLATE } from "#app/lib/template/template";
import { type TraitWord, traitWords } from "#app/lib/template/trait-words";
import type { Traits } from "#app/lib/template/types";

export interface Made {
  /** "there is a fuel return line" */
  because: string;
  /** "FP3, IG5 to IG7" */
  keys: string;
  items: { key: string; words: string }[];
}

export interface Makes {
  /** Gates that must be signed before the first start, and the items in them. */
  gates: number;
  items: number;
  /** Items after a run, at the service and for the release. */
  laterItems: number;
  /** Share of rated speed by rung, for the drawing. */
  runs: { key: string; share: number }[];
  added: Made[];
  leftOut: Made[];
}

type Words = ReadonlySet<TraitWord>;

/** @param traits may contradict themselves: the counts are then those of the template's conditions all the same. */
export function whatItMakes(traits: Traits): Makes {
  const board = generate(traits);
  const words = traitWords(traits);
  const first = new Set(
    board.gates.filter((g) => g.requiredBy.kind === "runs" || g.requiredBy.kind === "runs-and-release").map((g) => g.key),
  );
  const items = board.items.filter((i) => first.has(i.gate)).length;
  const all = [...board.items, ...board.postRun.items];
  return {
    gates: first.size,
    items,
    laterItems: all.length - items,
    runs: board.rungs.map(({ key, share }) => ({ key, share })),
    added: grouped(
      all.flatMap(({ key, words: says }) => ({ key, words: says, because: whyAdded(key, words) })).filter((i) => i.because !== ""),
    ),
    leftOut: grouped(board.leftOut),
  };
}

/** Why an item with a condition is on the board: what is true of the install. Empty for an item that every install has. */
function whyAdded(key: string, words: Words): string {
  const row = [...TEMPLATE.items, ...TEMPLATE.postRunItems].find((item) => item.key === key);
  const gate = [...TEMPLATE.gates, TEMPLATE.postRunGate].find((g) => g.key === gateOf(key));
  return why(
    [gate?.when, row?.when].filter((when) => when !== undefined),
    words,
  );
}

/** One entry for each reason, in the order in which the reasons first come up. */
function grouped(list: { key: string; words: string; because: string }[]): Made[] {
  const groups = new Map<string, Made["items"]>();
  for (const { key, words, because } of list) groups.set(because, [...(groups.get(because) ?? []), { key, words }]);
  return [...groups].map(([because, items]) => ({ because, items, keys: rangesOf(items.map((i) => i.key)) }));
}

/** "IG5", "IG6", "IG7", "FP3" as "IG5 to IG7, FP3": three or more that follow each other are a range. */
export function rangesOf(keys: string[]): string {
  const stretches: string[][] = [];
  for (const key of keys) {
    const last = stretches.at(-1);
    if (last && follows(last.at(-1) ?? "", key)) last.push(key);
    else stretches.push([key]);
  }
  return stretches.map((run) => (run.length > 2 ? `${run[0]} to ${run.at(-1)}` : run.join(", "))).join(", ");
}

const follows = (a: string, b: string) =>
  gateOf(a) === gateOf(b) && Number(b.slice(gateOf(b).length)) === Number(a.slice(gateOf(a).length)) + 1;
