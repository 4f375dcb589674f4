/**
 * What can happen to a board, good and bad, one record (or one edit) at a time. Instants repeat often: two records in three share the
 * instant of the one before.
 */
import type { Item, Proof, Run } from "#app/lib/gates/snapshot";
import type { Board } from "./board";
import type { Dice } from "./dice";
import { passing, TICK } from "./parts";
import { restraintEvidence } from "./sheets";

const SYSTEMS = ["oil", "fueleng", "ign", "bay", "prop"] as const;
const PEOPLE = [
  { by: "bo", as: "builder" },
  { by: "cy", as: "builder" },
  { by: "di", as: "inspector" },
  { by: "ed", as: "inspector" },
  { by: "la", as: "lead" },
  { by: "bo", as: "inspector" },
] as const;

type Happening = (dice: Dice, board: Board) => void;

const ticked = (board: Board): Item[] => board.s.items.filter((i) => !i.parts.some((p) => p.kind === "computed"));
const openRun = (dice: Dice, board: Board): Run | undefined =>
  dice.maybeOne(board.s.runs.filter((r) => !r.acts.some((a) => a.act === "start" || a.act === "scrub")));

/** A proof of any item: now, or typed in late for an earlier instant. */
function anyProof(dice: Dice, board: Board, more: Partial<Proof>): Proof | null {
  const item = dice.maybeOne(ticked(board));
  if (!item) return null;
  const who = dice.one(["bo", "cy", "la"]);
  const late = dice.chance(25);
  const counts = late ? board.now - dice.int(0, 12) * TICK : board.now;
  return board.proof(item.id, { by: who, did: dice.chance(80) ? who : "cy", late, counts, ...more });
}

export const BAD_NEWS = {
  opening: (dice, board) => {
    const opening = board.open(dice.some(SYSTEMS, 30), { by: dice.one(PEOPLE).by });
    if (dice.chance(60)) opening.closed = board.now;
    if (dice.chance(40)) opening.undisturbed = { confirmed: null };
  },
  "loose end": (dice, board) => {
    const gate = dice.one(board.s.gates).id;
    board.looseEnd(dice.chance(50) ? { kind: "gate", gate } : { kind: "rung", rung: dice.one(board.s.rungs).key });
  },
  finding: (dice, board) => {
    const severity = dice.one(["watch", "limiting", "grounding"] as const);
    board.finding(severity, { system: dice.one(SYSTEMS), cap: severity === "limiting" ? dice.int(5, 40) : null });
  },
  "failing proof": (dice, board) => {
    anyProof(dice, board, { state: "failed" });
  },
  withdrawal: (dice, board) => {
    const proof = dice.maybeOne(board.s.proofs.filter((p) => !p.withdrawn));
    if (proof) board.withdraw(proof, { by: proof.by, as: "builder" });
  },
  "out of tolerance": (dice, board) => {
    const tool = dice.one(board.s.tools);
    const at = board.now - dice.int(0, 8) * TICK;
    tool.checks.push({ id: board.id("check"), at, good: false, due: null, since: dice.chance(40) ? at - dice.int(0, 20) * TICK : null });
  },
  hold: (dice, board) => {
    const run = openRun(dice, board);
    if (run) board.act(run, "hold", {}, { by: "fi", as: "crew" });
  },
  "no-go": (dice, board) => {
    const run = openRun(dice, board);
    if (run) board.answer(run, dice.one(["la", "cy", "fi"]), { answer: "no-go", reason: "tired" });
  },
} satisfies Record<string, Happening>;

const work: Record<string, Happening> = {
  redo: (dice, board) => {
    const proof = anyProof(dice, board, {});
    if (proof && dice.chance(60)) board.confirm(proof.id, dice.one(PEOPLE));
  },
  "work gate again": (dice, board) => board.work(dice.one(board.s.gates)),
  "not applicable": (dice, board) => {
    const proof = anyProof(dice, board, { state: "na", evidence: [], tools: [] });
    if (proof && dice.chance(70)) board.accept(proof.id, dice.one(PEOPLE));
  },
  "bad evidence": (dice, board) => {
    const item = dice.maybeOne(ticked(board));
    if (!item) return;
    const bad = dice.one([5, 15, 4.9, 15.1, Number.NaN]);
    const evidence = dice.chance(20) ? [] : item.parts.map((part) => passing(part, bad));
    for (const e of evidence) {
      if (e?.kind === "torque" && dice.chance(30)) e.count = 3;
      if (e?.kind === "tally") for (const p of e.places) p.out = dice.one([p.out, 5, null]);
    }
    board.proof(item.id, { evidence, tools: dice.one([[], ["t2"], ["t1"], ["t9"]]) });
  },
  "other straps": (dice, board) => {
    const item = dice.maybeOne(board.s.items.filter((i) => i.parts.some((p) => p.kind === "sheet")));
    if (item) board.proof(item.id, { evidence: item.parts.map((part) => passing(part) && restraintEvidence(dice.one([50, 300, 3000]))) });
  },
  "close opening": (dice, board) => {
    const opening = dice.maybeOne(board.s.openings.filter((o) => o.closed === null));
    if (opening) opening.closed = board.now;
  },
  undisturbed: (dice, board) => {
    const opening = dice.maybeOne(board.s.openings);
    if (opening) opening.undisturbed = { confirmed: board.record("seen", dice.one(PEOPLE)) };
  },
  mistake: (dice, board) => {
    const opening = dice.maybeOne(board.s.openings);
    if (opening) opening.mistake = { ...board.record("mistake", { by: "di", as: "inspector" }), reason: "wrong aircraft" };
  },
  keep: (dice, board) => {
    const item = dice.maybeOne(ticked(board));
    const proof = item && board.current(item.id);
    if (proof) board.keep(proof.id, dice.one(PEOPLE));
  },
  confirm: (dice, board) => {
    const proof = dice.maybeOne(board.s.proofs);
    if (proof) board.confirm(proof.id, dice.one(PEOPLE));
  },
  "confirmation by oneself": (dice, board) => {
    const confirmation = dice.maybeOne(board.s.confirmations);
    if (confirmation) confirmation.by = "bo";
  },
  "good check": (dice, board) => {
    const due = board.now + dice.int(-4, 40) * TICK;
    dice.one(board.s.tools).checks.push({ id: board.id("check"), at: board.now - dice.int(0, 8) * TICK, good: true, due, since: null });
  },
  "tool ran out": (dice, board) => {
    const check = dice.one(dice.one(board.s.tools).checks);
    check.due = board.now - dice.int(0, 20) * TICK;
  },
  extinguisher: (dice, board) => {
    const one = dice.one(board.s.extinguishers);
    one.lookDue = dice.one([board.now + 2 * TICK, board.now, null]);
  },
};

const signing: Record<string, Happening> = {
  sign: (dice, board) => {
    const who = dice.one(PEOPLE);
    board.sign(dice.one(board.s.gates).id, who.by, who.as);
  },
  "sign again": (dice, board) => board.signGate(dice.one(board.s.gates).id),
  "stale list": (dice, board) => {
    const signature = dice.maybeOne(board.s.signatures);
    if (!signature) return;
    const [first, ...rest] = signature.covers;
    if (first) signature.covers = dice.chance(50) ? rest : [{ ...first, revision: first.revision + 1 }, ...rest];
  },
  "withdraw signature": (dice, board) => {
    const signature = dice.maybeOne([...board.s.signatures, ...board.s.releaseSignatures].filter((x) => !x.withdrawn));
    if (signature) board.withdraw(signature, { by: signature.by, as: signature.as });
  },
};

const edits: Record<string, Happening> = {
  "item revision": (dice, board) => {
    dice.one(board.s.items).revision += 1;
  },
  "gate revision": (dice, board) => {
    dice.one(board.s.gates).revision += 1;
  },
  "hide or show": (dice, board) => {
    const one = dice.chance(50) ? dice.one(board.s.gates) : dice.one(board.s.items);
    one.hidden = !one.hidden;
  },
  edge: (dice, board) => {
    const plain = board.s.gates.filter((g) => !g.eachRun && g.lookBack === null && g.requiredBy.kind !== "release");
    const at = dice.int(0, plain.length - 1);
    const before = dice.maybeOne(plain.slice(0, at));
    if (before) plain[at]?.[dice.chance(50) ? "needs" : "after"].push(before.id);
  },
  narrower: (dice, board) => {
    const gate = dice.one(board.s.gates);
    gate.validity = { hours: dice.one([1, 4, 8]), afterRunHours: dice.one([null, 2]) };
  },
  limit: (dice, board) => {
    const value = dice.one(board.s.values);
    if (dice.chance(50)) value.source = null;
    else value.value = dice.one([null, 15, 9, 500]);
  },
  "limit in band": (dice, board) => {
    const part = dice.maybeOne(board.s.items.flatMap((i) => i.parts).filter((p) => p.kind === "measure" || p.kind === "torque"));
    if (part) part.criterion = { ...part.criterion, limit: { key: "oilPressureMin", end: dice.one(["min", "max"]) } };
  },
  "no number": (dice, board) => {
    const part = dice.maybeOne(board.s.items.flatMap((i) => i.parts).filter((p) => p.kind === "measure"));
    if (part) part.criterion = { ...part.criterion, band: dice.one([null, { min: null, max: null }, { min: 10, max: null }]) };
  },
  "role ends": (dice, board) => {
    const role = dice.one(dice.one(board.s.members).roles);
    role.to = role.to ?? board.now;
  },
  "finding moves on": (dice, board) => {
    const finding = dice.maybeOne(board.s.findings);
    if (!finding) return;
    finding.fixed = { ...board.record("fixed"), action: "tightened" };
    if (dice.chance(60)) finding.closed = board.record("closed", { by: "di", as: "inspector" });
  },
  "loose end moves on": (dice, board) => {
    const end = dice.maybeOne(board.s.looseEnds);
    if (!end) return;
    const rung = dice.one(board.s.rungs).key;
    if (dice.chance(50)) end.accepted.push({ ...board.record("accepted", { by: "di", as: "inspector" }), rung, reason: "not turned" });
    else end.restored = board.record("restored");
    if (end.restored && dice.chance(60)) end.confirmed = board.record("confirmed", { by: "cy", as: "builder" });
  },
};

const running: Record<string, Happening> = {
  plan: (dice, board) => {
    const run = openRun(dice, board);
    if (run) board.plan(run, { rpm: dice.one([10, 20, 30, 50]), windLimit: dice.one([7, 2]) });
  },
  "plan with other gates": (dice, board) => {
    const run = openRun(dice, board);
    if (run)
      board.brief(run, {
        requiredGates: dice.some(
          board.s.gates.map((g) => g.id),
          60,
        ),
      });
  },
  "plan with other crew": (dice, board) => {
    const run = openRun(dice, board);
    if (!run) return;
    const member = dice.one(["cy", "bo", "fi", "nobody"]);
    board.brief(run, {
      positions: [
        { position: "operator", member: "la" },
        { position: "runlead", member: "cy" },
        { position: "fireguard", member },
      ],
    });
  },
  "roll call again": (dice, board) => {
    const run = openRun(dice, board);
    if (!run) return;
    for (const member of ["la", "cy", "fi"]) if (dice.chance(85)) board.answer(run, member, { queueEmpty: dice.chance(90) });
  },
  wind: (dice, board) => {
    const run = openRun(dice, board);
    const dayEnds = board.now + dice.int(1, 40) * TICK;
    if (run) board.wind(run, { speed: dice.one([7, 7.1, 1]), gust: dice.one([10, 10.1]), tail: dice.chance(10), dayEnds });
  },
  go: (dice, board) => {
    const run = openRun(dice, board);
    if (run) board.act(run, "go", { ends: board.now + dice.int(1, 16) * TICK });
  },
  start: (dice, board) => {
    const run = openRun(dice, board);
    if (!run) return;
    board.act(run, "start", { unstarted: dice.chance(20) });
    if (dice.chance(30)) board.act(run, "take-back");
    else if (dice.chance(60)) {
      board.wait();
      board.act(run, "ended");
      if (dice.chance(70)) board.act(run, "outcome", { outcome: dice.one(["completed", "cut short"]) });
    }
  },
  scrub: (dice, board) => {
    const run = openRun(dice, board);
    if (run) board.act(run, "scrub");
  },
  exceedance: (dice, board) => {
    const run = dice.maybeOne(board.s.runs);
    run?.exceedances.push({ id: board.id("exceedance"), sentence: "Oil too hot for 4 s.", answered: dice.chance(50) ? "finding-1" : null });
  },
  outcome: (dice, board) => {
    const run = dice.maybeOne(board.s.runs.filter((r) => r.acts.some((a) => a.act === "ended")));
    if (run) board.act(run, "outcome", { outcome: dice.one(["completed", "cut short"]) });
  },
  "set back": (dice, board) => {
    dice.one(board.s.rungs).setBack.push(board.record("set-back", { by: "di", as: "inspector" }));
  },
  "left out": (dice, board) => {
    dice.one(board.s.rungs).leftOut = { ...board.record("left-out", { by: "di", as: "inspector" }), reason: "no governor" };
  },
};

const FAMILIES: Record<string, Happening>[] = [BAD_NEWS, work, signing, edits, running];

/** One thing happens; time may pass before. */
export function disturb(dice: Dice, board: Board): void {
  if (dice.chance(33)) board.wait(dice.int(1, 3));
  dice.one(Object.values(dice.one(FAMILIES)))(dice, board);
}
