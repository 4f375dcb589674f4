/** The people of a run as its page shows them: who stands where and said what, and what is left for the reader to do. Pure. */
import { answerCounts, newestAnswer, POSITION_NAMES } from "#app/lib/gates/crew";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { RunFacts } from "#app/lib/gates/run-facts";
import { mayAcknowledge, mayAnswer } from "#app/lib/gates/run-verdicts";
import { POSITIONS } from "#app/lib/template/positions";
import type { PositionKey } from "#app/lib/template/types";
import { nameIn } from "#app/lib/views/places";
import { inShort, lowerFirst, timeOrWhen } from "#app/lib/views/run-words";

export type Answered = "go" | "no-go" | "none";

export interface RollEntry {
  key: string;
  position: PositionKey;
  letter: string;
  /** "Fire guard" */
  role: string;
  place: string;
  name: string;
  answer: Answered;
  /** "go", "no-go", "no answer", "said go before HOLD". */
  word: string;
  /** When, with zone; or what is still missing. */
  note: string;
  you: boolean;
}

export interface RollView {
  title: string;
  entries: RollEntry[];
  /** Positions that nobody holds: "No recorder yet". */
  empty: string[];
  stations: { position: PositionKey; letter: string; label: string; answer: Answered; you: boolean }[];
}

export function rollView(e: Evaluation, run: RunFacts, me: string): RollView {
  const plan = run.plan;
  if (!plan) return { title: "Roll call: nobody has a place yet", entries: [], empty: [], stations: [] };
  const zone = e.snapshot.install.timeZone;
  const entries = plan.positions.map(({ position, member }, n): RollEntry => {
    const def = POSITIONS.find((p) => p.key === position);
    const said = newestAnswer(run, member);
    const counts = answerCounts(run, said, plan.version);
    const answer: Answered = counts ? "go" : said?.answer === "no-go" ? "no-go" : "none";
    const read = run.run.acks.some((a) => a.by === member && a.version === plan.version);
    const before = answer === "none" && said ? `said go ${timeOrWhen(said.recorded, e.at, zone)}, asked again` : null;
    return {
      key: `${position}-${n}`,
      position,
      letter: def?.letter ?? "?",
      role: def?.name ?? position,
      place: def?.place ?? "",
      name: nameIn(e.snapshot, member),
      answer,
      word: answer === "none" ? "no answer" : answer,
      note:
        answer !== "none" && said
          ? timeOrWhen(said.recorded, e.at, zone)
          : (before ?? (read ? "has read the card" : "has not read the card")),
      you: member === me,
    };
  });
  const people = new Set(plan.positions.map((p) => p.member));
  const go = [...people].filter((m) => answerCounts(run, newestAnswer(run, m), plan.version)).length;
  const wanted = e.facts.rungs.find((r) => r.key === run.run.rung)?.crew.wanted ?? [];
  return {
    title:
      people.size === 0
        ? "Roll call: nobody has a place yet"
        : go === people.size
          ? `Roll call: all ${go} said go`
          : `Roll call: ${go} of ${people.size} said go`,
    entries,
    empty: wanted
      .filter((w) => plan.positions.filter((p) => p.position === w.position).length < w.count)
      .map((w) => `No ${POSITION_NAMES[w.position]} yet`),
    stations: entries.map(({ position, letter, role, name, answer, you }) => ({
      position,
      letter,
      label: `${role}, ${name}`,
      answer,
      you,
    })),
  };
}

export interface MineView {
  version: number;
  places: { letter: string; name: string; place: string; duty: string }[];
  /** "You are fire guard" */
  title: string;
  inShort: string;
  read: string | null;
  /** Null when there is nothing to acknowledge. */
  acknowledge: { ok: boolean; why: string } | null;
  go: { ok: boolean; why: string };
  noGo: { ok: boolean; why: string };
  said: { answer: Answered; words: string };
}

/** Null for somebody without a place on this run. */
export function mineView(e: Evaluation, run: RunFacts, me: string): MineView | null {
  const plan = run.plan;
  const held = plan?.positions.filter((p) => p.member === me).map((p) => p.position) ?? [];
  if (!plan || held.length === 0) return null;
  const zone = e.snapshot.install.timeZone;
  const places = POSITIONS.filter((p) => held.includes(p.key)).map(({ letter, name, place, duty }) => ({ letter, name, place, duty }));
  const ack = run.run.acks.filter((a) => a.by === me && a.version === plan.version).at(-1);
  const said = newestAnswer(run, me);
  const counts = answerCounts(run, said, plan.version);
  const ask = { run: run.run.id, member: me, version: plan.version };
  const why = (verdict: ReturnType<typeof mayAnswer>) => ({ ok: verdict.ok, why: verdict.ok ? "" : (verdict.blockers[0]?.sentence ?? "") });
  const open = !run.start && !run.scrub;
  return {
    version: plan.version,
    places,
    title: `You are ${places.map((p) => lowerFirst(p.name)).join(" and ")}`,
    inShort: inShort(plan.card),
    read: ack ? `You read card version ${plan.version}, ${timeOrWhen(ack.recorded, e.at, zone)}` : null,
    acknowledge: ack || !open ? null : why(mayAcknowledge(e, ask)),
    go: why(mayAnswer(e, { ...ask, answer: "go" })),
    noGo: open
      ? why(mayAnswer(e, { ...ask, answer: "no-go" }))
      : { ok: false, why: "The run is past its roll call. Call HOLD or shout STOP." },
    said: saidWords(said && { answer: said.answer, at: timeOrWhen(said.recorded, e.at, zone), reason: said.reason }, counts),
  };
}

function saidWords(said: { answer: "go" | "no-go"; at: string; reason: string } | null, counts: boolean): MineView["said"] {
  if (!said) return { answer: "none", words: "You have not answered." };
  if (said.answer === "no-go") return { answer: "no-go", words: `You said no-go, ${said.at}: ${said.reason}` };
  return counts
    ? { answer: "go", words: `You said go, ${said.at}.` }
    : { answer: "none", words: `You said go, ${said.at}. It counts no more: you are asked again.` };
}
