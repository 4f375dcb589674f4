// Reads a form that may carry photos: each picture is stored as it arrives and stands in the form as its file's id.
import {
  FormDataParseError,
  MaxFileSizeExceededError,
  MaxFilesExceededError,
  MaxTotalSizeExceededError,
  parseFormData,
} from "@remix-run/form-data-parser";
import { data } from "react-router";
import { readForm } from "#app/lib/http/form.server";
import type { Act } from "#app/lib/services/perform.server";
import { PHOTO_LIMITS, storePhoto } from "#app/lib/services/store-photo.server";

const FILES = 10;

export interface PhotoForm {
  form: FormData;
  /** A picture that could not be taken, by field; the others are stored. */
  refused: { field: string; message: string }[];
}

/** @param commandFor id of the command that stores picture n of this form: a repeated send stores nothing twice. */
export async function readPhotoForm(
  request: Request,
  act: Omit<Act, "commandId">,
  commandFor: (form: FormData, n: number) => string,
): Promise<PhotoForm> {
  if (!/^multipart\/form-data\b/i.test(request.headers.get("Content-Type") ?? "")) return { form: await readForm(request), refused: [] };
  const refused: PhotoForm["refused"] = [];
  const pictures: { field: string; name: string; bytes: Uint8Array }[] = [];
  const form = await parsed(request, async (file) => {
    const bytes = new Uint8Array(await file.arrayBuffer());
    if (bytes.length > 0) pictures.push({ field: file.fieldName, name: file.name, bytes });
  });
  // The command's id is a field that may come after the pictures.
  for (const [n, { field, name, bytes }] of pictures.entries()) {
    const stored = await storePhoto({ ...act, commandId: commandFor(form, n) }, { bytes, name });
    if (stored.ok) form.append(field, stored.value.file);
    else refused.push({ field, message: stored.message });
  }
  return { form, refused };
}

type Upload = Parameters<NonNullable<Parameters<typeof parseFormData>[2]>>[0];

async function parsed(request: Request, take: (file: Upload) => Promise<void>): Promise<FormData> {
  try {
    const limits = { maxFiles: FILES, maxFileSize: PHOTO_LIMITS.bytes, maxTotalSize: FILES * PHOTO_LIMITS.bytes };
    return await parseFormData(request, limits, take);
  } catch (error) {
    const most = PHOTO_LIMITS.bytes / 1_000_000;
    if (error instanceof MaxFilesExceededError)
      throw data(`At most ${FILES} photos at once. Nothing was recorded; send fewer.`, { status: 413 });
    if (error instanceof MaxFileSizeExceededError || error instanceof MaxTotalSizeExceededError)
      throw data(`A photo may have at most ${most} MB. Nothing was recorded; send a smaller one.`, { status: 413 });
    if (error instanceof FormDataParseError && !request.signal.aborted)
      throw data("What was sent broke off or cannot be read. Nothing was recorded; send it again.", { status: 400 });
    throw error;
  }
}
