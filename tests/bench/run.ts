/** `npm run bench`: what the product costs, as ratios within one run. The figures are of this machine at this moment; the ratios travel. */
import { benchEvaluator } from "./evaluator";

const rows = await benchEvaluator(25);
const line = (cells: string[]) => cells.map((cell, n) => (n ? cell.padStart(12) : cell.padEnd(44))).join("");
console.log(line(["gate evaluation, median", "items", "gates", "ms", "µs an item"]));
for (const r of rows) console.log(line([r.what, String(r.items), String(r.gates), r.ms.toFixed(2), r.perItem.toFixed(2)]));
const ratio = (items: number) => {
  const [own, , engine] = rows.filter((r) => r.items === items);
  return own && engine ? (engine.ms / own.ms).toFixed(0) : "?";
};
const sizes = [...new Set(rows.map((r) => r.items))];
console.log(`\nfrom the snapshot, times faster than the rules engine: ${sizes.map((n) => `${ratio(n)} (${n} items)`).join(", ")}`);
