/**
 * One item's row on its gate page: its state and reason, what was given, what is asked, and which acts this person may do now,
 * each by the rules' own verdict.
 */

import type { NutState } from "#app/components/ui/states";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { currentProof, proofsOf } from "#app/lib/gates/facts";
import type { ItemState, Verdict } from "#app/lib/gates/result";
import { mayEnterNumber } from "#app/lib/gates/set-up-verdicts";
import type { Item, Role } from "#app/lib/gates/snapshot";
import { mayAccept, mayConfirm, mayKeep, mayProve, mayWithdrawProof } from "#app/lib/gates/verdicts";
import { isComputed } from "#app/lib/gates/work-facts";
import type { UnitSystem } from "#app/lib/units/display";
import { type First, firstOf, type Wanted } from "#app/lib/views/gate-first";
import { type PartView, partViews } from "#app/lib/views/gate-parts";
import { type ProofView, proofView } from "#app/lib/views/gate-proof";
import { anchorOf, listOf, whoClears } from "#app/lib/views/places";
import { type RecordLinks, recordLinks } from "#app/lib/views/record-links";
import { nutOf } from "#app/lib/views/shown-states";

export interface Ask {
  ok: boolean;
  /** Why not; empty when it may be done. */
  reason: string;
}

export interface ItemView {
  id: string;
  anchor: string;
  key: string;
  revision: number;
  /** Id of the proof that is shown, "" = none: so that two tablets do not prove it over each other. */
  seen: string;
  words: string;
  caution: string | null;
  source: string | null;
  marks: string[];
  nut: NutState;
  word: string;
  /** Why it does not stand, first cause first. */
  reasons: { title: string; sentence: string; who: string }[];
  proof: ProofView | null;
  history: ProofView[];
  parts: PartView[];
  /** Nobody ticks it. */
  computed: boolean;
  /** Only a tick is asked: the left end of the row does it. */
  tickOnly: boolean;
  /** There is something for this person to do in the row: it stands open. */
  open: boolean;
  /** What comes before it: were it proved now, it would lapse at once. */
  first: First[];
  /** A step that is done, and is wanted again before the items that rest on it: why. */
  wanted: { note: string; sentence: string } | null;
  prove: Ask & { roles: Role[]; told: boolean; lateAllowed: boolean; numberMissing: boolean };
  failed: Ask;
  na: Ask;
  confirm: (Ask & { as: Role }) | null;
  accept: Ask | null;
  keep: Ask | null;
  withdraw: Ask | null;
  enterNumber: Ask;
  /** Where what happens to this item is written down. */
  record: RecordLinks;
  /** It asks for a loose end. */
  offersLooseEnd: boolean;
}

export interface Reader {
  id: string;
  roles: Role[];
  units: UnitSystem;
}

const ask = (v: Verdict): Ask => (v.ok ? { ok: true, reason: "" } : { ok: false, reason: v.blockers[0]?.sentence ?? "" });

/** @param wantedBy why this step is to be done again before others. */
export function itemView(e: Evaluation, item: Item, me: Reader, wantedBy?: Wanted): ItemView {
  const result = e.result.items[item.id];
  if (!result) throw new Error("An item that the board does not know");
  const proof = currentProof(e.facts, item.id);
  const computed = isComputed(item);
  const parts = partViews(e, item, me.units);
  const prove = proveOf(e, item, me, parts);
  const following = item.follows.every((f) => e.result.items[f]?.stands ?? true);
  const first = firstOf(e, item);
  const wanted = result.stands && wantedBy !== undefined;
  const asked = !result.stands && result.state !== "second eyes" && following && first.length === 0;
  const open = !computed && prove.ok && (asked || wanted) && !waitsForAcceptance(result.blockers);
  const newest = [...proofsOf(e.facts, item.id)].reverse();
  return {
    id: item.id,
    anchor: anchorOf(item.id),
    key: item.key,
    revision: item.revision,
    seen: proof?.id ?? "",
    words: item.words,
    caution: item.caution,
    source: item.source ?? null,
    marks: [
      ...(item.killer ? ["guards a life"] : []),
      ...(item.secondEyes ? ["2 people"] : []),
      ...(item.guarded ? ["guarded"] : []),
      ...(item.step ? ["step"] : []),
    ],
    nut: nutOf(result.state),
    word: wanted ? "do again" : wordOf(result.state, computed),
    reasons: result.stands
      ? []
      : result.blockers.map((b) => ({ title: b.title, sentence: b.sentence, who: whoClears(e.snapshot, b.owner, me.id) })),
    proof: proof ? proofView(e, item, proof, me.units) : null,
    history: newest.map((p) => proofView(e, item, p, me.units)),
    parts,
    computed,
    tickOnly: parts.every((p) => p.kind === "tick" && !p.missing),
    open,
    first,
    wanted: wanted ? wantedWords(wantedBy) : null,
    prove,
    failed: ask(mayProve(e, { item: item.id, member: me.id, as: me.roles[0] ?? "crew", state: "failed", late: false })),
    na: ask(mayProve(e, { item: item.id, member: me.id, as: prove.roles[0] ?? "builder", state: "na", late: false })),
    confirm: result.blockers.some((b) => b.code === "needs-second-eyes") && proof ? confirmOf(e, proof.id, me) : null,
    accept:
      result.blockers.some((b) => b.code === "needs-acceptance") && proof ? ask(mayAccept(e, { proof: proof.id, member: me.id })) : null,
    keep: result.state === "lapsed" && proof && me.roles.includes("inspector") ? ask(mayKeep(e, { proof: proof.id, member: me.id })) : null,
    withdraw: proof ? ask(mayWithdrawProof(e, { proof: proof.id, member: me.id })) : null,
    enterNumber: ask(mayEnterNumber(e, { item: item.id, member: me.id })),
    record: recordLinks(e, { kind: "item", id: item.id }),
    offersLooseEnd: item.offersLooseEnd !== null,
  };
}

function wantedWords({ keys, why }: Wanted): NonNullable<ItemView["wanted"]> {
  const note = `${listOf(keys)} ${keys.length === 1 ? "rests" : "rest"} on it`;
  return { note, sentence: `Do this again first: ${why}, and ${note}.` };
}

/** Under the nut, in the row's own words: nobody does a computed item, and of two people one was there. */
function wordOf(state: ItemState, computed: boolean): string {
  if (state === "second eyes") return "1 of 2";
  if (state === "not applicable") return "does not apply";
  return computed && state === "to do" ? "not yet" : state;
}

const waitsForAcceptance = (blockers: { code: string }[]): boolean => blockers.some((b) => b.code === "needs-acceptance");

function proveOf(e: Evaluation, item: Item, me: Reader, parts: PartView[]): ItemView["prove"] {
  const roles = (["builder", "inspector"] as const).filter((r) => me.roles.includes(r));
  const as = roles[0] ?? me.roles[0] ?? "crew";
  const base = { item: item.id, member: me.id, as, state: "done" as const };
  const plain = mayProve(e, { ...base, late: false });
  const told = !plain.ok && plain.blockers[0]?.code === "already" && mayProve(e, { ...base, late: false, told: true }).ok;
  return {
    ...(told ? { ok: true, reason: "" } : ask(plain)),
    roles,
    told,
    lateAllowed: mayProve(e, { ...base, late: true, told }).ok,
    numberMissing: parts.some((p) => p.missing),
  };
}

function confirmOf(e: Evaluation, proof: string, me: Reader): Ask & { as: Role } {
  const roles = (["inspector", "builder", "lead"] as const).filter((r) => me.roles.includes(r));
  const first = roles.find((as) => mayConfirm(e, { proof, member: me.id, as }).ok);
  const as = first ?? roles[0] ?? "crew";
  return { ...ask(mayConfirm(e, { proof, member: me.id, as })), as };
}
