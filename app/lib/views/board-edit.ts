/** The board as its editor lists it: gates and their items in order, what is hidden, and what may be done with each. Pure. */
import { mayEditBoard } from "#app/lib/gates/edit-verdicts";
import { type Edit, type EditSubject, OWN_ITEMS_AFTER } from "#app/lib/gates/edits";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Gate, Item } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { TEMPLATE } from "#app/lib/template/template";
import type { Viewer } from "#app/lib/views/board";
import { type May, mayOf } from "#app/lib/views/may";
import { boardOf } from "#app/lib/views/places";

export const editorOf = (installId: string): string => `${boardOf(installId)}/set-up/board`;
export const editGateOf = (installId: string, gate: string): string => `${editorOf(installId)}/gates/${gate}`;
export const editItemOf = (installId: string, item: string): string => `${editorOf(installId)}/items/${item}`;

export interface EditorRow {
  id: string;
  anchor: string;
  key: string;
  words: string;
  href: string;
  /** "guards a life", "second pair of eyes" and the like. */
  marks: string[];
  /** Edits that move it one place; null at the end of the list. */
  up: string | null;
  down: string | null;
}
export interface EditorGate extends EditorRow {
  items: EditorRow[];
  /** Where an item is added; null where the gate is fixed. */
  add: string | null;
}
export interface HiddenRow {
  id: string;
  name: string;
  words: string;
  /** The edit that shows it again; null where its gate's run fixed it. */
  show: string | null;
}
export interface BoardEditView {
  state: string;
  free: boolean;
  may: May;
  gates: EditorGate[];
  hidden: HiddenRow[];
  addGate: string;
}

export const anchorOfSubject = ({ kind, id }: EditSubject): string => `${kind}-${id}`;
const json = (edit: Edit): string => JSON.stringify(edit);

export function boardEditView(e: Evaluation, me: Viewer): BoardEditView {
  const { gates, items, proofs, install } = e.snapshot;
  const fixed = (g: Gate) => g.lookBack?.kind === "run";
  const shown = gates.filter((g) => !g.hidden);
  const moves = <T extends { id: string }>(kind: "gate" | "item", list: T[], at: number) => {
    const subject = { kind, id: (list[at] as T).id };
    return {
      up: at > 0 ? json({ kind: "move", subject, by: -1 }) : null,
      down: at < list.length - 1 ? json({ kind: "move", subject, by: 1 }) : null,
    };
  };
  const free = proofs.length === 0;
  const kept = items.filter((i) => !i.hidden && shown.some((g) => g.id === i.gate && !fixed(g)));
  return {
    state: `${count(shown.filter((g) => !fixed(g)).length, "gate")}, ${count(kept.length, "item")}`,
    free,
    may: mayOf(mayEditBoard(e, { member: me.id })),
    gates: shown.map((gate, n): EditorGate => {
      const own = items.filter((i) => i.gate === gate.id && !i.hidden);
      return {
        ...{ id: gate.id, anchor: anchorOfSubject({ kind: "gate", id: gate.id }), key: gate.key, words: gate.name },
        href: editGateOf(install.id, gate.id),
        marks: gateMarks(gate),
        ...(fixed(gate) ? { up: null, down: null } : moves("gate", shown, n)),
        add: fixed(gate) ? null : `${editItemOf(install.id, "new")}?gate=${gate.id}`,
        items: fixed(gate)
          ? []
          : own.map((item, at) => ({
              ...{ id: item.id, anchor: anchorOfSubject({ kind: "item", id: item.id }), key: item.key, words: item.words },
              href: editItemOf(install.id, item.id),
              marks: itemMarks(item),
              ...moves("item", own, at),
            })),
      };
    }),
    hidden: [
      ...gates.filter((g) => g.hidden && !fixed(g)).map((g) => hiddenRow({ kind: "gate", id: g.id }, g.key, g.name)),
      ...items
        .filter((i) => i.hidden && !gates.some((g) => g.id === i.gate && fixed(g)))
        .map((i) => hiddenRow({ kind: "item", id: i.id }, i.key, i.words)),
    ],
    addGate: editGateOf(install.id, "new"),
  };
}

const hiddenRow = (subject: EditSubject, name: string, words: string): HiddenRow => ({
  ...{ id: subject.id, name, words },
  show: json({ kind: "show", subject }),
});

function gateMarks(gate: Gate): string[] {
  if (gate.lookBack?.kind === "run") return ["fixed when its run started"];
  return [gate.eachRun ? "before each run" : "", gate.lookBack ? "looks back" : ""].filter(Boolean);
}

export const itemMarks = (item: Item): string[] =>
  [
    item.killer ? "guards a life" : "",
    item.secondEyes ? "second pair of eyes" : "",
    item.guarded ? "not before the gates in front" : "",
    item.step ? "a step" : "",
    item.parts.some((p) => p.kind === "computed") ? "worked out by the board" : "",
  ].filter(Boolean);

/** A key for a gate of one's own: its initials, and letters after them where the template or the board has those. */
export function keyForGate(e: Evaluation, name: string): string {
  const taken = new Set([...TEMPLATE.gates, TEMPLATE.postRunGate, ...e.snapshot.gates].map((g) => g.key));
  const words = name.toUpperCase().match(/[A-Z]+/g) ?? ["X"];
  const start = (words.length > 1 ? words.map((w) => w[0]).join("") : `${words[0]}XX`).slice(0, 2).padEnd(2, "X");
  const letters = "ABCDEFGHIJKLMNOPQRSTUVWXYZ";
  for (const more of ["", ...letters, ...[...letters].flatMap((a) => [...letters].map((b) => a + b))])
    if (!taken.has(start + more)) return start + more;
  throw new Error("No key is left");
}

/** Own items are counted from 51 on, so that no item of the template ever has their key. */
export function keyForItem(e: Evaluation, gate: Gate): string {
  const numbers = e.snapshot.items.filter((i) => i.gate === gate.id).map((i) => Number(/\d+$/.exec(i.key)?.[0] ?? 0));
  return `${gate.key}${Math.max(OWN_ITEMS_AFTER, ...numbers) + 1}`;
}
