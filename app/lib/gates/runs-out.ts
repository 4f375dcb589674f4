/** What time alone will end before a planned run: seen beforehand, so that somebody does it again in time. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Blocker } from "#app/lib/gates/result";
import type { Instant } from "#app/lib/gates/snapshot";
import { blocker, ownerOf } from "#app/lib/gates/who";

export interface RunsOut {
  item: string;
  until: Instant;
  blocker: Blocker;
}

/**
 * @returns items of the run's required gates that stand now and end by time before its planned start, soonest first. Not those of a
 * walk-round, which is done anew before each run; none where no start is planned, or the run was started or scrubbed.
 */
export function runsOutBefore(e: Evaluation, runId: string): RunsOut[] {
  const run = e.facts.runs.get(runId);
  const result = e.result.runs.find((r) => r.id === runId);
  const start = run?.run.plannedStart ?? null;
  if (!run || !result || start === null || run.start || run.scrub || start <= e.at) return [];
  const gates = result.requiredGates.filter((gate) => e.facts.gates.get(gate)?.eachRun === false);
  const found = gates.flatMap((gate) =>
    (e.facts.gateFacts.get(gate)?.items ?? []).flatMap(({ item, result: r }): RunsOut[] => {
      if (!r?.stands || r.until === null || r.until > start) return [];
      const name = e.facts.gates.get(gate)?.name ?? "A gate";
      return [
        {
          item: item.id,
          until: r.until,
          blocker: blocker({
            code: "ran-out",
            subject: ["item", item.id],
            title: item.words,
            sentence: `${name}: it stands until ${e.facts.when(r.until)}. Do it again as late as you can before the run.`,
            owner: ownerOf(e.facts, ["builder", "inspector"]),
            page: "gate",
            id: gate,
            item: item.id,
          }),
        },
      ];
    }),
  );
  return found.sort((a, b) => a.until - b.until || (a.item < b.item ? -1 : 1));
}
