// Files of the record, each under the SHA-256 of its bytes: the same bytes are kept once, and a name can never be chosen by whoever
// sends them. Small copies of pictures lie beside them; they can be made again at any time.
import { createHash } from "node:crypto";
import { env } from "#app/lib/env.server";
import { localStore } from "#app/lib/storage/local.server";
import { thumbnailOf } from "#app/lib/storage/picture.server";
import type { ByteStore } from "#app/lib/storage/store";

export const FILES = "files/";
export const THUMBS = "thumbs/";

let chosen: Promise<ByteStore> | undefined;

/** The store that the settings name. */
export function byteStore(): Promise<ByteStore> {
  chosen ??= env.bucket
    ? import("#app/lib/storage/s3.server").then(({ bucketStore }) => bucketStore(env.bucket as NonNullable<typeof env.bucket>))
    : Promise.resolve(localStore(env.dataFolder));
  return chosen;
}

/** SHA-256, hex: the name under which `keepBytes` keeps them. */
export const hashOfBytes = (bytes: Uint8Array): string => createHash("sha256").update(bytes).digest("hex");

function keyOf(prefix: string, hash: string, ending = ""): string {
  if (!/^[0-9a-f]{64}$/.test(hash)) throw new Error("Not a file's hash");
  return `${prefix}${hash.slice(0, 2)}/${hash}${ending}`;
}

/** Keeps the bytes and returns their SHA-256, hex. On return they are safe. */
export async function keepBytes(bytes: Uint8Array, type: string): Promise<string> {
  const store = await byteStore();
  const hash = hashOfBytes(bytes);
  const key = keyOf(FILES, hash);
  if (!(await store.has(key))) await store.put(key, bytes, type);
  return hash;
}

/** The bytes of a file that a row names. Throws when they are missing, or are not what was stored. */
export async function readBytes(hash: string): Promise<Uint8Array> {
  const bytes = await (await byteStore()).get(keyOf(FILES, hash));
  if (!bytes) throw new Error("The bytes of a stored file are missing");
  return bytes;
}

/** The small copy of a picture, made when it is first asked for. */
export async function readThumb(hash: string): Promise<Uint8Array> {
  const store = await byteStore();
  const key = keyOf(THUMBS, hash, ".webp");
  const kept = await store.get(key);
  if (kept) return kept;
  const made = await thumbnailOf(await readBytes(hash));
  await store.put(key, made, "image/webp");
  return made;
}

/** Hash in a key of the store; null for a key that is none of ours. */
export const hashIn = (key: string): string | null => /^(?:files|thumbs)\/[0-9a-f]{2}\/([0-9a-f]{64})(?:\.webp)?$/.exec(key)?.[1] ?? null;
