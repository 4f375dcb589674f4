/**
 * Takes out of a picture what the camera wrote about where and with what it was taken. Of a JPEG's, its orientation alone is put back.
 * The picture itself is not touched. Sources: JPEG ITU-T T.81 B.1; Exif 2.32 4.5.4 and 4.6.4; PNG W3C REC-png-3 5.3; WebP RFC 9649 2.7.
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

function jpeg(bytes: Uint8Array): Uint8Array | null {
  const v = view(bytes);
  const kept: Uint8Array[] = [bytes.subarray(0, 2)];
  let turned = 1;
  let at = 2;
  while (v.getUint8(at) === 0xff && v.getUint8(at + 1) !== 0xda) {
    const marker = v.getUint8(at + 1);
    const length = 2 + v.getUint16(at + 2);
    if (marker === 0xe1) turned = orientation(bytes.subarray(at + 4, at + length)) ?? turned;
    // APP1 (Exif, XMP), APP3 to APP13 (maker's data, IPTC), APP15 and comments go; JFIF, colour profile and Adobe's marker stay.
    const goes = marker === 0xe1 || (marker >= 0xe3 && marker <= 0xed) || marker === 0xef || marker === 0xfe;
    if (!goes) kept.push(bytes.subarray(at, at + length));
    at += length;
  }
  if (v.getUint8(at) !== 0xff) return null;
  if (turned !== 1) kept.splice(1, 0, exifWith(turned));
  // What some cameras put behind the end of the picture goes too.
  return join([...kept, bytes.subarray(at, bytes.length)]);
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

const PNG_GOES = new Set(["tEXt", "zTXt", "iTXt", "eXIf", "tIME"]);

function png(bytes: Uint8Array): Uint8Array | null {
  const v = view(bytes);
  const kept: Uint8Array[] = [bytes.subarray(0, 8)];
  for (let at = 8; at < bytes.length; ) {
    const length = 12 + v.getUint32(at);
    const kind = name(bytes, at + 4);
    if (at + length > bytes.length) return null;
    if (!PNG_GOES.has(kind)) kept.push(bytes.subarray(at, at + length));
    if (kind === "IEND") return join(kept);
    at += length;
  }
  return null;
}

function webp(bytes: Uint8Array): Uint8Array | null {
  const v = view(bytes);
  const kept: Uint8Array[] = [];
  for (let at = 12; at + 8 <= bytes.length; ) {
    const size = v.getUint32(at + 4, true);
    const length = 8 + size + (size & 1);
    const kind = name(bytes, at);
    if (at + 8 + size > bytes.length) return null;
    if (kind !== "EXIF" && kind !== "XMP ")
      kept.push(kind === "VP8X" ? withoutFlags(bytes.subarray(at, at + length)) : bytes.subarray(at, at + length));
    at += length;
  }
  const body = join(kept);
  const head = Uint8Array.from(bytes.subarray(0, 12));
  view(head).setUint32(4, body.length + 4, true);
  return join([head, body]);
}

/** The extended header no longer announces Exif (bit 3) and XMP (bit 2). */
function withoutFlags(chunk: Uint8Array): Uint8Array {
  const copy = Uint8Array.from(chunk);
  copy[8] = (copy[8] ?? 0) & ~0x0c;
  return copy;
}

function join(parts: Uint8Array[]): Uint8Array {
  const all = new Uint8Array(parts.reduce((n, p) => n + p.length, 0));
  let at = 0;
  for (const part of parts) {
    all.set(part, at);
    at += part.length;
  }
  return all;
}
