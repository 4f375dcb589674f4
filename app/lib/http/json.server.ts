// Reads a JSON body sent by a program. What cannot be read is answered in words, never as a fault of the server.

const MOST_BYTES = 256 * 1024;

export type Json = { ok: true; value: unknown } | { ok: false; message: string };

export async function readJson(request: Request): Promise<Json> {
  if (request.method !== "POST") return { ok: false, message: "This address takes POST." };
  if (!/^application\/json\b/i.test(request.headers.get("Content-Type") ?? ""))
    return { ok: false, message: "Send JSON, with Content-Type application/json." };
  const reader = request.body?.getReader();
  const chunks: Uint8Array[] = [];
  let size = 0;
  for (let next = await reader?.read(); next && !next.done; next = await reader?.read()) {
    size += next.value.byteLength;
    if (size > MOST_BYTES) {
      await reader?.cancel();
      return { ok: false, message: "The body is larger than 256 KiB." };
    }
    chunks.push(next.value);
  }
  try {
    return { ok: true, value: JSON.parse(Buffer.concat(chunks).toString("utf8")) };
  } catch {
    return { ok: false, message: "The body is not JSON." };
  }
}
