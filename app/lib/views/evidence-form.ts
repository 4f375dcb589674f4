/**
 * Reading an item's row back: what was typed, in the person's units, as evidence in SI, or a sentence for each field at fault.
 * Whether it is in its band is told here too, before it is recorded; the evaluator has the last word.
 */
import { computeSheet, readSheetForm, SHEET_FORMS, SHEET_VERSIONS, traitInputs, valuesTaken } from "#app/lib/bench/sheet";
import type { SheetResult } from "#app/lib/bench/sheet-result";
import { wrenchSetting } from "#app/lib/bench/torque";
import { bandInForce } from "#app/lib/gates/evidence";
import { instantOfLocal, localOf } from "#app/lib/gates/local-time";
import type { Evidence, Item, Snapshot } from "#app/lib/gates/snapshot";
import type { Criterion, Part, ValueKey } from "#app/lib/template/types";
import { format, formatBand, parseEntry, type UnitSystem } from "#app/lib/units/display";
import type { Quantity } from "#app/lib/units/quantity";
import { exactly } from "#app/lib/views/bench-form";

export interface EntryError {
  /** Name of the field and, where it is sent once per row, its row: "p0.value.1". */
  field: string;
  message: string;
}

export interface EntryContext {
  snapshot: Snapshot;
  units: UnitSystem;
  now: number;
}

export interface ReadEntry {
  evidence: (Evidence | null)[];
  tools: string[];
  errors: EntryError[];
  /** Values that are read well but lie outside their band: not to be taken as done. */
  outOfBand: EntryError[];
  sheets: Record<number, SheetResult>;
}

type Reader = { form: FormData; at: EntryContext; errors: EntryError[]; outOfBand: EntryError[]; sheets: Record<number, SheetResult> };

const all = (r: Reader, name: string): string[] => r.form.getAll(name).map((v) => (typeof v === "string" ? v.trim() : ""));
const one = (r: Reader, name: string): string => all(r, name)[0] ?? "";

/** @param form fields named by part: "p0.value" once per place, "p1.count" ... A part with errors has no evidence. */
export function readEntry(item: Item, form: FormData, at: EntryContext): ReadEntry {
  const reader: Reader = { form, at, errors: [], outOfBand: [], sheets: {} };
  const evidence = item.parts.map((part, n) => readPart(reader, part, n));
  const tools = [...new Set(item.parts.flatMap((part, n) => (part.kind === "torque" ? all(reader, `p${n}.tool`) : [])))].filter(Boolean);
  item.parts.forEach((part, n) => {
    if (part.kind === "torque" && !one(reader, `p${n}.tool`))
      reader.errors.push({
        field: `p${n}.tool`,
        message: `${part.label}: choose the wrench that was used. If it is not there, add it in the crib.`,
      });
  });
  return { evidence, tools, errors: reader.errors, outOfBand: reader.outOfBand, sheets: reader.sheets };
}

function readPart(r: Reader, part: Part, n: number): Evidence | null {
  switch (part.kind) {
    case "tick":
      return { kind: "tick" };
    case "measure": {
      const values = readValues(r, n, part, part.criterion.quantity);
      if (values) tellBand(r, n, part, values);
      return values && { kind: "measure", values };
    }
    case "reading": {
      if (part.optional && all(r, `p${n}.value`).every((v) => v === "")) return null;
      const values = readValues(r, n, part, part.quantity);
      return values && { kind: "reading", values };
    }
    case "torque":
      return readTorque(r, part, n);
    case "tally":
      return readTally(r, part, n);
    case "photo": {
      const files = all(r, `p${n}.photo`).filter(Boolean);
      if (!files.length && !part.optional) r.errors.push({ field: `p${n}.photo`, message: `Take the photo: ${part.of}.` });
      return files.length ? { kind: "photo", files, stored: true } : null;
    }
    case "text": {
      const text = one(r, `p${n}.text`);
      if (!text) r.errors.push({ field: `p${n}.text`, message: `Write it down: ${part.asks}` });
      return text ? { kind: "text", text } : null;
    }
    case "crank":
      return readCrank(r, n);
    case "sheet":
      return readSheet(r, part, n);
    case "computed":
      return null;
  }
}

function amount(r: Reader, field: string, text: string, quantity: Quantity): number | null {
  const entry = parseEntry(text, quantity, r.at.units);
  if (!entry.ok) r.errors.push({ field, message: entry.sentence });
  return entry.ok ? entry.si : null;
}

type Valued = { label: string; places: string[] };

/** One value per place. A sentence about one names the place, for it also stands in a list above the fields. */
function readValues(r: Reader, n: number, { label, places }: Valued, quantity: Quantity): number[] | null {
  const sent = all(r, `p${n}.value`);
  const values = places.map((place, i) => {
    const entry = parseEntry(sent[i] ?? "", quantity, r.at.units);
    if (!entry.ok) r.errors.push({ field: `p${n}.value.${i}`, message: `${place || label}: ${lowerFirst(entry.sentence)}` });
    return entry.ok ? entry.si : null;
  });
  return values.every((v): v is number => v !== null) ? values : null;
}

const lowerFirst = (s: string): string => `${s[0]?.toLowerCase() ?? ""}${s.slice(1)}`;

function tellBand(r: Reader, n: number, { criterion, places }: { criterion: Criterion; places: string[] }, values: number[]): void {
  const band = bandInForce(criterion, (key) => r.at.snapshot.values.find((v) => v.key === key)?.value ?? null);
  if (!band) return;
  values.forEach((v, i) => {
    if ((band.min !== null && v < band.min) || (band.max !== null && v > band.max))
      r.outOfBand.push({
        field: `p${n}.value.${i}`,
        message: `${places[i] ? `${places[i]}: ` : ""}${format(criterion.quantity, v, r.at.units).text} is out of the band (${formatBand(criterion.quantity, band, r.at.units)}). Put it right and measure again, or write it down as not right.`,
      });
  });
}

type PartOf<K extends Part["kind"]> = Extract<Part, { kind: K }>;

function readTorque(r: Reader, part: PartOf<"torque">, n: number): Evidence | null {
  const values = readValues(r, n, part, part.criterion.quantity);
  const countText = one(r, `p${n}.count`);
  const count = /^\d{1,4}$/.test(countText) ? Number(countText) : null;
  if (!count) r.errors.push({ field: `p${n}.count`, message: `${part.label}: count the fasteners that were torqued and enter how many.` });
  const adapterText = one(r, `p${n}.adapter`);
  const lengthText = one(r, `p${n}.wrench`);
  const adapter = adapterText === "" ? null : amount(r, `p${n}.adapter`, adapterText, "length");
  const wrenchLength = lengthText === "" ? null : amount(r, `p${n}.wrench`, lengthText, "length");
  if (adapter !== null && adapter !== 0 && wrenchLength === null && lengthText === "")
    r.errors.push({
      field: `p${n}.wrench`,
      message: "With an adapter the wrench’s own length is needed: middle of the handle to middle of the drive.",
    });
  const first = values?.[0];
  if (first !== undefined && first > 0 && adapter !== null && wrenchLength !== null) {
    const set = wrenchSetting(first, { wrenchLength, extension: adapter, angle: 0 });
    if (!set.ok) r.errors.push({ field: `p${n}.adapter`, message: set.errors[0]?.sentence ?? "The adapter does not fit this wrench." });
  }
  if (values) tellBand(r, n, part, values);
  return values && count ? { kind: "torque", values, count, adapter, wrenchLength } : null;
}

function readTally(r: Reader, part: PartOf<"tally">, n: number): Evidence | null {
  const [places, outs, ins] = [all(r, `p${n}.place`), all(r, `p${n}.out`), all(r, `p${n}.in`)];
  const counted = (text: string | undefined, row: number, side: "out" | "in"): number | null => {
    if (text !== undefined && /^\d{1,4}$/.test(text)) return Number(text);
    r.errors.push({ field: `p${n}.${side}.${row}`, message: `${places[row] || `Row ${row + 1}`}: count how many ${part.words[side]}.` });
    return null;
  };
  const before = r.errors.length;
  const rows = places.flatMap((place, row) => {
    const typed = place !== "" || (outs[row] ?? "") !== "" || (ins[row] ?? "") !== "";
    if (!typed) return [];
    if (place === "") r.errors.push({ field: `p${n}.place.${row}`, message: "Name the place that this count is for." });
    return [
      {
        place,
        out: part.mode === "in" ? null : counted(outs[row], row, "out"),
        in: part.mode === "out" ? null : counted(ins[row], row, "in"),
      },
    ];
  });
  if (!rows.length) r.errors.push({ field: `p${n}.place.0`, message: "Nothing is counted yet. Name at least one place, with its count." });
  return r.errors.length === before ? { kind: "tally", places: rows } : null;
}

function readCrank(r: Reader, n: number): Evidence | null {
  const { timeZone } = r.at.snapshot.install;
  const [began, seconds, pressure] = [all(r, `p${n}.began`), all(r, `p${n}.seconds`), all(r, `p${n}.pressure`)];
  const before = r.errors.length;
  const bursts = began.flatMap((time, row) => {
    if (!time && !seconds[row] && !pressure[row]) return [];
    // The crank clock gives the instant itself, a person the time of today.
    const read = /^\d{12,14}$/.test(time)
      ? { ok: true as const, at: Number(time) }
      : instantOfLocal(localOf(r.at.now, timeZone).date, time, timeZone);
    const at = read.ok ? read.at : null;
    if (at === null)
      r.errors.push({ field: `p${n}.began.${row}`, message: `Burst ${row + 1}: enter when it began, by the clock at the install.` });
    else if (at > r.at.now) r.errors.push({ field: `p${n}.began.${row}`, message: `Burst ${row + 1}: that time has not come yet today.` });
    const length = amount(r, `p${n}.seconds.${row}`, seconds[row] ?? "", "time");
    const seen = pressure[row] ? amount(r, `p${n}.pressure.${row}`, pressure[row], "time") : null;
    if (length !== null && seen !== null && seen > length)
      r.errors.push({
        field: `p${n}.pressure.${row}`,
        message: `Burst ${row + 1}: pressure is seen inside the burst, so at most after ${length} s.`,
      });
    return at === null || length === null ? [] : [{ at, seconds: length, pressureAfter: seen }];
  });
  if (!bursts.length && r.errors.length === before)
    r.errors.push({ field: `p${n}.began.0`, message: "No burst is entered. Enter each one, in order." });
  return r.errors.length === before ? { kind: "crank", bursts } : null;
}

function readSheet(r: Reader, part: PartOf<"sheet">, n: number): Evidence | null {
  const prefix = `p${n}.s.`;
  const fields = new Map<string, string[]>();
  for (const [name, value] of r.form.entries())
    if (name.startsWith(prefix) && typeof value === "string") {
      const key = name.slice(prefix.length);
      const there = fields.get(key);
      if (there) there.push(value);
      else fields.set(key, [value]);
    }
  for (const [name, value] of Object.entries(traitInputs(part.sheet, r.at.snapshot.traits))) fields.set(name, [value]);
  const { units } = r.at;
  const read = readSheetForm(part.sheet, fields, (text, quantity, as) => parseEntry(text, quantity, units, as?.[units]));
  if (!read.ok) {
    for (const { field, sentence } of read.errors) r.errors.push({ field: `${prefix}${rowLast(field)}`, message: sentence });
    return null;
  }
  const known = (key: ValueKey) => r.at.snapshot.values.find((v) => v.key === key)?.value ?? [];
  exactly(
    SHEET_FORMS[part.sheet].fields,
    units,
    (name) => fields.get(name)?.[0],
    read.inputs,
    (field) => field.prefill.flatMap((source) => (source.kind === "value" ? known(source.key) : [])),
  );
  const done = computeSheet(part.sheet, read.inputs);
  if (done.ok) r.sheets[n] = done.result;
  const took: Partial<Record<ValueKey, number>> = {};
  for (const key of valuesTaken(part.sheet)) {
    const value = r.at.snapshot.values.find((v) => v.key === key)?.value;
    if (value != null) took[key] = value;
  }
  return { kind: "sheet", sheet: part.sheet, version: SHEET_VERSIONS[part.sheet], inputs: read.inputs, took };
}

/** "straps.1.wll" as the row names it: "straps.wll.1". */
const rowLast = (path: string): string => {
  const [group, row, ...rest] = path.split(".");
  return row !== undefined && /^\d+$/.test(row) && rest.length ? `${group}.${rest.join(".")}.${row}` : path;
};
