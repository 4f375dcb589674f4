// Reads a form. A body of another kind, or one that breaks off, is the sender's fault and answered as such.
import { data } from "react-router";

/** The fields of a form. Throws an answer 415 when the body is no form, 400 when it cannot be read. */
export async function readForm(request: Request): Promise<FormData> {
  if (!/^(application\/x-www-form-urlencoded|multipart\/form-data)\b/i.test(request.headers.get("Content-Type") ?? "")) {
    throw data("This address takes a form, and something else was sent. Nothing was changed.", { status: 415 });
  }
  try {
    return await request.formData();
  } catch (error) {
    if (request.signal.aborted) throw error;
    throw data("What was sent broke off or cannot be read. Nothing was changed; send it again.", { status: 400 });
  }
}
