/** A mail about an account or an invitation: a few sentences, one link, small print. Text and HTML say the same. Pure. */
import { escapeHtml as e, mailButton, PAINT } from "#app/lib/mail/compose/html";
import { wrap } from "#app/lib/mail/compose/text";
import { cut, oneLine } from "#app/lib/mail/compose/words";

export interface Letter {
  subject: string;
  /** Whom it is for: "Ada Quill", or an address. */
  reader: string;
  /** The first sentence is the heavy one. */
  lead: string[];
  rows?: { head: string; text: string }[];
  button?: { label: string; href: string };
  /** Small print, each a paragraph. */
  small: string[];
}

export interface LetterText {
  subject: string;
  text: string;
  html: string;
}

/** @returns subject (one line), text (lines of at most 72 characters but for the link) and HTML. */
export function composeLetter(letter: Letter): LetterText {
  const plain: Letter = {
    subject: cut(oneLine(letter.subject), 150),
    reader: oneLine(letter.reader),
    lead: letter.lead.map(oneLine),
    rows: letter.rows?.map(({ head, text }) => ({ head, text: oneLine(text) })),
    button: letter.button,
    small: letter.small.map(oneLine),
  };
  return { subject: plain.subject, text: textOf(plain), html: htmlOf(plain) };
}

function textOf({ reader, lead, rows = [], button, small }: Letter): string {
  const lines = [
    ...wrap(`${reader},`),
    "",
    ...lead.flatMap((l) => wrap(l)),
    ...(rows.length ? [""] : []),
    ...rows.flatMap(({ head, text }) => wrap(`${head}: ${text}`, "- ", "  ")),
    ...(button ? ["", `${button.label}:`, button.href] : []),
    ...small.flatMap((s) => ["", ...wrap(s)]),
  ];
  return `${lines.join("\n")}\n`;
}

function htmlOf({ subject, reader, lead, rows = [], button, small }: Letter): string {
  const { ink, ink2, ground, line, read, dark } = PAINT;
  const says = (text: string, n: number) =>
    `<p class="t" style="margin:0 0 8px;font:${n === 0 ? 700 : 400} 20px/1.4 ${read};color:${ink}">${e(text)}</p>`;
  const row = ({ head, text }: { head: string; text: string }) =>
    `<tr><th scope="row" align="left" valign="top" class="u r" style="font:600 15px/1.4 ${read};color:${ink2};padding:9px 12px 9px 0;border-top:1px solid ${line};width:112px">${e(head)}</th><td valign="top" class="t r" style="font:400 17px/1.4 ${read};color:${ink};padding:8px 0;border-top:1px solid ${line}">${e(text)}</td></tr>`;
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1">
<meta name="color-scheme" content="light dark"><meta name="supported-color-schemes" content="light dark">
<title>${e(subject)}</title><style>:root{color-scheme:light dark}${dark}</style></head>
<body class="g" style="margin:0;padding:0;background:${ground}">
<table role="presentation" class="g" width="100%" cellpadding="0" cellspacing="0" style="background:${ground}"><tr><td align="center">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="max-width:600px;text-align:left;table-layout:fixed;word-wrap:break-word;overflow-wrap:anywhere">
<tr><td style="padding:24px 20px 4px"><p class="u" style="margin:0 0 14px;font:400 17px/1.4 ${read};color:${ink2}">${e(reader)},</p>${lead.map(says).join("")}</td></tr>
${rows.length ? `<tr><td style="padding:8px 20px"><table width="100%" cellpadding="0" cellspacing="0">${rows.map(row).join("")}</table></td></tr>` : ""}
${button ? `<tr><td style="padding:14px 20px 10px">${mailButton(button)}</td></tr>` : ""}
<tr><td style="padding:10px 20px 30px">${small.map((s) => `<p class="u" style="margin:0 0 12px;font:400 15px/1.5 ${read};color:${ink2}">${e(s)}</p>`).join("")}</td></tr>
</table></td></tr></table></body></html>
`;
}
