// Tiny pictures with what a camera writes about place and device.
import { crc32, deflateSync } from "node:zlib";
import sharp from "sharp";

function chunk(kind: string, data: Uint8Array): Buffer {
  const body = Buffer.concat([Buffer.from(kind, "latin1"), data]);
  const head = Buffer.alloc(4);
  head.writeUInt32BE(data.length);
  const check = Buffer.alloc(4);
  check.writeUInt32BE(crc32(body));
  return Buffer.concat([head, body, check]);
}

/** A PNG of one pixel, its shade given by `shade` (so that pictures differ), with `comment` as text in it. */
export function png(shade = 0, comment = "taken at 47.1 N 8.5 E"): Buffer {
  const header = Buffer.from([0, 0, 0, 1, 0, 0, 0, 1, 8, 0, 0, 0, 0]);
  return Buffer.concat([
    Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
    chunk("IHDR", header),
    chunk("tEXt", Buffer.from(`Comment\0${comment}`, "latin1")),
    chunk("IDAT", deflateSync(Buffer.from([0, shade & 255]))),
    chunk("IEND", Buffer.alloc(0)),
  ]);
}

const plain = await sharp({ create: { width: 2, height: 1, channels: 3, background: "#884422" } })
  .jpeg()
  .toBuffer();

/** A JPEG of 2 by 1 pixels, turned by a quarter (orientation 6), with a place in its Exif and in a comment. */
export function jpeg(place = "47.1 N 8.5 E"): Buffer {
  const tiff = Buffer.from([0x49, 0x49, 42, 0, 8, 0, 0, 0, 1, 0, 0x12, 0x01, 3, 0, 1, 0, 0, 0, 6, 0, 0, 0, 0, 0, 0, 0]);
  const exif = Buffer.concat([Buffer.from("Exif\0\0", "latin1"), tiff, Buffer.from(place, "latin1")]);
  const segment = (marker: number, data: Buffer) =>
    Buffer.concat([Buffer.from([0xff, marker, (data.length + 2) >> 8, (data.length + 2) & 255]), data]);
  return Buffer.concat([plain.subarray(0, 2), segment(0xe1, exif), segment(0xfe, Buffer.from(place, "latin1")), plain.subarray(2)]);
}

/** A WebP of 2 by 1 pixels with a place in its Exif. */
export const webp: Buffer = await sharp({ create: { width: 2, height: 1, channels: 3, background: "#224488" } })
  .withExif({ IFD0: { ImageDescription: "46.9 N 7.4 E" } })
  .webp()
  .toBuffer();
