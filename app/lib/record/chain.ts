/**
 * The record's hash chain. Each line is an event, the hash of the line before, and its own hash:
 * hash = SHA-256 over the UTF-8 bytes of the canonical form (RFC 8785) of {"event": event, "prev": prev}, in lower-case hex (FIPS 180-4).
 * The first line's `prev` is 64 zeros. A chain proves nothing against whoever can rewrite all of it, so its head is printed elsewhere.
 */
import { sha256 } from "@noble/hashes/sha2.js";
import { bytesToHex, utf8ToBytes } from "@noble/hashes/utils.js";
import { canonical } from "#app/lib/record/canonical";

export const FIRST = "0".repeat(64);

/** What the chain asks of an event; everything else in it is hashed and not looked at. */
export interface Chained {
  install: string;
  seq: number;
  recorded: number;
}

export interface Line<E extends Chained = Chained> {
  event: E;
  prev: string;
  hash: string;
}

export type Verified = { ok: true; lines: number; head: string } | { ok: false; line: number; why: string };

/** @returns SHA-256 of text as lower-case hex, 64 characters. */
export const hashOf = (text: string): string => bytesToHex(sha256(utf8ToBytes(text)));

/** @returns the hash of the line that holds `event` and follows the line with hash `prev`. */
export const link = (prev: string, event: Chained): string => hashOf(canonical({ event, prev }));

/**
 * Checks a whole chain from its first line.
 * @returns the number of lines and the head's hash, or the number of the first line (from 1) that is not right, and why.
 */
export function verify(lines: Iterable<Line>): Verified {
  let before: Line | null = null;
  let count = 0;
  for (const line of lines) {
    count++;
    const wrong = fault(line, before, count);
    if (wrong) return { ok: false, line: count, why: wrong };
    before = line;
  }
  return { ok: true, lines: count, head: before?.hash ?? FIRST };
}

/** A damaged line may hold what has no canonical form (a number beyond all numbers): it has no hash then. */
function hashIfAny(prev: string, event: Chained): string | null {
  try {
    return link(prev, event);
  } catch {
    return null;
  }
}

function fault(line: Line, before: Line | null, count: number): string | null {
  const { event, prev, hash } = line;
  if (event.seq !== count) return `line ${count} carries number ${event.seq}: a line was taken out, added or moved`;
  if (prev !== (before?.hash ?? FIRST)) return `line ${count} does not follow from the line before it`;
  if (hashIfAny(prev, event) !== hash) return `line ${count} was changed after it was written`;
  if (before && event.install !== before.event.install) return `line ${count} belongs to another install`;
  if (before && event.recorded < before.event.recorded) return `line ${count} is dated before the line that it follows`;
  return null;
}
