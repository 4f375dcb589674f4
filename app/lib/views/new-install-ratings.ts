/** The ratings and limits that a new install is asked for, as its third page shows them. Pure. */
import { presetText } from "#app/lib/schemas/new-install";
import type { Traits, ValueDef } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { symbolOf } from "#app/lib/units/convert";
import { displayUnit, type UnitSystem } from "#app/lib/units/display";

export interface RatingRow {
  key: string;
  label: string;
  help: string;
  /** Symbol; empty for a bare number. */
  unit: string;
  /** Shown in the field at first; empty where only the maker can say. */
  preset: string;
  /** Where the starting point comes from. */
  basis: string;
  wholeNumber: boolean;
}

export interface RatingGroup {
  id: string;
  title: string;
  says: string;
  rows: RatingRow[];
}

const GROUPS: (Omit<RatingGroup, "rows"> & { has: (def: ValueDef) => boolean })[] = [
  {
    id: "ratings",
    title: "Ratings",
    says: "Run speeds and bench sheets are computed from these.",
    has: (def) => !def.limit && !def.card,
  },
  {
    id: "run-limits",
    title: "Limits that stop every run",
    says: "Until each is there and somebody has said where it was read, no run is clear.",
    has: (def) => def.card,
  },
  {
    id: "release-limits",
    title: "Limits that stop the release",
    says: "Runs go on without them; the release for taxi tests does not.",
    has: (def) => def.limit && !def.card,
  },
];

export function ratingGroups(traits: Traits, units: UnitSystem): RatingGroup[] {
  const defs = valueDefs(traits);
  return GROUPS.map(({ has, ...group }) => ({ ...group, rows: defs.filter(has).map((def) => rowOf(def, units)) }));
}

function rowOf(def: ValueDef, units: UnitSystem): RatingRow {
  const preset = presetText(def, units);
  return {
    key: def.key,
    label: def.label,
    help: def.help,
    unit: symbolOf(def.shownIn ?? displayUnit(def.quantity, units)),
    preset,
    basis: preset === "" ? "" : def.basis.kind === "standard" ? def.basis.source : "common practice, no source",
    wholeNumber: def.quantity === "count" || def.quantity === "rotation",
  };
}
