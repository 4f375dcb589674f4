// Checks a record that was saved as JSON lines, without the application and without any package: Node.js alone.
//   node verify-record.mjs record.jsonl [--head <64 hex digits>]
// Each line is {"event": ..., "hash": "..."}. A line's hash is SHA-256 (FIPS 180-4) over the UTF-8 bytes of the canonical JSON
// (RFC 8785) of {"event": event, "prev": hash of the line before}; before the first line stand 64 zeros. The head is the last hash.
// A head that was mailed or printed earlier must be one of the hashes: else lines were cut off, or the whole record was written anew.
import { createHash } from "node:crypto";
import { readFileSync, realpathSync } from "node:fs";

/** Canonical JSON: keys sorted by UTF-16 code units, no white space, numbers and strings as ECMAScript writes them (RFC 8785, 3.2). */
const canonical = (x) => {
  if (Array.isArray(x)) return `[${x.map(canonical).join(",")}]`;
  if (x !== null && typeof x === "object")
    return `{${Object.keys(x)
      .sort()
      .map((key) => `${JSON.stringify(key)}:${canonical(x[key])}`)
      .join(",")}}`;
  return JSON.stringify(x);
};

/** @param {string} text */
export function verifyRecord(text) {
  const lines = text.split("\n");
  if (lines.at(-1) === "") lines.pop();
  const hashes = [];
  let before = null;
  for (const [n, line] of lines.entries()) {
    const broken = (why) => ({ ok: false, line: n + 1, why, hashes });
    let parsed;
    try {
      parsed = JSON.parse(line);
    } catch {
      return broken("is not JSON");
    }
    const event = parsed?.event;
    if (!event || typeof event !== "object" || typeof parsed.hash !== "string") return broken("is not a line of a record");
    if (event.seq !== n + 1) return broken(`carries number ${event.seq}: a line was taken out, added or moved`);
    if (before && event.install !== before.install) return broken("belongs to another install");
    if (before && event.recorded < before.recorded) return broken("was recorded before the line above it");
    const prev = hashes.at(-1) ?? "0".repeat(64);
    const hash = createHash("sha256").update(canonical({ event, prev }), "utf8").digest("hex");
    if (hash !== parsed.hash) return broken("does not match its hash: it, or the line above it, was changed");
    hashes.push(hash);
    before = event;
  }
  return { ok: true, hashes };
}

function main([file, ...options]) {
  if (!file) {
    console.error("Say which file: npm run verify-record -- record.jsonl [--head <the head that was mailed or printed>]");
    return 2;
  }
  const wanted = options[0] === "--head" ? (options[1] ?? "").toLowerCase() : null;
  let text;
  try {
    text = readFileSync(file, "utf8");
  } catch (error) {
    console.error(`The file cannot be read: ${error.message}`);
    return 2;
  }
  const found = verifyRecord(text);
  if (!found.ok) {
    console.log(`BROKEN. Line ${found.line} ${found.why}. The lines before it follow from each other.`);
    return 1;
  }
  if (!found.hashes.length) {
    console.log("EMPTY. The file holds no line.");
    return 1;
  }
  console.log(`WHOLE. ${found.hashes.length} lines follow from each other.\nHead ${found.hashes.at(-1)}`);
  if (wanted === null) {
    console.log("Compare the head with one that was mailed or printed earlier: only that shows that nobody wrote the whole record anew.");
    return 0;
  }
  const place = found.hashes.indexOf(wanted);
  if (place < 0) {
    console.log(`NOT THE SAME RECORD. No line has the hash ${wanted}: lines were cut off, or the whole record was written anew.`);
    return 1;
  }
  console.log(`The head you gave is that of line ${place + 1}: what was recorded up to there is what stands in this file.`);
  return 0;
}

if (process.argv[1] && import.meta.filename === realpathSync(process.argv[1])) process.exitCode = main(process.argv.slice(2));
