/**
 * What the forms of every act share. Messages are shown beside the field, so each says what to write; an empty field of a page comes
 * as none at all, so every text names what is wrong with that too.
 */
import { z } from "zod";
import { isPlainText, NOT_PLAIN } from "#app/lib/schemas/plain-text";
import { SYSTEMS } from "#app/lib/template/types";

/** A text of at least `least` characters; `message` where it is missing or shorter. */
export const textSchema = (message: string, most: number, least = 3) =>
  z
    .string(message)
    .trim()
    .min(least, message)
    .max(most, `Use at most ${most.toLocaleString("en")} characters.`)
    .refine(isPlainText, NOT_PLAIN);

/** A text that may stay empty. */
export const freeTextSchema = (most: number) => textSchema("", most, 0).default("");

const LOST = "The form has lost its number. Load the page again.";
export const commandIdSchema = z.string(LOST).regex(/^[A-Za-z0-9_-]{16,64}$/, LOST);
export const idSchema = z.string("Choose one.").min(1, "Choose one.").max(64, "Choose one.");
export const roleSchema = z.enum(["lead", "builder", "inspector", "crew"], "Choose a role.");
export const reasonSchema = textSchema("Say why, in a few words.", 1000);
export const noteSchema = freeTextSchema(2000);
export const sourceSchema = textSchema("Say where it was read, such as the manual and its page.", 200);
export const systemSchema = z.enum(SYSTEMS, "Choose a system.");
/** Crankshaft speed, 1/s. */
export const rotationSchema = z.number("Enter a speed.").positive("Enter a speed above zero.").max(500);
export const instantSchema = z.number("Enter a date and time.").int();
