/** Rules 2 to 7 of a proof: revision, tools, second person, acceptance, openings, validity. Each returns why not, or null. */
import { type Facts, heldRole, nameOf } from "#app/lib/gates/facts";
import type { BlockerCode } from "#app/lib/gates/result";
import type { Gate, Instant, Item, Proof, Role, Tool } from "#app/lib/gates/snapshot";

export interface Cause {
  code: BlockerCode;
  sentence: string;
  /** Members who must not clear it (own work). */
  barred?: string[];
  roles?: [Role, ...Role[]];
}

/** Rule 2. */
export const revisionFails = (item: Item, proof: Proof): Cause | null =>
  proof.revision === item.revision
    ? null
    : { code: "old-revision", sentence: "The item was changed after this proof. Prove it again as it reads now." };

/** A bad check reaches back to the last good check before it, not including that check's own instant; for ever where there is none. */
export const doubtSince = (checks: Tool["checks"], bad: { at: Instant }): Instant =>
  checks.reduce((last, c) => (c.good && c.at < bad.at && c.at > last ? c.at : last), Number.NEGATIVE_INFINITY);

/** Rule 3: every tool named was in date when used, and no out-of-tolerance record reaches that instant. */
export function toolFails(facts: Facts, proof: Proof): Cause | null {
  if (!proof.tools.length) return null;
  for (const id of proof.tools) {
    const tool = facts.tools.get(id);
    const name = tool?.name ?? "The tool";
    const checks = tool?.checks ?? [];
    const at = proof.counts;
    const newest = checks.filter((c) => c.at <= at).at(-1)?.at;
    // Of several checks at one instant the worst counts, so that their order cannot matter.
    const last = checks
      .filter((c) => c.at === newest)
      .reduce<(typeof checks)[number] | null>(
        (worst, c) => (worst && (!worst.good || (c.good && (worst.due ?? 0) <= (c.due ?? 0))) ? worst : c),
        null,
      );
    const bad = checks.find((c) => !c.good && c.at >= at && (doubtSince(checks, c) < at || (c.since !== null && c.since <= at)));
    if (bad)
      return {
        code: "tool-doubtful",
        sentence: `${name} was found out of tolerance on ${facts.when(bad.at)} and was in doubt when used. Do it again with a good tool.`,
      };
    if (!last?.good || last.due === null || at >= last.due)
      return {
        code: "tool-out-of-date",
        sentence: `${name} was not in date when used on ${facts.when(at)}. Do it again with a tool in date.`,
      };
  }
  return null;
}

/** Rule 4: second pair of eyes, and late entries: another builder, lead or inspector confirmed this very proof. */
export function secondPersonFails(facts: Facts, item: Item, proof: Proof): Cause | null {
  if (!item.secondEyes && !proof.late) return null;
  const seen = (facts.confirmationsOf.get(proof.id) ?? []).some(
    (c) =>
      c.by !== proof.by &&
      c.by !== proof.did &&
      (c.as === "builder" || c.as === "lead" || c.as === "inspector") &&
      heldRole(facts, c.by, c.as, c.recorded),
  );
  if (seen) return null;
  const who = nameOf(facts, proof.did);
  return {
    code: "needs-second-eyes",
    sentence: `Done by ${who} ${facts.when(proof.counts)}${proof.late ? ", entered late" : ""}. A second person must look and confirm: anyone but ${who}.`,
    barred: [proof.by, proof.did],
    roles: ["builder", "inspector", "lead"],
  };
}

/** Rule 5: an inspector accepted the reason of "not applicable". */
export function acceptanceFails(facts: Facts, proof: Proof): Cause | null {
  if (proof.state !== "na") return null;
  const accepted = (facts.acceptancesOf.get(proof.id) ?? []).some(
    (a) => a.as === "inspector" && a.by !== proof.by && a.by !== proof.did && heldRole(facts, a.by, "inspector", a.recorded),
  );
  return accepted
    ? null
    : {
        code: "needs-acceptance",
        sentence: `Marked not applicable (${proof.note}). An inspector must accept the reason.`,
        barred: [proof.by, proof.did],
        roles: ["inspector"],
      };
}

/** When a keep lets the proof count for openings and `after`; null = not kept. Each-run gates cannot be kept. */
export function keptAt(facts: Facts, gate: Gate, proof: Proof): Instant | null {
  if (gate.eachRun || !facts.keepsOf.size) return null;
  let at: Instant | null = null;
  for (const k of facts.keepsOf.get(proof.id) ?? [])
    if (
      k.as === "inspector" &&
      k.by !== proof.by &&
      k.by !== proof.did &&
      heldRole(facts, k.by, "inspector", k.recorded) &&
      (at === null || k.recorded > at)
    )
      at = k.recorded;
  return at;
}

/** What somebody wrote, as the end of a sentence that has its own full stop. */
export const withoutStop = (text: string): string => text.trim().replace(/\.$/, "");

/** Rule 6: newer than the closing of every opening of its systems, and none still open. `counts` already minds a keep. */
export function openingFails(facts: Facts, item: Item, counts: Instant): Cause | null {
  if (!facts.openings.size) return null;
  for (const system of item.systems) {
    const slot = facts.openings.get(system);
    if (slot?.open)
      return {
        code: "system-open",
        sentence: `${nameOf(facts, slot.open.by)} opened it ${facts.when(slot.open.opened)}: ${withoutStop(slot.open.reason)}. Close the opening, then do this again.`,
      };
  }
  for (const system of item.systems) {
    const closed = facts.openings.get(system)?.lastClosed;
    if (closed && (closed.closed as Instant) >= counts)
      return {
        code: "system-opened-since",
        sentence: `${nameOf(facts, closed.by)} opened it ${facts.when(closed.opened)}, after this was done: ${withoutStop(closed.reason)}. Do it again.`,
      };
  }
  return null;
}

/** Rule 7. @returns the instant at which time ends the proof; null = never. */
export function validUntil(facts: Facts, item: Item, gate: Gate, proof: Proof): Instant | null {
  if (facts.allSettled && gate.requiredBy.kind !== "runs") return null;
  const validity = item.validity ?? gate.validity;
  if (!validity) return null;
  const ran = facts.newestCompletedEnd;
  if (validity.afterRunHours !== null && ran !== null && ran > proof.counts) return ran + validity.afterRunHours * 3600_000;
  return validity.hours === null ? null : proof.counts + validity.hours * 3600_000;
}
