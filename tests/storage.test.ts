import { mkdtempSync, rmSync } from "node:fs";
import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { localStore } from "#app/lib/storage/local.server";
import { bucketStore } from "#app/lib/storage/s3.server";
import type { ByteStore } from "#app/lib/storage/store";

/** The few calls of the S3 REST API that the store makes, over HTTP, by path. Source: the service's public API reference. */
function bucketFake(): Server {
  const kept = new Map<string, { bytes: Buffer; changed: Date }>();
  return createServer((request, response) => {
    const url = new URL(request.url ?? "/", "http://fake");
    const [, bucket, ...rest] = url.pathname.split("/");
    const key = decodeURIComponent(rest.join("/"));
    const chunks: Buffer[] = [];
    request.on("data", (chunk: Buffer) => chunks.push(chunk));
    request.on("end", () => {
      const xml = (status: number, body: string) => response.writeHead(status, { "Content-Type": "application/xml" }).end(body);
      if (bucket !== "board") return xml(404, "<Error><Code>NoSuchBucket</Code></Error>");
      if (!/AWS4-HMAC-SHA256 Credential=id\//.test(request.headers.authorization ?? ""))
        return xml(403, "<Error><Code>AccessDenied</Code></Error>");
      const found = kept.get(key);
      if (request.method === "PUT") {
        kept.set(key, { bytes: plainBody(Buffer.concat(chunks), String(request.headers["content-encoding"] ?? "")), changed: new Date() });
        return response.writeHead(200, { ETag: '"x"' }).end();
      }
      if (request.method === "DELETE") {
        kept.delete(key);
        return response.writeHead(204).end();
      }
      if (url.searchParams.get("list-type") === "2") {
        const names = [...kept.keys()].filter((k) => k.startsWith(url.searchParams.get("prefix") ?? "")).sort();
        const from = Number(url.searchParams.get("continuation-token") ?? 0);
        const page = names.slice(from, from + 2);
        const more = from + 2 < names.length;
        const contents = page.map(
          (k) => `<Contents><Key>${k}</Key><LastModified>${kept.get(k)?.changed.toISOString()}</LastModified></Contents>`,
        );
        return xml(
          200,
          `<ListBucketResult><IsTruncated>${more}</IsTruncated>${more ? `<NextContinuationToken>${from + 2}</NextContinuationToken>` : ""}${contents.join("")}</ListBucketResult>`,
        );
      }
      if (!found) return request.method === "HEAD" ? response.writeHead(404).end() : xml(404, "<Error><Code>NoSuchKey</Code></Error>");
      response.writeHead(200, { "Content-Length": found.bytes.length }).end(request.method === "HEAD" ? undefined : found.bytes);
    });
  });
}

/** The client may send a body in signed chunks ("aws-chunked"): size in hex, a line end, the bytes. */
function plainBody(body: Buffer, encoding: string): Buffer {
  if (!encoding.includes("aws-chunked")) return body;
  const parts: Buffer[] = [];
  for (let at = 0; at < body.length; ) {
    const line = body.indexOf("\r\n", at);
    const size = Number.parseInt(body.subarray(at, line).toString("latin1"), 16);
    if (!size) break;
    parts.push(body.subarray(line + 2, line + 2 + size));
    at = line + 2 + size + 2;
  }
  return Buffer.concat(parts);
}

const folder = mkdtempSync(join(tmpdir(), "bladecount-store-"));
const fake = bucketFake();
let address = "";
beforeAll(async () => {
  await new Promise<void>((done) => fake.listen(0, "127.0.0.1", done));
  address = `http://127.0.0.1:${(fake.address() as AddressInfo).port}`;
});
afterAll(() => {
  fake.closeAllConnections();
  fake.close();
  rmSync(folder, { recursive: true, force: true });
});

const stores: [string, () => ByteStore][] = [
  ["the disk", () => localStore(folder)],
  ["a bucket", () => bucketStore({ bucket: "board", region: "us-east-1", endpoint: address, accessKeyId: "id", secretAccessKey: "key" })],
];

describe.each(stores)("%s", (_, open) => {
  const all = async (store: ByteStore, prefix: string) => {
    const keys: string[] = [];
    for await (const { key, changed } of store.list(prefix)) {
      expect(Math.abs(changed - Date.now())).toBeLessThan(60_000);
      keys.push(key);
    }
    return keys.sort();
  };

  it("gives back what it was given, and nothing where nothing is", async () => {
    const store = open();
    const bytes = new Uint8Array([0, 1, 2, 255, 13, 10, 0]);
    expect(await store.get("files/ab/abc")).toBeNull();
    expect(await store.has("files/ab/abc")).toBe(false);
    await store.put("files/ab/abc", bytes, "image/png");
    expect(Buffer.from((await store.get("files/ab/abc")) ?? []).equals(Buffer.from(bytes))).toBe(true);
    expect(await store.has("files/ab/abc")).toBe(true);
    await store.put("files/ab/abc", bytes, "image/png");
    expect(await all(store, "files/")).toEqual(["files/ab/abc"]);
  });

  it("lists all of a prefix, however many, and removes one", async () => {
    const store = open();
    for (const n of [1, 2, 3, 4, 5]) await store.put(`thumbs/${n}/${n}.webp`, new Uint8Array([n]), "image/webp");
    expect(await all(store, "thumbs/")).toHaveLength(5);
    await store.remove("thumbs/3/3.webp");
    await store.remove("thumbs/3/3.webp");
    expect(await all(store, "thumbs/")).toEqual(["thumbs/1/1.webp", "thumbs/2/2.webp", "thumbs/4/4.webp", "thumbs/5/5.webp"]);
    expect(await all(store, "nothing/")).toEqual([]);
  });

  it.each(["../etc/passwd", "files/../../x", "/files/x", "files//x", "files/A", "files/x\u0000", ""])(
    "takes no key but its own: %j",
    async (key) => {
      await expect((async () => open().put(key, new Uint8Array([1]), "image/png"))()).rejects.toThrow("Not a key");
    },
  );
});

describe("a bucket that refuses", () => {
  it("is an error, not an empty answer", async () => {
    const store = bucketStore({ bucket: "other", region: "us-east-1", endpoint: address, accessKeyId: "id", secretAccessKey: "key" });
    await expect(store.put("files/a/b", new Uint8Array([1]), "image/png")).rejects.toThrow();
  });
});
