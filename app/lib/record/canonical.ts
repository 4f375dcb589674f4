/**
 * One spelling for one value: the JSON Canonicalization Scheme, so that a hash made here can be made again anywhere.
 * Source: RFC 8785.
 */
import serialize from "canonicalize";

/**
 * @param value JSON data; entries that are undefined are left out.
 * @returns its canonical text. Throws on NaN, infinities, lone surrogates and undefined itself, which JSON cannot say.
 */
export function canonical(value: unknown): string {
  const text = serialize(value);
  if (text === undefined) throw new Error("There is no JSON for this value");
  return text;
}
