/**
 * Widths of text without a browser, so that server, tablet and dossier lay the Line out alike.
 * Advance widths of Inter at weight 720, hundredths of an em, from space to tilde, measured once from the font.
 */
const ADVANCE = [
  23, 32.9, 54.7, 64.7, 65.6, 100.8, 67.1, 33.3, 37.2, 37.2, 56.1, 67.7, 32.5, 46.5, 32.5, 38.7, 67.4, 42.8, 62.7, 64.4, 67.6, 62.1, 64.7,
  59.8, 64.8, 64.7, 32.5, 33.3, 67.7, 67.7, 67.7, 56.4, 101.9, 76.1, 66, 73.8, 71.9, 60.8, 58.6, 74.9, 74.3, 27.9, 58.3, 71.8, 56.4, 92.9,
  75.8, 76.8, 64.6, 77.3, 65.7, 65.6, 66.5, 72.8, 76.1, 105.7, 73.7, 72.9, 66.3, 37.2, 33.5, 37.2, 48.5, 47.8, 35.9, 57.9, 62.7, 58.5, 62.7,
  59.2, 35.4, 62.8, 62, 27, 27, 57.9, 27, 91.2, 62, 61, 62.7, 62.7, 41.2, 55.8, 35.5, 62, 59.7, 84.9, 57.7, 59.9, 56.7, 46.8, 37.2, 46.8,
  67.7,
];
/** Anything else, accented letters among them. */
const OTHER = 64;

/** Sizes of the Line's two texts, px at scale 1. */
export const NAME_PX = 16.5;
export const NOTE_PX = 15;

/** Width in px of one line of text at the given size. */
export function textWidth(text: string, px: number): number {
  let hundredths = 0;
  for (const sign of text) hundredths += ADVANCE[sign.charCodeAt(0) - 32] ?? OTHER;
  return (hundredths * px) / 100;
}

/** Greedy wrap at spaces into at most `lines` lines of `max` px; the last line takes the rest. */
export function wrap(text: string, px: number, max: number, lines = 2): string[] {
  const out = [""];
  for (const word of text.split(" ")) {
    const last = out.length - 1;
    const longer = out[last] ? `${out[last]} ${word}` : word;
    if (textWidth(longer, px) <= max || !out[last] || out.length === lines) out[last] = longer;
    else out.push(word);
  }
  return out;
}

/** The text, or as much of it as fits into `max` px with an ellipsis. */
export function clip(text: string, px: number, max: number): string {
  if (textWidth(text, px) <= max) return text;
  let kept = text;
  while (kept && textWidth(`${kept}…`, px) > max) kept = kept.slice(0, -1);
  return `${kept.trimEnd()}…`;
}
