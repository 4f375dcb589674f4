import { createHash } from "node:crypto";
import sharp from "sharp";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { fileFor } from "#app/db/queries/files.server";
import { now } from "#app/lib/clock";
import { PHOTO_LIMITS, storePhoto } from "#app/lib/services/store-photo.server";
import { sweepFiles } from "#app/lib/services/sweep-files.server";
import { keepBytes, readBytes, readThumb } from "#app/lib/storage/files.server";
import { imageType } from "#app/lib/storage/image-type";
import { rewritePicture, thumbnailOf } from "#app/lib/storage/picture.server";
import { jpeg, png, webp } from "../support/picture";
import { value, type Workshop, workshop } from "../support/workshop";

// Each test works a whole install through its services.
vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
beforeAll(async () => {
  w = await workshop();
});
afterAll(() => w.clock.stop());

const refused = (status: number, code: string) => ({ ok: false, status, code });

describe("a photo", () => {
  it("is kept under the hash of its bytes, without what the camera wrote, for members alone", async () => {
    const { file } = value(await storePhoto(w.act("bea"), { bytes: png(7), name: "C:\\photos\\mount\u0000.png" }));
    const row = await fileFor(db(), file, "ines");
    expect(row).toMatchObject({ type: "image/png", name: "mount.png", installId: w.installId });
    const bytes = await readBytes(row?.hash ?? "");
    expect(createHash("sha256").update(bytes).digest("hex")).toBe(row?.hash);
    expect(bytes.length).toBe(row?.size);
    expect(Buffer.from(bytes).includes("47.1 N")).toBe(false);
    expect(await fileFor(db(), file, "olga")).toBeNull();
  });

  it.each<[string, Buffer, RegExp]>([
    ["a page", Buffer.from("<!doctype html><script>alert(1)</script>".padEnd(100)), /no JPEG, PNG or WebP/],
    ["a drawing with code in it", Buffer.from("<svg xmlns='http://www.w3.org/2000/svg' onload='x'/>".padEnd(100)), /no JPEG, PNG or WebP/],
    ["a picture cut short", png().subarray(0, 50), /damaged/],
    ["nothing", Buffer.alloc(0), /no JPEG, PNG or WebP/],
    ["too many bytes", Buffer.concat([png(), Buffer.alloc(PHOTO_LIMITS.bytes)]), /larger than 12 MB/],
    ["too many pixels", huge(), /60 million pixels/],
  ])("is refused: %s", async (_, bytes, why) => {
    const outcome = await storePhoto(w.act("bea"), { bytes, name: "a.png" });
    expect(outcome).toMatchObject(refused(422, "invalid"));
    expect(outcome.ok ? "" : outcome.message).toMatch(why);
  });

  it("is refused on an install of others", async () => {
    expect(await storePhoto({ ...w.act("bea"), installId: w.otherInstall }, { bytes: png(), name: "a.png" })).toMatchObject(
      refused(404, "not-found"),
    );
  });
});

/** A PNG whose header says 100,000 by 100,000 pixels. */
function huge(): Buffer {
  const bytes = Buffer.from(png());
  bytes.writeUInt32BE(100_000, 16);
  bytes.writeUInt32BE(100_000, 20);
  return bytes;
}

describe("a picture written anew", () => {
  const PIXELS = PHOTO_LIMITS.pixels;
  const places = (bytes: Uint8Array | undefined) => {
    const text = Buffer.from(bytes ?? []).toString("latin1");
    return ["47.1 N", "46.9 N", "Exif", "<script>"].filter((word) => text.includes(word));
  };

  it("has no place and no device in it, and is turned as the camera was held", async () => {
    expect(places(jpeg())).toEqual(["47.1 N", "Exif"]);
    const after = await rewritePicture(jpeg(), "image/jpeg", PIXELS);
    expect(imageType(jpeg())).toMatchObject({ width: 2, height: 1 });
    expect(after).toMatchObject({ type: "image/jpeg", width: 1, height: 2 });
    expect(imageType(after?.bytes ?? new Uint8Array())).toMatchObject({ type: "image/jpeg", width: 1, height: 2 });
    expect(places(after?.bytes)).toEqual([]);
  });

  it.each([
    ["JPEG", jpeg(), "image/jpeg"],
    ["PNG", png(), "image/png"],
    ["WebP", webp, "image/webp"],
  ] as const)("of kind %s has nothing behind its end, whatever was sent there", async (_, given, type) => {
    const more = Buffer.concat([given, jpeg("46.9 N"), Buffer.from("<script>alert(1)</script>")]);
    const [clean, cut] = await Promise.all([rewritePicture(given, type, PIXELS), rewritePicture(more, type, PIXELS)]);
    expect(places(cut?.bytes)).toEqual([]);
    expect(cut?.bytes).toEqual(clean?.bytes);
  });

  it("of a damaged file is none", async () => {
    expect(await rewritePicture(png().subarray(0, 60), "image/png", PIXELS)).toBeNull();
    expect(await rewritePicture(jpeg().subarray(0, 90), "image/jpeg", PIXELS)).toBeNull();
  });

  it("has a small copy for lists, no longer than 480 px", async () => {
    const wide = await sharp({ create: { width: 1200, height: 300, channels: 3, background: "#777" } })
      .png()
      .toBuffer();
    expect(imageType(await thumbnailOf(wide))).toEqual({ type: "image/webp", width: 480, height: 120 });
  });
});

describe("files that no row names", () => {
  it("go after a day, and those of the record stay", async () => {
    const { file } = value(await storePhoto(w.act("bea"), { bytes: png(77), name: "kept.png" }));
    const row = await fileFor(db(), file, "bea");
    const lost = await keepBytes(Buffer.from("left by a crash"), "image/png");
    await readThumb(row?.hash ?? "");
    // The clock of the files is the disk's own.
    w.clock.add(Date.now() - now());
    expect(await sweepFiles()).toBe(0);
    w.clock.add(25 * 3600_000);
    expect(await sweepFiles()).toBeGreaterThan(0);
    await expect(readBytes(lost)).rejects.toThrow("missing");
    expect((await readBytes(row?.hash ?? "")).length).toBe(row?.size);
    expect((await readThumb(row?.hash ?? "")).length).toBeGreaterThan(0);
  });
});
