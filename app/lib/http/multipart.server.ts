// Reads a form that may carry photos: each picture is stored and stands in the form as its file's id.
import { readForm } from "#app/lib/http/form.server";
import { commandIdSchema } from "#app/lib/schemas/act";
import type { Refusal } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";
import { PHOTO_LIMITS, storePhoto } from "#app/lib/services/store-photo.server";

const MOST_PHOTOS = 10;

export interface PhotoForm {
  form: FormData;
  /** A picture that could not be taken, by field; the others are stored. */
  refused: { field: string; message: string; outcome: Refusal }[];
  /** Ids of the files that were stored, in their order. */
  stored: string[];
}

/**
 * @param intents acts of the page that take photos: pictures sent with anything else are let go. Null where the address takes nothing else.
 * Each picture is stored by a command of its own, named after the form's: a repeated send stores nothing twice.
 */
export async function readPhotoForm(request: Request, act: Omit<Act, "commandId">, intents: string[] | null): Promise<PhotoForm> {
  const refused: PhotoForm["refused"] = [];
  const pictures: { field: string; name: string; bytes: Uint8Array }[] = [];
  const form = await readForm(request, {
    most: MOST_PHOTOS,
    bytes: PHOTO_LIMITS.bytes,
    take: async (file) => {
      const bytes = new Uint8Array(await file.arrayBuffer());
      if (bytes.length > 0) pictures.push({ field: file.fieldName, name: file.name, bytes });
    },
  });
  const command = commandIdSchema.safeParse(form.get("commandId"));
  const ids: string[] = [];
  if (!command.success || intents?.includes(String(form.get("intent"))) === false) return { form, refused, stored: ids };
  for (const [n, { field, name, bytes }] of pictures.entries()) {
    const stored = await storePhoto({ ...act, commandId: `${command.data}-f${n}` }, { bytes, name });
    if (stored.ok) {
      form.append(field, stored.value.file);
      ids.push(stored.value.file);
    } else refused.push({ field, message: stored.message, outcome: stored });
  }
  return { form, refused, stored: ids };
}
