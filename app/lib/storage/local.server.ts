// Files in the data folder, each under the SHA-256 of its bytes: the same bytes are kept once, and a name can never be chosen
// by whoever sends them. Written beside, flushed, then renamed, so that a file is whole or not there.
import { createHash, randomBytes } from "node:crypto";
import { access, mkdir, open, readFile, rename } from "node:fs/promises";
import { join } from "node:path";
import { env } from "#app/lib/env.server";

const root = () => join(env.dataFolder, "files");

function pathOf(hash: string): string {
  if (!/^[0-9a-f]{64}$/.test(hash)) throw new Error("Not a file's hash");
  return join(root(), hash.slice(0, 2), hash);
}

/** SHA-256, hex: the name under which `keepBytes` keeps them. */
export const hashOfBytes = (bytes: Uint8Array): string => createHash("sha256").update(bytes).digest("hex");

/** Keeps the bytes and returns their SHA-256, hex. On return they are on the disk. */
export async function keepBytes(bytes: Uint8Array): Promise<string> {
  const hash = hashOfBytes(bytes);
  const path = pathOf(hash);
  if (await exists(path)) return hash;
  await mkdir(join(root(), hash.slice(0, 2)), { recursive: true, mode: 0o700 });
  const beside = `${path}.${randomBytes(6).toString("hex")}`;
  const file = await open(beside, "wx", 0o600);
  try {
    await file.writeFile(bytes);
    await file.sync();
  } finally {
    await file.close();
  }
  await rename(beside, path);
  return hash;
}

/** The bytes of a file that a row names. Throws when they are missing. */
export const readBytes = (hash: string): Promise<Buffer> => readFile(pathOf(hash));

async function exists(path: string): Promise<boolean> {
  return access(path).then(
    () => true,
    () => false,
  );
}
