/**
 * A board as a template of one's own: what it asks, by keys, without anybody's records. Numbers come along as starting points; where
 * they were read does not, for that was another engine's paper.
 */
import { carryOver, same } from "#app/lib/template/carry-over";
import { generate } from "#app/lib/template/generate";
import type { GateDef, GeneratedBoard, ItemDef, Part, Traits, ValueKey } from "#app/lib/template/types";

export const OWN_TEMPLATE_SCHEMA = "bladecount.board-template";
export const OWN_TEMPLATE_VERSION = 1;

export interface OwnTemplate {
  schema: typeof OWN_TEMPLATE_SCHEMA;
  version: typeof OWN_TEMPLATE_VERSION;
  name: string;
  /** Of the built-in template from which the board came. */
  templateVersion: string;
  /** Answers about the install that the board was made for, and the ratings that its counts and bands follow from, SI. */
  traits: Traits;
  values: Partial<Record<ValueKey, number>>;
  gates: (GateDef & { hidden: boolean })[];
  items: (ItemDef & { hidden: boolean })[];
  postRun: GeneratedBoard["postRun"];
}

/** A number is a starting point again: nobody has read it in this engine's papers yet. */
export function withoutSources(part: Part): Part {
  if (part.kind === "measure" || part.kind === "torque") return { ...part, criterion: { ...part.criterion, source: null } };
  return part.kind === "tick" && part.reference ? { ...part, reference: { ...part.reference, source: null } } : part;
}

/** What an own template leaves out of the built-in one for the same answers, and what it has beside it. */
export interface Compared {
  dropped: { key: string; words: string; killer: boolean }[];
  own: { key: string; words: string }[];
  changed: { key: string; words: string; killer: boolean }[];
}

export function compareWithBuiltIn(own: OwnTemplate): Compared {
  const builtIn = generate(own.traits, own.values);
  const gates = new Map(own.gates.map((g) => [g.key, g]));
  const shown = new Map(own.items.filter((i) => !i.hidden && !gates.get(i.gate)?.hidden).map((i) => [i.key, i]));
  const known = new Set(builtIn.items.map((i) => i.key));
  const says = ({ words, parts, killer, secondEyes, guarded, systems }: ItemDef) => ({
    ...{ words, killer, secondEyes, guarded, systems: [...systems].sort() },
    parts: parts.map(withoutSources),
  });
  return {
    dropped: builtIn.items.filter((i) => !shown.has(i.key)).map(({ key, words, killer }) => ({ key, words, killer })),
    own: [...shown.values()].filter((i) => !known.has(i.key)).map(({ key, words }) => ({ key, words })),
    changed: builtIn.items.flatMap((i) => {
      const mine = shown.get(i.key);
      return mine && !same(says(i), says(mine)) ? [{ key: i.key, words: mine.words, killer: i.killer }] : [];
    }),
  };
}

/**
 * The board of a new install from an own template. Counts and bands that follow from ratings come out for the new ones; what was
 * changed by hand stays. What is hidden is not made: it is listed as left out.
 */
export function boardFrom(own: OwnTemplate, values: Partial<Record<ValueKey, number>>): GeneratedBoard {
  const before = generate(own.traits, own.values);
  const after = generate(own.traits, values);
  const [was, is] = [new Map(before.items.map((i) => [i.key, i])), new Map(after.items.map((i) => [i.key, i]))];
  const gates = own.gates.filter((g) => !g.hidden);
  const every = new Map(own.gates.map((g) => [g.key, g]));
  const shown = new Set(gates.map((g) => g.key));
  const pass = (keys: string[], seen: string[] = []): string[] => [
    ...new Set(
      keys.flatMap((key) => {
        const gate = every.get(key);
        if (shown.has(key) || !gate || seen.includes(key)) return shown.has(key) ? [key] : [];
        return pass([...gate.needs, ...gate.after], [...seen, key]);
      }),
    ),
  ];
  const items = own.items.filter((i) => !i.hidden && shown.has(i.gate));
  const keys = new Set(items.map((i) => i.key));
  const compared = compareWithBuiltIn(own);
  return {
    ...after,
    templateVersion: `${own.templateVersion}, own template “${own.name}”`,
    gates: gates.map(({ hidden: _, ...g }) => ({ ...g, needs: pass(g.needs), after: pass(g.after) })),
    items: items.map(({ hidden: _, ...item }) => {
      const [old, now] = [was.get(item.key), is.get(item.key)];
      const parts = old && now ? carryOver(old.parts.map(withoutSources), now.parts.map(withoutSources), item.parts) : item.parts;
      return {
        ...item,
        parts: parts.map(withoutSources),
        follows: item.follows.filter((f) => keys.has(f)),
        step: item.step && { endedBy: item.step.endedBy !== null && keys.has(item.step.endedBy) ? item.step.endedBy : null },
      };
    }),
    postRun: carryOver(before.postRun, after.postRun, own.postRun),
    leftOut: [
      ...after.leftOut,
      ...compared.dropped.map(({ key, words }) => ({ key, words, because: `left out by the template “${own.name}”` })),
    ],
  };
}
