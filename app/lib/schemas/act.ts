/** What the forms of every act share. Messages are shown beside the field, so each says what to write. */
import { z } from "zod";
import { SYSTEMS } from "#app/lib/template/types";

export const commandIdSchema = z.string().regex(/^[A-Za-z0-9_-]{16,64}$/, "The form has lost its number. Load the page again.");
export const idSchema = z.string().min(1, "Choose one.").max(64);
export const roleSchema = z.enum(["lead", "builder", "inspector", "crew"]);
export const reasonSchema = z.string().trim().min(3, "Say why, in a few words.").max(1000, "Use at most 1,000 characters.");
export const noteSchema = z.string().trim().max(2000, "Use at most 2,000 characters.").default("");
export const sourceSchema = z
  .string()
  .trim()
  .min(3, "Say where it was read, such as the manual and its page.")
  .max(200, "Use at most 200 characters.");
export const systemSchema = z.enum(SYSTEMS, "Choose a system.");
/** Crankshaft speed, 1/s. */
export const rotationSchema = z.number("Enter a speed.").positive("Enter a speed above zero.").max(500);
export const instantSchema = z.number("Enter a date and time.").int();
