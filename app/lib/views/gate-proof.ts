/** One recorded proof as it is shown: who, when, what was given, and what others said about it. */
import { computeSheet } from "#app/lib/bench/sheet";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Evidence, Item, Proof } from "#app/lib/gates/snapshot";
import { evidenceWords } from "#app/lib/record/evidence-words";
import type { Part } from "#app/lib/template/types";
import { fromSI } from "#app/lib/units/convert";
import { displayUnit, format, type UnitSystem } from "#app/lib/units/display";
import { criterionView } from "#app/lib/views/gate-parts";
import { nameIn } from "#app/lib/views/places";

/** A piece of evidence to be drawn: a value on its rule, strokes of a tally, pictures, or words. */
export type GivenView =
  | {
      kind: "value";
      label: string;
      value: string;
      unit: string;
      rule: { min: number | null; max: number | null; at: number } | null;
      says: string;
      out: boolean;
    }
  | { kind: "tally"; count: number; says: string; note: string }
  | { kind: "photos"; files: string[]; of: string }
  | { kind: "words"; text: string };

export interface ProofView {
  id: string;
  state: Proof["state"];
  did: string;
  recordedBy: string | null;
  when: string;
  late: boolean;
  given: GivenView[];
  words: string;
  note: string;
  tools: string;
  said: string[];
  withdrawn: string | null;
}

export function proofView(e: Evaluation, item: Item, proof: Proof, units: UnitSystem): ProofView {
  const { snapshot } = e;
  const name = (id: string) => nameIn(snapshot, id);
  const zone = snapshot.install.timeZone;
  const by = <T extends { proof: string; by: string; recorded: number }>(rows: T[], say: (row: T) => string) =>
    rows.filter((x) => x.proof === proof.id).map(say);
  const words = item.parts
    .map((part, n) => (part.kind === "computed" || part.kind === "tick" ? "" : evidenceWords(part, proof.evidence[n] ?? null, units, zone)))
    .filter(Boolean)
    .join("; ");
  return {
    id: proof.id,
    state: proof.state,
    did: name(proof.did),
    recordedBy: proof.by === proof.did ? null : name(proof.by),
    when: e.facts.when(proof.counts),
    late: proof.late,
    given: proof.state === "na" ? [] : item.parts.flatMap((part, n) => givenView(e, part, proof.evidence[n] ?? null, units)),
    words: proof.state === "na" ? "not applicable" : words,
    note: proof.note,
    tools: proof.tools.map((t) => e.facts.tools.get(t)?.name ?? "a tool").join(", "),
    said: [
      ...by(snapshot.confirmations, (c) => `Seen by ${name(c.by)} ${e.facts.when(c.recorded)}`),
      ...by(snapshot.acceptances, (a) => `Reason accepted by ${name(a.by)} ${e.facts.when(a.recorded)}: ${a.reason}`),
      ...by(snapshot.keeps, (k) => `Kept by ${name(k.by)} ${e.facts.when(k.recorded)}: ${k.reason}`),
    ],
    withdrawn: proof.withdrawn ? `Withdrawn by ${name(proof.withdrawn.by)} ${e.facts.when(proof.withdrawn.recorded)}` : null,
  };
}

function givenView(e: Evaluation, part: Part, given: Evidence | null, units: UnitSystem): GivenView[] {
  if (!given || part.kind !== given.kind) return [];
  switch (given.kind) {
    case "tick":
      return part.kind === "tick" && part.reference?.text ? [{ kind: "words", text: `As the maker says: ${part.reference.text}` }] : [];
    case "measure":
    case "torque":
      return part.kind === "measure" || part.kind === "torque" ? valueViews(e, part, given, units) : [];
    case "reading":
      return part.kind === "reading"
        ? given.values.map((v, i) => {
            const { value, unit } = format(part.quantity, v, units);
            return { kind: "value", label: part.places[i] || "", value, unit, rule: null, says: part.label, out: false };
          })
        : [];
    case "tally": {
      const sum = (side: "out" | "in") => given.places.reduce((s, p) => s + (p[side] ?? 0), 0);
      if (part.kind !== "tally") return [];
      const inside = part.mode === "out" ? "" : `${sum("in")} ${part.words.in}`;
      const outside = part.mode === "in" ? "" : `${sum("out")} ${part.words.out}`;
      return [
        {
          kind: "tally",
          count: part.mode === "out" ? sum("out") : sum("in"),
          says: [outside, inside].filter(Boolean).join(", "),
          note: given.places.map((p) => p.place).join(", "),
        },
      ];
    }
    case "photo":
      return given.files.length && part.kind === "photo" ? [{ kind: "photos", files: given.files, of: part.of }] : [];
    case "sheet": {
      const done = computeSheet(given.sheet, given.inputs);
      return [{ kind: "words", text: done.ok ? done.result.sentence : "The sheet no longer computes. Work it again." }];
    }
    default:
      return [{ kind: "words", text: evidenceWords(part, given, units, e.snapshot.install.timeZone) }];
  }
}

type Banded = Extract<Part, { kind: "measure" | "torque" }>;

function valueViews(e: Evaluation, part: Banded, given: Extract<Evidence, { kind: "measure" | "torque" }>, units: UnitSystem): GivenView[] {
  const view = criterionView(e, part.criterion, units);
  const unit = displayUnit(part.criterion.quantity, units);
  const end = (n: number | null) => (n === null ? null : fromSI(n, unit));
  // One rule a value would fill the page where there are many places: the rule is drawn for up to two.
  const drawn = given.values.length <= 2 && view.band !== null;
  return given.values.map((v, i) => {
    const shown = format(part.criterion.quantity, v, units);
    return {
      kind: "value",
      label: part.places[i] || "",
      value: shown.value,
      unit: shown.unit,
      rule: drawn ? { min: end(view.band?.min ?? null), max: end(view.band?.max ?? null), at: fromSI(v, unit) } : null,
      says: `${part.label}, ${view.bandText}`,
      out: view.band !== null && ((view.band.min !== null && v < view.band.min) || (view.band.max !== null && v > view.band.max)),
    };
  });
}
