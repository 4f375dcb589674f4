/**
 * Where bytes are kept: a place that takes a key and bytes and gives them back. Local disk by default, a bucket by setting.
 * Keys are made by the program, never by whoever sends the bytes: lower-case letters, digits, "/" and ".".
 */
export interface ByteStore {
  /** On return the bytes are safe. The same key again overwrites with the same bytes. */
  put: (key: string, bytes: Uint8Array, type: string) => Promise<void>;
  /** Null where there is none. */
  get: (key: string) => Promise<Uint8Array | null>;
  has: (key: string) => Promise<boolean>;
  remove: (key: string) => Promise<void>;
  /** Keys that begin with `prefix`, with the instant of their last change in ms. */
  list: (prefix: string) => AsyncIterable<{ key: string; changed: number }>;
}

/** Throws on a key that this program does not make. */
export function checkKey(key: string): string {
  if (!/^[a-z0-9]+(\/[a-z0-9.]+)*$/.test(key) || key.includes("..")) throw new Error("Not a key of the byte store");
  return key;
}
