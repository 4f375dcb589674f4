// The sign-in form.
import { z } from "zod";

/** bcrypt reads 72 bytes: what is longer is refused in words, never cut. */
const withinBcrypt = (text: string) => new TextEncoder().encode(text).length <= 72;

/** Lower-cased address, and the password untouched: no trimming, no change of case. */
export const signInForm = z.object({
  email: z
    .string({ error: "Enter your e-mail address." })
    .trim()
    .toLowerCase()
    .max(254, "This address is too long.")
    .pipe(z.email("Enter an e-mail address such as name@field.example.")),
  password: z
    .string({ error: "Enter your password." })
    .min(1, "Enter your password.")
    .refine(withinBcrypt, "This password is longer than 72 bytes, which is as much as is checked. No account has one as long."),
  to: z.string().max(2000).optional(),
});
