// Pictures are decoded and written anew: what comes out holds the pixels and nothing that the camera, or whoever sent it, put beside
// them. Decoding is also the proof that it is a picture.
import sharp from "sharp";

// One thread a picture: the server has others to serve.
sharp.concurrency(1);
sharp.cache(false);

/** Longest edge kept, px: more than any screen shows, enough to read a stamp on a bolt head. */
const LONGEST = 4096;
const THUMB = 480;

export type PictureType = "image/jpeg" | "image/png" | "image/webp";

export interface Picture {
  bytes: Uint8Array;
  type: PictureType;
  width: number;
  height: number;
}

/** @returns the picture written anew, turned as the camera was held; null where it cannot be decoded. `most` = pixels allowed. */
export async function rewritePicture(given: Uint8Array, type: PictureType, most: number): Promise<Picture | null> {
  try {
    const image = sharp(given, { limitInputPixels: most, failOn: "error", pages: 1 })
      .autoOrient()
      .resize({ width: LONGEST, height: LONGEST, fit: "inside", withoutEnlargement: true });
    const out =
      type === "image/png"
        ? image.png({ compressionLevel: 9 })
        : type === "image/webp"
          ? image.webp({ quality: 85 })
          : image.jpeg({ quality: 85 });
    const { data, info } = await out.toBuffer({ resolveWithObject: true });
    return { bytes: new Uint8Array(data), type, width: info.width, height: info.height };
  } catch {
    return null;
  }
}

/** A small copy for lists, as WebP. Throws where the bytes are no picture. */
export async function thumbnailOf(bytes: Uint8Array): Promise<Uint8Array> {
  return new Uint8Array(
    await sharp(bytes).resize({ width: THUMB, height: THUMB, fit: "inside", withoutEnlargement: true }).webp({ quality: 72 }).toBuffer(),
  );
}
