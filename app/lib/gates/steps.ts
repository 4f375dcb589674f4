/**
 * Steps: what an item rests on for as long as it is being done ("outdoors, gear off"). A step is asked whether it held when the item
 * was proved; and, before the work begins, whether it would hold if the item were proved now.
 */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { evidenceMeets } from "#app/lib/gates/evidence";
import { type Facts, proofsOf } from "#app/lib/gates/facts";
import { acceptanceFails, type Cause, revisionFails, secondPersonFails, toolFails, withoutStop } from "#app/lib/gates/proofs";
import type { Instant, Item, Proof } from "#app/lib/gates/snapshot";
import { allProofs, type ItemFacts } from "#app/lib/gates/work-facts";

export type StepFault =
  | { kind: "not-done" }
  | { kind: "not-accepted" }
  | { kind: "not-holding" }
  | { kind: "not-seen"; second: Cause }
  | { kind: "too-old"; at: Instant }
  | { kind: "over"; by: Proof };

/** By the instant that counts; of one instant, by the order in which they were recorded. */
const before = (a: Proof, b: Pick<Proof, "counts" | "seq">): boolean => a.counts < b.counts || (a.counts === b.counts && a.seq < b.seq);

/** Why the step did not hold when `proof` of an item that rests on it was done; null = it held. */
export function stepFault(facts: Facts, own: ItemFacts, proof: Pick<Proof, "counts" | "seq">): StepFault | null {
  const step = own.item;
  const rest = allProofs(own)
    .filter((p) => p.counts < proof.counts)
    .at(-1);
  if (!rest || rest.withdrawn) return { kind: "not-done" };
  if (rest.state === "na") return revisionFails(step, rest) || acceptanceFails(facts, rest) ? { kind: "not-accepted" } : null;
  if (rest.state === "failed" || !evidenceMeets(facts, step, rest).ok || revisionFails(step, rest) || toolFails(facts, rest))
    return { kind: "not-holding" };
  const second = secondPersonFails(facts, step, rest);
  if (second) return { kind: "not-seen", second };
  if (proof.counts - rest.counts > facts.snapshot.settings.stepWindow) return { kind: "too-old", at: rest.counts };
  const ended = step.step?.endedBy;
  const over = ended ? proofsOf(facts, ended).find((p) => before(rest, p) && before(p, proof)) : undefined;
  return over ? { kind: "over", by: over } : null;
}

/** Words of an item inside quotation marks: without a full stop of their own. */
export const quoted = (item: Item): string => withoutStop(item.words);

export const windowHours = (facts: Facts): number => Math.round(facts.snapshot.settings.stepWindow / 3600_000);

/** The fault of a proof that is there. */
export function stepCause(facts: Facts, step: Item, fault: StepFault): Cause {
  const rests = `It rests on “${quoted(step)}”`;
  const again = "Do that first, then this again.";
  switch (fault.kind) {
    case "not-done":
      return { code: "step-missing", sentence: `${rests}, which was not so then. ${again}` };
    case "not-accepted":
      return { code: "step-missing", sentence: `${rests}, whose “not applicable” does not stand. ${again}` };
    case "not-holding":
      return { code: "step-missing", sentence: `${rests}, whose proof does not hold. ${again}` };
    case "not-seen":
      return { ...fault.second, code: "step-missing", sentence: `${rests}, which a second person must still confirm.` };
    case "too-old":
      return { code: "step-too-old", sentence: `${rests}, done more than ${windowHours(facts)} h before. ${again}` };
    case "over":
      return { code: "step-ended", sentence: `${rests}, which was over when this was done. ${again}` };
  }
}

/**
 * Steps that do not hold now: were the item proved at `e.at`, the proof would lapse at once. Each is to be done again (or seen by a
 * second person) before the item.
 * @returns in the order in which the item names them; none for an id that is not on the board.
 */
export function stepsToRedoFirst(e: Evaluation, item: string): { step: Item; fault: StepFault }[] {
  // A proof given now is written later than everything there is.
  const now = { counts: e.at + 1, seq: Number.MAX_SAFE_INTEGER };
  return (e.facts.itemFacts.get(item)?.item.follows ?? []).flatMap((id) => {
    const followed = e.facts.itemFacts.get(id);
    if (!followed?.item.step) return [];
    const fault = stepFault(e.facts, followed, now);
    return fault ? [{ step: followed.item, fault }] : [];
  });
}
