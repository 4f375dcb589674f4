/** What comes before an item that is to be proved: a step that would not hold now, a system that is still open. Pure. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { allItems } from "#app/lib/gates/facts";
import { withoutStop } from "#app/lib/gates/proofs";
import type { Item } from "#app/lib/gates/snapshot";
import { type StepFault, stepsToRedoFirst, windowHours } from "#app/lib/gates/steps";
import { inSentence } from "#app/lib/gates/who";
import { isComputed } from "#app/lib/gates/work-facts";
import { anchorOf, boardOf, gateOf, rowAnchor } from "#app/lib/views/places";
import { systemWords } from "#app/lib/views/systems";

export interface First {
  /** On the link: "Do again first: FP1", "Close: fuel, forward of the firewall". */
  act: string;
  href: string;
  sentence: string;
}

/** Nothing for an item that stands, or that waits for somebody's eyes only. */
export function firstOf(e: Evaluation, item: Item): First[] {
  const result = e.result.items[item.id];
  if (!result || result.stands || result.state === "second eyes" || isComputed(item)) return [];
  return [...openSystems(e, item), ...stepsFirst(e, item)];
}

/** Why a step that stands is wanted again. */
export interface Wanted {
  keys: string[];
  /** "it was done more than 12 h ago" */
  why: string;
}

/** Steps that are to be done again first, each with the keys of the items that ask for it. */
export function wantedFirst(e: Evaluation): ReadonlyMap<string, Wanted> {
  const wanted = new Map<string, Wanted>();
  for (const item of allItems(e.facts)) {
    if (!item.follows.length || openSystems(e, item).length) continue;
    const result = e.result.items[item.id];
    if (!result || result.stands || result.state === "second eyes" || result.state === "not applicable") continue;
    for (const { step, fault } of stepsToRedoFirst(e, item.id))
      wanted.set(step.id, { keys: [...(wanted.get(step.id)?.keys ?? []), item.key], why: faultWords(e, fault) });
  }
  return wanted;
}

function stepsFirst(e: Evaluation, item: Item): First[] {
  const begun = e.result.items[item.id]?.proof !== null;
  return stepsToRedoFirst(e, item.id).flatMap(({ step, fault }) => {
    // A step that was not done yet is asked for in its own row; nothing has to be said twice before the work begins.
    if (!begun && !e.result.items[step.id]?.stands) return [];
    const href = step.gate === item.gate ? `#${anchorOf(step.id)}` : gateOf(e.snapshot.install.id, step.gate, step.id);
    const sentence = `Do ${step.key} first: ${faultWords(e, fault)}, and a proof of this given now would lapse at once.`;
    const act = `Do again first: ${step.key}`;
    return [{ act, href, sentence }];
  });
}

function faultWords(e: Evaluation, fault: StepFault): string {
  switch (fault.kind) {
    case "not-done":
      return "it is not so now";
    case "not-accepted":
      return "its “not applicable” does not stand";
    case "not-holding":
      return "its proof does not hold";
    case "not-seen":
      return "a second person must still confirm it";
    case "too-old":
      return `it was done more than ${windowHours(e.facts)} h ago`;
    case "over": {
      const by = e.facts.itemFacts.get(fault.by.item)?.item;
      return `it is over since ${by ? `${by.key} was done ` : ""}${e.facts.when(fault.by.counts)}`;
    }
  }
}

/** Each opening once, for a proof given while it is open does not count. What looks back on a run, and steps, do not mind openings. */
export function openSystems(e: Evaluation, item: Item): First[] {
  if (item.step || e.facts.gates.get(item.gate)?.lookBack) return [];
  const open = new Map(item.systems.flatMap((s) => e.facts.openings.get(s)?.open ?? []).map((o) => [o.id, o]));
  return [...open.values()].map((o) => {
    const act = `Close: ${inSentence(systemWords(o.systems))}`;
    const href = `${boardOf(e.snapshot.install.id)}/openings#${rowAnchor("openings", o.id)}`;
    const sentence = `Open since ${e.facts.when(o.opened)}: ${withoutStop(o.reason)}. Close it first: a proof of this given now would not count.`;
    return { act, href, sentence };
  });
}
