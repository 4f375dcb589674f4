/** An item of the board, or a new one, as its form shows it: in the person's own units. Pure. */

import { mayEditBoard } from "#app/lib/gates/edit-verdicts";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { PART_NAMES } from "#app/lib/gates/part-changes";
import type { Item } from "#app/lib/gates/snapshot";
import { ADDED_KINDS, labelOf, shownEnd } from "#app/lib/schemas/part-forms";
import { SYSTEM_NAMES } from "#app/lib/template/systems";
import { type Part, SYSTEMS } from "#app/lib/template/types";
import { symbolOf } from "#app/lib/units/convert";
import { displayUnit, type UnitSystem } from "#app/lib/units/display";
import { type Quantity, SI } from "#app/lib/units/quantity";
import type { Viewer } from "#app/lib/views/board";
import { type May, mayOf } from "#app/lib/views/may";

export interface PartView {
  n: number;
  /** "A measurement in a band". */
  kind: string;
  /** The part's own words, and what they are; null where it has none. */
  label: string | null;
  labelName: string;
  /** Least and most as shown; null where it has no band. */
  band: { min: string; max: string; unit: string; source: string; note: string } | null;
  /** Fasteners; null where none are counted. */
  count: string | null;
  optional: boolean | null;
  /** Named places, where it wants several values. */
  places: string;
}

export interface ItemFormView {
  /** "FP3" or "New item". */
  title: string;
  gate: { id: string; name: string };
  words: string;
  caution: string;
  killer: boolean;
  secondEyes: boolean;
  guarded: boolean;
  computed: boolean;
  hours: string;
  afterRun: string;
  systems: { key: string; name: string; on: boolean }[];
  follows: { id: string; key: string; words: string; on: boolean }[];
  parts: PartView[];
  quantities: { value: string; label: string }[];
  kinds: { value: string; label: string }[];
  /** The edit that hides it; null where it is new or hidden. */
  hide: string | null;
  hidden: boolean;
  may: May;
}

const QUANTITIES: Partial<Record<Quantity, string>> = {
  pressure: "Pressure",
  temperature: "Temperature",
  voltage: "Voltage",
  current: "Current",
  resistance: "Resistance",
  angle: "Angle",
  length: "Length",
  volume: "Volume",
  volumeFlow: "Flow",
  mass: "Mass",
  force: "Force",
  time: "Time",
  rotation: "Speed of rotation",
  count: "A number of things",
  fraction: "A share",
};
const text = (n: number | null | undefined): string => (n === null || n === undefined ? "" : String(n));
const capital = (words: string): string => `${words[0]?.toUpperCase()}${words.slice(1)}`;

/** @param item null = a new one. @returns null where there is no such gate. */
export function itemFormView(e: Evaluation, me: Viewer, item: Item | null, gateId: string, units: UnitSystem): ItemFormView | null {
  const gate = e.snapshot.gates.find((g) => g.id === (item?.gate ?? gateId));
  if (!gate) return null;
  const peers = e.snapshot.items.filter((i) => i.gate === gate.id && !i.hidden && i.id !== item?.id);
  return {
    title: item?.key ?? "New item",
    gate: { id: gate.id, name: gate.name },
    words: item?.words ?? "",
    caution: item?.caution ?? "",
    killer: item?.killer ?? false,
    secondEyes: item?.secondEyes ?? false,
    guarded: item?.guarded ?? false,
    computed: item?.parts.some((p) => p.kind === "computed") ?? false,
    hours: text(item?.validity?.hours),
    afterRun: text(item?.validity?.afterRunHours),
    systems: SYSTEMS.map((key) => ({ key, name: SYSTEM_NAMES[key], on: item?.systems.includes(key) ?? false })),
    follows: peers.map(({ id, key, words }) => ({ id, key, words, on: item?.follows.includes(id) ?? false })),
    parts: (item?.parts ?? []).map((part, n) => partView(e, part, n, units)),
    quantities: (Object.keys(SI) as Quantity[]).flatMap((q) => {
      const name = QUANTITIES[q];
      return name ? [{ value: q, label: `${name}${unitOf(q, units)}` }] : [];
    }),
    kinds: ADDED_KINDS.map((kind) => ({ value: kind, label: capital(PART_NAMES[kind]) })),
    hide: item && !item.hidden ? JSON.stringify({ kind: "hide", subject: { kind: "item", id: item.id } }) : null,
    hidden: item?.hidden ?? false,
    may: mayOf(mayEditBoard(e, { member: me.id })),
  };
}

function unitOf(q: Quantity, units: UnitSystem): string {
  const symbol = symbolOf(displayUnit(q, units));
  return symbol ? `, ${symbol}` : "";
}

function partView(e: Evaluation, part: Part, n: number, units: UnitSystem): PartView {
  const places = "places" in part && part.places.some(Boolean) ? part.places.join(", ") : "";
  return {
    n,
    kind: capital(PART_NAMES[part.kind]),
    label: labelOf(part),
    labelName:
      part.kind === "photo"
        ? "What it shows"
        : part.kind === "text"
          ? "What is written down"
          : part.kind === "tick"
            ? "Maker’s word that it asks for"
            : "Label",
    band: part.kind === "measure" || part.kind === "torque" ? bandView(e, part, units) : null,
    count: part.kind === "torque" ? text(part.count) : null,
    optional: part.kind === "photo" || part.kind === "reading" ? part.optional : null,
    places,
  };
}

function bandView(e: Evaluation, { criterion }: Extract<Part, { kind: "measure" | "torque" }>, units: UnitSystem): PartView["band"] {
  const limits = [criterion.limit, criterion.otherLimit].flatMap((l) => e.snapshot.values.find((v) => v.key === l?.key)?.label ?? []);
  return {
    min: shownEnd(criterion.quantity, criterion.band?.min, units),
    max: shownEnd(criterion.quantity, criterion.band?.max, units),
    unit: symbolOf(displayUnit(criterion.quantity, units)),
    source: criterion.source ?? "",
    note: limits.length ? `${limits.join(" and ")} of Set-up count${limits.length > 1 ? "" : "s"} too: the narrower holds.` : "",
  };
}
