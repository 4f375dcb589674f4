// The production server: files from build/client, everything else through the router. It refuses what no route should have
// to think about (odd methods, bodies without end, slow senders), compresses, logs one line a request and stops cleanly.
import { createServer } from "node:http";
import { fileURLToPath } from "node:url";
import { promisify } from "node:util";
import { gzip } from "node:zlib";
import { sendResponse } from "@remix-run/node-fetch-server";
import { BodyTooLarge, readRequest } from "./scripts/read-request.mjs";
import { serveFiles } from "./scripts/serve-files.mjs";

process.env.NODE_ENV ??= "production";
const build = await import("./build/server/index.js").catch((error) => {
  // A setting that cannot be used, or no build: said before there is a log.
  console.error(`Cannot start. ${error.message}`);
  process.exit(78);
});
const { boot, createRequestHandler, env, log, newRequestFacts, requestContext, RouterContextProvider, setSecurityHeaders } =
  build.entry.module;
const handle = createRequestHandler(build, env.mode);
const serveFile = serveFiles(fileURLToPath(new URL("./build/client", import.meta.url)), env);
const compress = promisify(gzip);
const methods = ["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE"];

/** A plain refusal with the same headers as any page. */
function refuse(status, sentence, headers = {}) {
  const response = new Response(`${sentence}\n`, { status, headers: { "Content-Type": "text/plain; charset=utf-8", ...headers } });
  setSecurityHeaders(response.headers, "none", { development: false, https: env.https });
  return response;
}

/** The visitor's address. The header counts only when our own proxy sets it; its last entry is the one that the proxy added. */
function addressOf(req) {
  const forwarded = env.trustProxy
    ? String(req.headers["x-forwarded-for"] ?? "")
        .split(",")
        .at(-1)
        ?.trim()
    : "";
  return forwarded || req.socket.remoteAddress || "unknown";
}

async function answer(req, res, facts) {
  if (!methods.includes(req.method)) return refuse(405, `The method ${req.method} is not used here.`, { Allow: methods.join(", ") });
  const close = { Connection: "close" };
  let read;
  try {
    read = readRequest(req, res, env.appOrigin);
  } catch (error) {
    return error instanceof BodyTooLarge
      ? refuse(413, error.message, close)
      : refuse(400, "This is not an address that can be read.", close);
  }
  const context = new RouterContextProvider();
  context.set(requestContext, facts);
  const response = await handle(read.request, context);
  const overrun = read.overrun();
  return overrun ? refuse(413, overrun.message, close) : response;
}

/** Pages and data of more than 1 kB go out compressed; streams (live events, files) are passed on as they are. */
async function packed(req, response) {
  const whole = /^(text\/html|application\/json|text\/x-script)/.test(response.headers.get("Content-Type") ?? "");
  if (!response.body || !whole || response.headers.has("Content-Encoding")) return response;
  const body = Buffer.from(await response.arrayBuffer());
  const headers = new Headers(response.headers);
  headers.append("Vary", "Accept-Encoding");
  const plain = body.byteLength <= 1024 || !/\bgzip\b/.test(String(req.headers["accept-encoding"] ?? ""));
  const sent = plain ? body : await compress(body, { level: 5 });
  if (!plain) headers.set("Content-Encoding", "gzip");
  headers.set("Content-Length", String(sent.byteLength));
  return new Response(sent, { status: response.status, headers });
}

/** The path for the log: tokens of links (43 letters and digits) are secrets, queries may hold names. */
const loggedPath = (url) => url.split("?", 1)[0].replaceAll(/[0-9A-Za-z]{43}/g, ":token");

async function respond(req, res) {
  const began = performance.now();
  const facts = newRequestFacts(addressOf(req));
  let response;
  try {
    response = await packed(req, await answer(req, res, facts));
  } catch (error) {
    log.error({ err: error, trace: facts.traceId }, "a request failed outside every route");
    response = refuse(500, `The server failed to answer. The fault is ours; its number in the log is ${facts.traceId}.`);
  }
  const ms = Math.round(performance.now() - began);
  log.info({ trace: facts.traceId, method: req.method, path: loggedPath(req.url), status: response.status, ms }, "request");
  try {
    await sendResponse(res, response);
  } catch {
    res.destroy();
  }
}

const server = createServer((req, res) => {
  if (!serveFile(req, res)) void respond(req, res);
});
// 20 MB over a poor hangar link take their time; a sender of one byte a second does not get for ever.
server.headersTimeout = 15_000;
server.requestTimeout = 180_000;
server.keepAliveTimeout = 20_000;
server.on("clientError", (error, socket) => {
  if (error.code === "ECONNRESET" || !socket.writable) return socket.destroy();
  const status = { ERR_HTTP_REQUEST_TIMEOUT: "408 Request Timeout", HPE_HEADER_OVERFLOW: "431 Request Header Fields Too Large" }[
    error.code
  ];
  socket.end(`HTTP/1.1 ${status ?? "400 Bad Request"}\r\nConnection: close\r\nContent-Length: 0\r\n\r\n`);
});

/** What cannot start says why in one sentence and leaves with 78 (EX_CONFIG of sysexits.h), so that a supervisor need not try again. */
function giveUp(sentence) {
  log.fatal(sentence);
  process.exit(78);
}

// The last resort: what nobody caught is logged, and a process whose state is unknown makes room for a new one.
process.on("uncaughtException", (error) => {
  log.fatal({ err: error }, "an error that nothing caught");
  process.exit(1);
});

const stopWork = await boot().catch((error) => giveUp(`Cannot start. ${error.message}`));
server.on("error", (error) => {
  if (error.code === "EADDRINUSE") giveUp(`Port ${env.port} of ${env.host} is in use by another program. Set PORT to a free one.`);
  giveUp(`Cannot listen on ${env.host} port ${env.port}. ${error.message}`);
});
server.listen(env.port, env.host, () => {
  log.info({ address: `http://${env.host}:${server.address().port}`, origin: env.appOrigin }, "Bladecount is ready");
});

let stopping = false;
for (const signal of ["SIGTERM", "SIGINT"]) {
  process.on(signal, async () => {
    if (stopping) return;
    stopping = true;
    // No new requests; those under way get two seconds, then live streams are cut. Tablets reconnect.
    const closed = new Promise((done) => server.close(done));
    setTimeout(() => server.closeAllConnections(), 2_000).unref();
    await Promise.all([closed, stopWork()]);
    log.info("stopped");
    process.exit(0);
  });
}
