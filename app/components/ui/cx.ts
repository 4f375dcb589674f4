/** Joins class names, leaving out what is off. */
export const cx = (...names: (string | false | 0 | null | undefined)[]) => names.filter(Boolean).join(" ");
