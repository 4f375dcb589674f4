/**
 * The bench by key: every calculator with its question, criterion, source and form. What a page, a shared address or kept inputs
 * hold is read and computed here each time; a result is never stored.
 */
import type { BenchDef, BenchKey, BenchResult } from "#app/lib/bench/bench-def";
import type { FieldError, Outcome } from "#app/lib/bench/check";
import { type Parse, readWith } from "#app/lib/bench/read-form";
import { ATMOSPHERE } from "#app/lib/bench/sheet-atmosphere";
import { BATTERY } from "#app/lib/bench/sheet-battery";
import { COMPRESSION } from "#app/lib/bench/sheet-compression";
import { CRANK_SHEET } from "#app/lib/bench/sheet-crank";
import { FUEL_FLOW } from "#app/lib/bench/sheet-fuel-flow";
import { RESTRAINT } from "#app/lib/bench/sheet-restraint";
import { STATIC_POWER } from "#app/lib/bench/sheet-static-power";
import { TIP_SPEED } from "#app/lib/bench/sheet-tip-speed";
import { TORQUE_SHEET } from "#app/lib/bench/sheet-torque";
import { WIRE_DROP } from "#app/lib/bench/sheet-wire";
import type { Traits } from "#app/lib/template/types";

/** In the order in which an install needs them. */
export const BENCH: Record<BenchKey, BenchDef> = {
  "fuel-flow": {
    ...FUEL_FLOW,
    answers: "Does the supply give the engine more fuel than it takes at take-off?",
    criterion: "Each pump alone at least 1.25 times take-off consumption, gravity 1.5 times; two catches that agree within 5 %.",
    source:
      "14 CFR 23.955(b) and (c) before amendment 23-64, a benchmark for homebuilts; 0.55 lb/(hp·h) and attitude as in AC 90-89A (the first from memory). The 5 % is common practice, no source.",
  },
  restraint: {
    ...RESTRAINT,
    answers: "Do straps, anchors and gear hold the aircraft at the planned rpm, and up to which?",
    criterion: "Cap at or above the planned rpm; with a tailwheel the lower of the lines' cap and the nose-over cap.",
    source:
      "Momentum theory of the propeller, statics, Coulomb friction. Figure of merit 0.75, demand factor 1.5 and friction values are common practice, no source.",
  },
  torque: TORQUE_SHEET,
  crank: CRANK_SHEET,
  compression: {
    ...COMPRESSION,
    answers: "How much does each cylinder lose, and where?",
    criterion: "A loss of at most 25 % of the supply in every cylinder, or the maker's limit.",
    source: "AC 43.13-1B, paragraph 8-14.",
  },
  "tip-speed": TIP_SPEED,
  atmosphere: ATMOSPHERE,
  "static-power": STATIC_POWER,
  battery: BATTERY,
  "wire-drop": WIRE_DROP,
};

export const BENCH_KEYS = Object.keys(BENCH) as BenchKey[];

export const isBenchKey = (text: string): text is BenchKey => Object.hasOwn(BENCH, text);

/** Choices that the install's answers at set-up suggest; on the bench they may be changed. */
export function suggested(
  key: BenchKey,
  traits: Pick<Traits, "delivery" | "gear" | "blades" | "turbo" | "lithium">,
): Record<string, string> {
  switch (key) {
    case "fuel-flow":
      return { supply: traits.delivery === "gravity" ? "gravity" : "pump" };
    case "restraint":
      return { gear: traits.gear };
    case "tip-speed":
      return { blades: traits.blades };
    // A charger may hold anything: whoever has one chooses.
    case "static-power":
      return traits.turbo ? {} : { breathing: "natural" };
    case "battery":
      return { chemistry: traits.lithium ? "lifepo4" : "lead" };
    default:
      return {};
  }
}

/** The result from inputs in SI, or a sentence for every bad input at its field. Never throws for bad input, never NaN or Infinity. */
export const computeBench = (key: BenchKey, inputs: Record<string, unknown>): Outcome<BenchResult> => BENCH[key].compute(inputs);

/** A sent form as inputs in SI, or a sentence for every bad field ("straps.1.wll"). Inputs that come back compute without errors. */
export function readBenchForm(
  key: BenchKey,
  form: ReadonlyMap<string, readonly string[]>,
  parse: Parse,
): { ok: true; inputs: Record<string, unknown> } | { ok: false; errors: FieldError[] } {
  return readWith(BENCH[key], form, parse);
}
