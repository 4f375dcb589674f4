/** Evidence in words, with units: the same on a signing sheet, in the history and in the dossier. */
import type { Evidence } from "#app/lib/gates/snapshot";
import { when } from "#app/lib/gates/when";
import type { Part, Places } from "#app/lib/template/types";
import { format, type UnitSystem } from "#app/lib/units/display";
import type { Quantity } from "#app/lib/units/quantity";

/** @returns one phrase, such as "bolts: top 22.5 N·m, bottom 23 N·m"; "not given" where an optional part is missing. */
export function evidenceWords(part: Part, given: Evidence | null, units: UnitSystem, timeZone: string): string {
  if (part.kind === "computed") return "worked out by the board";
  if (given === null) return "not given";
  switch (given.kind) {
    case "tick":
      return part.kind === "tick" && part.reference?.text ? `done as: ${part.reference.text}` : "done";
    case "measure":
    case "reading":
      return part.kind === "measure" || part.kind === "reading"
        ? valuesWords(part.label, part.places, given.values, quantityOf(part), units)
        : "of another kind";
    case "torque": {
      if (part.kind !== "torque") return "of another kind";
      const adapter = given.adapter === null ? "" : `, adapter ${format("length", given.adapter, units).text}`;
      return `${valuesWords(part.label, part.places, given.values, part.criterion.quantity, units)}, ${given.count} fasteners${adapter}`;
    }
    case "tally":
      return given.places
        .map((p) => [p.place, p.out === null ? "" : `out ${p.out}`, p.in === null ? "" : `in ${p.in}`].filter(Boolean).join(" "))
        .join(", ");
    case "photo":
      return given.files.length === 1 ? "1 photo" : `${given.files.length} photos`;
    case "text":
      return given.text;
    case "crank":
      return given.bursts
        .map((b) => {
          const pressure = b.pressureAfter === null ? "no pressure" : `pressure after ${format("time", b.pressureAfter, units).text}`;
          return `${when(b.at, timeZone)}: ${format("time", b.seconds, units).text}, ${pressure}`;
        })
        .join("; ");
    case "sheet":
      return `sheet ${given.sheet}, version ${given.version}`;
  }
}

const quantityOf = (part: Extract<Part, { kind: "measure" | "reading" }>): Quantity =>
  part.kind === "measure" ? part.criterion.quantity : part.quantity;

function valuesWords(label: string, places: Places, values: number[], quantity: Quantity, units: UnitSystem): string {
  return `${label}: ${values.map((v, n) => `${places[n] ? `${places[n]} ` : ""}${format(quantity, v, units).text}`).join(", ")}`;
}
