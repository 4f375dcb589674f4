/**
 * A mail's page as HTML: inline styles, tables only where mail programs need them, nothing fetched from anywhere, light and dark
 * by the reader's own setting. Every text is escaped here and nowhere else. Pure.
 */
import type { MailPage, MailRow } from "#app/lib/mail/compose/page";
import { small } from "#app/lib/mail/compose/words";

/** Paint as in the product's tokens. The dark ones stand in the style element, by class. */
const ink = "#161510";
const ink2 = "#45423a";
const ground = "#f4f0e6";
const plate = "#fcfaf4";
const line = "#7b7668";
const read = "Inter,'Helvetica Neue',Helvetica,Arial,sans-serif";
const figures = "'B612 Mono',Menlo,Consolas,monospace";

const DARK = `@media (prefers-color-scheme:dark){
.g{background:#0e0f0c!important}.t{color:#f3efe2!important}.u{color:#c4bfb0!important}
.b{background:#181a15!important;border-color:#f3efe2!important}.r{border-color:#8b8778!important}
.p{border-color:#9c988a!important}.e{background:#0e0f0c!important}.w{background:#3b1012!important;border-color:#ff8a80!important}.s{color:#ffa79e!important}
.f{background:#8fb3ff!important;border-color:#6f97ef!important;color:#050b1c!important}.k{background:#ff8a80!important}}`;

/** For mails of another make. */
export const PAINT = { ink, ink2, ground, line, read, dark: DARK };

/** The one thing to press in a mail: a fitting, as on the screen. */
export const mailButton = ({ label, href }: { label: string; href: string }): string =>
  `<a class="f" href="${escapeHtml(href)}" style="display:block;background:#173f9f;border:0 solid #0f2d76;border-width:0 14px;color:#fff;font:700 20px/1.3 ${read};text-decoration:none;padding:20px">${escapeHtml(label)}</a>`;

/** Text as HTML text or as a double-quoted attribute. */
export const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (c) => ({ "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;", "'": "&#39;" })[c] ?? c);

const e = escapeHtml;
const big = (text: string, heavy: boolean) =>
  `<p class="t" style="margin:0 0 6px;font:${heavy ? 700 : 400} 21px/1.35 ${read};color:${ink}">${e(text)}</p>`;

export function toHtml(page: MailPage): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1">
<meta name="color-scheme" content="light dark"><meta name="supported-color-schemes" content="light dark">
<title>${e(page.subject)}</title><style>:root{color-scheme:light dark}${DARK}</style></head>
<body class="g" style="margin:0;padding:0;background:${ground}">
<div style="display:none;max-height:0;overflow:hidden">${e(page.preview)}</div>
<table role="presentation" class="g" width="100%" cellpadding="0" cellspacing="0" style="background:${ground}"><tr><td align="center">
<table role="presentation" width="100%" cellpadding="0" cellspacing="0" style="max-width:600px;text-align:left;table-layout:fixed;word-wrap:break-word;overflow-wrap:anywhere">
<tr><td style="padding:20px 20px 4px">
<p class="u" style="margin:0;font:400 15px/1.4 ${read};color:${ink2}"><b class="t" style="font:700 19px/1.2 ${figures};color:${ink}">${e(page.registration)}</b>&nbsp; ${e(page.what)}</p>
<h1 class="t" style="margin:8px 0 10px;font:700 56px/1 ${read};letter-spacing:-2px;color:${ink}">${e(page.word)}</h1></td></tr>
<tr><td>${pipe(page)}</td></tr>
<tr><td style="padding:14px 20px 6px">${big(page.reader, true)}${places(page)}</td></tr>
<tr><td style="padding:6px 20px 12px">${page.lead.map((l, n) => big(l, n === 0)).join("")}</td></tr>
${box(page)}${stops(page)}${page.sections.map(section).join("\n")}
${abortOf(page)}
<tr><td style="padding:24px 20px 10px">${mailButton(page.button)}</td></tr>
<tr><td style="padding:8px 20px 30px">${page.small.map(smallPrint).join("")}${record(page)}</td></tr>
</table></td></tr></table></body></html>
`;
}

const smallPrint = (text: string) => `<p class="u" style="margin:0 0 12px;font:400 15px/1.5 ${read};color:${ink2}">${e(text)}</p>`;

function record({ record: r }: MailPage): string {
  return `<p class="u" style="margin:0;font:400 13px/1.5 ${read};color:${ink2}">${e(r.line)}<br><span style="font-family:${figures};font-size:12px;word-break:break-all">${e(r.hash)}</span></p>`;
}

function pipe({ pipe: { fill, spade } }: MailPage): string {
  const edge = `border-top:2px solid ${ink2};border-bottom:2px solid ${ink2}`;
  const cell = (width: number, paint: string, look: string) =>
    width <= 0
      ? ""
      : `<td class="${look}" width="${width}%" height="14" style="height:14px;font-size:0;line-height:0;background:${paint};${edge}">&nbsp;</td>`;
  const full = Math.round(fill * 100);
  return `<table role="presentation" width="100%" cellpadding="0" cellspacing="0"><tr>${cell(full, "#b3c23a", "p")}${spade ? cell(2, "#a30f18", "p k") : ""}${cell(100 - full - (spade ? 2 : 0), plate, "p e")}</tr></table>`;
}

function places({ places: rows }: MailPage): string {
  return rows
    .map(
      (p) =>
        `<p class="t" style="margin:0 0 8px;font:400 17px/1.45 ${read};color:${ink}"><b>${e(p.head)}.</b> ${e(p.text)}${p.note ? ` ${e(p.note)}` : ""}</p>`,
    )
    .join("");
}

function framed(inner: string): string {
  return `<tr><td style="padding:0 20px 14px"><table role="presentation" width="100%" cellpadding="0" cellspacing="0"><tr><td class="b" style="background:${plate};border:2px solid ${ink};padding:14px 16px">${inner}</td></tr></table></td></tr>`;
}

function box({ box: b }: MailPage): string {
  if (!b) return "";
  return framed(
    `<div class="u" style="font:600 15px/1.4 ${read};color:${ink2}">${e(b.label)}</div><div class="t" style="font:700 40px/1.1 ${figures};letter-spacing:-2px;color:${ink}">${e(b.figure)}<span style="font-size:20px;font-weight:400;letter-spacing:0"> ${e(b.unit)}</span></div><div class="u" style="font:400 15px/1.45 ${read};color:${ink2};padding-top:4px">${e(b.note)}</div>`,
  );
}

function stops({ stops: list }: MailPage): string {
  if (!list.length) return "";
  const items = list.map(
    (s, n) =>
      `<p class="t" style="margin:${n ? 14 : 0}px 0 0;font:400 17px/1.45 ${read};color:${ink}"><b>${n + 1}&nbsp; ${e(s.title)}</b><br>${e(s.sentence)}<br><span class="u" style="color:${ink2}">${e(s.onIt)}</span></p>`,
  );
  return framed(items.join(""));
}

function section({ title, rows }: MailPage["sections"][number]): string {
  const head = title ? `<h2 class="t" style="margin:0 0 4px;font:700 20px/1.3 ${read};color:${ink}">${e(title)}</h2>` : "";
  return `<tr><td style="padding:16px 20px 0">${head}<table width="100%" cellpadding="0" cellspacing="0">${rows.map(tableRow).join("")}</table></td></tr>`;
}

function tableRow({ head, text, note, you }: MailRow): string {
  const wide = /^\d+$/.test(head) ? 26 : 112;
  const said = you ? `<b>${e(text)}</b>` : e(text);
  return `<tr><th scope="row" align="left" valign="top" class="u r" style="font:600 15px/1.4 ${read};color:${ink2};padding:9px 12px 9px 0;border-top:1px solid ${line};width:${wide}px">${e(head)}</th><td valign="top" class="t r" style="font:400 17px/1.4 ${read};color:${ink};padding:8px 0;border-top:1px solid ${line}">${said}${note ? `<br><span class="u" style="font-size:15px;color:${ink2}">${e(note)}</span>` : ""}</td></tr>`;
}

/** "throttle shut, for any of these: oil pressure late; rough running." */
const sentence = ([first = "", ...others]: string[]) =>
  `${first}${others.length ? `${first.endsWith("any of these") ? ": " : "; "}${others.map(small).join("; ")}` : ""}.`;

function abortOf({ abort }: MailPage): string {
  if (!abort.length) return "";
  const parts = abort.map(
    (a, n) =>
      `<p class="t" style="margin:${n ? 12 : 0}px 0 0;font:400 17px/1.45 ${read};color:${ink}"><b class="s" style="color:#860a13">${e(a.word)}:</b> ${e(sentence(a.lines))}</p>`,
  );
  return `<tr><td style="padding:20px 20px 0"><table role="presentation" width="100%" cellpadding="0" cellspacing="0"><tr><td class="w" style="background:#f7d9d4;border-left:8px solid #a30f18;padding:14px 16px">${parts.join("")}</td></tr></table></td></tr>`;
}
