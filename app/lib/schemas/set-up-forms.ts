/** The set-up's and crew's forms as a page sends them: text in the person's own units in, the services' input out. Pure. */
import { z } from "zod";
import { commandIdSchema, idSchema, roleSchema, sourceSchema } from "#app/lib/schemas/act";
import type { Value, ValueDef } from "#app/lib/template/types";
import { format, parseEntry, type UnitSystem } from "#app/lib/units/display";

/**
 * One rating or limit with where it was read. Where the figure is left as it was shown, the value stays as it is: what is confirmed
 * is not cut by the rounding of the screen.
 */
export function valueForm(def: ValueDef & Value, units: UnitSystem) {
  const shown = def.value === null ? null : format(def.quantity, def.value, units, def.shownIn).value;
  return z.object({
    commandId: commandIdSchema,
    key: z.literal(def.key, "The form has lost which value it is for. Load the page again."),
    value: z
      .string()
      .default("")
      .transform((text, context) => {
        if (def.value !== null && text.trim() === shown) return def.value;
        const read = parseEntry(text, def.quantity, units, def.shownIn);
        if (read.ok) return read.si;
        context.addIssue({ code: "custom", message: read.sentence });
        return z.NEVER;
      }),
    source: sourceSchema,
  });
}

export const endRoleForm = z.object({ commandId: commandIdSchema, member: idSchema, role: roleSchema });

export const mailAgainForm = z.object({ commandId: commandIdSchema, mail: idSchema });
