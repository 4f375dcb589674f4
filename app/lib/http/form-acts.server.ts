// One form, one service: what is typed is judged, the act is done, and a refusal goes back with the text as it was.
import { parseWithZod } from "@conform-to/zod/v4";
import type { z } from "zod";
import type { InstallContext } from "#app/lib/http/install.server";
import { type FormReply, replyOf } from "#app/lib/schemas/form-reply";
import type { Outcome } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";

/** `anchor`: the row to lead back to. */
export type FormActed = { done: true; anchor: string } | { done: false; reply: FormReply; status: number };

interface Acting<S extends z.ZodType, T> {
  sent: FormData;
  /** Id of the form on the page, which gets the errors back. */
  form: string;
  schema: S;
  serve: (input: z.output<S>) => Promise<Outcome<T>>;
  anchor: (value: T) => string;
}

export async function formAct<S extends z.ZodType, T>({ sent, form, schema, serve, anchor }: Acting<S, T>): Promise<FormActed> {
  const submission = parseWithZod(sent, { schema });
  if (submission.status !== "success") return { done: false, reply: replyOf(form, sent, submission.reply().error), status: 400 };
  const outcome = await serve(submission.value);
  if (outcome.ok) return { done: true, anchor: anchor(outcome.value) };
  return { done: false, reply: replyOf(form, sent, { "": [outcome.message] }), status: outcome.status };
}

/** Ids of the photos that a form brought or still has; they stand in it as one text from then on, so that they come back with it. */
export function photosIn(sent: FormData, field: string): string[] {
  const ids = [...new Set(sent.getAll(field).flatMap((v) => (typeof v === "string" ? v.split(",") : [])))].filter(Boolean);
  sent.set(field, ids.join(","));
  return ids;
}

/** Acts in this person's name on this install, by the number of the form. */
export const actsOf =
  ({ installId, me }: InstallContext) =>
  (commandId: string): Act => ({ installId, actor: { userId: me.id }, commandId });
