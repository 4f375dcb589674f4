/** Why an edit cannot be made at all: what it is about is not there, has moved on, guards a life, or would wait for itself. */
import { siblings } from "#app/lib/gates/apply-edit";
import { nameOfSubject } from "#app/lib/gates/edit-changes";
import { type Edit, type EditSubject, isStale, OWN_ITEMS_AFTER } from "#app/lib/gates/edits";
import type { Gate, Item, Snapshot } from "#app/lib/gates/snapshot";
import { isComputed } from "#app/lib/gates/work-facts";
import { TEMPLATE } from "#app/lib/template/template";

export interface EditFault {
  code: "order" | "stale" | "not-found";
  sentence: string;
}
const order = (sentence: string): EditFault => ({ code: "order", sentence });

/** @returns null where the edit can be made on this board. */
export function editFault(s: Snapshot, edit: Edit): EditFault | null {
  switch (edit.kind) {
    case "add-gate":
      return s.gates.some((g) => g.id === edit.id || g.key === edit.key)
        ? { code: "stale", sentence: "A gate with that key stands here already. Load the page again." }
        : (gateKeyFault(edit.key) ??
            unsignedFault(edit.to.policy) ??
            edgeFault(s, edit.id, edit.to.needs, edit.to.after) ??
            circleFault(withGate(s, edit.id, edit.to)));
    case "add-item":
      return (
        subjectFault(s, { kind: "gate", id: edit.gate }) ??
        (s.items.some((i) => i.id === edit.id || (i.gate === edit.gate && i.key === edit.key))
          ? { code: "stale", sentence: "An item with that key stands here already. Load the page again." }
          : (itemKeyFault(s, edit.gate, edit.key) ?? partsFault(edit.to.parts) ?? followsFault(s, edit.id, edit.gate, edit.to.follows)))
      );
    case "change-gate":
      return (
        subjectFault(s, { kind: "gate", id: edit.id }) ??
        staleFault(s, edit) ??
        edgeFault(s, edit.id, edit.to.needs ?? [], edit.to.after ?? []) ??
        (edit.to.policy ? unsignedFault(edit.to.policy) : null) ??
        circleFault(withGate(s, edit.id, edit.to))
      );
    case "change-item":
      return subjectFault(s, { kind: "item", id: edit.id }) ?? staleFault(s, edit) ?? itemFault(s, edit);
    case "hide":
      return subjectFault(s, edit.subject) ?? hideFault(s, edit.subject);
    case "show":
      return subjectFault(s, edit.subject, true) ?? (edit.subject.kind === "gate" ? circleFault(s) : null);
    case "move": {
      const fault = subjectFault(s, edit.subject);
      if (fault) return fault;
      const list = siblings(s, edit.subject);
      const at = list.findIndex((x) => x.id === edit.subject.id) + edit.by;
      return list[at] ? null : order(`It stands at the ${edit.by < 0 ? "top" : "end"} already.`);
    }
    case "traits":
      return staleFault(s, edit);
  }
}

/** Keys of the template are the template's: other answers about the install may bring what has them. */
const gateKeyFault = (key: string): EditFault | null =>
  [...TEMPLATE.gates, TEMPLATE.postRunGate].some((g) => g.key === key)
    ? order(`${key} is a gate of the template. Take another key.`)
    : null;
function itemKeyFault(s: Snapshot, gate: string, key: string): EditFault | null {
  const own = s.gates.find((g) => g.id === gate)?.key ?? "";
  return key.startsWith(own) && Number(key.slice(own.length)) > OWN_ITEMS_AFTER
    ? null
    : order(`Own items of ${own} are numbered from ${OWN_ITEMS_AFTER + 1} on.`);
}

const GONE: EditFault = { code: "not-found", sentence: "What this changes is not on the board. Load the page again." };

/** @param hidden it must be hidden; else it must not. */
function subjectFault(s: Snapshot, subject: EditSubject, hidden = false): EditFault | null {
  const item = subject.kind === "item" ? s.items.find((i) => i.id === subject.id) : undefined;
  const gate = s.gates.find((g) => g.id === (item ? item.gate : subject.id));
  if (!gate || (subject.kind === "item" && !item)) return GONE;
  if (gate.lookBack?.kind === "run")
    return order(
      "This gate looks back on one run. What it asks was fixed when that run started; only a missing number may still be entered.",
    );
  if ((item ?? gate).hidden !== hidden)
    return order(
      hidden ? `${nameOfSubject(s, subject)} is on the board already.` : `${nameOfSubject(s, subject)} is hidden. Show it again first.`,
    );
  return null;
}

const staleFault = (s: Snapshot, edit: Edit): EditFault | null =>
  isStale(s, edit) ? { code: "stale", sentence: "What this changes has been changed by somebody since." } : null;

const unsignedFault = (policy: Gate["policy"]): EditFault | null =>
  policy.length ? null : order("A gate that nobody signs would stand by itself. Name who signs.");

function edgeFault(s: Snapshot, id: string, needs: string[], after: string[]): EditFault | null {
  const known = new Map(s.gates.map((g) => [g.id, g]));
  for (const other of [...needs, ...after]) {
    if (other === id) return order("A gate cannot wait for itself. Take that away.");
    if (!known.has(other)) return GONE;
  }
  return null;
}

function withGate(s: Snapshot, id: string, to: Partial<Pick<Gate, "needs" | "after" | "name">>): Node[] {
  const others: Node[] = s.gates.map((g) => (g.id === id ? node({ ...g, ...to }) : node(g)));
  return s.gates.some((g) => g.id === id)
    ? others
    : [...others, node({ id, name: to.name ?? "", needs: to.needs ?? [], after: to.after ?? [] })];
}
const node = (g: Pick<Gate, "id" | "name" | "needs" | "after">): Node => ({ id: g.id, name: g.name, before: [...g.needs, ...g.after] });

interface Node {
  id: string;
  name: string;
  before: string[];
}

const circleFault = (given: Node[] | Snapshot): EditFault | null => {
  const nodes = Array.isArray(given) ? given : given.gates.map(node);
  const path = circle(nodes);
  return path && order(`Gates would wait for each other in a circle: ${path.join(", then ")}. Take one of these edges away first.`);
};

/** The names along a circle, the first again at its end; null where there is none. Hidden gates pass their edges on, so they count. */
export function circle(nodes: Node[]): string[] | null {
  const byId = new Map(nodes.map((n) => [n.id, n]));
  const state = new Map<string, "on the way" | "done">();
  const path: Node[] = [];
  const visit = (at: Node): Node[] | null => {
    state.set(at.id, "on the way");
    path.push(at);
    for (const id of at.before) {
      const next = byId.get(id);
      if (!next || state.get(id) === "done") continue;
      if (state.get(id) === "on the way") return [...path.slice(path.indexOf(next)), next];
      const found = visit(next);
      if (found) return found;
    }
    path.pop();
    state.set(at.id, "done");
    return null;
  };
  for (const one of nodes) {
    const found = state.has(one.id) ? null : visit(one);
    // Read in the order of the work: what comes first stands first.
    if (found) return found.reverse().map((n) => n.name);
  }
  return null;
}

function itemFault(s: Snapshot, edit: Extract<Edit, { kind: "change-item" }>): EditFault | null {
  const item = s.items.find((i) => i.id === edit.id) as Item;
  const { to } = edit;
  if (to.killer === false) return order("This item guards a life: that mark stays. Say why it does not apply on the item itself instead.");
  if (to.parts && isComputed(item)) return order("The board works this item out by itself: its evidence cannot be changed.");
  return (to.parts ? partsFault(to.parts) : null) ?? (to.follows ? followsFault(s, item.id, item.gate, to.follows) : null);
}

const partsFault = (parts: unknown[]): EditFault | null =>
  parts.length ? null : order("An item that asks for no evidence would stand by nobody's word. Ask for a tick at least.");

function followsFault(s: Snapshot, id: string, gate: string, follows: string[]): EditFault | null {
  const peers = s.items.filter((i) => i.gate === gate);
  if (follows.includes(id)) return order("An item cannot follow itself. Take that away.");
  if (follows.some((f) => !s.items.some((i) => i.id === f))) return GONE;
  const nodes = s.items.map((i): Node => ({ id: i.id, name: i.key, before: i.id === id ? follows : i.follows }));
  if (!peers.some((i) => i.id === id)) nodes.push({ id, name: "the new item", before: follows });
  const path = circle(nodes);
  return path && order(`Items would follow each other in a circle: ${path.join(", then ")}. Take one of these away first.`);
}

function hideFault(s: Snapshot, { kind, id }: EditSubject): EditFault | null {
  const shown = s.items.filter((i) => !i.hidden);
  const going = shown.filter((i) => (kind === "item" ? i.id === id : i.gate === id));
  const killer = going.find((i) => i.killer);
  if (killer)
    return order(
      kind === "item"
        ? "This item guards a life: it is never hidden. Where it does not apply, mark it so with the reason, and an inspector accepts that."
        : `${killer.key} in it guards a life, so this gate is never hidden.`,
    );
  const computed = going.find(isComputed);
  if (computed) return order(`The board works ${computed.key} out by itself, and the release rests on it: it is never hidden.`);
  const gone = new Set(going.map((i) => i.id));
  for (const item of shown) {
    if (gone.has(item.id)) continue;
    if (item.step?.endedBy && gone.has(item.step.endedBy))
      return order(`It ends ${item.key}, which would then never be over. Hide ${item.key} first.`);
    if (item.parts.some((p) => p.kind === "tally" && p.of !== undefined && gone.has(p.of)))
      return order(`${item.key} counts back in what this one took out. Hide ${item.key} first.`);
  }
  return null;
}
