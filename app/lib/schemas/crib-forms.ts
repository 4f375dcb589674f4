/** The crib's forms as a page sends them: text and dates in, the services' input out. Masses are typed in the person's units. Pure. */
import { z } from "zod";
import { commandIdSchema, freeTextSchema, idSchema, noteSchema, textSchema } from "#app/lib/schemas/act";
import { addExtinguisherSchema, addToolSchema, dateSchema } from "#app/lib/schemas/crib";
import { parseEntry, type UnitSystem } from "#app/lib/units/display";

const commandId = commandIdSchema;
const date = (message: string) => z.string(message).pipe(dateSchema);
const name = (message: string) => textSchema(message, 120, 2);
const said = (message: string) => textSchema(message, 2000);

export const addToolForm = z.object({
  intent: z.literal("add-tool"),
  commandId,
  name: name("Give it its name, such as the mark on its handle and its range."),
  serial: addToolSchema.shape.serial,
});
export const goodCheckForm = z.object({
  intent: z.literal("good-check"),
  commandId,
  tool: idSchema,
  on: date("Enter the day of the check."),
  due: date("Enter the last day in date, as the label or certificate says."),
  certificate: freeTextSchema(80),
  note: noteSchema,
});
export const badCheckForm = z.object({
  intent: z.literal("bad-check"),
  commandId,
  tool: idSchema,
  on: date("Enter the day on which it was found."),
  since: z
    .string()
    .default("")
    .transform((text) => text.trim() || null)
    .pipe(dateSchema.nullable()),
  certificate: freeTextSchema(80),
  note: said("Say what was found, in a few words."),
});
export const addExtinguisherForm = (units: UnitSystem) =>
  z.object({
    intent: z.literal("add-extinguisher"),
    commandId,
    name: name("Give it a name or number, as written on the bottle."),
    agent: addExtinguisherSchema.shape.agent,
    classB: z
      .literal("on")
      .optional()
      .transform((ticked) => ticked === "on"),
    charge: z
      .string()
      .default("")
      .transform((text, context) => {
        const read = parseEntry(text, "mass", units);
        if (read.ok && read.si > 0 && read.si <= 200) return read.si;
        context.addIssue({ code: "custom", message: read.ok ? "Type the mass of agent on the label, above zero." : read.sentence });
        return z.NEVER;
      }),
    rating: addExtinguisherSchema.shape.rating,
    position: addExtinguisherSchema.shape.position,
  });
const bottle = { commandId, extinguisher: idSchema };
const lastDay = date("Enter the last day to which it is in date.");
export const lookForm = z.object({ intent: z.literal("look"), ...bottle, due: lastDay, note: noteSchema });
export const serviceForm = z.object({ intent: z.literal("service"), ...bottle, due: lastDay, note: noteSchema });
export const withdrawForm = z.object({
  intent: z.literal("withdrawn"),
  ...bottle,
  note: said("Say why, such as discharged or gauge low."),
});
