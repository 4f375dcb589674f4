/**
 * Text that reads as it is stored: no control characters but tab and line ends, and none that turn the direction of the text round
 * (U+202A to U+202E, U+2066 to U+2069), which could make a name or a reason read as another. Source: Unicode UAX #9, 2.1 and 2.2.
 */

const HIDDEN = /[^\P{Cc}\t\n\r]|[\u202A-\u202E\u2066-\u2069]/u;

export const NOT_PLAIN = "There is a character in it that cannot be seen, often one that was copied along. Type the text by hand.";

export const isPlainText = (text: string): boolean => !HIDDEN.test(text);

/** Plain text all through: every text of a list or an object, however deep. */
export function isPlain(value: unknown): boolean {
  if (typeof value === "string") return isPlainText(value);
  return typeof value !== "object" || value === null || Object.values(value).every(isPlain);
}
