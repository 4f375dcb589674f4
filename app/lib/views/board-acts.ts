/** What one person can do now, most useful first, by asking the rules' own verdicts. Each is a link to the place. */

import type { Evaluation } from "#app/lib/gates/evaluate";
import { allItems, currentProof, itemsIn } from "#app/lib/gates/facts";
import type { GateResult } from "#app/lib/gates/result";
import { mayLead } from "#app/lib/gates/run-verdicts";
import { maySign } from "#app/lib/gates/signing-verdicts";
import type { Item, SigningRole } from "#app/lib/gates/snapshot";
import { stepsToRedoFirst } from "#app/lib/gates/steps";
import { mayAccept, mayConfirm } from "#app/lib/gates/verdicts";
import { count } from "#app/lib/gates/who";
import { isComputed } from "#app/lib/gates/work-facts";
import type { Viewer } from "#app/lib/views/board";
import { crewActs } from "#app/lib/views/board-crew";
import { editorOf } from "#app/lib/views/board-edit";
import { openSystems } from "#app/lib/views/gate-first";
import { itemsWords } from "#app/lib/views/items-words";
import { boardOf, gateOf, runOf } from "#app/lib/views/places";

export interface ActView {
  label: string;
  note: string;
  href: string;
}

const SIGNING: SigningRole[] = ["inspector", "builder", "lead"];

export function actsOf(e: Evaluation, me: Viewer): ActView[] {
  return [
    ...runActs(e, me),
    ...crewActs(e, me.id),
    ...signActs(e, me),
    ...secondPersonActs(e, me),
    ...editActs(e, me),
    ...leadActs(e, me),
    ...workActs(e, me),
  ];
}

/** What others wait for this person to do: card and roll call, signatures, second eyes, and GO where the run is clear. */
export function waitingFor(e: Evaluation, me: Viewer): ActView[] {
  const calls = e.result.next?.clear ? leadActs(e, me) : [];
  return [...crewActs(e, me.id), ...signActs(e, me), ...secondPersonActs(e, me), ...editActs(e, me), ...calls];
}

/** Gates that this person may sign now, with the role. */
export function signable(e: Evaluation, me: Viewer): { gate: GateResult; as: SigningRole }[] {
  return Object.values(e.result.gates).flatMap((gate) => {
    if (!gate.present || !gate.ready || gate.stands) return [];
    const as = SIGNING.find((r) => me.roles.includes(r) && maySign(e, { gate: gate.id, member: me.id, as: r, covers: null }).ok);
    return as ? [{ gate, as }] : [];
  });
}

function signActs(e: Evaluation, me: Viewer): ActView[] {
  const ready = signable(e, me);
  const install = e.snapshot.install.id;
  const name = (id: string) => e.facts.gates.get(id)?.name ?? "the gate";
  if (ready.length > 1)
    return [
      {
        label: `Sign ${count(ready.length, "gate")} on one sheet`,
        note: ready.map((r) => e.facts.gates.get(r.gate.id)?.short ?? "").join(", "),
        href: `${boardOf(install)}/sign`,
      },
    ];
  return ready.map(({ gate, as }) => ({
    label: `${gate.holding.length ? "Countersign" : "Sign"} ${name(gate.id)}`,
    note: `as ${as}, ${itemsWords(e, gate.id)}`,
    href: `${gateOf(install, gate.id)}/sign`,
  }));
}

/** Edits of the board that this inspector, who did not make them, may answer. */
function editActs(e: Evaluation, me: Viewer): ActView[] {
  const waiting = me.roles.includes("inspector") ? e.snapshot.editsWaiting.filter((w) => w.by !== me.id) : [];
  if (!waiting.length) return [];
  const subjects = waiting.map((w) => w.subject);
  return [
    {
      label: `Answer ${count(waiting.length, "edit")} of the board`,
      note: subjects.length > 2 ? `${subjects[0]} and ${subjects.length - 1} more` : subjects.join(", "),
      href: `${editorOf(e.snapshot.install.id)}#waiting`,
    },
  ];
}

function secondPersonActs(e: Evaluation, me: Viewer): ActView[] {
  const install = e.snapshot.install.id;
  const waiting = allItems(e.facts).flatMap((item) => {
    const proof = currentProof(e.facts, item.id);
    if (!proof) return [];
    const roles = (["inspector", "builder", "lead"] as const).filter((r) => me.roles.includes(r));
    const confirm = roles.some((as) => mayConfirm(e, { proof: proof.id, member: me.id, as }).ok);
    const accept =
      e.result.items[item.id]?.blockers.some((b) => b.code === "needs-acceptance") && mayAccept(e, { proof: proof.id, member: me.id }).ok;
    return confirm ? [{ item, verb: "Look and confirm" }] : accept ? [{ item, verb: "Accept or not" }] : [];
  });
  return waiting.map(({ item, verb }) => ({ label: `${verb}: ${item.key}`, note: item.words, href: gateOf(install, item.gate, item.id) }));
}

/** A run with GO, or on, is held or followed on its live card; one that has ended is reviewed. */
function runActs(e: Evaluation, me: Viewer): ActView[] {
  const install = e.snapshot.install.id;
  const reviews = me.roles.some((r) => r !== "crew");
  return e.result.runs.flatMap((run) => {
    if (run.id === null) return [];
    const leads = mayLead(e, { run: run.id, member: me.id });
    const live = `${runOf(install, run.id)}/live`;
    if (run.state === "running")
      return [{ label: `${leads ? "Live card of" : "Follow"} run ${run.label}`, note: "the engine runs", href: live }];
    if (run.state === "called" && leads) return [{ label: `Live card of run ${run.label}`, note: "start list, clocks, steps", href: live }];
    return run.state === "ended" && reviews
      ? [{ label: `Review run ${run.label}`, note: "outcome, log, exceedances", href: `${runOf(install, run.id)}/review` }]
      : [];
  });
}

function leadActs(e: Evaluation, me: Viewer): ActView[] {
  const { next } = e.result;
  if (!next || !me.roles.includes("lead")) return [];
  const install = e.snapshot.install.id;
  if (next.id === null)
    return [{ label: `Plan run ${next.label}`, note: "time, wind limit, positions", href: `${boardOf(install)}/build-up` }];
  if (next.clear && !next.go && next.state !== "running")
    return [{ label: `Call GO for run ${next.label}`, note: "the crew is told by mail", href: runOf(install, next.id) }];
  return [];
}

/** Whether work on the gate would count now: what looks back on a run waits for its end, the release's own items for the last run. */
function countsNow(e: Evaluation, id: string): boolean {
  const gate = e.facts.gates.get(id);
  if (!gate) return false;
  const run = gate.lookBack?.kind === "run" ? gate.lookBack.run : gate.lookBack ? e.facts.settledBy.get(gate.lookBack.rung) : null;
  if (gate.lookBack) return !!run && e.facts.runs.get(run)?.endedAt != null;
  return gate.requiredBy.kind !== "release" || e.facts.allSettled;
}

/** Gates with work for a builder or inspector: those that stop the next run first, then the others whose prerequisites stand. */
function workActs(e: Evaluation, me: Viewer): ActView[] {
  if (!me.roles.some((r) => r === "builder" || r === "inspector")) return [];
  const roots = (e.result.next ?? e.result.release).blockers.flatMap((b) => (b.subject.kind === "gate" ? [b.subject.id] : []));
  const order = [...new Set([...roots, ...e.facts.gates.keys()])].filter((id) => countsNow(e, id));
  const install = e.snapshot.install.id;
  return order.flatMap((id): ActView[] => {
    const gate = e.result.gates[id];
    const next = gate && !gate.complete && gate.state !== "waiting" ? nextItem(e, id) : null;
    if (!gate || !next) return [];
    const name = e.facts.gates.get(id)?.name ?? "the gate";
    const label = gate.state === "lapsed" ? `Do ${name} again` : gate.done ? `Carry on with ${name}` : `Begin ${name}`;
    const own = nextOwn(e, id);
    const [closing] = own ? openSystems(e, own) : [];
    if (own && closing) return [{ label: closing.act, note: `then ${own.key} ${own.words}`, href: closing.href }];
    return [{ label, note: `Next: ${next.key} ${next.words}`, href: gateOf(install, next.gate, next.id) }];
  });
}

/** The first item of a gate that somebody has to prove: not done, and everything that it follows stands. */
function nextOwn(e: Evaluation, gate: string): Item | null {
  const items = itemsIn(e.facts, gate).filter((i) => !isComputed(i) && ["to do", "lapsed"].includes(e.result.items[i.id]?.state ?? ""));
  return items.find((i) => i.follows.every((f) => e.result.items[f]?.stands ?? true)) ?? items[0] ?? null;
}

/** That item; or, where a step that it rests on would not hold for work done now, the step. */
export function nextItem(e: Evaluation, gate: string): Item | null {
  const own = nextOwn(e, gate);
  return own && (stepsToRedoFirst(e, own.id)[0]?.step ?? own);
}
