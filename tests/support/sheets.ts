/** A restraint sheet for tests: one part, evidence that meets it, and evidence of straps that do not hold. */
import type { Evidence } from "#app/lib/gates/snapshot";
import type { Part } from "#app/lib/template/types";

export const sheetPart: Part = { kind: "sheet", sheet: "restraint" };
export const sheetEvidence: Evidence | null = null;
