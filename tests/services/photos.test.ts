import { createHash } from "node:crypto";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { fileFor } from "#app/db/queries/files.server";
import { PHOTO_LIMITS, storePhoto } from "#app/lib/services/store-photo.server";
import { imageType } from "#app/lib/storage/image-type";
import { readBytes } from "#app/lib/storage/local.server";
import { stripMetadata } from "#app/lib/storage/strip-metadata";
import { jpeg, png } from "../support/picture";
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
    expect(bytes.includes("47.1 N")).toBe(false);
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

describe("metadata", () => {
  it("goes from a JPEG, but for how the picture is turned", () => {
    const before = jpeg();
    expect(imageType(before)).toEqual({ type: "image/jpeg", width: 2, height: 1 });
    const after = Buffer.from(stripMetadata(before, "image/jpeg") ?? []);
    expect(imageType(after)).toEqual({ type: "image/jpeg", width: 2, height: 1 });
    expect(after.includes("47.1 N")).toBe(false);
    expect(after.includes("JFIF")).toBe(true);
    // Exif 2.32, 4.6.4: tag 0x0112, type SHORT, one value, 6 = turned a quarter clockwise.
    expect(after.includes(Buffer.from([0x01, 0x12, 0, 3, 0, 0, 0, 1, 0, 6]))).toBe(true);
    expect(after.subarray(-4)).toEqual(before.subarray(-4));
  });

  it("goes from a WebP, whose header no longer announces it", () => {
    const before = webp([part("EXIF", [1, 2, 3]), part("XMP ", [4, 5])]);
    expect(imageType(before)).toEqual({ type: "image/webp", width: 2, height: 1 });
    const after = Buffer.from(stripMetadata(before, "image/webp") ?? []);
    expect(after.includes("EXIF") || after.includes("XMP ")).toBe(false);
    expect(after.readUInt32LE(4)).toBe(after.length - 8);
    expect(after[20]).toBe(0);
    expect(imageType(after)).toEqual({ type: "image/webp", width: 2, height: 1 });
  });

  it("goes from between the scans of a JPEG, past fill bytes, and from behind its end", () => {
    const whole = jpeg();
    const scan = whole.subarray(whole.length - 14, whole.length - 2);
    // A marker in coded data is stuffed (FF 00) or a restart (FF D0 to D7): T.81 B.1.1.5 and B.2.1.
    const coded = Buffer.from([1, 0xff, 0x00, 2, 0xff, 0xd3, 3]);
    const said = (marker: number) => Buffer.concat([Buffer.from([0xff, 0xff, marker, 0, 10]), Buffer.from("46.9 N 7")]);
    const before = Buffer.concat([
      ...[whole.subarray(0, whole.length - 2), coded, said(0xfe), said(0xe1), said(0xe2), scan, coded],
      ...[Buffer.from([0xff, 0xff, 0xff, 0xd9]), jpeg("46.9 N"), Buffer.from("<script>")],
    ]);
    const after = Buffer.from(stripMetadata(before, "image/jpeg") ?? []);
    expect(after.includes("46.9 N") || after.includes("47.1 N") || after.includes("<script>")).toBe(false);
    const [fill, end] = [Buffer.from([0xff]), Buffer.from([0xff, 0xd9])];
    const scans = Buffer.concat([scan, coded, fill, scan, coded, fill, fill, end]);
    expect(after.subarray(-scans.length)).toEqual(scans);
    expect(imageType(after)).toEqual({ type: "image/jpeg", width: 2, height: 1 });
  });

  it.each<[string, Buffer, "image/png" | "image/webp"]>([
    ["PNG", png(), "image/png"],
    ["WebP", webp([]), "image/webp"],
  ])("goes from behind the end of a %s, and with parts that no picture is drawn from", (_, picture, type) => {
    const clean = Buffer.from(stripMetadata(picture, type) ?? []);
    expect(clean.length).toBeGreaterThan(0);
    expect(stripMetadata(Buffer.concat([picture, Buffer.from("46.9 N <script>")]), type)).toEqual(new Uint8Array(clean));
    expect(stripMetadata(withOwnPart(picture, type), type)).toEqual(new Uint8Array(clean));
  });

  it("of a damaged picture is no picture", () => {
    expect(stripMetadata(png().subarray(0, 60), "image/png")).toBeNull();
    expect(stripMetadata(jpeg().subarray(0, 30), "image/jpeg")).toBeNull();
  });
});

const part = (kind: string, data: number[]): Buffer =>
  Buffer.concat([Buffer.from(kind, "latin1"), u32(data.length), Buffer.from(data), Buffer.alloc(data.length % 2)]);

/** A WebP of 2 by 1 pixels with `more` behind its picture. */
function webp(more: Buffer[]): Buffer {
  const body = Buffer.concat([part("VP8X", [0x0c, 0, 0, 0, 1, 0, 0, 0, 0, 0]), part("VP8L", [0x2f, 0, 0, 0, 0]), ...more]);
  return Buffer.concat([Buffer.from("RIFF"), u32(body.length + 4), Buffer.from("WEBP"), body]);
}

/** The picture with a part of somebody's own making inside it. */
function withOwnPart(picture: Buffer, type: "image/png" | "image/webp"): Buffer {
  if (type === "image/webp") return webp([part("GPSx", [...Buffer.from("46.9 N")])]);
  const own = Buffer.concat([Buffer.from([0, 0, 0, 6]), Buffer.from("gpSx46.9 N"), Buffer.alloc(4)]);
  return Buffer.concat([picture.subarray(0, 33), own, picture.subarray(33)]);
}

function u32(n: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32LE(n);
  return bytes;
}
