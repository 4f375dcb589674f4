/**
 * A board with an edit in it. Everything that an edit makes say something new gets a new revision, so that what was proved or signed
 * before speaks no longer for it; words only and another order ask for the same and leave it.
 */
import { type Edit, type EditSubject, isOnCard } from "#app/lib/gates/edits";
import type { Gate, Item, Snapshot } from "#app/lib/gates/snapshot";
import { withTraits } from "#app/lib/gates/trait-edit";

/**
 * @param edit fits the snapshot (`editFault` says null).
 * @param wordsOnly an inspector accepted it as saying the same in other words.
 * @returns a new snapshot; the order of its gates, and of each gate's items, is that of the board.
 */
export function applyEdit(snapshot: Snapshot, edit: Edit, wordsOnly = false): Snapshot {
  const raise = wordsOnly ? 0 : 1;
  switch (edit.kind) {
    case "add-gate": {
      const gate: Gate = { ...edit.to, id: edit.id, key: edit.key, revision: 1, eachRun: false, lookBack: null, hidden: false };
      const at = snapshot.gates.findIndex((g) => g.id === edit.before);
      return { ...snapshot, gates: snapshot.gates.toSpliced(at < 0 ? snapshot.gates.length : at, 0, gate) };
    }
    case "add-item": {
      const gateKey = snapshot.gates.find((g) => g.id === edit.gate)?.key ?? "";
      const item: Item = {
        ...edit.to,
        ...{ id: edit.id, key: edit.key, gate: edit.gate, revision: 1, hidden: false, step: null, offersLooseEnd: null },
        onCard: isOnCard(edit.to.killer, gateKey),
      };
      return { ...snapshot, items: [...snapshot.items, item] };
    }
    case "change-gate":
      return ofGate(snapshot, edit.id, (g) => ({ ...g, ...edit.to, revision: g.revision + raise }));
    case "change-item":
      return ofItem(snapshot, edit.id, (i) => changedItem(snapshot, { ...i, ...edit.to, revision: i.revision + raise }));
    case "hide":
    case "show": {
      const hidden = edit.kind === "hide";
      const { kind, id } = edit.subject;
      return kind === "gate"
        ? ofGate(snapshot, id, (g) => ({ ...g, hidden, revision: g.revision + 1 }))
        : ofItem(snapshot, id, (i) => ({ ...i, hidden, revision: i.revision + 1 }));
    }
    case "move":
      return moved(snapshot, edit.subject, edit.by);
    case "traits":
      return withTraits(snapshot, edit.to, edit.ids);
  }
}

const ofGate = (s: Snapshot, id: string, change: (g: Gate) => Gate): Snapshot => ({
  ...s,
  gates: s.gates.map((g) => (g.id === id ? change(g) : g)),
});
const ofItem = (s: Snapshot, id: string, change: (i: Item) => Item): Snapshot => ({
  ...s,
  items: s.items.map((i) => (i.id === id ? change(i) : i)),
});

const changedItem = (s: Snapshot, item: Item): Item => ({
  ...item,
  onCard: isOnCard(item.killer, s.gates.find((g) => g.id === item.gate)?.key ?? ""),
});

/** Those among which the subject is moved, in the board's order. */
export function siblings(snapshot: Snapshot, { kind, id }: EditSubject): { id: string }[] {
  if (kind === "gate") return snapshot.gates.filter((g) => !g.hidden);
  const gate = snapshot.items.find((i) => i.id === id)?.gate;
  return snapshot.items.filter((i) => i.gate === gate && !i.hidden);
}

function moved(snapshot: Snapshot, subject: EditSubject, by: -1 | 1): Snapshot {
  const list = siblings(snapshot, subject);
  const other = list[list.findIndex((x) => x.id === subject.id) + by];
  if (!other) return snapshot;
  const swap = <T extends { id: string }>(all: T[]): T[] => {
    const [a, b] = [all.findIndex((x) => x.id === subject.id), all.findIndex((x) => x.id === other.id)];
    return all.with(a, all[b] as T).with(b, all[a] as T);
  };
  return subject.kind === "gate" ? { ...snapshot, gates: swap(snapshot.gates) } : { ...snapshot, items: swap(snapshot.items) };
}
