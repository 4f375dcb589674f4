import { expect, test } from "vitest";
import { evaluateBoard } from "#app/lib/gates/evaluate";
import { bigBoard } from "./bench/evaluator";

/** The best of several runs, ms for each item: what a busy machine adds is left out. */
function perItem(gates: number, items: number): number {
  const { s, now } = bigBoard(gates, items);
  let best = Number.POSITIVE_INFINITY;
  for (let n = 0; n < 25; n++) {
    const start = performance.now();
    evaluateBoard(s, now);
    best = Math.min(best, performance.now() - start);
  }
  return best / items;
}

test("cost grows with the items, not with their square", () => {
  perItem(25, 500);
  const few = perItem(25, 500);
  const many = perItem(400, 8_000);
  // A square would be sixteen times as much an item; what processors' caches cost is two to four times.
  expect(many / few).toBeLessThan(8);
});
