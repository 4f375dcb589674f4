/** Forms of the set-up: a new install, its people, its ratings and limits, the maker's numbers of its items. */
import { z } from "zod";
import { idSchema, roleSchema, sourceSchema, textSchema } from "#app/lib/schemas/act";
import { traitsSchema } from "#app/lib/template/traits";

/** It is painted on the strip of every page, which has room for so many. */
export const LONGEST_REGISTRATION = 12;

const timeZoneSchema = z.string("Choose a time zone.").refine((zone) => {
  try {
    new Intl.DateTimeFormat("en", { timeZone: zone });
    return true;
  } catch {
    return false;
  }
}, "Choose a time zone.");

const registrationSchema = textSchema("Enter the registration, as painted on the side.", LONGEST_REGISTRATION, 2)
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/i, "Letters and digits, with a hyphen between them if it has one: nothing else is painted on the side.")
  .toUpperCase();

export const createInstallSchema = z.object({
  registration: registrationSchema,
  name: textSchema("Give the install a name.", 80, 2),
  timeZone: timeZoneSchema,
  traits: traitsSchema,
  /** SI by value key; `source` null = not confirmed. */
  values: z.record(z.string(), z.object({ value: z.number().nullable(), source: sourceSchema.nullable() })).default({}),
});
export type CreateInstall = z.output<typeof createInstallSchema>;

export const addMemberSchema = z.object({ email: z.email("Enter a mail address.").trim().toLowerCase(), role: roleSchema });
export const endRoleSchema = z.object({ member: idSchema, role: roleSchema });
export type AddMember = z.output<typeof addMemberSchema>;
export type EndRole = z.output<typeof endRoleSchema>;

const end = z.number().nullable();
export const enterNumberSchema = z.object({
  item: idSchema,
  /** Number of the part, from 0. */
  part: z.number().int().min(0).max(19),
  /** Of a measure or torque, SI. */
  band: z
    .object({ min: end, max: end })
    .refine(
      (b) => (b.min !== null || b.max !== null) && (b.min ?? -Infinity) <= (b.max ?? Infinity),
      "Enter a band whose least is not above its most.",
    )
    .nullable()
    .default(null),
  /** Of a tick that refers to a maker's mark or instruction. */
  text: textSchema("Write what the maker says.", 400, 1).nullable().default(null),
  source: sourceSchema,
});
export type EnterNumber = z.output<typeof enterNumberSchema>;

export const confirmValueSchema = z.object({ key: z.string().min(1).max(40), value: z.number("Enter the value."), source: sourceSchema });
export type ConfirmValue = z.output<typeof confirmValueSchema>;
