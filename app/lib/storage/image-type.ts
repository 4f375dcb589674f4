/**
 * What kind of picture some bytes are, judged by their first bytes alone, and how large it is.
 * Sources: JPEG ITU-T T.81 B.1; PNG W3C REC-png-3 5.2 and 11.2.1; WebP RFC 9649 2.4 to 2.7.
 */

export interface ImageType {
  type: "image/jpeg" | "image/png" | "image/webp";
  width: number;
  height: number;
}

const ascii = (b: Uint8Array, from: number, text: string): boolean => [...text].every((c, n) => b[from + n] === c.charCodeAt(0));
const view = (b: Uint8Array) => new DataView(b.buffer, b.byteOffset, b.byteLength);

/** @returns type and pixels, or null for anything that is not a whole JPEG, PNG or WebP header. */
export function imageType(bytes: Uint8Array): ImageType | null {
  if (bytes.length < 30) return null;
  if (bytes[0] === 0xff && bytes[1] === 0xd8) return jpeg(bytes);
  if (bytes[0] === 0x89 && ascii(bytes, 1, "PNG\r\n\u001a\n") && ascii(bytes, 12, "IHDR")) {
    const v = view(bytes);
    return sized("image/png", v.getUint32(16), v.getUint32(20));
  }
  if (ascii(bytes, 0, "RIFF") && ascii(bytes, 8, "WEBP")) return webp(bytes);
  return null;
}

const sized = (type: ImageType["type"], width: number, height: number): ImageType | null =>
  width > 0 && height > 0 ? { type, width, height } : null;

function jpeg(bytes: Uint8Array): ImageType | null {
  const v = view(bytes);
  for (let at = 2; at + 9 < bytes.length; ) {
    if (bytes[at] !== 0xff) return null;
    const marker = bytes[at + 1] ?? 0;
    // Start of frame: C0 to CF but for the tables DHT, JPG and DAC.
    if (marker >= 0xc0 && marker <= 0xcf && ![0xc4, 0xc8, 0xcc].includes(marker))
      return sized("image/jpeg", v.getUint16(at + 7), v.getUint16(at + 5));
    if (marker === 0xff) at += 1;
    else if (marker === 0xda) return null;
    else at += 2 + v.getUint16(at + 2);
  }
  return null;
}

function webp(bytes: Uint8Array): ImageType | null {
  const v = view(bytes);
  if (ascii(bytes, 12, "VP8X"))
    return sized("image/webp", 1 + (v.getUint32(24, true) & 0xffffff), 1 + ((v.getUint32(26, true) >>> 8) & 0xffffff));
  if (ascii(bytes, 12, "VP8 ")) return sized("image/webp", v.getUint16(26, true) & 0x3fff, v.getUint16(28, true) & 0x3fff);
  if (ascii(bytes, 12, "VP8L")) {
    const bits = v.getUint32(21, true);
    return sized("image/webp", 1 + (bits & 0x3fff), 1 + ((bits >>> 14) & 0x3fff));
  }
  return null;
}
