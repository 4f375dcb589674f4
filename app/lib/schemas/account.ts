/** Forms about one's own account, invitations and the instance's people, and the choices in them. Pure. */
import { z } from "zod";
import { commandIdSchema, idSchema, roleSchema, textSchema } from "#app/lib/schemas/act";

export type RoleName = z.output<typeof roleSchema>;

export const ROLE_DOES: Record<RoleName, string> = {
  lead: "plans runs, calls GO, brings people in",
  builder: "does the work, signs for it",
  inspector: "checks the work of others, countersigns",
  crew: "stands at a run, answers the roll call",
};

/** Mails that can be switched off: about runs on which one holds no place, proofs that run out before a run, dates in the crib. */
export const MAIL_CHOICES = ["runs", "runs-out", "due"] as const;
export type MailChoice = (typeof MAIL_CHOICES)[number];

/** What a token of the API may do. */
export const SCOPES = ["read", "record"] as const;
export type Scope = (typeof SCOPES)[number];

/** For how long a token of the API is good, days. */
export const TOKEN_DAYS = ["30", "90", "365"] as const;

const addressSchema = (message: string) =>
  z
    .string(message)
    .trim()
    .toLowerCase()
    .max(254, "This address is too long.")
    .pipe(z.email("Enter an address such as name@field.example."))
    // One plain address: what the mail goes to, and nothing that could name a second one.
    .pipe(z.string().regex(/^[^\s,;:<>"()[\]\\@]+@[^\s,;:<>"()[\]\\@]+$/, "Enter an address such as name@field.example."));

const nameSchema = textSchema("Enter your name, as it is to stand under what you sign.", 80, 2);
/** Untouched: no trimming, no change of case. How long and how guessable is judged where it is set. */
const passwordSchema = z.string("Choose a password.").min(1, "Choose a password.").max(400, "Use a shorter password.");
const presentPassword = z
  .string("Enter your password: it shows that it is you.")
  .min(1, "Enter your password: it shows that it is you.")
  .max(400, "That is not your password.");

const PIN = "Choose a PIN of 6 digits or more.";
const pinFields = { pin: z.string(PIN).min(1, PIN).max(12, "Use 12 digits at most."), pinAgain: z.string("Enter the PIN once more.") };
/** The digits are never shown, so they are asked for twice. */
const samePin = {
  test: (form: { pin: string; pinAgain: string }) => form.pin === form.pinAgain,
  fault: { path: ["pinAgain"], message: "These are other digits than above. Enter the same PIN twice." },
};

export const inviteForm = z.object({
  commandId: commandIdSchema,
  email: addressSchema("Enter the mail address of whoever is to join."),
  role: z.enum(["lead", "builder", "inspector", "crew"], "Choose what they do here."),
});
export const invitationForm = z.object({ commandId: commandIdSchema, invitation: idSchema });
export const giveRoleForm = z.object({ commandId: commandIdSchema, member: idSchema, role: roleSchema });
export const leaveForm = z.object({ commandId: commandIdSchema });

/** Whoever joins without an account makes one. */
export const newPersonForm = z.object({ name: nameSchema, newPassword: passwordSchema, ...pinFields }).refine(samePin.test, samePin.fault);
export const firstPersonForm = z
  .object({ name: nameSchema, email: addressSchema("Enter your mail address."), newPassword: passwordSchema, ...pinFields })
  .refine(samePin.test, samePin.fault);

export const forgotForm = z.object({ email: addressSchema("Enter the mail address with which you sign in.") });
export const resetForm = z.object({ newPassword: passwordSchema });

export const passwordForm = z.object({ commandId: commandIdSchema, password: presentPassword, newPassword: passwordSchema });
export const addressForm = z.object({
  commandId: commandIdSchema,
  email: addressSchema("Enter your new mail address."),
  password: presentPassword,
});
export const pinForm = z
  .object({ commandId: commandIdSchema, password: presentPassword, ...pinFields })
  .refine(samePin.test, samePin.fault);
export const mailForm = z.object({ want: z.array(z.enum(MAIL_CHOICES)).default([]) });
export const sessionForm = z.object({ session: idSchema });

export const tokenForm = z.object({
  commandId: commandIdSchema,
  name: textSchema("Say what it is for, such as the display in the hangar.", 60, 2),
  may: z.enum(SCOPES, "Choose what it may do."),
  days: z.enum(TOKEN_DAYS, "Choose how long it is good for."),
  password: presentPassword,
});
export const endTokenForm = z.object({ token: idSchema });

export const personForm = z.object({ person: idSchema });
export const instanceMailForm = z.object({ mail: idSchema });
