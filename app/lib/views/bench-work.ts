/**
 * From what was typed to a result: what an address or a form holds, what of it is kept, and working it out anew each time.
 * Pure; texts stay as they were typed, in the units of whoever typed them.
 */
import { BENCH, computeBench, readBenchForm } from "#app/lib/bench/bench";
import type { BenchKey, BenchResult, TypedForm } from "#app/lib/bench/bench-def";
import { type FieldError, MOST_ROWS } from "#app/lib/bench/check";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { parseEntry, type UnitSystem } from "#app/lib/units/display";
import { exactly, prefill, type Standing } from "#app/lib/views/bench-form";

/** What an address or a form holds of a calculator's fields; null = it holds none. Unknown names and overlong texts are left out. */
export function typedForm(key: BenchKey, sent: Iterable<readonly [string, unknown]>): TypedForm | null {
  const { fields, groups } = BENCH[key].form;
  const plain = new Set(fields.map((f) => f.name));
  const repeated = new Set(groups.flatMap((g) => g.fields.map((f) => `${g.name}.${f.name}`)));
  const form: Record<string, string[]> = {};
  let units: UnitSystem | null = null;
  for (const [name, value] of sent) {
    if (typeof value !== "string") continue;
    if (name === "units" && (value === "si" || value === "us")) units = value;
    else if (plain.has(name) || repeated.has(name)) {
      const there = form[name] ?? [];
      if (there.length < (plain.has(name) ? 1 : MOST_ROWS)) form[name] = [...there, value.trim().slice(0, 80)];
    }
  }
  return units && { units, fields: form };
}

/** What is worth keeping: without what the install itself fills in, so that this follows the install. */
export function worthKeeping(e: Evaluation, key: BenchKey, form: TypedForm): TypedForm {
  const fields = { ...form.fields };
  for (const field of BENCH[key].form.fields) {
    const own = prefill(e, key, field, form.units);
    if (own && own.origin !== "default" && fields[field.name]?.[0] === own.text) delete fields[field.name];
  }
  return { units: form.units, fields };
}

/** The form with the install's values where a kept one leaves them out, in its own units. */
export function completed(e: Evaluation, key: BenchKey, { form, complete }: Standing): TypedForm {
  if (complete) return form;
  const fields = { ...form.fields };
  for (const field of BENCH[key].form.fields) {
    const filled = prefill(e, key, field, form.units);
    if (filled && fields[field.name] === undefined) fields[field.name] = [filled.text];
  }
  return { units: form.units, fields };
}

type Worked = { ok: true; inputs: Record<string, unknown>; result: BenchResult } | { ok: false; errors: FieldError[] };

/** @returns inputs in SI with their result, or what is wrong at which field. */
export function workOut(e: Evaluation, key: BenchKey, form: TypedForm): Worked {
  const { units, fields } = form;
  const read = readBenchForm(key, new Map(Object.entries(fields)), (text, quantity, as) => parseEntry(text, quantity, units, as?.[units]));
  if (!read.ok) return read;
  exactly(
    BENCH[key].form.fields,
    units,
    (name) => fields[name]?.[0],
    read.inputs,
    (field) => [prefill(e, key, field, units)?.si ?? []].flat(),
  );
  const done = computeBench(key, read.inputs);
  return done.ok ? { ok: true, inputs: read.inputs, result: done.result } : done;
}
