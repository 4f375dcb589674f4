// From Node's request to the standard one. The body keeps its brakes on (a slow reader slows the sender), has a limit that is
// counted and not only believed, and may be left half read by whoever refuses it.
import { Readable, Transform } from "node:stream";
import { createHeaders } from "@remix-run/node-fetch-server";

const megabyte = 1024 * 1024;

/** Most bytes of a request's body: an upload of photos, or a form. */
export function bodyLimit(type) {
  return type.startsWith("multipart/form-data") ? 20 * megabyte : megabyte;
}

export class BodyTooLarge extends Error {
  name = "BodyTooLarge";

  /** @param {number} limit bytes */
  constructor(limit) {
    super(
      `What was sent is larger than ${limit / megabyte} MB, which is the most that is taken here. Nothing was saved; send less at once.`,
    );
  }
}

/**
 * Throws BodyTooLarge when the sender says so itself, another error when the address cannot be read. `overrun()` of the answer is
 * that error once a body of unknown length has passed its limit.
 * @param {import("node:http").IncomingMessage} req
 * @param {import("node:http").ServerResponse} res
 * @param {string | undefined} origin the public address, when a proxy in front ends TLS
 */
export function readRequest(req, res, origin) {
  const url = new URL(`${origin ?? `http://${req.headers.host}`}${req.url}`);
  decodeURI(url.pathname);
  const limit = bodyLimit(req.headers["content-type"] ?? "");
  if (Number(req.headers["content-length"] ?? 0) > limit) throw new BodyTooLarge(limit);

  const gone = new AbortController();
  res.once("close", () => {
    if (!res.writableFinished) gone.abort();
  });
  const init = { method: req.method, headers: createHeaders(req), signal: gone.signal };
  if (req.method === "GET" || req.method === "HEAD") return { request: new Request(url, init), overrun: () => undefined };

  /** @type {BodyTooLarge | undefined} */
  let overrun;
  let seen = 0;
  const counter = new Transform({
    transform(chunk, _encoding, done) {
      seen += chunk.byteLength;
      if (seen > limit) overrun = new BodyTooLarge(limit);
      done(overrun, overrun ? undefined : chunk);
    },
  });
  const letRestGo = () => {
    req.unpipe(counter);
    req.resume();
  };
  // A reader that stopped, or a body over its limit, ends the counter and never the process.
  counter.on("error", letRestGo);
  counter.on("close", letRestGo);
  res.once("finish", letRestGo);
  req.on("error", (error) => counter.destroy(error));
  req.on("close", () => {
    if (!req.complete) counter.destroy();
  });
  req.pipe(counter);
  return { request: new Request(url, { ...init, body: Readable.toWeb(counter), duplex: "half" }), overrun: () => overrun };
}
