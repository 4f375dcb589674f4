// What the crib's page can do: the form as it arrives, the service that it asks for, and what goes back when it is refused.
import { parseWithZod } from "@conform-to/zod/v4";
import type { z } from "zod";
import type { InstallContext } from "#app/lib/http/install.server";
import {
  addExtinguisherForm,
  addToolForm,
  badCheckForm,
  goodCheckForm,
  lookForm,
  serviceForm,
  withdrawForm,
} from "#app/lib/schemas/crib-forms";
import { type FormReply, replyOf } from "#app/lib/schemas/form-reply";
import { addExtinguisher, addTool, recordLook, recordToolCheck } from "#app/lib/services/crib.server";
import type { Outcome } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";
import { anchorOfCrib } from "#app/lib/views/crib";

export type CribActed = { done: true; anchor: string } | { done: false; reply: FormReply; status: number };

/** Null where the form is none of the crib's. */
export async function actOnCrib({ installId, me }: InstallContext, sent: FormData): Promise<CribActed | null> {
  const act = (commandId: string): Act => ({ installId, actor: { userId: me.id }, commandId });
  const row = (field: string) => anchorOfCrib(String(sent.get(field) ?? ""));
  switch (sent.get("intent")) {
    case "add-tool":
      return acted(sent, "add-tool", addToolForm, async ({ commandId, name, serial }) =>
        anchored(await addTool(act(commandId), { name, serial }), (v) => anchorOfCrib(v.tool)),
      );
    case "add-extinguisher":
      return acted(sent, "add-extinguisher", addExtinguisherForm(me.units), async ({ commandId, intent: _, ...input }) =>
        anchored(await addExtinguisher(act(commandId), input), (v) => anchorOfCrib(v.extinguisher)),
      );
    case "good-check":
      return acted(sent, `${row("tool")}-good`, goodCheckForm, async ({ commandId, intent: _, ...check }) =>
        anchored(await recordToolCheck(act(commandId), { ...check, good: true }), () => row("tool")),
      );
    case "bad-check":
      return acted(sent, `${row("tool")}-bad`, badCheckForm, async ({ commandId, intent: _, ...check }) =>
        anchored(await recordToolCheck(act(commandId), { ...check, good: false, due: null }), () => row("tool")),
      );
    case "look":
    case "service":
      return acted(
        sent,
        `${row("extinguisher")}-${sent.get("intent")}`,
        sent.get("intent") === "look" ? lookForm : serviceForm,
        async (form) => {
          const { commandId, intent, ...look } = form;
          return anchored(await recordLook(act(commandId), { ...look, kind: intent }), () => row("extinguisher"));
        },
      );
    case "withdrawn":
      return acted(sent, `${row("extinguisher")}-withdrawn`, withdrawForm, async ({ commandId, intent, ...look }) =>
        anchored(await recordLook(act(commandId), { ...look, kind: intent, due: null }), () => row("extinguisher")),
      );
    default:
      return null;
  }
}

const anchored = <T>(outcome: Outcome<T>, anchor: (value: T) => string): Outcome<string> =>
  outcome.ok ? { ok: true, value: anchor(outcome.value) } : outcome;

async function acted<S extends z.ZodType>(
  sent: FormData,
  form: string,
  schema: S,
  serve: (input: z.output<S>) => Promise<Outcome<string>>,
): Promise<CribActed> {
  const submission = parseWithZod(sent, { schema });
  if (submission.status !== "success") return { done: false, reply: replyOf(form, sent, submission.reply().error), status: 400 };
  const outcome = await serve(submission.value);
  if (outcome.ok) return { done: true, anchor: outcome.value };
  return { done: false, reply: replyOf(form, sent, { "": [outcome.message] }), status: outcome.status };
}
