/**
 * Whole boards for tests of the gate rules: `makeBoard` sets one up, `signAll` works every gate in order, each record as early as the
 * rules let it be, so that equal instants are common.
 */
import type { Gate, Item } from "#app/lib/gates/snapshot";
import { Board } from "./board";

export { Board } from "./board";
export { HOUR, measure, TICK, torque } from "./parts";

const rank = (g: Gate): number => (g.eachRun ? 2 : g.requiredBy.kind === "release" ? 1 : 0);

/**
 * Works and signs every visible gate in an order that its edges allow, *release* gates and *each run* last. Gates that look back on
 * a run that has not ended are left out.
 */
export function signAll(board: Board, only: (gate: Gate) => boolean = () => true): Board {
  const done = new Set<string>();
  const visit = (gate: Gate, path: string[]): void => {
    if (done.has(gate.id) || path.includes(gate.id)) return;
    for (const id of [...gate.needs, ...gate.after]) {
      const before = board.s.gates.find((g) => g.id === id);
      if (before) visit(before, [...path, gate.id]);
    }
    done.add(gate.id);
    if (!gate.hidden && only(gate)) board.work(gate);
  };
  for (const gate of [...board.s.gates].sort((a, b) => rank(a) - rank(b))) visit(gate, []);
  return board;
}

/** A small board with the cast, one tool, a redline and one rung; `gates` in order, each with its items. */
export function makeBoard(gates: Record<string, Partial<Gate> & { items: Record<string, Partial<Item>> }> = {}): Board {
  const board = new Board().cast();
  board.tool("wrench");
  board.extinguishers();
  board.value("redline", 45);
  board.rung("1");
  for (const [id, { items, ...gate }] of Object.entries(gates)) {
    board.gate(id, gate);
    for (const [key, item] of Object.entries(items)) board.item(key, id, item);
  }
  return board;
}
