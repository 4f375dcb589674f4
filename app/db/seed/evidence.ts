// Evidence of the demo: what its data says was found, as the record holds it; where the data is silent, what meets the part.
import { SHEET_VERSIONS, valuesTaken } from "#app/lib/bench/sheet";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { bandInForce } from "#app/lib/gates/evidence";
import type { Evidence } from "#app/lib/gates/snapshot";
import type { Part, SheetKey, ValueKey } from "#app/lib/template/types";
import { toSI } from "#app/lib/units/convert";
import type { DemoInstall, FoundPart } from "../../../fixtures/demo/types";

/** A part's evidence, but photos. `at` = the instant of the proof, ms since 1970 UTC. */
export function evidenceOf(
  e: Evaluation,
  data: DemoInstall,
  part: Exclude<Part, { kind: "photo" }>,
  found: FoundPart,
  at: number,
): Evidence | null {
  switch (part.kind) {
    case "tick":
      return { kind: "tick" };
    case "measure":
      return { kind: "measure", values: valuesOf(e, part, found) };
    case "torque":
      return { kind: "torque", values: valuesOf(e, part, found), count: found.count ?? part.count ?? 4, adapter: null, wrenchLength: null };
    case "reading":
      return found.values ? { kind: "reading", values: inSI(found) } : part.optional ? null : missing(part.label);
    case "tally":
      return found.places ? { kind: "tally", places: found.places } : missing(part.words.out);
    case "text":
      return found.text ? { kind: "text", text: found.text } : missing(part.asks);
    case "crank":
      return { kind: "crank", bursts: bursts(found, at) };
    case "sheet":
      return sheet(e, data, part.sheet);
    case "computed":
      return null;
  }
}

const missing = (what: string): never => {
  throw new Error(`The demo's data does not say what was found: ${what}`);
};

const inSI = ({ values = [], unit = "1" }: FoundPart): number[] => values.map((v) => toSI(v, unit));

function valuesOf(e: Evaluation, part: Extract<Part, { kind: "measure" | "torque" }>, found: FoundPart): number[] {
  if (found.values) return inSI(found);
  const band = bandInForce(part.criterion, (key) => e.facts.values.get(key)?.value ?? null);
  if (band?.min == null || band.max == null) return missing(part.label);
  const middle = (band.min + band.max) / 2;
  return part.places.map(() => middle);
}

/** Bursts with the rests that a starter needs, the last one ended just before the proof. */
function bursts({ bursts: list = [] }: FoundPart, at: number) {
  let end = at;
  const timed = [...list].reverse().map((b) => {
    const began = end - b.seconds * 1000;
    end = began - 25_000;
    return { ...b, at: began };
  });
  return timed.reverse();
}

function sheet(e: Evaluation, data: DemoInstall, key: SheetKey): Evidence {
  const known = (k: ValueKey) => e.facts.values.get(k)?.value ?? missing(k);
  const inputs = key === "restraint" ? restraint(data, known) : key === "fuel-flow" ? flow(data, known) : missing(key);
  const took = Object.fromEntries(valuesTaken(key).flatMap((k) => (e.facts.values.get(k)?.value == null ? [] : [[k, known(k)]])));
  return { kind: "sheet", sheet: key, version: SHEET_VERSIONS[key], inputs, took };
}

type Known = (key: ValueKey) => number;

function restraint({ restraint: rig, traits }: DemoInstall, known: Known) {
  if (!rig) return missing("the rig");
  return {
    planned: toSI(rig.rpm, "rpm"),
    power: known("ratedPower"),
    reference: known("ratedRpm"),
    reduction: traits.drive === "geared" ? known("reductionRatio") : 1,
    diameter: known("propDiameter"),
    merit: 0.75,
    pressureAltitude: 430,
    temperature: toSI(8, "°C"),
    factor: 1.5,
    mass: known("mass"),
    slope: 0,
    wheels: "none",
    gear: traits.gear,
    ...rig.tail,
    straps: rig.straps.map((s) => ({ ...s, elevation: toSI(s.elevation, "deg"), azimuth: toSI(s.azimuth, "deg"), anchor: "rated" })),
  };
}

function flow({ flow: test, traits }: DemoInstall, known: Known) {
  if (!test) return missing("the fuel flow");
  return {
    supply: traits.delivery === "gravity" ? "gravity" : "pump",
    takeoffFlow: known("takeoffFlow"),
    density: 720,
    measuredAt: test.measuredAt,
    noseUp: toSI(16, "deg"),
    fuelInTank: toSI(4, "L"),
    pumps: test.pumps.map(({ name, catches }) => ({
      name,
      catches: catches.map(([litres, seconds]) => ({ volume: toSI(litres, "L"), seconds })),
    })),
  };
}
