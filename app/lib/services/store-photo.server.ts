// Takes in a picture: judged by its bytes, written anew without what the camera wrote about place and device, kept by its hash, then its row.
// Bytes first, row in the transaction: a crash between leaves bytes that nobody can reach, never a row without bytes. What can be
// refused is refused before, so that a refusal leaves nothing on the disk.
import { eq } from "drizzle-orm";
import { db, type Reader } from "#app/db/client.server";
import { memberOf } from "#app/db/queries/membership.server";
import { files } from "#app/db/schema/files";
import { mayRaise } from "#app/lib/gates/happening-verdicts";
import { replayOf } from "#app/lib/services/commands.server";
import { done, invalid, notFound, type Outcome, type Refusal, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, commandOf, perform } from "#app/lib/services/perform.server";
import { hashOfBytes, keepBytes } from "#app/lib/storage/files.server";
import { imageType } from "#app/lib/storage/image-type";
import { rewritePicture } from "#app/lib/storage/picture.server";

/** Limits, common practice: a phone's picture is 3 to 8 MB. */
export const PHOTO_LIMITS = { bytes: 12_000_000, pixels: 60_000_000, perInstall: 5000 };

export async function storePhoto(act: Act, input: { bytes: Uint8Array; name: string }): Promise<Outcome<{ file: string }>> {
  if (!(await memberOf(db(), act.installId, act.actor.userId))) return notFound("That install");
  const { bytes } = input;
  if (bytes.length > PHOTO_LIMITS.bytes)
    return invalid(`The picture is larger than ${PHOTO_LIMITS.bytes / 1_000_000} MB. Send a smaller one.`);
  const image = imageType(bytes);
  const damaged = () => invalid("This is no JPEG, PNG or WebP picture, or it is damaged. Take it again.");
  if (!image) return damaged();
  if (image.width * image.height > PHOTO_LIMITS.pixels) return invalid("The picture has more than 60 million pixels. Send a smaller one.");
  const name = safeName(input.name);
  const named = { ...act, kind: "store-photo", input: { sent: hashOfBytes(bytes), name } };
  const before = (await replayOf<{ file: string }>(db(), commandOf(named))) ?? (await refuseFull(db(), act.installId));
  if (before) return before;
  const clean = await rewritePicture(bytes, image.type, PHOTO_LIMITS.pixels);
  if (!clean) return damaged();
  const hash = await keepBytes(clean.bytes, clean.type);
  return perform(named, async (d) => {
    const refusal = refusalOf(mayRaise(d.e, { member: d.member.id })) ?? (await refuseFull(d.tx, d.installId));
    if (refusal) return refusal;
    const row = { hash, size: clean.bytes.length, name };
    const { id } = await d.record(roleOf(d.member, "builder", "inspector"), { type: "file-stored", data: { ...row, mime: image.type } });
    await d.tx.insert(files).values({ id, installId: d.installId, ...row, type: image.type, createdAt: d.now, by: d.member.id });
    return done({ file: id });
  });
}

async function refuseFull(reader: Reader, installId: string): Promise<Refusal | null> {
  if ((await reader.$count(files, eq(files.installId, installId))) < PHOTO_LIMITS.perInstall) return null;
  return invalid(`This install has ${PHOTO_LIMITS.perInstall} pictures already, as many as it can hold.`);
}

/** For display alone: no path, no character that cannot be seen, at most 100 characters. */
function safeName(name: string): string {
  const plain = name.replace(/^.*[\\/]|[\p{Cc}\p{Cf}]/gu, "");
  return plain.trim().slice(0, 100) || "photo";
}
