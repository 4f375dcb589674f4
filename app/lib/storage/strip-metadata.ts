/**
 * Takes out of a picture what the camera wrote about where and with what it was taken. Of a JPEG's, its orientation alone is put back.
 * The picture itself is not touched, and nothing else stays. Sources: JPEG ITU-T T.81 B.1; Exif 2.32 4.5.4 and 4.6.4; PNG W3C REC-png-3 5.3; WebP RFC 9649 2.7.
 */
import type { ImageType } from "#app/lib/storage/image-type";

const view = (b: Uint8Array) => new DataView(b.buffer, b.byteOffset, b.byteLength);
const name = (b: Uint8Array, at: number) => String.fromCharCode(...b.subarray(at, at + 4));

/** @returns the bytes without metadata, or null where the file is damaged. */
export function stripMetadata(bytes: Uint8Array, type: ImageType["type"]): Uint8Array | null {
  try {
    return type === "image/jpeg" ? jpeg(bytes) : type === "image/png" ? png(bytes) : webp(bytes);
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** Up to the first end of image. What some cameras put behind it, such as a second picture, goes. */
function jpeg(bytes: Uint8Array): Uint8Array | null {
  const v = view(bytes);
  const out = output(bytes.length + exifWith(1).length);
  out.keep(bytes.subarray(0, 2));
  let turned = 1;
  let inScans = false;
  for (let at = 2; ; ) {
    if (v.getUint8(at) !== 0xff) return null;
    const marker = v.getUint8(at + 1);
    if (marker === 0xff)
      at += 1; // A fill byte, T.81 B.1.1.2.
    else if (marker === 0xd9) {
      out.keep(bytes.subarray(at, at + 2));
      return inScans ? out.kept() : null;
    } else {
      const length = v.getUint16(at + 2);
      // Markers without a segment have no place here: T.81 B.2.
      if (marker < 0xc0 || (marker >= 0xd0 && marker <= 0xd8) || length < 2) return null;
      const segment = bytes.subarray(at + 4, at + 2 + length);
      const scan = marker === 0xda;
      const end = scan ? endOfScan(bytes, at + 2 + length) : at + 2 + length;
      if (!saysMore(marker) || (!inScans && isOfPicture(marker, segment))) out.keep(bytes.subarray(at, end));
      if (marker === 0xe1 && turned === 1 && !inScans) {
        turned = orientation(segment) ?? 1;
        if (turned !== 1) out.keep(exifWith(turned));
      }
      inScans ||= scan;
      at = end;
    }
  }
}

/** A segment for applications (APP0 to APP15, and the reserved ones behind them) or a comment. */
const saysMore = (marker: number): boolean => marker >= 0xe0;

/** JFIF's own head, the colour profile and Adobe's colour transform: without them the picture would look different. */
const isOfPicture = (marker: number, segment: Uint8Array): boolean =>
  (marker === 0xe0 && name(segment, 0) === "JFIF") ||
  (marker === 0xe2 && name(segment, 0) === "ICC_") ||
  (marker === 0xee && name(segment, 0) === "Adob");

/** Where the next marker stands: in coded data FF is followed by 00, or by D0 to D7 where it starts anew. */
function endOfScan(bytes: Uint8Array, from: number): number {
  for (let at = bytes.indexOf(0xff, from); at >= 0; at = bytes.indexOf(0xff, at + 2)) {
    const next = bytes[at + 1] ?? 0;
    if (next === 0xff) at -= 1;
    else if (next !== 0 && !(next >= 0xd0 && next <= 0xd7)) return at;
  }
  throw new RangeError("A scan without an end");
}

/** The orientation (1 to 8) of an Exif segment's first directory; null when it says none. */
function orientation(segment: Uint8Array): number | null {
  if (name(segment, 0) !== "Exif" || segment.length < 16) return null;
  const tiff = view(segment.subarray(6));
  const little = tiff.getUint16(0) === 0x4949;
  const directory = tiff.getUint32(4, little);
  const entries = tiff.getUint16(directory, little);
  for (let n = 0; n < entries; n++) {
    const entry = directory + 2 + n * 12;
    if (tiff.getUint16(entry, little) === 0x0112) {
      const value = tiff.getUint16(entry + 8, little);
      return value >= 1 && value <= 8 ? value : null;
    }
  }
  return null;
}

/** An Exif segment that says the orientation and nothing else. */
function exifWith(turned: number): Uint8Array {
  const text = [0x45, 0x78, 0x69, 0x66, 0, 0];
  const tiff = [0x4d, 0x4d, 0, 42, 0, 0, 0, 8, 0, 1, 0x01, 0x12, 0, 3, 0, 0, 0, 1, 0, turned, 0, 0, 0, 0, 0, 0];
  const length = 2 + text.length + tiff.length;
  return Uint8Array.from([0xff, 0xe1, length >> 8, length & 0xff, ...text, ...tiff]);
}

/** What a PNG is drawn from; every other chunk goes, and so does what stands behind IEND. */
const PNG_STAYS = new Set([
  "IHDR",
  "PLTE",
  "IDAT",
  "IEND",
  "tRNS",
  "gAMA",
  "cHRM",
  "sRGB",
  "iCCP",
  "cICP",
  "mDCV",
  "cLLI",
  "sBIT",
  "bKGD",
  "pHYs",
]);

function png(bytes: Uint8Array): Uint8Array | null {
  const v = view(bytes);
  const out = output(bytes.length);
  out.keep(bytes.subarray(0, 8));
  for (let at = 8; at < bytes.length; ) {
    const length = 12 + v.getUint32(at);
    const kind = name(bytes, at + 4);
    if (at + length > bytes.length) return null;
    if (PNG_STAYS.has(kind)) out.keep(bytes.subarray(at, at + length));
    if (kind === "IEND") return out.kept();
    at += length;
  }
  return null;
}

const WEBP_STAYS = new Set(["VP8 ", "VP8L", "VP8X", "ALPH", "ANIM", "ANMF", "ICCP"]);

function webp(bytes: Uint8Array): Uint8Array | null {
  const v = view(bytes);
  const out = output(bytes.length + 1);
  out.keep(bytes.subarray(0, 12));
  const end = 8 + v.getUint32(4, true);
  if (end > bytes.length) return null;
  for (let at = 12; at + 8 <= end; ) {
    const size = v.getUint32(at + 4, true);
    const length = 8 + size + (size & 1);
    const kind = name(bytes, at);
    if (at + 8 + size > end) return null;
    const chunk = bytes.subarray(at, at + length);
    if (WEBP_STAYS.has(kind)) out.keep(kind === "VP8X" ? withoutFlags(chunk) : chunk);
    at += length;
  }
  const kept = out.kept();
  if (kept.length === 12) return null;
  view(kept).setUint32(4, kept.length - 8, true);
  return kept;
}

/** The extended header no longer announces Exif (bit 3) and XMP (bit 2). */
function withoutFlags(chunk: Uint8Array): Uint8Array {
  const copy = Uint8Array.from(chunk);
  copy[8] = (copy[8] ?? 0) & ~0x0c;
  return copy;
}

/** Takes in what is kept, in order; `room` = bytes that it can become at most. */
function output(room: number) {
  const all = new Uint8Array(room);
  let size = 0;
  return {
    keep: (part: Uint8Array) => {
      all.set(part, size);
      size += part.length;
    },
    kept: () => all.subarray(0, size),
  };
}
