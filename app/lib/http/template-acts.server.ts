// The acts of the page of one's own templates: read one in from a file, start an install from one, throw one away.
import { parseWithZod } from "@conform-to/zod/v4";
import { db } from "#app/db/client.server";
import { ownTemplate } from "#app/db/queries/own-templates.server";
import { commandIdSchema } from "#app/lib/schemas/act";
import { type FormReply, replyOf } from "#app/lib/schemas/form-reply";
import { identitySchema } from "#app/lib/schemas/new-install";
import { readTemplate } from "#app/lib/schemas/own-template";
import { createInstallSchema } from "#app/lib/schemas/set-up";
import { createInstall } from "#app/lib/services/create-install.server";
import { keepTemplate, throwTemplateAway } from "#app/lib/services/keep-template.server";
import { anchorOfTemplate, TEMPLATES } from "#app/lib/views/own-templates";
import { boardOf } from "#app/lib/views/places";

export type TemplateActed = { to: string } | { reply: FormReply; status: number };

const LOST = "The form has lost its number. Load the page again.";

/** Null where the form is none of this page's. @param file text of the file that came with it, if one did. */
export async function actOnTemplates(userId: string, sent: FormData, file: string | null): Promise<TemplateActed | null> {
  const actor = { userId };
  const command = commandIdSchema.safeParse(sent.get("commandId"));
  const id = String(sent.get("template") ?? "");
  const refused = (form: string, errors: Record<string, string[]>, status: number) => ({ reply: replyOf(form, sent, errors), status });
  switch (sent.get("intent")) {
    case "read": {
      if (!command.success) return refused("read", { "": [LOST] }, 400);
      if (file === null) return refused("read", { file: ["Choose a file that was saved from a template."] }, 400);
      const read = readTemplate(file);
      if (!read.ok) return refused("read", { file: read.sentences }, 422);
      const outcome = await keepTemplate({ actor, commandId: command.data }, read.template);
      if (!outcome.ok) return refused("read", { "": [outcome.message] }, outcome.status);
      return { to: `${TEMPLATES}#${anchorOfTemplate(outcome.value.template)}` };
    }
    case "away": {
      const outcome = await throwTemplateAway({ actor }, id);
      return outcome.ok ? { to: TEMPLATES } : refused("read", { "": [outcome.message] }, outcome.status);
    }
    case "start":
      return start(userId, sent, id, command.success ? command.data : null);
    default:
      return null;
  }
}

async function start(userId: string, sent: FormData, id: string, commandId: string | null): Promise<TemplateActed> {
  const form = anchorOfTemplate(id);
  const refused = (errors: Parameters<typeof replyOf>[2], status: number) => ({ reply: replyOf(form, sent, errors), status });
  const kept = await ownTemplate(db(), userId, id);
  if (!kept) return refused({ "": ["This template is not here any more. Load the page again."] }, 404);
  if (!commandId) return refused({ "": [LOST] }, 400);
  const submission = parseWithZod(sent, { schema: identitySchema });
  if (submission.status !== "success") return refused(submission.reply().error, 400);
  const { traits, values } = kept.body;
  const known = Object.fromEntries(Object.entries(values).map(([key, value]) => [key, { value: value ?? null, source: null }]));
  const input = createInstallSchema.parse({ ...submission.value, traits, values: known });
  const outcome = await createInstall({ actor: { userId }, commandId }, input, kept.body);
  return outcome.ok ? { to: boardOf(outcome.value.install) } : refused({ "": [outcome.message] }, outcome.status);
}
