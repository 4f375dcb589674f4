// The pages of the mail fake. Plain HTML, newest first; everything that came by mail is escaped.

/** @typedef {import("./mail-fake.mjs").Message} Message */

const entities = { "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;", "'": "&#39;" };
/** @param {string} text */
const esc = (text) => text.replace(/[&<>"']/g, (c) => entities[/** @type {keyof typeof entities} */ (c)]);

const style = `:root{color-scheme:light dark;font:17px/1.5 system-ui,sans-serif}body{max-width:66rem;margin:0 auto;padding:1.5rem}
h1{font-size:1.9rem;letter-spacing:-.02em}table{width:100%;border-collapse:collapse}td,th{text-align:left;padding:.6rem .8rem;border-bottom:1px solid;vertical-align:top}
a{color:inherit}pre{white-space:pre-wrap;border:1px solid;padding:1rem;overflow-wrap:anywhere}iframe{width:100%;height:40rem;border:1px solid;background:#fff}`;

/** @param {string} title @param {string} body */
const page = (title, body) =>
  `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${esc(title)}</title><style>${style}</style></head><body>${body}</body></html>`;

/** @param {Message[]} messages */
export function inboxPage(messages) {
  const rows = [...messages]
    .reverse()
    .map(
      (m) =>
        `<tr><td style="white-space:nowrap">${esc(m.date.replace("T", " ").slice(0, 16))}</td><td>${esc(m.to.join(", "))}</td><td><a href="/messages/${esc(m.id)}">${esc(m.subject || "(no subject)")}</a></td><td>${m.attachments.length || ""}</td></tr>`,
    );
  const list = rows.length
    ? `<table><thead><tr><th>Time (UTC)</th><th>To</th><th>Subject</th><th>Files</th></tr></thead><tbody>${rows.join("")}</tbody></table>`
    : "<p>No mail yet. What the program sends appears here; reload to look again.</p>";
  return page(
    "Inbox of the mail fake",
    `<h1>Inbox of the mail fake</h1><p>Nothing here was delivered to anyone. <a href="/messages.json">As JSON</a></p>${list}`,
  );
}

/** @param {Message} message */
export function messagePage(message) {
  const files = message.attachments.map(
    (a, i) =>
      `<li><a href="/messages/${esc(message.id)}/${i}">${esc(a.name)}</a> ${esc(a.type)}${a.method ? `, ${esc(a.method)}` : ""}</li>`,
  );
  const html = message.html
    ? `<h2>HTML</h2><iframe sandbox title="The mail as HTML" src="/messages/${esc(message.id)}/html"></iframe>`
    : "";
  const headers = message.headers.map((h) => `${h.name}: ${h.value}`).join("\n");
  return page(
    message.subject,
    `<p><a href="/">Inbox</a></p><h1>${esc(message.subject || "(no subject)")}</h1><p>To ${esc(message.to.join(", "))}</p>
${files.length ? `<h2>Files</h2><ul>${files.join("")}</ul>` : ""}<h2>Text</h2><pre>${esc(message.text)}</pre>${html}<h2>Headers</h2><pre>${esc(headers)}</pre>`,
  );
}
