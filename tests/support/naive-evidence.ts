/**
 * Rule 1 of the gate rules once more, for the second evaluator: does the evidence of a proof meet the criterion of today?
 * Written without the product's evaluator, slow and obvious; only the bench sheets are computed by the product's own calculators.
 */
import { computeSheet, SHEET_VERSIONS, valuesTaken } from "#app/lib/bench/sheet";
import type { Evidence, Item, Proof, Snapshot } from "#app/lib/gates/snapshot";
import type { Criterion, Part, ValueKey } from "#app/lib/template/types";

type Tally = Extract<Evidence, { kind: "tally" }>;

/** The install's value of this key, null where it has none. */
export function installValue(s: Snapshot, key: ValueKey): number | null {
  return s.values.find((v) => v.key === key)?.value ?? null;
}

/** Proofs of an item as they happened, the newest last: by the instant that counts, then by sequence. */
export function proofsInOrder(s: Snapshot, itemId: string): Proof[] {
  return s.proofs.filter((p) => p.item === itemId).sort((a, b) => a.counts - b.counts || a.seq - b.seq);
}

function bandOf(s: Snapshot, criterion: Criterion): { min: number | null; max: number | null } | null {
  const ends = { min: criterion.band?.min ?? null, max: criterion.band?.max ?? null };
  if (criterion.limit) {
    const limit = installValue(s, criterion.limit.key);
    if (limit === null) return null;
    ends[criterion.limit.end] = limit;
  }
  return ends.min === null && ends.max === null ? null : ends;
}

function insideBand(s: Snapshot, criterion: Criterion, values: number[]): boolean {
  const band = bandOf(s, criterion);
  if (band === null) return false;
  return values.every((v) => (band.min === null || v >= band.min) && (band.max === null || v <= band.max));
}

const onePerPlace = (values: number[], places: string[]) => values.length === places.length && values.every(Number.isFinite);
const counted = (n: number | null): n is number => n !== null && Number.isInteger(n) && n >= 0;

function tallyMeets(s: Snapshot, part: Extract<Part, { kind: "tally" }>, evidence: Tally): boolean {
  if (evidence.places.length === 0) return false;
  if (part.mode === "pairs") return evidence.places.every((p) => counted(p.out) && counted(p.in) && p.out === p.in);
  if (part.mode === "out") {
    const sum = evidence.places.reduce((total, p) => total + (p.out ?? 0), 0);
    return evidence.places.every((p) => counted(p.out)) && (part.expected === undefined || sum === part.expected);
  }
  const source = s.items.find((i) => i.id === part.of);
  const newest = source && proofsInOrder(s, source.id).at(-1);
  if (!source || !newest || newest.withdrawn || newest.state !== "done") return false;
  const where = source.parts.findIndex((p) => p.kind === "tally" && p.mode === "out");
  const out = newest.evidence[where];
  if (out?.kind !== "tally") return false;
  // Each count that went out is crossed off against one that came back, and none may be left on either side.
  const left = [...evidence.places];
  for (const o of out.places) {
    const match = left.findIndex((p) => p.place === o.place && counted(p.in) && p.in === o.out);
    if (match < 0) return false;
    left.splice(match, 1);
  }
  return left.length === 0;
}

function crankMeets(giveUpAfter: number, bursts: Extract<Evidence, { kind: "crank" }>["bursts"]): boolean {
  let total = 0;
  for (const burst of bursts) {
    if (burst.pressureAfter !== null) return total + burst.seconds > 0 && total + burst.pressureAfter <= giveUpAfter;
    total += burst.seconds;
  }
  return false;
}

function sheetMeets(s: Snapshot, evidence: Extract<Evidence, { kind: "sheet" }>): boolean {
  const computed = computeSheet(evidence.sheet, evidence.inputs);
  if (!computed.ok || !computed.result.passes || evidence.version !== SHEET_VERSIONS[evidence.sheet]) return false;
  const { inputs } = evidence;
  const feeds: Partial<Record<string, ValueKey | ValueKey[]>> =
    evidence.sheet === "restraint"
      ? {
          power: "ratedPower",
          reference: ["staticRpmMin", "ratedRpm"],
          diameter: "propDiameter",
          reduction: "reductionRatio",
          mass: "mass",
        }
      : evidence.sheet === "compression"
        ? { count: "cylinders" }
        : inputs.takeoffFlow === undefined
          ? { takeoffFlow: "takeoffFlow", power: "ratedPower" }
          : { takeoffFlow: "takeoffFlow" };
  for (const [input, keys] of Object.entries(feeds)) {
    const says = [keys ?? []]
      .flat()
      .map((k) => installValue(s, k))
      .filter((v) => v !== null);
    if (says.length > 0 && !says.some((v) => Math.abs(v - Number(inputs[input])) < 1e-9 * Math.abs(v) + 1e-15)) return false;
  }
  return valuesTaken(evidence.sheet).every((key) => evidence.took[key] === undefined || evidence.took[key] === installValue(s, key));
}

function partMeets(s: Snapshot, part: Part, evidence: Evidence | null | undefined, proof: Proof): boolean {
  if (part.kind === "computed") return true;
  if (!evidence) return (part.kind === "photo" || part.kind === "reading") && part.optional;
  switch (part.kind) {
    case "tick":
      return evidence.kind === "tick" && (!part.reference || part.reference.text !== null);
    case "measure":
      return evidence.kind === "measure" && onePerPlace(evidence.values, part.places) && insideBand(s, part.criterion, evidence.values);
    case "torque":
      return (
        evidence.kind === "torque" &&
        onePerPlace(evidence.values, part.places) &&
        insideBand(s, part.criterion, evidence.values) &&
        (part.count === null || evidence.count === part.count) &&
        proof.tools.length > 0
      );
    case "tally":
      return evidence.kind === "tally" && tallyMeets(s, part, evidence);
    case "photo":
      return evidence.kind === "photo" && (part.optional || (evidence.files.length > 0 && evidence.stored));
    case "reading":
      return evidence.kind === "reading" && onePerPlace(evidence.values, part.places);
    case "text":
      return evidence.kind === "text" && evidence.text.trim() !== "";
    case "crank":
      return evidence.kind === "crank" && crankMeets(part.giveUpAfter, evidence.bursts);
    case "sheet":
      return evidence.kind === "sheet" && evidence.sheet === part.sheet && sheetMeets(s, evidence);
  }
}

/** Rule 1: every part of the item has evidence that meets it as it is today; a failed proof meets nothing. */
export function evidenceMeets(s: Snapshot, item: Item, proof: Proof): boolean {
  return proof.state === "done" && item.parts.every((part, i) => partMeets(s, part, proof.evidence[i], proof));
}
