/** Open findings that stop a run or hold it below its plan, and where a new one is raised from its page. Pure. */
import { rpmText } from "#app/lib/gates/clearance";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { anchorOfFinding } from "#app/lib/views/findings";
import { boardOf, type Place } from "#app/lib/views/places";
import { recordLinks } from "#app/lib/views/record-links";

export interface RunFindings {
  list: {
    id: string;
    /** "F-7" */
    tag: string;
    words: string;
    severity: "grounding" | "limiting";
    /** "caps it at 1,400 rpm" */
    does: string;
    state: "open" | "fixed, not closed";
    href: string;
  }[];
  raise: Place;
}

/** The hardest first. Without a plan every limiting finding counts. */
export function runFindings(e: Evaluation, runId: string): RunFindings {
  const rpm = e.facts.runs.get(runId)?.plan?.rpm ?? Number.POSITIVE_INFINITY;
  const base = boardOf(e.snapshot.install.id);
  const cap = (f: { severity: string; cap: number | null }) => (f.severity === "grounding" ? Number.NEGATIVE_INFINITY : (f.cap ?? 0));
  const list = e.facts.snapshot.findings
    .map((f, i) => ({ f, tag: `F-${i + 1}` }))
    .filter(({ f }) => !f.closed && f.severity !== "watch" && cap(f) < rpm)
    .sort((a, b) => cap(a.f) - cap(b.f) || b.f.seq - a.f.seq)
    .map(({ f, tag }) => ({
      id: f.id,
      tag,
      words: f.words,
      severity: f.severity === "grounding" ? ("grounding" as const) : ("limiting" as const),
      does: f.severity === "grounding" ? "stops every run" : `caps it at ${rpmText(f.cap ?? 0)}`,
      state: f.fixed ? ("fixed, not closed" as const) : ("open" as const),
      href: `${base}/findings#${anchorOfFinding(f.id)}`,
    }));
  return { list, raise: recordLinks(e, { kind: "run", id: runId }).finding };
}
