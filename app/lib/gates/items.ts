/** From an item's proofs to its state: the eight rules of a proof, in order, and the computed items. */
import { computedItem } from "#app/lib/gates/computed";
import { evidenceMeets, numberMissing } from "#app/lib/gates/evidence";
import { currentProof, type Facts, isComputed, nameOf } from "#app/lib/gates/facts";
import {
  acceptanceFails,
  type Cause,
  keptAt,
  openingFails,
  revisionFails,
  secondPersonFails,
  toolFails,
  validUntil,
} from "#app/lib/gates/proofs";
import type { ItemResult, ItemState } from "#app/lib/gates/result";
import type { Gate, Instant, Item, Proof } from "#app/lib/gates/snapshot";
import { blocker, ownerOf } from "#app/lib/gates/who";

/** Newer-than rules of a gate, worked out once for all of its items. */
export interface GateLimits {
  /** Proofs must be strictly newer than this (marks); null = no such rule. */
  newerThan: { at: Instant; cause: Cause } | null;
  /** Set when a look-back gate has no ended run to look back on. */
  noRunYet: Cause | null;
  /** Per system: the newest current proof of a gate that this one comes *after*. */
  after: Map<string, { at: Instant; gate: string }>;
}

export interface ItemContext {
  facts: Facts;
  gate: Gate;
  limits: GateLimits;
  /** Results of the items that this one follows, evaluated before. */
  results: Map<string, ItemResult>;
}

/** @returns the item's state at `facts.at`, every failing rule as a blocker (first cause first), and until when it stands. */
export function evaluateItem(ctx: ItemContext, item: Item): ItemResult {
  const { facts, gate } = ctx;
  if (isComputed(item)) return computedItem(facts, gate, item);
  const proof = currentProof(facts, item.id);
  if (!proof) return notStanding(ctx, item, null, "to do", [nothingYet(facts, item)]);

  const lookBack = gate.lookBack !== null;
  if (ctx.limits.noRunYet) return notStanding(ctx, item, proof, "to do", [ctx.limits.noRunYet]);
  if (proof.state === "na") {
    if (item.killer && gate.eachRun)
      return notStanding(ctx, item, proof, "to do", [
        { code: "na-not-allowed", sentence: "This item guards a life and is asked before each run: it cannot be not applicable. Do it." },
      ]);
    const old = revisionFails(item, proof);
    if (old) return notStanding(ctx, item, proof, "lapsed", [old]);
    const waits = acceptanceFails(facts, proof);
    if (waits) return notStanding(ctx, item, proof, "second eyes", [waits]);
    return { id: item.id, state: "not applicable", stands: true, until: null, proof: proof.id, blockers: [] };
  }
  if (proof.state === "failed")
    return notStanding(ctx, item, proof, "to do", [
      {
        code: "item-failed",
        sentence: `${nameOf(facts, proof.did)} found it not right on ${facts.when(proof.counts)}${proof.note ? `: ${proof.note}` : ""}. Put it right and prove it again.`,
      },
    ]);

  const met = evidenceMeets(facts, item, proof);
  if (!met.ok) return notStanding(ctx, item, proof, "to do", [met]);

  const lapsed: Cause[] = [];
  const add = (cause: Cause | null) => {
    if (cause) lapsed.push(cause);
  };
  add(revisionFails(item, proof));
  add(toolFails(facts, proof));
  let until: Instant | null = null;
  if (!item.step) {
    const kept = keptAt(facts, gate, proof);
    const counts = kept === null ? proof.counts : Math.max(kept, proof.counts);
    if (!lookBack) {
      add(openingFails(facts, item, counts));
      until = validUntil(facts, item, gate, proof);
      if (until !== null && until <= facts.at) add({ code: "ran-out", sentence: `Ran out on ${facts.when(until)}. Do it again.` });
    }
    add(newerThanFails(ctx, item, proof, counts));
    const followed = followsFail(ctx, item, proof);
    for (const cause of followed.causes) add(cause);
    until = soonest(until, followed.until);
  }
  const second = secondPersonFails(facts, item, proof);
  if (lapsed.length) return notStanding(ctx, item, proof, "lapsed", second ? [...lapsed, second] : lapsed);
  if (second) return notStanding(ctx, item, proof, "second eyes", [second]);
  return { id: item.id, state: "done", stands: true, until, proof: proof.id, blockers: [] };
}

/** The earlier of two ends; null = never. */
export const soonest = (a: Instant | null, b: Instant | null): Instant | null => (a === null ? b : b === null ? a : Math.min(a, b));

function nothingYet(facts: Facts, item: Item): Cause {
  for (const part of item.parts) {
    const missing = numberMissing(facts, part);
    if (missing)
      return {
        code: "number-missing",
        sentence: `The maker's number is missing: ${missing}. Enter it with where it was read, then do the item.`,
        roles: ["builder", "lead", "inspector"],
      };
  }
  const last = facts.proofsOf.get(item.id)?.at(-1);
  return last?.withdrawn
    ? {
        code: "item-withdrawn",
        sentence: `${nameOf(facts, last.withdrawn.by)} withdrew the proof on ${facts.when(last.withdrawn.recorded)}. Do it and prove it again.`,
      }
    : { code: "item-to-do", sentence: "Not done yet." };
}

function newerThanFails({ facts, limits }: ItemContext, item: Item, proof: Proof, counts: Instant): Cause | null {
  if (limits.newerThan && proof.counts <= limits.newerThan.at) return limits.newerThan.cause;
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

const FOLLOWS_NOTHING = { causes: [], until: null } as const;

/** Rule 8: what it follows stands with an older proof; a step it rests on still held; a step it ends is over. */
function followsFail({ facts, results }: ItemContext, item: Item, proof: Proof): { causes: readonly Cause[]; until: Instant | null } {
  if (!item.follows.length && !facts.endsSteps.has(item.id)) return FOLLOWS_NOTHING;
  const causes: Cause[] = [];
  let until: Instant | null = null;
  for (const id of item.follows) {
    const other = facts.items.get(id);
    if (!other) continue;
    if (other.step) {
      const cause = stepFails(facts, other, proof);
      if (cause) causes.push(cause);
      continue;
    }
    const result = results.get(id);
    const otherProof = currentProof(facts, id);
    if (!result?.stands)
      causes.push({ code: "follows", sentence: `It follows “${other.words}”, which does not stand. Do that first, then this again.` });
    else {
      until = soonest(until, result.until);
      if (result.state !== "not applicable" && otherProof && otherProof.counts >= proof.counts)
        causes.push({
          code: "follows",
          sentence: `“${other.words}” was done again on ${facts.when(otherProof.counts)}, not before this. Do this again after it.`,
        });
    }
  }
  for (const step of facts.endsSteps.get(item.id) ?? []) {
    const newest = facts.proofsOf.get(step.id)?.at(-1);
    if (newest && newest.counts >= proof.counts)
      causes.push({
        code: "step-newer",
        sentence: `“${step.words}” was done again on ${facts.when(newest.counts)}. This ends it: do it again.`,
      });
  }
  return { causes, until };
}

function stepFails(facts: Facts, step: Item, proof: Proof): Cause | null {
  const older = (facts.proofsOf.get(step.id) ?? []).filter((p) => p.counts < proof.counts);
  const rest = older.at(-1);
  const again = `Do “${step.words}” first, then this again.`;
  if (!rest || rest.withdrawn) return { code: "step-missing", sentence: `It rests on “${step.words}”, which was not so then. ${again}` };
  if (rest.state === "na") {
    const bad = revisionFails(step, rest) ?? acceptanceFails(facts, rest);
    return bad && { code: "step-missing", sentence: `It rests on “${step.words}”, whose “not applicable” does not stand. ${again}` };
  }
  if (rest.state === "failed" || !evidenceMeets(facts, step, rest).ok || revisionFails(step, rest) || toolFails(facts, rest))
    return { code: "step-missing", sentence: `It rests on “${step.words}”, whose proof does not hold. ${again}` };
  const second = secondPersonFails(facts, step, rest);
  if (second)
    return { ...second, code: "step-missing", sentence: `It rests on “${step.words}”, which a second person must still confirm.` };
  if (proof.counts - rest.counts > facts.snapshot.settings.stepWindow) {
    const hours = Math.round(facts.snapshot.settings.stepWindow / 3600_000);
    return { code: "step-too-old", sentence: `It rests on “${step.words}”, done more than ${hours} h before. ${again}` };
  }
  const ended = step.step?.endedBy;
  if (ended && (facts.proofsOf.get(ended) ?? []).some((p) => p.counts > rest.counts && p.counts < proof.counts))
    return { code: "step-ended", sentence: `“${step.words}” was over when this was done. ${again}` };
  return null;
}

function notStanding({ facts, gate }: ItemContext, item: Item, proof: Proof | null, state: ItemState, causes: Cause[]): ItemResult {
  const blockers = causes.map((c) =>
    blocker({
      code: c.code,
      subject: ["item", item.id],
      title: item.words,
      sentence: c.sentence,
      page: "gate",
      id: gate.id,
      item: item.id,
      owner: ownerOf(facts, c.roles ?? ["builder", "inspector"], c.barred),
    }),
  );
  return { id: item.id, state, stands: false, until: null, proof: proof?.id ?? null, blockers };
}
