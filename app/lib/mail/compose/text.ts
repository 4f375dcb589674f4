/** A mail's page as plain text, complete in itself: lines of at most 72 characters, links and the hash on lines of their own. Pure. */
import type { MailPage, MailRow } from "#app/lib/mail/compose/page";

const WIDTH = 72;

/** Words broken into lines; the first begins with `first`, the others with `rest`. A word that fits no line is broken, a link is not. */
export function wrap(text: string, first = "", rest = first): string[] {
  const lines: string[] = [];
  let line = first;
  let bare = true;
  for (const word of text.split(" ").flatMap((w) => pieces(w, WIDTH - rest.length))) {
    if (!bare && line.length + 1 + word.length > WIDTH) {
      lines.push(line);
      line = rest;
      bare = true;
    }
    line += bare ? word : ` ${word}`;
    bare = false;
  }
  return [...lines, line];
}

function pieces(word: string, most: number): string[] {
  if (word.length <= most || /^https?:\/\//.test(word)) return [word];
  const out: string[] = [];
  let piece = "";
  for (const sign of word) {
    if (piece.length + sign.length > most) {
      out.push(piece);
      piece = "";
    }
    piece += sign;
  }
  return [...out, piece];
}

export function toText(page: MailPage): string {
  const lines = [
    ...wrap(page.reader),
    ...page.places.flatMap((p) => [...wrap(`${p.head}: ${p.text}`, "  "), ...wrap(p.note ?? "", "  ")]),
    "",
    ...wrap(`${page.word.toUpperCase()}. ${page.registration} ${page.what}`),
    ...page.lead.flatMap((l) => wrap(l)),
    ...(page.box ? ["", ...wrap(`${capital(page.box.label)} ${page.box.figure} ${page.box.unit}. ${page.box.note}`)] : []),
    ...stops(page),
    ...page.sections.flatMap((s) => ["", ...(s.title ? wrap(s.title.toUpperCase()) : []), ...s.rows.flatMap(row)]),
    ...(page.abort.length ? ["", "ABORT WORDS"] : []),
    ...page.abort.flatMap((a) => a.lines.flatMap((l, n) => (n === 0 ? wrap(l, `${a.word}: `, "  ") : wrap(l, "  - ", "    ")))),
    "",
    `${page.button.label}:`,
    page.button.href,
    "The board:",
    page.board,
    "",
    ...page.small.flatMap((s) => wrap(s)),
    "",
    page.record.line,
    page.record.hash,
  ];
  return `${lines.join("\n")}\n`;
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

function stops({ stops: list }: MailPage): string[] {
  if (!list.length) return [];
  return [
    "",
    "WHAT STOPS IT",
    ...list.flatMap((s, n) => [...wrap(s.title, `${n + 1}. `, "   "), ...wrap(s.sentence, "   "), ...wrap(s.onIt, "   ")]),
  ];
}

function row({ head, text, note }: MailRow): string[] {
  const numbered = /^\d+$/.test(head);
  const first = numbered ? `${head}. ` : "- ";
  const rest = " ".repeat(first.length);
  return [...wrap(numbered ? text : `${head}: ${text}`, first, rest), ...(note ? wrap(note, rest) : [])];
}
