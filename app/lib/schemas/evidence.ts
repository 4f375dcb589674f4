/**
 * Evidence as it comes in from a form, a tablet or a script, checked against the parts of its item.
 * Only the shape is judged here; whether it meets the criterion is the evaluator's matter. All numbers are SI.
 */
import type { Evidence } from "#app/lib/gates/snapshot";
import { evidenceListSchema } from "#app/lib/record/evidence-shape";
import { isPlain, NOT_PLAIN } from "#app/lib/schemas/plain-text";
import type { Part } from "#app/lib/template/types";

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
    const given = parsed.data[n] ?? null;
    const wrong = partFault(part, given, state) ?? (isPlain(given) ? null : NOT_PLAIN);
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
