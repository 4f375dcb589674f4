/** Evidence in the board editor's item form: each part's own few fields, `p0.min`, and one part more, `new.kind`. Pure. */
import type { Errors, Sent } from "#app/lib/schemas/edit-forms";
import type { Criterion, Part } from "#app/lib/template/types";
import { format, parseEntry, type UnitSystem } from "#app/lib/units/display";
import { type Quantity, SI } from "#app/lib/units/quantity";

/** Kinds that a person may add; the others belong to the board's own calculations. */
export const ADDED_KINDS = ["tick", "measure", "torque", "photo", "reading", "text"] as const;

/** What stands in a part's own text field; null where it has none. */
export function labelOf(part: Part): string | null {
  if ("label" in part) return part.label;
  if (part.kind === "photo") return part.of;
  if (part.kind === "text") return part.asks;
  return part.kind === "tick" ? (part.reference?.asks ?? null) : null;
}

export const shownEnd = (quantity: Quantity, value: number | null | undefined, units: UnitSystem): string =>
  value === null || value === undefined ? "" : format(quantity, value, units).value;

/** A figure left as it was shown keeps its exact value. */
function end(sent: Sent, name: string, quantity: Quantity, was: number | null, units: UnitSystem, errors: Errors): number | null {
  const text = sent(name);
  if (text === "") return null;
  if (was !== null && text === shownEnd(quantity, was, units)) return was;
  const read = parseEntry(text, quantity, units);
  if (read.ok) return read.si;
  errors[name] = [read.sentence];
  return null;
}

function criterion(sent: Sent, at: string, was: Criterion, units: UnitSystem, errors: Errors): Criterion {
  const { quantity, band: old } = was;
  const min = end(sent, `${at}.min`, quantity, old?.min ?? null, units, errors);
  const max = end(sent, `${at}.max`, quantity, old?.max ?? null, units, errors);
  const band = min === null && max === null ? null : { min, max };
  const changed = band?.min !== old?.min || band?.max !== old?.max;
  const source = sent(`${at}.source`) || null;
  if (changed && band !== null && !source) errors[`${at}.source`] = ["Say where the new figure was read, such as the manual and its page."];
  return { ...was, band: band ?? (old && old.min === null && old.max === null ? old : null), source };
}

/** @returns the part as the form has it; null where it is taken away. */
export function readPart(sent: Sent, part: Part, n: number, units: UnitSystem, errors: Errors): Part | null {
  const at = `p${n}`;
  if (sent(`${at}.drop`) !== "") return null;
  const label = sent(`${at}.label`);
  const optional = sent(`${at}.optional`) !== "";
  switch (part.kind) {
    case "tick":
      return part.reference ? { ...part, reference: { ...part.reference, asks: label } } : part;
    case "measure":
      return { ...part, label, criterion: criterion(sent, at, part.criterion, units, errors) };
    case "torque": {
      const count = countOf(sent, `${at}.count`, errors);
      return { ...part, label, count, criterion: criterion(sent, at, part.criterion, units, errors) };
    }
    case "photo":
      return { ...part, of: label, optional };
    case "reading":
      return { ...part, label, optional };
    case "text":
      return { ...part, asks: label };
    default:
      return part;
  }
}

function countOf(sent: Sent, name: string, errors: Errors): number | null {
  const text = sent(name);
  if (text === "") return null;
  if (/^\d{1,3}$/.test(text) && Number(text) > 0) return Number(text);
  errors[name] = ["Enter how many fasteners, or leave it empty."];
  return null;
}

/** @returns the part that the form adds; null where it adds none. */
export function readNewPart(sent: Sent, units: UnitSystem, errors: Errors): Part | null {
  const kind = ADDED_KINDS.find((k) => k === sent("new.kind"));
  if (!kind) return null;
  const label = sent("new.label");
  const places = sent("new.places")
    .split("\n")
    .map((line) => line.trim())
    .filter(Boolean);
  const at = places.length ? places : [""];
  const needLabel = kind !== "tick" && label === "";
  if (needLabel) errors["new.label"] = ["Say what is measured, shown or written down."];
  switch (kind) {
    case "tick":
      return label ? { kind, reference: { asks: label, text: null, source: null } } : { kind };
    case "photo":
      return { kind, of: label || "?", optional: false };
    case "text":
      return { kind, asks: label || "?" };
    default: {
      const quantity = kind === "torque" ? "torque" : (sent("new.quantity") as Quantity);
      if (!(quantity in SI)) {
        errors["new.quantity"] = ["Choose what is measured."];
        return null;
      }
      if (kind === "reading") return { kind, label: label || "?", places: at, quantity, optional: false };
      const empty: Criterion = { quantity, band: null, basis: { kind: "maker" }, source: null };
      const made = { label: label || "?", places: at, criterion: criterion(sent, "new", empty, units, errors) };
      return kind === "torque" ? { kind, ...made, count: countOf(sent, "new.count", errors) } : { kind, ...made };
    }
  }
}
