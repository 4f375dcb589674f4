/** Runs of the build-up: state, whether clear, what stops the start, what is left after the end. */

import { clearanceOf, rpmText } from "#app/lib/gates/clearance";
import { acceptedFor } from "#app/lib/gates/computed";
import { crewOf, crewUntil, newestAnswer, positionBlockers, rollCallBlockers } from "#app/lib/gates/crew";
import type { Facts } from "#app/lib/gates/facts";
import { requiredBy } from "#app/lib/gates/gate-limits";
import { soonest } from "#app/lib/gates/items";
import { rank, rootsOf } from "#app/lib/gates/rank";
import type { Blocker, Clearance, GateResult, RunResult, RunState } from "#app/lib/gates/result";
import { goCalled, type RunFacts } from "#app/lib/gates/run-facts";
import type { Instant, Rung, Wind } from "#app/lib/gates/snapshot";
import { blocker, count, findingOwner, inSentence, looseEndOwner, ownerOf, ownersAmong } from "#app/lib/gates/who";

interface Board {
  facts: Facts;
  gates: Map<string, GateResult>;
}

/** @param run null = the next rung, not planned yet. */
export function evaluateRun(board: Board, rung: Rung, run: RunFacts | null): RunResult {
  const { facts, gates } = board;
  const required = requiredBy(facts, run, rung);
  const planned = run?.plan?.rpm ?? rung.rpm;
  const clearance = clearanceOf(facts, planned, required, run?.plan ? `plan, run card version ${run.plan.version}` : "the rung's own rpm");
  const review = run ? reviewBlockers(board, run) : [];
  const base = {
    id: run?.run.id ?? null,
    rung: rung.key,
    label: run?.run.label ?? rung.key,
    clearance,
    requiredGates: required,
    go: null,
    goLost: false,
  };

  const over = run ? overState(run, review) : null;
  if (run && over) {
    const stop = blocker({
      code: "run-over",
      subject: ["run", run.run.id],
      title: `Run ${run.run.label} is ${over}`,
      sentence: over === "running" ? "Report it ended first." : "Plan another run of this rung.",
      owner: ownerOf(facts, ["lead"]),
      page: over === "running" ? "run" : "build-up",
      id: over === "running" ? run.run.id : null,
    });
    return {
      ...base,
      state: over,
      clear: false,
      until: null,
      blockers: [stop],
      startBlockers: [stop],
      reviewBlockers: over === "ended" ? review : [],
    };
  }

  const blockers = rank(
    [
      ...ladderBlockers(board, rung, run),
      ...rootsOf(facts, gates, required).filter((b) => !onlyGrounded(gates.get(b.subject.id))),
      ...findingBlockers(facts),
      ...looseEndBlockers(facts, rung),
      ...limitBlockers(facts),
      ...planBlockers(facts, rung, run, clearance),
      ...(run?.plan ? [...positionBlockers(facts, run, rung), ...rollCallBlockers(facts, run), ...windBlockers(facts, run)] : []),
    ],
    gates,
  );
  const clear = blockers.length === 0;
  let until: Instant | null = null;
  if (clear && run) {
    for (const id of required) until = soonest(until, gates.get(id)?.until ?? null);
    // It also rests on the reviews of the runs before it.
    for (const gate of facts.gates.values())
      if (gate.lookBack?.kind === "run" && facts.runs.get(gate.lookBack.run)?.start)
        until = soonest(until, gates.get(gate.id)?.until ?? null);
    until = soonest(soonest(until, newestWind(run)?.dayEnds ?? null), crewUntil(facts, run));
  }
  // GO is over with its card and with what it stood on, even if nobody has written HOLD yet.
  const called = run ? goCalled(run, facts.at) : null;
  const go = clear && called?.version === run?.plan?.version && called ? { id: called.id, ends: called.ends } : null;
  return {
    ...base,
    state: go ? "called" : run?.word ? "held" : "planned",
    go,
    goLost: called !== null && go === null,
    clear,
    until,
    blockers,
    startBlockers: run ? startBlockers(facts, run, !!go) : [],
    reviewBlockers: [],
  };
}

/** The state of a run that was started or scrubbed; null = it may still be called. */
function overState(run: RunFacts, review: Blocker[]): RunState | null {
  if (!run.start) return run.scrub ? "scrubbed" : null;
  if (run.endedAt === null) return "running";
  return review.length ? "ended" : "reviewed";
}

/** A gate that only a grounding finding stops: the finding stands in the list by itself, and stops the run by itself. */
const onlyGrounded = (gate: GateResult | undefined): boolean =>
  !!gate?.blockers.length && gate.blockers.every((b) => b.code === "grounding");

/** Earlier rungs, reviews, and other runs under way. */
function ladderBlockers(board: Board, rung: Rung, run: RunFacts | null): Blocker[] {
  const { facts } = board;
  const out: Blocker[] = [];
  const lead = ownerOf(facts, ["lead"]);
  const earlier = facts.rungs.filter((r) => r.order < rung.order && !facts.settledBy.has(r.key));
  if (earlier[0])
    out.push(
      blocker({
        code: "earlier-rung",
        subject: ["rung", earlier[0].key],
        title: `Run ${earlier[0].key} comes first`,
        sentence: `${earlier.length > 1 ? `${count(earlier.length, "earlier rung")} are` : `${earlier[0].name} is`} not settled. Run it, or have an inspector accept leaving it out.`,
        owner: lead,
        page: "build-up",
      }),
    );
  for (const other of facts.runs.values()) {
    if (other.run.id === run?.run.id) continue;
    if (other.start && reviewBlockers(board, other).length) {
      const first = reviewBlockers(board, other)[0] as Blocker;
      out.push(
        blocker({
          code: "review-first",
          subject: ["run", other.run.id],
          title: `Run ${other.run.label} is not reviewed`,
          sentence: first.sentence,
          owner: first.owner,
          page: "run",
          id: other.run.id,
        }),
      );
    }
    // Once called, a run blocks the others until it is run or scrubbed: neither a HOLD nor the end of its window may clear another one.
    if (!other.start && !other.scrub && other.run.acts.some((a) => a.act === "go"))
      out.push(
        blocker({
          code: "other-run",
          subject: ["run", other.run.id],
          title: `Run ${other.run.label} was called`,
          sentence: "Run it or scrub it before another run.",
          owner: lead,
          page: "run",
          id: other.run.id,
        }),
      );
  }
  return out;
}

function findingBlockers(facts: Facts): Blocker[] {
  return facts.snapshot.findings
    .filter((f) => f.severity === "grounding" && !f.closed)
    .map((f) =>
      blocker({
        code: "grounding",
        subject: ["finding", f.id],
        title: `Grounding finding: ${f.words}`,
        page: "findings",
        id: f.id,
        sentence: f.fixed
          ? "Fixed; an inspector must look and close it."
          : "It grounds every run. A builder fixes it, then an inspector closes it.",
        owner: findingOwner(facts, f),
      }),
    );
}

function looseEndBlockers(facts: Facts, rung: Rung): Blocker[] {
  return facts.snapshot.looseEnds
    .filter((l) => !l.confirmed && !acceptedFor(facts, l, rung.key))
    .map((l) =>
      blocker({
        code: "loose-end",
        subject: ["loose-end", l.id],
        title: `Loose end: ${l.what}`,
        page: "loose-ends",
        id: l.id,
        sentence: l.restored
          ? "Restored; a second person must look and confirm."
          : `Restore it, or have an inspector accept it for run ${rung.key}.`,
        owner: looseEndOwner(facts, l),
      }),
    );
}

function limitBlockers(facts: Facts): Blocker[] {
  const open: { key: string; label: string }[] = facts.snapshot.values.filter(
    (v) => (v.card || v.key === "redline") && (v.value === null || v.source === null),
  );
  if (!facts.values.has("redline")) open.unshift({ key: "redline", label: "Redline" });
  if (!open.length) return [];
  const first = open.slice(0, 3).map((v) => inSentence(v.label));
  return [
    blocker({
      code: "limit-unconfirmed",
      subject: ["value", open[0]?.key ?? "redline"],
      title: `${count(open.length, "limit")} not confirmed`,
      page: "set-up",
      sentence: `Enter where each was read: ${first.join(", ")}${open.length > 3 ? ` and ${open.length - 3} more` : ""}.`,
      owner: ownerOf(facts, ["lead", "builder"]),
    }),
  ];
}

function planBlockers(facts: Facts, rung: Rung, run: RunFacts | null, { rpm: cleared, binds }: Clearance): Blocker[] {
  const lead = ownerOf(facts, ["lead"]);
  if (!run?.plan)
    return [
      blocker({
        code: "not-planned",
        subject: ["rung", rung.key],
        title: `Run ${rung.key} is not planned`,
        sentence: "The lead sets the time, the place and who stands where.",
        owner: lead,
        page: "build-up",
      }),
    ];
  // A grounding finding stands in the list by itself.
  const grounded = binds?.kind === "finding" && facts.snapshot.findings.some((f) => f.id === binds.id && f.severity === "grounding");
  if (cleared >= run.plan.rpm || grounded) return [];
  return [
    blocker({
      code: "clearance",
      subject: ["run", run.run.id],
      title: `Cleared to ${rpmText(cleared)} only`,
      page: "run",
      id: run.run.id,
      sentence: `The plan goes to ${rpmText(run.plan.rpm)}; what binds is: ${binds?.label}. Raise that, or plan a lower run.`,
      owner: lead,
    }),
  ];
}

const newestWind = (run: RunFacts): Wind | null => run.run.winds.reduce<Wind | null>((m, w) => (!m || w.seq > m.seq ? w : m), null);

function windBlockers(facts: Facts, run: RunFacts): Blocker[] {
  const wind = newestWind(run);
  const plan = run.plan;
  const owner = ownerOf(facts, ["crew", "lead", "builder", "inspector"]);
  const make = (code: "wind-missing" | "wind-over", title: string, sentence: string) => [
    blocker({ code, subject: ["run", run.run.id], title, sentence, owner, page: "run", id: run.run.id }),
  ];
  if (!wind || facts.at >= wind.dayEnds) return make("wind-missing", "Wind not read today", "Read the wind at the aircraft and enter it.");
  if (wind.tail) return make("wind-over", "Wind from behind", "Turn the aircraft into the wind, or wait; then read it again.");
  if (plan && (wind.speed > plan.windLimit || wind.gust > plan.gustLimit))
    return make("wind-over", "Wind over its limit", "Wait for it to drop, then read it again.");
  return [];
}

/** What keeps a clear run from being started now: GO in force, answers and wind fresh. */
function startBlockers(facts: Facts, run: RunFacts, called: boolean): Blocker[] {
  const out: Blocker[] = [];
  const minutes = Math.round(facts.snapshot.settings.freshness / 60_000);
  const at = { page: "run" as const, id: run.run.id };
  if (!called) {
    const over = run.word?.act === "go" && facts.at >= run.word.ends;
    out.push(
      blocker({
        code: over ? "go-over" : "go-missing",
        subject: ["run", run.run.id],
        title: over ? "GO is over" : "No GO",
        sentence: over
          ? `Its window ended on ${facts.when(run.word?.act === "go" ? run.word.ends : facts.at)}. The lead calls GO again.`
          : "The lead calls GO first.",
        owner: ownerOf(facts, ["lead"]),
        ...at,
      }),
    );
  }
  const old = crewOf(run).filter(
    (m) => facts.at - (newestAnswer(run, m)?.recorded ?? Number.NEGATIVE_INFINITY) > facts.snapshot.settings.freshness,
  );
  if (old.length)
    out.push(
      blocker({
        code: "answer-old",
        subject: ["run", run.run.id],
        title: `${count(old.length, "answer")} too old`,
        sentence: `Answers may be ${minutes} min old at the start. Answer the roll call again.`,
        owner: ownersAmong(facts, old),
        ...at,
      }),
    );
  const wind = newestWind(run);
  if (!wind || facts.at - wind.recorded > facts.snapshot.settings.freshness)
    out.push(
      blocker({
        code: "wind-old",
        subject: ["run", run.run.id],
        title: "Wind too old",
        sentence: `The wind may be ${minutes} min old at the start. Read it again.`,
        owner: ownerOf(facts, ["crew", "lead", "builder", "inspector"]),
        ...at,
      }),
    );
  return out;
}

/** What a started run still needs to be reviewed; empty before it has started. */
export function reviewBlockers({ facts, gates }: Board, run: RunFacts): Blocker[] {
  if (!run.start) return [];
  const out: Blocker[] = [];
  const id = run.run.id;
  const add = (code: Blocker["code"], title: string, sentence: string, owner: Blocker["owner"]) =>
    out.push(blocker({ code, subject: ["run", id], title, sentence, owner, page: "run", id }));
  if (run.endedAt === null)
    add("run-not-ended", `Run ${run.run.label} has not ended`, "Whoever leads or records reports it ended.", ownerOf(facts, ["lead"]));
  if (run.outcome === null)
    add("outcome-missing", "Outcome not stated", "Say whether the run was completed or cut short.", ownerOf(facts, ["lead"]));
  if (!run.logRead && run.noLog?.as !== "inspector")
    add(
      "log-missing",
      "Engine log not read",
      "Bring the log in, or have an inspector accept why there is none.",
      ownerOf(facts, ["builder", "inspector"]),
    );
  const open = run.run.exceedances.filter((x) => x.answered === null);
  if (open[0])
    add("exceedance", `${count(open.length, "exceedance")} not answered`, open[0].sentence, ownerOf(facts, ["builder", "inspector"]));
  const post = [...facts.gates.values()].filter((g) => g.lookBack?.kind === "run" && g.lookBack.run === id).map((g) => g.id);
  if (!post.length)
    add(
      "gate-missing",
      "No post-run gate",
      "The post-run inspection of this run is not on the board. The lead adds it.",
      ownerOf(facts, ["lead"]),
    );
  else if (!post.every((g) => gates.get(g)?.stands)) out.push(...rootsOf(facts, gates, post));
  return out;
}
