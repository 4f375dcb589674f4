/**
 * Evidence as it comes in from a form, a tablet or a script, checked against the parts of its item.
 * Only the shape is judged here; whether it meets the criterion is the evaluator's matter. All numbers are SI.
 */
import { z } from "zod";
import type { Evidence } from "#app/lib/gates/snapshot";
import type { Part } from "#app/lib/template/types";

const number = z.number({ error: "a number is missing" });
const numbers = z.array(number).min(1).max(200);
const words = (most: number) => z.string().trim().min(1, "something must be written").max(most);
const placeCount = z.number().int().min(0).max(10_000).nullable();

export const evidenceSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("tick") }),
  z.strictObject({ kind: z.literal("measure"), values: numbers }),
  z.strictObject({
    kind: z.literal("torque"),
    values: numbers,
    count: z.number().int().min(1).max(1000),
    adapter: z.number().nullable(),
    wrenchLength: z.number().positive().nullable(),
  }),
  z.strictObject({
    kind: z.literal("tally"),
    places: z
      .array(z.strictObject({ place: words(80), out: placeCount, in: placeCount }))
      .min(1)
      .max(200),
  }),
  z.strictObject({ kind: z.literal("photo"), files: z.array(z.string().min(1).max(64)).max(20), stored: z.boolean() }),
  z.strictObject({ kind: z.literal("reading"), values: numbers }),
  z.strictObject({ kind: z.literal("text"), text: words(4000) }),
  z.strictObject({
    kind: z.literal("crank"),
    bursts: z
      .array(z.strictObject({ at: z.number().int(), seconds: z.number().min(0), pressureAfter: z.number().min(0).nullable() }))
      .min(1)
      .max(100),
  }),
  z.strictObject({
    kind: z.literal("sheet"),
    sheet: z.enum(["fuel-flow", "restraint", "compression"]),
    version: z.string().max(40),
    inputs: z.record(z.string(), z.json()),
    took: z.record(z.string(), z.number()),
  }),
]);

export const evidenceListSchema = z.array(evidenceSchema.nullable()).max(20);

export type EvidenceChecked = { ok: true; evidence: (Evidence | null)[] } | { ok: false; message: string };

/**
 * @param parts of the item, in order. @param state of the proof: a failed one may leave parts out, a "not applicable" one has none.
 * @returns the evidence with one entry per part, or a sentence that says what is missing.
 */
export function checkEvidence(parts: Part[], state: "done" | "failed" | "na", input: unknown): EvidenceChecked {
  if (state === "na") return { ok: true, evidence: parts.map(() => null) };
  const parsed = evidenceListSchema.safeParse(input);
  if (!parsed.success) {
    const [issue] = parsed.error.issues;
    return no(`Part ${Number(issue?.path[0] ?? 0) + 1} cannot be read: ${issue?.message ?? "unknown"}. Fill it in again.`);
  }
  if (parsed.data.length > parts.length)
    return no(`The item has ${parts.length} parts, ${parsed.data.length} were sent. Load the page again.`);
  const evidence: (Evidence | null)[] = [];
  for (const [n, part] of parts.entries()) {
    const given = (parsed.data[n] ?? null) as Evidence | null;
    const wrong = partFault(part, given, state);
    if (wrong) return no(`Part ${n + 1}: ${wrong}`);
    evidence.push(given);
  }
  return { ok: true, evidence };
}

const no = (message: string): EvidenceChecked => ({ ok: false, message });

function partFault(part: Part, given: Evidence | null, state: "done" | "failed"): string | null {
  if (part.kind === "computed") return given ? "this is worked out by the board, nobody enters it." : null;
  if (given === null) {
    const optional = (part.kind === "photo" || part.kind === "reading") && part.optional;
    return optional || state === "failed" ? null : "nothing was entered. Fill it in.";
  }
  if (given.kind !== part.kind) return `the item asks for ${part.kind}, ${given.kind} was sent. Load the page again.`;
  if (
    (part.kind === "measure" || part.kind === "torque" || part.kind === "reading") &&
    "values" in given &&
    given.values.length !== part.places.length
  )
    return `${part.places.length} values are wanted, ${given.values.length} were sent.`;
  if (part.kind === "sheet" && given.kind === "sheet" && given.sheet !== part.sheet)
    return "this is another sheet. Open the sheet from the item.";
  if (part.kind === "photo" && given.kind === "photo" && given.files.length === 0 && !part.optional && state === "done")
    return "the photo is missing.";
  return null;
}
