// Reads a form. A body of another kind, one that breaks off, or a form that no page of this site sends, is the sender's fault and
// answered as such, before anybody looks at the fields.
import {
  type FileUpload,
  FormDataParseError,
  MaxFileSizeExceededError,
  MaxFilesExceededError,
  MaxPartsExceededError,
  MaxTotalSizeExceededError,
  MultipartParseError,
  parseFormData,
} from "@remix-run/form-data-parser";
import { data } from "react-router";

/** The longest forms, a sheet with all its rows or the ratings of an install, have some hundred fields. */
const MOST_FIELDS = 1500;
const LONGEST_NAME = 100;
/** At most four steps of which the last may be a place in a list: "words", "values.redline.source", "crew.operator[1]", "p0.s.straps.wll". */
const FIELD_NAME = /^[a-z0-9][\w-]*(\.[a-z0-9][\w-]*){0,2}(\.[a-z0-9][\w-]*|\[\d{0,2}\])?$/i;

const URL_ENCODED = /^application\/x-www-form-urlencoded\b/i;
const MULTIPART = /^multipart\/form-data\b/i;

/** Files that a form may carry: how many, how large each (bytes), and who takes them. */
export interface Uploads {
  most: number;
  bytes: number;
  take: (file: FileUpload) => Promise<void>;
  /** What they are called in a refusal; photos where nothing else is said. */
  what?: { one: string; many: string };
}

/**
 * The fields of a form. Throws an answer 415 when the body is no form, or one with files where none are taken; 413 when there is too
 * much of it; 400 when it cannot be read or has fields that no form has.
 */
export async function readForm(request: Request, uploads?: Uploads): Promise<FormData> {
  const type = request.headers.get("Content-Type") ?? "";
  if (!URL_ENCODED.test(type) && !(uploads && MULTIPART.test(type)))
    throw data("This address takes a form, and something else was sent. Nothing was changed.", { status: 415 });
  const form = await parsed(request, uploads);
  const names = [...form.keys()];
  if (names.length > MOST_FIELDS) throw tooManyFields();
  if (names.some((name) => name.length > LONGEST_NAME || !FIELD_NAME.test(name)))
    throw data("The form has a field that no form of this site has. Nothing was changed; load the page again.", { status: 400 });
  return form;
}

const tooManyFields = () => data(`The form has more than ${MOST_FIELDS} fields. Nothing was changed; send less at once.`, { status: 413 });

const PHOTOS = { one: "photo", many: "photos" };

async function parsed(
  request: Request,
  { most, bytes, take, what = PHOTOS }: Uploads = { most: 0, bytes: 0, take: async () => {} },
): Promise<FormData> {
  try {
    return await parseFormData(request, { maxFiles: most, maxFileSize: bytes, maxParts: MOST_FIELDS }, take);
  } catch (error) {
    if (request.signal.aborted) throw error;
    if (error instanceof MaxPartsExceededError) throw tooManyFields();
    if (error instanceof MaxFilesExceededError)
      throw data(`At most ${most} ${what.many} at once. Nothing was recorded; send fewer.`, { status: 413 });
    if (error instanceof MaxFileSizeExceededError)
      throw data(`A ${what.one} may have at most ${bytes / 1_000_000} MB. Nothing was recorded; send a smaller one.`, { status: 413 });
    if (error instanceof MaxTotalSizeExceededError)
      throw data("That is more than is taken at once. Nothing was recorded; send less.", { status: 413 });
    if (error instanceof FormDataParseError || error instanceof MultipartParseError)
      throw data("What was sent broke off or cannot be read. Nothing was changed; send it again.", { status: 400 });
    throw error;
  }
}
