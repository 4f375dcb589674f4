/** Release for taxi tests: every rung settled, every run reviewed, every gate it requires standing, nothing open, two signatures. */
import { releaseOpenings, releaseRecord } from "#app/lib/gates/computed";
import { type Facts, heldRole } from "#app/lib/gates/facts";
import { soonest } from "#app/lib/gates/items";
import { rank, rootsOf } from "#app/lib/gates/rank";
import type { Blocker, GateResult, ReleaseResult } from "#app/lib/gates/result";
import { reviewBlockers } from "#app/lib/gates/runs";
import { sameCovers } from "#app/lib/gates/signing";
import type { Gate, Instant, ReleaseSignature } from "#app/lib/gates/snapshot";
import { blocker, count, ownerOf } from "#app/lib/gates/who";

const LACK_TITLES: Partial<Record<Blocker["code"], string>> = {
  "finding-open": "A finding is open",
  "loose-end": "A loose end is left",
  unconfirmed: "A figure is still a default",
  "opening-since-run": "Opened since the engine last ran",
};

const releaseOnly = (g: Gate) => g.requiredBy.kind === "release" && !g.lookBack;

export function evaluateRelease(facts: Facts, gates: Map<string, GateResult>): ReleaseResult {
  const required = [...facts.gates.values()].filter((g) => g.requiredBy.kind !== "runs").map((g) => g.id);
  const blockers: Blocker[] = [];
  const lead = ownerOf(facts, ["lead"]);
  const open = facts.rungs.filter((r) => !facts.settledBy.has(r.key));
  if (open[0] || !facts.rungs.length)
    blockers.push(
      blocker({
        code: "rung-not-settled",
        subject: ["rung", open[0]?.key ?? ""],
        title: open[0] ? `Run ${open[0].key} is still to do` : "No build-up yet",
        sentence: open.length > 1 ? `${count(open.length, "rung")} of the build-up are not settled.` : "The build-up is not finished.",
        owner: lead,
        page: "build-up",
      }),
    );
  for (const run of facts.runs.values()) {
    const first = reviewBlockers({ facts, gates }, run)[0];
    if (first)
      blockers.push(
        blocker({
          code: "review-first",
          subject: ["run", run.run.id],
          title: `Run ${run.run.label} is not reviewed`,
          sentence: first.sentence,
          owner: first.owner,
          page: "run",
          id: run.run.id,
        }),
      );
  }
  blockers.push(...rootsOf(facts, gates, required));
  // Asked here and not only by the items that show it, so that a board without those items asks no less.
  for (const lack of [...releaseRecord(facts), ...releaseOpenings(facts)])
    blockers.push(
      blocker({
        code: lack.code,
        subject: ["release", facts.snapshot.install.id],
        title: LACK_TITLES[lack.code] ?? "Not ready for release",
        sentence: lack.sentence,
        owner: ownerOf(facts, lack.roles, lack.barred),
        page: lack.page,
        id: lack.id ?? null,
      }),
    );

  const ready = blockers.length === 0;
  const covers = coversNow(facts, gates, required);
  const holds = facts.snapshot.releaseSignatures.filter((s) => !s.withdrawn && sameRelease(s, covers));
  const pair = pairOf(facts, holds);
  const stands = ready && pair.length === 2;
  let until: Instant | null = null;
  if (stands) for (const id of required) until = soonest(until, gates.get(id)?.until ?? null);

  let state: ReleaseResult["state"] = "not yet";
  if (stands) state = "released";
  else if (ready) state = pair.length ? "half signed" : "ready";
  else if (wasReleased(facts)) state = "lapsed";
  if (ready && !stands) {
    const missing = pair[0] ? (pair[0].as === "lead" ? "inspector" : "lead") : "lead";
    blockers.push(
      blocker({
        code: "release-signatures",
        subject: ["release", facts.snapshot.install.id],
        title: pair.length ? "One signature is missing" : "Ready for its two signatures",
        sentence: "A lead and an inspector sign the release, two people.",
        owner: ownerOf(
          facts,
          [missing],
          pair.map((p) => p.by),
        ),
        page: "build-up",
      }),
    );
  }
  return { state, stands, until, holding: pair.map((s) => s.id), covers, blockers: rank(blockers, gates) };
}

/** What a signer of the release would cover now. */
function coversNow(facts: Facts, gates: Map<string, GateResult>, required: string[]): ReleaseResult["covers"] {
  const own = [...facts.gates.values()].filter(releaseOnly);
  const ownIds = new Set(own.map((g) => g.id));
  return {
    items: own.flatMap((g) => gates.get(g.id)?.covers ?? []),
    signatures: required
      .filter((id) => !ownIds.has(id))
      .flatMap((id) => gates.get(id)?.holding ?? [])
      .sort(),
  };
}

export function sameRelease(s: { covers: ReleaseResult["covers"] }, today: ReleaseResult["covers"]): boolean {
  const ids = (list: string[]) => [...list].sort().join("\u0001");
  return sameCovers(s.covers.items, today.items) && ids(s.covers.signatures) === ids(today.signatures);
}

/** A lead's and an inspector's signature by two people, the earliest that fit; or one of them alone. */
function pairOf(facts: Facts, signatures: ReleaseSignature[]): ReleaseSignature[] {
  const good = signatures.filter((s) => heldRole(facts, s.by, s.as, s.recorded)).sort((a, b) => a.seq - b.seq);
  for (const lead of good)
    if (lead.as === "lead")
      for (const other of good) if (other.as === "inspector" && other.by !== lead.by) return [lead, other].sort((a, b) => a.seq - b.seq);
  return good.slice(0, 1);
}

/** Whether both had signed once, over the same list. */
function wasReleased(facts: Facts): boolean {
  const all = facts.snapshot.releaseSignatures;
  return all.some(
    (s) =>
      pairOf(
        facts,
        all.filter((t) => sameRelease(t, s.covers)),
      ).length === 2,
  );
}
