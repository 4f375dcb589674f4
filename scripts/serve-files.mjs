// The files of build/client, known by name at start: a path that is not in the list is not a file, so none can climb out.
import { createReadStream, readdirSync, statSync } from "node:fs";
import { extname, join, relative, sep } from "node:path";

const types = {
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".json": "application/json; charset=utf-8",
  ".webmanifest": "application/manifest+json; charset=utf-8",
  ".svg": "image/svg+xml",
  ".png": "image/png",
  ".ico": "image/x-icon",
  ".woff2": "font/woff2",
  ".txt": "text/plain; charset=utf-8",
};

/** How long a browser may keep a file: one with a hash in its name for ever; the service worker is asked for each time. */
function keepFor(url) {
  if (url.startsWith("/assets/")) return "public, max-age=31536000, immutable";
  return /\.(js|webmanifest)$/.test(url) ? "no-cache" : "public, max-age=3600";
}

/**
 * Returns a function that answers a GET or HEAD of a file, and says whether it did.
 * @param {string} root folder
 * @param {{ https: boolean }} options
 */
export function serveFiles(root, { https }) {
  const files = new Map();
  for (const entry of readdirSync(root, { recursive: true, withFileTypes: true })) {
    if (!entry.isFile()) continue;
    const path = join(entry.parentPath, entry.name);
    const url = `/${relative(root, path).split(sep).join("/")}`;
    if (!url.startsWith("/.vite/")) files.set(url, { path, size: statSync(path).size });
  }

  /** @param {import("node:http").IncomingMessage} req @param {import("node:http").ServerResponse} res */
  return function serveFile(req, res) {
    const url = (req.url ?? "/").split("?", 1)[0] ?? "/";
    const file = req.method === "GET" || req.method === "HEAD" ? files.get(url) : undefined;
    if (!file) return false;
    const accepts = String(req.headers["accept-encoding"] ?? "");
    const [encoding, ending] =
      [
        ["br", ".br"],
        ["gzip", ".gz"],
      ].find(([name, end]) => files.has(url + end) && new RegExp(`\\b${name}\\b`).test(accepts)) ?? [];
    const chosen = ending ? files.get(url + ending) : file;
    res.writeHead(200, {
      "Content-Type": types[/** @type {keyof typeof types} */ (extname(url))] ?? "application/octet-stream",
      "Content-Length": chosen.size,
      "Cache-Control": keepFor(url),
      "X-Content-Type-Options": "nosniff",
      "Cross-Origin-Resource-Policy": "same-origin",
      // A drawing opened by itself is a page of ours; nothing in it may run.
      "Content-Security-Policy": "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'none'",
      ...(https ? { "Strict-Transport-Security": "max-age=63072000; includeSubDomains" } : {}),
      ...(encoding ? { "Content-Encoding": encoding } : {}),
      ...(files.has(`${url}.gz`) ? { Vary: "Accept-Encoding" } : {}),
    });
    if (req.method === "HEAD") res.end();
    else {
      createReadStream(chosen.path)
        .on("error", () => res.destroy())
        .pipe(res);
    }
    return true;
  };
}
