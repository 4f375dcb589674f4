// Bearer secrets of links and programs: 256 random bits, of which only the SHA-256 is stored. A plain hash is enough for them: there
// is nothing in them to guess. Source: OWASP ASVS 5.0.0, 6.4.1 and 11.5.1.
import { createHash } from "node:crypto";

export const tokenHash = (token: string): string => createHash("sha256").update(token).digest("hex");

/** True for what `newToken` can have made. */
export const isToken = (text: string): boolean => /^[0-9A-Za-z]{43}$/.test(text);
