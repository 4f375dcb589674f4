/** A gate's page as one person sees it: where it stands on the pipe, its items, its signatures and the one next thing. */

import type { ValveState } from "#app/components/ui/states";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemsIn, signaturesOf } from "#app/lib/gates/facts";
import type { GateResult } from "#app/lib/gates/result";
import { maySign, mayWithdrawSignature } from "#app/lib/gates/signing-verdicts";
import type { Gate, Signature, SigningRole } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { type AgainView, againOf } from "#app/lib/views/gate-again";
import { wantedFirst } from "#app/lib/views/gate-first";
import { type ItemView, itemView, type Reader } from "#app/lib/views/gate-item";
import { itemsWords } from "#app/lib/views/items-words";
import { anyOf, boardOf, gateOf, nameIn, type Place, placeOf, whoClears } from "#app/lib/views/places";
import { type RecordLinks, recordLinks } from "#app/lib/views/record-links";
import { valveOf } from "#app/lib/views/shown-states";

export interface FeedView {
  id: string;
  name: string;
  state: ValveState;
  href: string;
}

export interface SignatureView {
  id: string | null;
  role: string;
  name: string;
  time: string;
  waits: boolean;
  /** It was given, and no longer holds. */
  lapsed: boolean;
  /** This person may take it back. */
  mayWithdraw: boolean;
}

export interface FootView {
  says: string;
  note: string;
  act: { label: string; note: string; href: string } | null;
}

export interface GateView {
  id: string;
  key: string;
  name: string;
  valve: ValveState;
  part: number;
  state: string;
  until: string | null;
  caution: { title: string; text: string; sign: "propeller" | "strap" | "fire" | "general" } | null;
  feeds: FeedView[];
  onward: Place[];
  waits: { title: string; sentence: string; place: Place }[];
  /** What has lapsed here and why; null = nothing. */
  again: AgainView | null;
  items: ItemView[];
  /** Where an opening, a loose end or a finding of this gate is written down. */
  record: RecordLinks;
  signatures: SignatureView[];
  former: string[];
  foot: FootView;
}

/** @returns null where there is no such gate on the board. */
export function gateView(e: Evaluation, gateId: string, me: Reader): GateView | null {
  const gate = e.facts.gates.get(gateId);
  const result = e.result.gates[gateId];
  if (!gate || !result?.present) return null;
  const wanted = wantedFirst(e);
  const items = itemsIn(e.facts, gateId).map((item) => itemView(e, item, me, wanted.get(item.id)));
  return {
    id: gate.id,
    key: gate.key,
    name: gate.name,
    valve: valveOf(result.state),
    part: result.of ? result.done / result.of : 0,
    state: stateWords(e, result),
    until: result.until === null ? null : e.facts.when(result.until),
    caution: cautionOf(gate),
    feeds: result.prerequisites.map((id) => feedOf(e, id)),
    onward: onwardOf(e, gateId),
    waits: result.blockers
      .filter((b) => ["gate-waits", "grounding", "loose-end"].includes(b.code))
      .map((b) => ({ title: b.title, sentence: b.sentence, place: placeOf(e.snapshot, b.link) })),
    again: againOf(e, gateId),
    items,
    record: recordLinks(e, { kind: "gate", id: gateId }),
    ...signaturesView(e, gate, result, me),
    foot: footOf(e, gate, result, items, me),
  };
}

function stateWords(e: Evaluation, result: GateResult): string {
  switch (result.state) {
    case "in work":
      return result.done ? `in work, ${result.done} of ${result.of} done` : `not begun, ${count(result.of, "item")}`;
    case "half signed":
      return `half signed, waits for the ${missingPlace(e, result)}`;
    case "waiting":
      return `waits for ${count(result.prerequisites.filter((id) => !e.result.gates[id]?.stands).length, "gate")}, ${result.done} of ${result.of} done`;
    case "lapsed":
      return `lapsed, ${result.done} of ${result.of} stand`;
    case "ready":
      return "ready to sign";
    case "signed":
      return result.until === null ? "signed" : `signed, stands until ${e.facts.when(result.until)}`;
  }
}

const missingPlace = (e: Evaluation, result: GateResult): string =>
  (e.facts.gates.get(result.id)?.policy[result.holding.length] ?? []).join(" or ");

function feedOf(e: Evaluation, id: string): FeedView {
  const gate = e.facts.gates.get(id);
  return {
    id,
    name: gate?.short ?? "Gate",
    state: valveOf(e.result.gates[id]?.state ?? "waiting"),
    href: gateOf(e.snapshot.install.id, id),
  };
}

/** Gates that wait for this one; the run where there are none. */
function onwardOf(e: Evaluation, gateId: string): Place[] {
  const install = e.snapshot.install.id;
  const after = Object.values(e.result.gates).filter((g) => g.present && g.prerequisites.includes(gateId));
  // The walk-round needs every gate; it is named only where nothing else comes first.
  const near = after.filter((g) => !e.facts.gates.get(g.id)?.eachRun);
  const shown = (near.length ? near : after).map((g) => ({ href: gateOf(install, g.id), label: e.facts.gates.get(g.id)?.short ?? "Gate" }));
  const next = e.result.next;
  if (shown.length || !next) return shown;
  return [{ href: next.id ? `/installs/${install}/runs/${next.id}` : `${boardOf(install)}/build-up`, label: `Run ${next.label}` }];
}

const SIGNS: Record<string, NonNullable<GateView["caution"]>["sign"]> = {
  OP: "propeller",
  PR: "propeller",
  IG: "propeller",
  WR: "propeller",
  PO: "propeller",
  SV: "propeller",
  TD: "strap",
  FS: "fire",
  FP: "fire",
  FI: "fire",
  DY: "fire",
};

/** Its first words stand out: up to the first colon or full stop. */
function cautionOf(gate: Gate): GateView["caution"] {
  if (!gate.caution) return null;
  const [, title = gate.caution, rest = ""] = /^(.+?[.:])\s*(.*)$/s.exec(gate.caution) ?? [];
  return {
    title: `${title.replace(/[.:]$/, "")}.`,
    text: rest?.[0] ? `${rest[0].toUpperCase()}${rest.slice(1)}` : "",
    sign: SIGNS[gate.key] ?? "general",
  };
}

const SAYS: Record<SigningRole, string> = {
  builder: "signed as builder",
  inspector: "countersigned as inspector",
  lead: "countersigned as lead",
};

function signaturesView(e: Evaluation, gate: Gate, result: GateResult, me: Reader): Pick<GateView, "signatures" | "former"> {
  const all = signaturesOf(e.facts, gate.id);
  const given = result.holding.flatMap((id) => all.filter((s) => s.id === id));
  const open = gate.policy.slice(given.length).map((roles, i): SignatureView => {
    const owner = i === 0 && result.ready ? result.blockers.find((b) => b.code === "not-signed")?.owner : undefined;
    const names = owner?.members.map((m) => nameIn(e.snapshot, m)) ?? [];
    return {
      id: null,
      role: roles.join(" or "),
      name: names.length ? anyOf(names, 2) : "not yet",
      time: result.ready ? (i === 0 ? "may sign now" : "after that") : "when all items stand",
      waits: true,
      lapsed: false,
      mayWithdraw: false,
    };
  });
  const held = given.map(
    (s): SignatureView => ({
      id: s.id,
      role: result.state === "lapsed" ? `${SAYS[s.as]}, lapsed` : SAYS[s.as],
      name: nameIn(e.snapshot, s.by),
      time: e.facts.when(s.recorded),
      waits: false,
      lapsed: result.state === "lapsed",
      mayWithdraw: mayWithdrawSignature(e, { signature: s.id, member: me.id }).ok,
    }),
  );
  const former = all.filter((s) => !result.holding.includes(s.id)).map((s) => formerWords(e, s));
  return { signatures: [...held, ...open], former };
}

function formerWords(e: Evaluation, s: Signature): string {
  const base = `${nameIn(e.snapshot, s.by)}, ${SAYS[s.as]}, ${e.facts.when(s.recorded)}`;
  return s.withdrawn
    ? `${base}: withdrawn by ${nameIn(e.snapshot, s.withdrawn.by)} ${e.facts.when(s.withdrawn.recorded)}`
    : `${base}: what it covered has changed since`;
}

/** The role in which this person may sign now. */
export function signingRole(e: Evaluation, gateId: string, me: Pick<Reader, "id" | "roles">): SigningRole | null {
  const roles: SigningRole[] = ["builder", "inspector", "lead"];
  return roles.find((as) => me.roles.includes(as) && maySign(e, { gate: gateId, member: me.id, as, covers: null }).ok) ?? null;
}

function footOf(e: Evaluation, gate: Gate, result: GateResult, items: ItemView[], me: Reader): FootView {
  const as = signingRole(e, gate.id, me);
  if (as)
    return {
      says: result.holding.length ? `Signed once. ${gate.name} waits for you.` : "All items stand",
      note: "The sheet reads back what you sign.",
      act: {
        label: result.holding.length ? `Countersign as ${as}` : `Sign as ${as}`,
        note: `${itemsWords(e, gate.id)}, with your PIN`,
        href: `${gateOf(e.snapshot.install.id, gate.id)}/sign`,
      },
    };
  const left = items.filter((i) => i.reasons.length > 0);
  if (result.stands)
    return {
      says: `${gate.name} stands signed`,
      note: result.until === null ? "Nothing is left to do here." : `Until ${e.facts.when(result.until)}.`,
      act: toBoard(e),
    };
  if (!left.length) return waitingFoot(e, result, gate, me);
  const next = nextOf(items);
  const kinds = left.map((i) => `${i.key} ${i.nut === "second-eyes" ? "second eyes" : i.nut === "lapsed" ? "lapsed" : "to do"}`);
  const says = `${count(left.length, "item")} left before ${result.state === "waiting" ? "it can be signed" : "anyone can sign"}`;
  const note = kinds.length > 6 ? `${kinds.slice(0, 5).join(", ")} and ${kinds.length - 5} more` : kinds.join(", ");
  return next
    ? { says, note, act: next }
    : { says, note: `${left[0]?.reasons[0]?.who ? `${left[0].reasons[0].who} ` : ""}${note}`, act: toBoard(e) };
}

/** The one next thing in the rows for this person: what others wait for, then the items in order, and what comes before each. */
function nextOf(items: ItemView[]): FootView["act"] {
  const left = items.filter((i) => i.reasons.length > 0);
  const act = (verb: string, i: ItemView, note = i.words) => ({ label: `${verb}: ${i.key}`, note, href: `#${i.anchor}` });
  const waiting = left.find((i) => i.confirm?.ok || i.accept?.ok);
  if (waiting) return act(waiting.confirm?.ok ? "Look and confirm" : "Accept or not", waiting);
  for (const i of items) {
    if (i.wanted && i.open) return act("Do again first", i, i.wanted.note);
    if (!i.reasons.length) continue;
    const [first] = i.first.filter((f) => !f.href.startsWith("#"));
    if (first) return { label: first.act, note: `before ${i.key}`, href: first.href };
    if (i.open) return act(i.nut === "lapsed" ? "Do again" : "Next", i);
    if (i.prove.numberMissing && i.enterNumber.ok) return act("Enter the number", i);
  }
  return null;
}

function waitingFoot(e: Evaluation, result: GateResult, gate: Gate, me: Reader): FootView {
  const [first] = result.blockers;
  if (!gate.policy.length)
    return { says: "No signatures of its own", note: "It is covered by the two signatures of the release.", act: toBoard(e) };
  const who = first ? whoClears(e.snapshot, first.owner, me.id) : "";
  return { says: first?.title ?? "Nothing for you here", note: first ? `${first.sentence} ${who}` : "", act: toBoard(e) };
}

const toBoard = (e: Evaluation): FootView["act"] => ({
  label: "Back to the board",
  note: "what stops us, and what you can do",
  href: boardOf(e.snapshot.install.id),
});
