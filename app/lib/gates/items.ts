/** From an item's proofs to its state: the eight rules of a proof, in order, and the computed items. */

import { computedItem } from "#app/lib/gates/computed";
import { evidenceMeets, numberMissing } from "#app/lib/gates/evidence";
import { type Facts, nameOf } from "#app/lib/gates/facts";
import {
  acceptanceFails,
  type Cause,
  keptAt,
  openingFails,
  revisionFails,
  secondPersonFails,
  toolFails,
  validUntil,
  withoutStop,
} from "#app/lib/gates/proofs";
import type { Blocker, ItemResult, ItemState } from "#app/lib/gates/result";
import type { Instant, Item, Proof } from "#app/lib/gates/snapshot";
import { quoted, stepCause, stepFault } from "#app/lib/gates/steps";
import { blocker, ownerOf } from "#app/lib/gates/who";
import { type ItemFacts, isComputed } from "#app/lib/gates/work-facts";

/** Newer-than rules of a gate, worked out once for all of its items. */
export interface GateLimits {
  /** Proofs must be strictly newer than this (marks); null = no such rule. */
  newerThan: { at: Instant; cause: Cause } | null;
  /** Set when a look-back gate has no ended run to look back on. */
  noRunYet: Cause | null;
  /** Per system: the newest current proof of a gate that this one comes *after*. */
  after: ReadonlyMap<string, { at: Instant; gate: string }>;
}

/** Shared by every item that stands: most do, and none of them needs a list of its own. */
const NONE = Object.freeze([]) as unknown as Blocker[];

const NO_CAUSES: Cause[] = [];

/** The list with one more reason; the same list where there is none, so that what stands needs no list. */
const also = (list: Cause[], cause: Cause | null): Cause[] => (cause === null ? list : [...list, cause]);

/**
 * @param own the item with what is recorded of it; those that it follows have been evaluated before.
 * @returns its state at `facts.at`, every failing rule as a blocker (first cause first), and until when it stands.
 */
export function evaluateItem(facts: Facts, limits: GateLimits, own: ItemFacts): ItemResult {
  const { item, current: proof } = own;
  const { gate } = own.of;
  own.computed = isComputed(item);
  if (own.computed) return computedItem(facts, gate, item);
  if (!proof) return notStanding(facts, item, null, "to do", [nothingYet(facts, own)]);

  const lookBack = gate.lookBack !== null;
  if (proof.state === "na") {
    if (item.killer && gate.eachRun)
      return notStanding(facts, item, proof, "to do", [
        { code: "na-not-allowed", sentence: "This item guards a life and is asked before each run: it cannot be not applicable. Do it." },
      ]);
    const old = revisionFails(item, proof);
    if (old) return notStanding(facts, item, proof, "lapsed", [old]);
    const waits = acceptanceFails(facts, proof);
    if (waits) return notStanding(facts, item, proof, "second eyes", [waits]);
    return { id: item.id, state: "not applicable", stands: true, until: null, proof: proof.id, blockers: NONE };
  }
  if (limits.noRunYet) return notStanding(facts, item, proof, "to do", [limits.noRunYet]);
  if (proof.state === "failed")
    return notStanding(facts, item, proof, "to do", [
      {
        code: "item-failed",
        sentence: `${nameOf(facts, proof.did)} found it not right on ${facts.when(proof.counts)}${proof.note ? `: ${withoutStop(proof.note)}` : ""}. Put it right and prove it again.`,
      },
    ]);

  const met = evidenceMeets(facts, item, proof);
  if (!met.ok) return notStanding(facts, item, proof, "to do", [met]);

  let lapsed = also(also(NO_CAUSES, revisionFails(item, proof)), toolFails(facts, proof));
  let until: Instant | null = null;
  if (!item.step) {
    const kept = keptAt(facts, gate, proof);
    const counts = kept === null ? proof.counts : Math.max(kept, proof.counts);
    if (!lookBack) {
      lapsed = also(lapsed, openingFails(facts, item, counts));
      until = validUntil(facts, item, gate, proof);
      if (until !== null && until <= facts.at)
        lapsed = also(lapsed, { code: "ran-out", sentence: `Ran out on ${facts.when(until)}. Do it again.` });
    }
    lapsed = also(lapsed, newerThanFails(facts, limits, item, proof, counts));
    if (item.follows.length || own.ends.length) {
      const followed = followsFail(facts, own, proof);
      for (const cause of followed.causes) lapsed = also(lapsed, cause);
      until = soonest(until, followed.until);
    }
  }
  const second = secondPersonFails(facts, item, proof);
  if (lapsed.length) return notStanding(facts, item, proof, "lapsed", second ? [...lapsed, second] : lapsed);
  if (second) return notStanding(facts, item, proof, "second eyes", [second]);
  return { id: item.id, state: "done", stands: true, until, proof: proof.id, blockers: NONE };
}

/** The earlier of two ends; null = never. */
export const soonest = (a: Instant | null, b: Instant | null): Instant | null => (a === null ? b : b === null ? a : Math.min(a, b));

function nothingYet(facts: Facts, own: ItemFacts): Cause {
  for (const part of own.item.parts) {
    const missing = numberMissing(facts, part);
    if (missing)
      return {
        code: "number-missing",
        sentence: `The maker's number is missing: ${missing}. Enter it with where it was read, then do the item.`,
        roles: ["builder", "lead", "inspector"],
      };
  }
  const last = own.newest;
  return last?.withdrawn
    ? {
        code: "item-withdrawn",
        sentence: `${nameOf(facts, last.withdrawn.by)} withdrew the proof on ${facts.when(last.withdrawn.recorded)}. Do it and prove it again.`,
      }
    : { code: "item-to-do", sentence: "Not done yet." };
}

function newerThanFails(facts: Facts, limits: GateLimits, item: Item, proof: Proof, counts: Instant): Cause | null {
  if (limits.newerThan && proof.counts <= limits.newerThan.at) return limits.newerThan.cause;
  if (!limits.after.size) return null;
  for (const system of item.systems) {
    const other = limits.after.get(system);
    if (other && counts <= other.at)
      return {
        code: "after-gate",
        sentence: `${facts.gates.get(other.gate)?.name ?? "An earlier gate"} was worked on ${facts.when(other.at)}, after this. Do it again.`,
      };
  }
  return null;
}

/** Rule 8: what it follows stands with an older proof; a step it rests on still held; a step it ends is over. */
function followsFail(facts: Facts, { item, ends }: ItemFacts, proof: Proof): { causes: Cause[]; until: Instant | null } {
  const causes: Cause[] = [];
  let until: Instant | null = null;
  for (const id of item.follows) {
    const followed = facts.itemFacts.get(id);
    if (!followed) continue;
    const { item: other, current: otherProof, result } = followed;
    if (other.step) {
      const fault = stepFault(facts, followed, proof);
      if (fault) causes.push(stepCause(facts, other, fault));
      continue;
    }
    if (!result?.stands)
      causes.push({ code: "follows", sentence: `It follows “${quoted(other)}”, which does not stand. Do that first, then this again.` });
    else {
      until = soonest(until, result.until);
      if (result.state !== "not applicable" && otherProof && otherProof.counts >= proof.counts)
        causes.push({
          code: "follows",
          sentence: `“${quoted(other)}” was done again on ${facts.when(otherProof.counts)}, not before this. Do this again after it.`,
        });
    }
  }
  for (const { item: step, newest } of ends) {
    if (newest && newest.counts >= proof.counts)
      causes.push({
        code: "step-newer",
        sentence: `“${quoted(step)}” was done again on ${facts.when(newest.counts)}. This ends it: do it again.`,
      });
  }
  return { causes, until };
}

function notStanding(facts: Facts, item: Item, proof: Proof | null, state: ItemState, causes: Cause[]): ItemResult {
  const blockers = causes.map((c) =>
    blocker({
      code: c.code,
      subject: ["item", item.id],
      title: item.words,
      sentence: c.sentence,
      page: "gate",
      id: item.gate,
      item: item.id,
      owner: ownerOf(facts, c.roles ?? ["builder", "inspector"], c.barred),
    }),
  );
  return { id: item.id, state, stands: false, until: null, proof: proof?.id ?? null, blockers };
}
