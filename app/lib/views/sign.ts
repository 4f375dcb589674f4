/** The sign sheet: what is signed, in one sentence and item by item, by whom it was done, what it means, and whether this person may. */

import type { ValveState } from "#app/components/ui/states";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemOf, itemsIn, proofsOf } from "#app/lib/gates/facts";
import { maySign } from "#app/lib/gates/signing-verdicts";
import type { Cover, SigningRole } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { meaningOf } from "#app/lib/record/shown";
import type { UnitSystem } from "#app/lib/units/display";
import type { Viewer } from "#app/lib/views/board";
import { proofView } from "#app/lib/views/gate-proof";
import { itemsWords, workedOut } from "#app/lib/views/items-words";
import { anyOf, gateOf, nameIn, placeOf, whoClears } from "#app/lib/views/places";
import { valveOf } from "#app/lib/views/shown-states";

export interface SheetView {
  id: string;
  name: string;
  gateHref: string;
  valve: ValveState;
  /** The state after this signature. */
  after: ValveState;
  as: SigningRole;
  roles: SigningRole[];
  act: string;
  /** "did this work or saw it done: 10 items of Oil prime, last on 4 Dec ..." */
  sentence: string;
  items: { key: string; words: string; said: string; who: string }[];
  /** Over the list: "7 items, and 1 that the board works out". */
  signed: string;
  meaning: string;
  means: string[];
  covers: Cover[];
  /** Why this person may not sign now; null when they may. */
  refusal: { title: string; sentence: string; who: string; place: { href: string; label: string } } | null;
  earlier: string[];
}

const ROLES: SigningRole[] = ["builder", "inspector", "lead"];

/** @param wanted role chosen on the sheet; else the first in which this person may sign. @returns null when there is no such gate. */
export function sheetView(e: Evaluation, gateId: string, me: Viewer & { units: UnitSystem }, wanted: string | null): SheetView | null {
  const gate = e.facts.gates.get(gateId);
  const result = e.result.gates[gateId];
  if (!gate || !result?.present) return null;
  const allowed = new Set(gate.policy.flat());
  const roles = ROLES.filter((r) => me.roles.includes(r) && allowed.has(r));
  const may = (as: SigningRole) => maySign(e, { gate: gateId, member: me.id, as, covers: null });
  const as = roles.find((r) => r === wanted) ?? roles.find((r) => may(r).ok) ?? roles[0] ?? "builder";
  const verdict = may(as);
  const [first] = verdict.ok ? [] : verdict.blockers;
  const place = result.holding.length;
  const last = place + 1 >= gate.policy.length;
  return {
    id: gate.id,
    name: gate.name,
    gateHref: gateOf(e.snapshot.install.id, gate.id),
    valve: valveOf(result.state),
    after: last ? "signed" : "half-signed",
    as,
    roles,
    act: as === "builder" ? "Sign as builder" : `Countersign as ${as}`,
    sentence: sentenceOf(e, gateId, result.covers, as),
    items: result.covers.map((c) => coverView(e, c, me.units)),
    signed: itemsWords(e, gateId),
    meaning: meaningOf(as),
    means: meansOf(e, gateId, me.id, last),
    covers: result.covers,
    refusal: first
      ? {
          title: first.title,
          sentence: first.sentence,
          who: first.code === "already" ? "" : whoClears(e.snapshot, first.owner, me.id),
          place: placeOf(e.snapshot, first.link),
        }
      : null,
    earlier: result.holding.flatMap((id) => {
      const s = e.snapshot.signatures.find((x) => x.id === id);
      return s ? [`${nameIn(e.snapshot, s.by)} signed as ${s.as} ${e.facts.when(s.recorded)}`] : [];
    }),
  };
}

const proofOf = (e: Evaluation, cover: Cover) => proofsOf(e.facts, cover.item).find((p) => p.id === cover.proof) ?? null;

function sentenceOf(e: Evaluation, gate: string, covers: Cover[], as: SigningRole): string {
  const proofs = covers.flatMap((c) => proofOf(e, c) ?? []);
  const done = proofs.filter((p) => p.state === "done").length;
  const na = proofs.filter((p) => p.state === "na").length;
  const people = anyOf([...new Set(proofs.map((p) => nameIn(e.snapshot, p.did)))]).replace(/ or (?=[^,]*$)/, " and ");
  const newest = proofs.length ? Math.max(...proofs.map((p) => p.counts)) : null;
  const by = workedOut(e, gate);
  const rest = by ? `; and ${by} that the board works out` : "";
  const what = `${count(done, "item")} done${na ? `, ${na} not applicable` : ""}, by ${people || "nobody"}${newest === null ? "" : `, the last on ${e.facts.when(newest)}`}${rest}`;
  return as === "builder"
    ? `did this work or saw it done: ${what}.`
    : `did none of this work and have looked at what is recorded: ${what}.`;
}

function coverView(e: Evaluation, cover: Cover, units: UnitSystem): SheetView["items"][number] {
  const item = itemOf(e.facts, cover.item);
  const proof = proofOf(e, cover);
  if (!item || !proof) return { key: item?.key ?? "", words: item?.words ?? "", said: "no proof", who: "" };
  const view = proofView(e, item, proof, units);
  const said = proof.state === "na" ? `not applicable: ${view.note}` : view.words || "done";
  return { key: item.key, words: item.words, said: [said, ...view.said].join(". "), who: `${view.did}, ${view.when}` };
}

function meansOf(e: Evaluation, gateId: string, me: string, last: boolean): string[] {
  const result = e.result.gates[gateId];
  const gate = e.facts.gates.get(gateId);
  // A sheet that cannot be signed must not say that it stands.
  if (!result?.ready) return [];
  const until = (result?.covers ?? []).flatMap((c) => e.result.items[c.item]?.until ?? []);
  const systems = [...new Set(itemsIn(e.facts, gateId).flatMap((i) => i.systems))].length;
  const next = gate?.policy[(result?.holding.length ?? 0) + 1] ?? [];
  const others = e.snapshot.members
    .filter((m) => m.id !== me && m.roles.some((r) => r.to === null && (next as string[]).includes(r.role)))
    .map((m) => m.name);
  return [
    `Everything stands as it is written down now: ${itemsWords(e, gateId)}.`,
    until.length
      ? `It stands until ${e.facts.when(Math.min(...until))}, or until a system of it is opened.`
      : systems
        ? "It stands until a system of it is opened."
        : "Time alone does not end it.",
    ...(last ? [] : [`${others.length ? anyOf(others) : "An inspector"} countersigns after you. Nobody can do both.`]),
  ];
}

/** Whether a refusal is about the PIN: it is shown at the PIN then. */
export const aboutPin = (code: string): boolean => code.startsWith("pin-");
