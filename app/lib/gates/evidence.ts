/**
 * Rule 1 of a proof: does its evidence meet the item's present criterion?
 * Sheets are computed again, never trusted; nothing meets a criterion without its number.
 */

import { alike, atLeast, atMost } from "#app/lib/bench/compare";
import { burstErrors, crankSummary } from "#app/lib/bench/crank";
import { computeSheet, SHEET_VERSIONS, traitInputs, valuesTaken, valuesUsed } from "#app/lib/bench/sheet";
import { type Facts, itemOf, proofsOf } from "#app/lib/gates/facts";
import type { BlockerCode } from "#app/lib/gates/result";
import type { Evidence, Item, Proof } from "#app/lib/gates/snapshot";
import type { Criterion, Part, SheetKey, ValueKey } from "#app/lib/template/types";
import type { Band } from "#app/lib/units/quantity";

export type Met = { ok: true } | { ok: false; code: BlockerCode; sentence: string };

const no = (code: BlockerCode, sentence: string): Met => ({ ok: false, code, sentence });
const YES: Met = { ok: true };

/** The band in force: its ends may come from values of the install. Null = a number is missing. SI, inclusive. */
export function bandInForce(criterion: Criterion, valueOfInstall: (key: ValueKey) => number | null): Band | null {
  if (!criterion.limit && !criterion.otherLimit)
    return criterion.band && (criterion.band.min !== null || criterion.band.max !== null) ? criterion.band : null;
  const band: Band = { min: criterion.band?.min ?? null, max: criterion.band?.max ?? null };
  for (const limit of [criterion.limit, criterion.otherLimit]) {
    if (!limit) continue;
    const value = valueOfInstall(limit.key);
    if (value === null) return null;
    // Where the item has a number of its own at that end, the narrower of the two counts.
    if (limit.end === "min") band.min = band.min === null ? value : Math.max(band.min, value);
    else band.max = band.max === null ? value : Math.min(band.max, value);
  }
  return band.min === null && band.max === null ? null : band;
}

const bandNow = (facts: Facts, criterion: Criterion): Band | null => bandInForce(criterion, (key) => facts.values.get(key)?.value ?? null);

/** What must be entered before anyone can prove this part: null when nothing is missing. */
export function numberMissing(facts: Facts, part: Part): string | null {
  if (part.kind === "tick") return part.reference && !part.reference.text ? part.reference.asks : null;
  if (part.kind !== "measure" && part.kind !== "torque") return null;
  return bandNow(facts, part.criterion) ? null : part.label;
}

/** @returns whether the proof's evidence meets every part of the item, and the first part that it does not meet. */
export function evidenceMeets(facts: Facts, item: Item, proof: Proof): Met {
  for (let n = 0; n < item.parts.length; n++) {
    const met = partMet(facts, item, item.parts[n] as Part, proof.evidence[n] ?? null, proof);
    if (!met.ok) return met;
  }
  return YES;
}

function partMet(facts: Facts, item: Item, part: Part, given: Evidence | null, proof: Proof): Met {
  if (part.kind === "computed") return YES;
  const band = part.kind === "measure" || part.kind === "torque" ? bandNow(facts, part.criterion) : null;
  if (band === null) {
    const missing = numberMissing(facts, part);
    if (missing) return no("number-missing", `A number is missing: ${missing}. Enter it with where it was read.`);
  }
  const optional = (part.kind === "photo" || part.kind === "reading") && part.optional;
  if (given === null) return optional ? YES : no("evidence-missing", `${evidenceName(part)} was not recorded. Prove it again with it.`);
  if (given.kind !== part.kind) return no("evidence-missing", `The item now asks for ${evidenceName(part).toLowerCase()}. Prove it again.`);

  switch (part.kind) {
    case "tick":
      return YES;
    case "measure":
      return given.kind === "measure" ? inBand(band as Band, part.places.length, given.values, part.label) : YES;
    case "torque": {
      if (given.kind !== "torque") return YES;
      if (!proof.tools.length) return no("evidence-missing", "No wrench is named. Prove it again with the wrench from the crib.");
      if (part.count !== null && given.count !== part.count)
        return no("tally-unequal", `${given.count} fasteners torqued, ${part.count} expected. Torque the rest.`);
      if (!(Number.isInteger(given.count) && given.count > 0))
        return no("evidence-missing", "How many fasteners were torqued was not recorded.");
      return inBand(band as Band, part.places.length, given.values, part.label);
    }
    case "tally":
      return given.kind === "tally" ? tallyMet(facts, item, part, given) : YES;
    case "photo":
      if (given.kind !== "photo") return YES;
      if (!given.files.length) return optional ? YES : no("evidence-missing", "The photo is missing. Take it and prove the item again.");
      return given.stored ? YES : no("photo-not-stored", "The photo has not arrived yet. Keep the page open until it is stored.");
    case "reading":
      return given.kind === "reading" && given.values.length === part.places.length && given.values.every(Number.isFinite)
        ? YES
        : no("evidence-missing", `A reading is missing: ${part.label}.`);
    case "text":
      return given.kind === "text" && given.text.trim() ? YES : no("evidence-missing", `Not written down: ${part.asks}`);
    case "crank":
      return given.kind === "crank" ? crankMet(part.giveUpAfter, given.bursts) : YES;
    case "sheet":
      return given.kind === "sheet" ? sheetMet(facts, part.sheet, given) : YES;
  }
}

function inBand(band: Band, places: number, values: number[], label: string): Met {
  if (values.length !== places) return no("evidence-missing", `A value is missing: ${label}.`);
  let out = false;
  for (const v of values) {
    if (!Number.isFinite(v)) return no("evidence-missing", `A value is missing: ${label}.`);
    // With room for the last binary digit: a limit entered in one unit and a reading in another must meet at the boundary.
    out ||= (band.min !== null && !atLeast(v, band.min)) || (band.max !== null && !atMost(v, band.max));
  }
  return out ? no("out-of-band", `${label} is outside its band. Put it right and measure again.`) : YES;
}

type TallyPart = Extract<Part, { kind: "tally" }>;
type TallyEvidence = Extract<Evidence, { kind: "tally" }>;

function tallyMet(facts: Facts, item: Item, part: TallyPart, given: TallyEvidence): Met {
  const whole = (n: number | null): n is number => n !== null && Number.isInteger(n) && n >= 0;
  if (!given.places.length) return no("evidence-missing", "Nothing was counted. Name at least one place, with its count.");
  if (part.mode === "out") {
    if (!given.places.every((p) => whole(p.out))) return no("evidence-missing", "A count is missing.");
    const sum = given.places.reduce((s, p) => s + (p.out as number), 0);
    return part.expected !== undefined && sum !== part.expected
      ? no("tally-unequal", `${sum} ${part.words.out}, ${part.expected} expected. Count again.`)
      : YES;
  }
  if (part.mode === "pairs") {
    if (!given.places.every((p) => whole(p.out) && whole(p.in)))
      return no("evidence-missing", "A count is missing: every place needs both.");
    const odd = given.places.find((p) => p.out !== p.in);
    return odd
      ? no(
          "tally-unequal",
          `${odd.place || "Count"}: ${odd.out} ${part.words.out}, ${odd.in} ${part.words.in}. Find the rest before you go on.`,
        )
      : YES;
  }
  if (!given.places.every((p) => whole(p.in))) return no("evidence-missing", "A count is missing.");
  const step = part.of ? proofsOf(facts, part.of).at(-1) : undefined;
  const outs = step?.evidence.find((e): e is TallyEvidence => e?.kind === "tally");
  // A count that was found wrong is no measure for another one.
  if (!step || step.withdrawn || step.state !== "done" || !outs)
    return no(
      "tally-unequal",
      `What was taken out has no count${part.of ? ` (${itemOf(facts, part.of)?.words ?? item.words})` : ""}. Count that first.`,
    );
  // As lists, not by name: a place named twice must not answer for one that is missing.
  const listed = (list: { place: string; n: number | null }[]) => list.map((p) => `${p.place}\u0001${p.n}`).sort();
  const out = listed(outs.places.map((p) => ({ place: p.place, n: p.out })));
  const back = listed(given.places.map((p) => ({ place: p.place, n: p.in })));
  const same = out.length === back.length && out.every((p, n) => p === back[n]);
  const sum = (list: (number | null)[]) => list.reduce<number>((s, n) => s + (n ?? 0), 0);
  return same
    ? YES
    : no(
        "tally-unequal",
        `${sum(given.places.map((p) => p.in))} ${part.words.in}, ${sum(outs.places.map((p) => p.out))} ${part.words.out}, place by place. Find the difference.`,
      );
}

function crankMet(giveUpAfter: number, bursts: Extract<Evidence, { kind: "crank" }>["bursts"]): Met {
  const [wrong] = burstErrors(bursts);
  if (wrong) return no("evidence-missing", wrong);
  const { pressure, gaveUp } = crankSummary(bursts, giveUpAfter);
  if (!pressure)
    return no(
      "evidence-missing",
      bursts.length ? "No oil pressure was seen in any burst. Find the cause before you crank on." : "No burst was recorded.",
    );
  return gaveUp
    ? no(
        "out-of-band",
        `Pressure came only after ${Math.round(pressure.cranking)} s of cranking; ${giveUpAfter} s are allowed. Find the cause.`,
      )
    : YES;
}

/** A saved sheet computed again, with what the install's traits say put over what was typed. */
function compute(facts: Facts, given: Extract<Evidence, { kind: "sheet" }>) {
  return computeSheet(given.sheet, { ...given.inputs, ...traitInputs(given.sheet, facts.snapshot.traits) });
}

function sheetMet(facts: Facts, key: SheetKey, given: Extract<Evidence, { kind: "sheet" }>): Met {
  if (given.version !== SHEET_VERSIONS[key])
    return no("sheet-outdated", "The calculation has changed since this sheet was saved. Work the sheet again.");
  for (const { keys, used, label } of valuesUsed(key, given.inputs)) {
    const known = keys.flatMap((k) => facts.values.get(k)?.value ?? []);
    if (known.length && !known.some((v) => used !== undefined && alike(v, used)))
      return no(
        "sheet-outdated",
        `The sheet did not use the install's ${label}. Correct it in Set-up if it is wrong there, then work the sheet again.`,
      );
  }
  for (const taken of valuesTaken(key)) {
    const used = given.took[taken];
    const value = facts.values.get(taken);
    if (used !== undefined && used !== (value?.value ?? null))
      return no(
        "sheet-outdated",
        `${value?.label ?? "A value"} of the install has changed since this sheet was saved. Work the sheet again.`,
      );
  }
  const done = compute(facts, given);
  if (!done.ok) return no("sheet-fails", done.errors[0]?.sentence ?? "The sheet cannot be computed from its inputs.");
  return done.result.passes ? YES : no("sheet-fails", done.result.sentence);
}

/**
 * Highest crankshaft speed (1/s) that the restraint sheets of this item allow, by the item's current proof, computed again.
 * @returns undefined when the item has no restraint sheet, null when its proof gives none.
 */
export function restraintCap(facts: Facts, item: Item, proof: Proof | null): number | null | undefined {
  const parts = item.parts.map((p, n) => (p.kind === "sheet" && p.sheet === "restraint" ? n : -1)).filter((n) => n >= 0);
  if (!parts.length) return undefined;
  let cap: number | null = null;
  for (const n of parts) {
    const given = proof?.evidence[n];
    const done = given?.kind === "sheet" ? compute(facts, given) : null;
    if (!done?.ok || done.result.cap === null) return null;
    cap = cap === null ? done.result.cap : Math.min(cap, done.result.cap);
  }
  return cap;
}

function evidenceName(part: Part): string {
  const known: Record<Part["kind"], string> = {
    tick: "The tick",
    measure: "The measurement",
    torque: "The torque",
    tally: "The count",
    photo: "The photo",
    reading: "The reading",
    text: "The note",
    crank: "The cranking",
    sheet: "The sheet",
    computed: "The computed result",
  };
  return known[part.kind];
}
