/** The review of an ended run: outcome, engine log, exceedances, post-run gate; each with who may do it and why not. Pure. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { mayAnswerExceedance, mayReadLog } from "#app/lib/gates/happening-verdicts";
import { mayReport } from "#app/lib/gates/run-verdicts";
import { type May, mayOf } from "#app/lib/views/may";
import { runOf } from "#app/lib/views/places";
import { type StopView, stopView } from "#app/lib/views/run";
import { lowerFirst } from "#app/lib/views/run-words";

export interface ReviewView {
  label: string;
  title: string;
  state: string;
  back: string;
  left: StopView[];
  outcome: string | null;
  log: "read" | "accepted as missing" | null;
  may: { outcome: May; readLog: May; noLog: May };
  exceedances: { id: string; sentence: string; answered: boolean; may: May; mayWithout: May }[];
  /** Findings that may answer one: raised or still open since the start. */
  findings: { value: string; label: string }[];
}

/** @returns null where the install has no such run. */
export function reviewView(e: Evaluation, runId: string, member: string): ReviewView | null {
  const run = e.facts.runs.get(runId);
  const judged = e.result.runs.find((r) => r.id === runId);
  const rung = e.facts.rungs.find((r) => r.key === run?.run.rung);
  if (!run || !judged || !rung) return null;
  const started = run.start?.recorded ?? Number.POSITIVE_INFINITY;
  const ask = { run: runId, member };
  return {
    label: run.run.label,
    title: `Run ${run.run.label}, ${lowerFirst(rung.name)}`,
    state: run.start
      ? judged.state === "reviewed"
        ? "reviewed"
        : judged.state === "running"
          ? "still running"
          : "to be reviewed"
      : "not started",
    back: runOf(e.snapshot.install.id, runId),
    left: judged.reviewBlockers.map((b, n) => stopView(e, b, n + 1, member)),
    outcome: run.outcome,
    log: run.logRead ? "read" : run.noLog?.as === "inspector" ? "accepted as missing" : null,
    may: {
      outcome: mayOf(mayReport(e, { ...ask, report: "outcome", outcome: "completed" })),
      readLog: mayOf(mayReadLog(e, { ...ask, missing: false })),
      noLog: mayOf(mayReadLog(e, { ...ask, missing: true })),
    },
    exceedances: run.run.exceedances.map((x) => ({
      id: x.id,
      sentence: x.sentence,
      answered: x.answered !== null,
      may: mayOf(mayAnswerExceedance(e, { exceedance: x.id, member, finding: e.snapshot.findings.find((f) => !f.closed)?.id ?? null })),
      mayWithout: mayOf(mayAnswerExceedance(e, { exceedance: x.id, member, finding: null })),
    })),
    findings: e.snapshot.findings.filter((f) => !f.closed || f.closed.recorded >= started).map((f) => ({ value: f.id, label: f.words })),
  };
}
