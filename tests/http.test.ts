import { createServer, request as httpRequest, type IncomingMessage } from "node:http";
import type { AddressInfo } from "node:net";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { steadyClock } from "#app/lib/clock";
import { readEnv } from "#app/lib/env.server";
import { contentSecurityPolicy, setSecurityHeaders } from "#app/lib/http/headers.server";
import { refuseForeignWrite } from "#app/lib/http/origin";
import { returnPath } from "#app/lib/http/return-path";
import { BodyTooLarge, bodyLimit, readRequest } from "../scripts/read-request.mjs";

describe("a write", () => {
  const ask = (method: string, headers: Record<string, string>) =>
    refuseForeignWrite({ method, url: "https://board.example/theme", headers: new Headers(headers) });

  it.each(["POST", "PUT", "PATCH", "DELETE", "post"])("by %s is taken from our own origin only", (method) => {
    expect(ask(method, { Origin: "https://board.example" })).toBeNull();
    for (const origin of [
      "http://board.example",
      "https://board.example:8443",
      "https://evil.example",
      "https://board.example.evil.example",
      "null",
    ]) {
      expect(ask(method, { Origin: origin })).toContain("another site");
    }
    expect(ask(method, {})).toContain("does not say");
  });

  it("with a bearer token needs no origin, and reading never does", () => {
    expect(ask("POST", { Authorization: "Bearer x" })).toBeNull();
    expect(ask("POST", { Authorization: "Basic x" })).not.toBeNull();
    expect(ask("GET", { Origin: "https://evil.example" })).toBeNull();
  });
});

describe("the way back after signing in", () => {
  it.each(["/hangar", "/installs/a/gates/b?open=1#item-2", "/"])("may be %s", (path) => {
    expect(returnPath(path, "/x")).toBe(path);
  });
  it.each([
    "//evil.example",
    "/\\evil.example",
    "\\\\evil.example",
    "https://evil.example/",
    "javascript:alert(1)",
    "evil.example",
    "/\t/evil.example",
    "/\n//evil.example",
    "",
    null,
    undefined,
  ])("is never %j", (path) => {
    expect(returnPath(path, "/x")).toBe("/x");
  });
});

describe("security headers", () => {
  const set = (https: boolean, given: Record<string, string> = {}) => {
    const headers = new Headers(given);
    setSecurityHeaders(headers, "n1", { development: false, https });
    return headers;
  };

  it("let scripts and style elements run by nonce only, and nobody frame a page", () => {
    const policy = contentSecurityPolicy("n1", { development: false, https: true }).split("; ");
    expect(policy).toContain("script-src 'self' 'nonce-n1'");
    expect(policy).toContain("style-src 'self' 'nonce-n1'");
    expect(policy).toEqual(
      expect.arrayContaining([
        "default-src 'self'",
        "frame-ancestors 'none'",
        "object-src 'none'",
        "base-uri 'none'",
        "form-action 'self'",
      ]),
    );
    expect(policy.filter((p) => p.includes("unsafe-inline"))).toEqual(["style-src-attr 'unsafe-inline'"]);
  });

  it("promise https for two years where there is https, and nothing where there is not", () => {
    expect(set(true).get("Strict-Transport-Security")).toBe("max-age=63072000; includeSubDomains");
    expect(set(false).has("Strict-Transport-Security")).toBe(false);
  });

  it("leave a stricter policy of a route as it is", () => {
    expect(set(true, { "Content-Security-Policy": "sandbox" }).get("Content-Security-Policy")).toBe("sandbox");
    expect(set(true).get("X-Content-Type-Options")).toBe("nosniff");
    expect(set(true).get("Cache-Control")).toBe("no-store");
  });
});

describe("settings", () => {
  it("have defaults for everything", () => {
    expect(readEnv({})).toMatchObject({
      host: "127.0.0.1",
      port: 3000,
      https: false,
      trustProxy: false,
      hashCost: 12,
      baseUrl: "http://127.0.0.1:3000",
    });
  });
  it("know https from the public address", () => {
    expect(readEnv({ APP_ORIGIN: "https://board.example/" })).toMatchObject({
      appOrigin: "https://board.example",
      https: true,
      baseUrl: "https://board.example",
    });
  });
  it.each([{ PORT: "high" }, { APP_ORIGIN: "board.example" }, { APP_ORIGIN: "ftp://board.example" }, { TRUST_PROXY: "yes" }])(
    "refuse %j and name it",
    (source) => {
      expect(() => readEnv(source)).toThrow(Object.keys(source)[0]);
    },
  );
});

it("server time holds still while the clock behind it goes back", () => {
  const raw = [5, 9, 3, 8, 12];
  const clock = steadyClock(() => raw.shift() ?? 0);
  expect([1, 2, 3, 4, 5].map(() => clock.now())).toEqual([5, 9, 9, 9, 12]);
});

describe("a request's body", () => {
  let take: (request: Request, overrun: () => BodyTooLarge | undefined) => Promise<string>;
  const server = createServer(async (req, res) => {
    try {
      const { request, overrun } = readRequest(req, res, undefined);
      res.end(await take(request, overrun));
    } catch (error) {
      res.writeHead(error instanceof BodyTooLarge ? 413 : 400, { Connection: "close" }).end(error instanceof Error ? error.message : "");
    }
  });
  beforeEach(() => new Promise<void>((ready) => server.listen(0, "127.0.0.1", ready)));
  afterEach(
    () =>
      new Promise((done) => {
        server.close(done);
        server.closeAllConnections();
      }),
  );

  /** Sends a body in pieces of 64 kB, without saying how long it is unless told to. */
  function send(bytes: number, headers: Record<string, string> = {}, path = "/"): Promise<{ status: number; text: string }> {
    return new Promise((resolve, reject) => {
      const req = httpRequest(
        { port: (server.address() as AddressInfo).port, host: "127.0.0.1", method: "POST", path, headers },
        async (res: IncomingMessage) => {
          let text = "";
          for await (const piece of res) text += piece;
          resolve({ status: res.statusCode ?? 0, text });
        },
      );
      // A server that refuses early may hang up while we still send.
      req.on("error", (error: NodeJS.ErrnoException) =>
        error.code === "EPIPE" || error.code === "ECONNRESET" ? undefined : reject(error),
      );
      for (let left = bytes; left > 0; left -= 65_536) req.write(Buffer.alloc(Math.min(left, 65_536)));
      req.end();
    });
  }
  const mb = 1024 * 1024;
  const length = async (request: Request) => String((await request.arrayBuffer()).byteLength);

  it("comes through whole up to its limit", async () => {
    take = length;
    expect(await send(mb)).toEqual({ status: 200, text: String(mb) });
    expect(await send(3 * mb, { "Content-Type": "multipart/form-data; boundary=b" })).toEqual({ status: 200, text: String(3 * mb) });
  });

  it("is refused before it is read when it says that it is too long", async () => {
    take = async () => "read";
    expect(await send(0, { "Content-Length": String(mb + 1) })).toMatchObject({
      status: 413,
      text: expect.stringContaining("larger than 1 MB"),
    });
  });

  it("is cut at its limit when it does not say how long it is", async () => {
    take = async (request, overrun) => {
      await request.arrayBuffer().catch(() => {});
      throw overrun() ?? new Error("no overrun");
    };
    expect(await send(2 * mb)).toMatchObject({ status: 413 });
  });

  it("may be left half read, or given up, without harm to the server", async () => {
    take = async (request) => {
      const reader = request.body?.getReader();
      await reader?.read();
      await reader?.cancel();
      return "enough";
    };
    expect(await send(mb)).toEqual({ status: 200, text: "enough" });
    take = async () => "not even looked at";
    expect(await send(mb)).toEqual({ status: 200, text: "not even looked at" });
    take = length;
    expect(await send(10)).toEqual({ status: 200, text: "10" });
  });

  it("of an address that cannot be decoded is refused", async () => {
    take = length;
    expect(await send(1, {}, "/%ff")).toMatchObject({ status: 400 });
  });

  it("has a limit by what it carries", () => {
    expect([bodyLimit("text/plain"), bodyLimit("multipart/form-data; boundary=b")]).toEqual([mb, 20 * mb]);
  });
});
