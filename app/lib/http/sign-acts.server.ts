// Reading a sign sheet's form: the role, the PIN and, gate by gate, the list that was shown.
import { z } from "zod";
import { commandIdSchema } from "#app/lib/schemas/act";
import { coverSchema, type SignGates, signGatesSchema } from "#app/lib/schemas/signing";
import { invalid, type Refusal } from "#app/lib/services/outcome";

const sheetSchema = z.array(z.object({ gate: z.string(), covers: z.array(coverSchema).max(500) }));

export type ReadSheet = { ok: true; commandId: string; input: SignGates } | { ok: false; refusal: Refusal };

/** Fields: commandId, as, pin, and once per gate `sheet` with `{ gate, covers }` as JSON. Gates not ticked in `gate` are left out. */
export function readSheet(form: FormData, several: boolean): ReadSheet {
  const commandId = commandIdSchema.safeParse(form.get("commandId"));
  if (!commandId.success) return { ok: false, refusal: invalid(commandId.error.issues[0]?.message ?? "") };
  const ticked = new Set(form.getAll("gate"));
  const gates = sheetSchema.safeParse(form.getAll("sheet").map((text) => parsedJson(text)));
  if (!gates.success) return { ok: false, refusal: invalid("The sheet that was sent cannot be read. Load it again, then sign.") };
  const input = signGatesSchema.safeParse({
    as: form.get("as"),
    pin: String(form.get("pin") ?? "").replace(/\s/g, ""),
    gates: several ? gates.data.filter((g) => ticked.has(g.gate)) : gates.data,
  });
  if (input.success) return { ok: true, commandId: commandId.data, input: input.data };
  const [issue] = input.error.issues;
  return {
    ok: false,
    refusal: { ...invalid(issue?.message ?? "The sheet cannot be read."), code: issue?.path[0] === "pin" ? "pin-wrong" : "invalid" },
  };
}

function parsedJson(text: FormDataEntryValue): unknown {
  try {
    return JSON.parse(String(text));
  } catch {
    return null;
  }
}
