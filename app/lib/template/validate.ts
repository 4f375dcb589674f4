/**
 * Checks the template itself, as a mechanic's editor would: keys, edges, steps, conditions and the length of its words.
 */
import { parseCondition } from "#app/lib/template/condition";
import type { ItemRow } from "#app/lib/template/rows";
import { gateOf, TEMPLATE, type Template } from "#app/lib/template/template";
import { SYSTEMS } from "#app/lib/template/types";

const LONGEST_WORDS = 120;
const LONGEST_SHORT_NAME = 16;

/** What is wrong with a template, one sentence each; empty where nothing is. */
export function validateTemplate(template: Template = TEMPLATE): string[] {
  const gates = [...template.gates, template.postRunGate];
  const items = [...template.items, ...template.postRunItems];
  return [
    ...repeated(gates.map(({ key }) => key)).map((key) => `Gate ${key} stands twice.`),
    ...repeated(items.map(({ key }) => key)).map((key) => `Item ${key} stands twice.`),
    ...gates.flatMap((gate) => gateFaults(gate, gates, items)),
    ...items.flatMap((item) => itemFaults(item, template)),
    ...stepFaults(items),
    ...circles(new Map(gates.map((gate) => [gate.key, [...gate.needs.map((need) => need.gate), ...gate.after]]))).map(
      (path) => `Gates wait for each other in a circle: ${path}.`,
    ),
    ...circles(new Map(items.map((item) => [item.key, item.follows]))).map((path) => `Items follow each other in a circle: ${path}.`),
  ];
}

/** Throws with every fault of the template, a sentence a line. */
export function assertTemplate(template: Template = TEMPLATE): void {
  const faults = validateTemplate(template);
  if (faults.length > 0) throw new Error(faults.join("\n"));
}

function repeated(keys: string[]): string[] {
  return [...new Set(keys.filter((key, index) => keys.indexOf(key) !== index))];
}

function conditionFaults(owner: string, conditions: (string | undefined)[]): string[] {
  return conditions.flatMap((when) => {
    if (when === undefined) return [];
    try {
      parseCondition(when);
      return [];
    } catch (error) {
      return [`${owner}: ${error instanceof Error ? error.message : String(error)}`];
    }
  });
}

function gateFaults(gate: Template["gates"][number], gates: Template["gates"], items: ItemRow[]): string[] {
  const known = new Set(gates.map(({ key }) => key));
  const unknown = [...gate.needs.map((need) => need.gate), ...gate.after].filter((key) => !known.has(key));
  const faults = unknown.map((key) => `Gate ${gate.key} points to ${key}, which does not exist.`);
  if (gate.short.length > LONGEST_SHORT_NAME)
    faults.push(`Gate ${gate.key}: its short name is longer than ${LONGEST_SHORT_NAME} characters.`);
  if (!items.some((item) => gateOf(item.key) === gate.key)) faults.push(`Gate ${gate.key} has no item.`);
  const stray = gate.after.filter((key) => !gate.needs.some((need) => need.gate === key));
  faults.push(...stray.map((key) => `Gate ${gate.key} comes after ${key} but does not need it.`));
  return [...faults, ...conditionFaults(`Gate ${gate.key}`, [gate.when, ...gate.needs.map((need) => need.when)])];
}

function itemFaults(item: ItemRow, template: Template): string[] {
  const { key } = item;
  const postRun = template.postRunItems.includes(item);
  const home = postRun ? [template.postRunGate] : template.gates;
  const peers = postRun ? template.postRunItems : template.items;
  const gate = home.find((row) => row.key === gateOf(key));
  const faults: string[] = [];
  if (!gate) faults.push(`Item ${key} belongs to no gate.`);
  if (item.parts.length === 0) faults.push(`Item ${key} asks for no evidence.`);
  if (item.guarded && gate && gate.needs.length === 0) faults.push(`Item ${key} is guarded, but its gate needs no other gate.`);
  if (item.runs && !postRun) faults.push(`Item ${key} is made for some runs only, but is not looked at after a run.`);
  for (const words of [item.words, ...item.wordsWhen.map(([, other]) => other)]) {
    if (words.length > LONGEST_WORDS) faults.push(`Item ${key}: its words are longer than ${LONGEST_WORDS} characters (${words.length}).`);
    if (!words.endsWith(".")) faults.push(`Item ${key}: its words do not end in a full stop.`);
  }
  for (const system of item.systems) if (!SYSTEMS.includes(system)) faults.push(`Item ${key}: ${system} is not a system.`);
  for (const other of item.follows) {
    if (!peers.some((peer) => peer.key === other)) faults.push(`Item ${key} follows ${other}, which does not exist.`);
  }
  for (const part of item.parts) {
    if (part.kind !== "tally" || part.mode !== "in") continue;
    const source = peers.find((peer) => peer.key === part.of);
    const counts = source?.parts.some((other) => other.kind === "tally" && other.mode === "out");
    if (!counts || source?.step?.endedBy !== key) faults.push(`Item ${key} counts back in what no step that it ends counted out.`);
  }
  const looseEndGate = item.offersLooseEnd?.dueGate;
  if (looseEndGate && !template.gates.some((row) => row.key === looseEndGate))
    faults.push(`Item ${key}: its loose end is due before no gate.`);
  const conditions = [item.when, item.runs?.unless, ...item.wordsWhen.map(([when]) => when), ...item.parts.map((part) => part.when)];
  return [...faults, ...conditionFaults(`Item ${key}`, conditions)];
}

/** A step's ending item is of the same gate, always there with it, and follows whatever follows the step. */
function stepFaults(items: ItemRow[]): string[] {
  const byKey = new Map(items.map((item) => [item.key, item]));
  const before = (key: string): Set<string> => {
    const direct = byKey.get(key)?.follows ?? [];
    return new Set(direct.flatMap((other) => (other === key ? [] : [other, ...before(other)])));
  };
  if (circles(new Map(items.map((item) => [item.key, item.follows]))).length > 0) return [];
  return items.flatMap((item) => {
    const ending = item.step?.endedBy;
    if (!ending) return [];
    const end = byKey.get(ending);
    if (!end || gateOf(ending) !== gateOf(item.key)) return [`Step ${item.key} is ended by ${ending}, which is not in its gate.`];
    const faults = end.when && end.when !== item.when ? [`Step ${item.key} can be there without ${ending}, which ends it.`] : [];
    const earlier = before(ending);
    const followers = items.filter((other) => other.key !== ending && other.follows.includes(item.key));
    const missed = followers.filter((other) => !earlier.has(other.key));
    return [...faults, ...missed.map((other) => `${ending} ends step ${item.key} but does not follow ${other.key}.`)];
  });
}

/** Paths that lead back to where they began. */
function circles(edges: ReadonlyMap<string, string[]>): string[] {
  const done = new Set<string>();
  const found: string[] = [];
  const visit = (key: string, path: string[]): void => {
    const start = path.indexOf(key);
    if (start >= 0) {
      found.push([...path.slice(start), key].join(", "));
      return;
    }
    if (done.has(key)) return;
    for (const next of edges.get(key) ?? []) visit(next, [...path, key]);
    done.add(key);
  };
  for (const key of edges.keys()) visit(key, []);
  return found;
}
