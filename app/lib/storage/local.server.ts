// The byte store on the disk. Written beside, flushed, then renamed, so that a file is whole or not there.
import { randomBytes } from "node:crypto";
import { access, mkdir, open, opendir, readFile, rename, rm, stat } from "node:fs/promises";
import { dirname, join, relative, sep } from "node:path";
import { type ByteStore, checkKey } from "#app/lib/storage/store";

const absent = (error: unknown): boolean => (error as NodeJS.ErrnoException).code === "ENOENT";

/** @param root folder that holds nothing else. */
export function localStore(root: string): ByteStore {
  const pathOf = (key: string) => join(root, ...checkKey(key).split("/"));
  return {
    async put(key, bytes) {
      const path = pathOf(key);
      await mkdir(dirname(path), { recursive: true, mode: 0o700 });
      const beside = `${path}.${randomBytes(6).toString("hex")}.part`;
      const file = await open(beside, "wx", 0o600);
      try {
        await file.writeFile(bytes);
        await file.sync();
      } finally {
        await file.close();
      }
      await rename(beside, path);
    },
    async get(key) {
      return readFile(pathOf(key)).catch((error: unknown) => {
        if (absent(error)) return null;
        throw error;
      });
    },
    has: (key) =>
      access(pathOf(key)).then(
        () => true,
        () => false,
      ),
    remove: (key) => rm(pathOf(key), { force: true }),
    async *list(prefix) {
      const folder = join(root, ...prefix.split("/").filter(Boolean));
      try {
        for await (const entry of await opendir(folder, { recursive: true })) {
          if (!entry.isFile()) continue;
          const path = join(entry.parentPath, entry.name);
          const found = await stat(path).catch(() => null);
          if (found) yield { key: relative(root, path).split(sep).join("/"), changed: found.mtimeMs };
        }
      } catch (error) {
        if (!absent(error)) throw error;
      }
    },
  };
}
