/** The crank clock of one item: the starter's rule as the install has it, and the way back. Pure. */
import { type CrankRule, DEFAULT_CRANK_RULE } from "#app/lib/bench/crank";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemOf } from "#app/lib/gates/facts";
import { gateOf } from "#app/lib/views/places";

export interface CrankView {
  item: string;
  key: string;
  words: string;
  caution: string;
  gate: string;
  back: string;
  rule: CrankRule;
  /** Where the rule comes from: the install's own figures, or the default. */
  from: string;
  timeZone: string;
}

/** @returns null where the item is not on the board or asks for no cranking. */
export function crankView(e: Evaluation, itemId: string): CrankView | null {
  const item = itemOf(e.facts, itemId);
  const part = item?.parts.find((p) => p.kind === "crank");
  if (!item || part?.kind !== "crank") return null;
  const value = (key: "starterOn" | "starterRest" | "starterTries") => e.facts.values.get(key);
  const [on, rest, tries] = [value("starterOn"), value("starterRest"), value("starterTries")];
  const sources = [...new Set([on, rest, tries].map((v) => v?.source ?? null))];
  return {
    item: item.id,
    key: item.key,
    words: item.words,
    caution:
      item.caution ??
      "A propeller is live, always. Plugs out or fuel and ignition off, everybody clear of the arc; the starter maker's manual comes first.",
    gate: item.gate,
    back: gateOf(e.snapshot.install.id, item.gate, item.id),
    rule: {
      ...DEFAULT_CRANK_RULE,
      on: on?.value ?? DEFAULT_CRANK_RULE.on,
      rest: rest?.value ?? DEFAULT_CRANK_RULE.rest,
      tries: tries?.value ?? DEFAULT_CRANK_RULE.tries,
      giveUpAfter: part.giveUpAfter,
    },
    from:
      sources.length === 1 && sources[0]
        ? `as read in: ${sources[0]}`
        : "usual figures, not confirmed: enter the starter maker's in Set-up",
    timeZone: e.snapshot.install.timeZone,
  };
}
