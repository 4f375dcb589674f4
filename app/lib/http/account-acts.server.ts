// A form about an account: what is typed is judged, the act is done, and a refusal goes back with the text as it was, but for what is
// secret: no password, PIN or token is ever written into a page.
import { parseWithZod } from "@conform-to/zod/v4";
import type { z } from "zod";
import { type FormReply, replyOf } from "#app/lib/schemas/form-reply";
import type { Outcome } from "#app/lib/services/outcome";

const SECRETS = ["password", "newPassword", "pin", "pinAgain"];

/** Refusals that are about one field, by their code. */
const FIELD: Record<string, string> = {
  "password-wrong": "password",
  "password-weak": "newPassword",
  "pin-weak": "pin",
  "address-same": "email",
};

export type AccountActed<T> = { done: true; value: T } | { done: false; reply: FormReply; status: number };

interface Acting<S extends z.ZodType, T> {
  sent: FormData;
  /** Id of the form on the page, which gets the errors back. */
  form: string;
  schema: S;
  serve: (input: z.output<S>) => Promise<Outcome<T>>;
}

export async function accountAct<S extends z.ZodType, T>({ sent, form, schema, serve }: Acting<S, T>): Promise<AccountActed<T>> {
  const shown = new FormData();
  for (const [name, value] of sent) if (!SECRETS.includes(name)) shown.append(name, value);
  const submission = parseWithZod(sent, { schema });
  if (submission.status !== "success") return { done: false, reply: replyOf(form, shown, submission.reply().error), status: 400 };
  const outcome = await serve(submission.value);
  if (outcome.ok) return { done: true, value: outcome.value };
  return { done: false, reply: replyOf(form, shown, { [FIELD[outcome.code] ?? ""]: [outcome.message] }), status: outcome.status };
}
