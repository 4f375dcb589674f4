// What the crib's page can do: the form as it arrives, and the service that it asks for.
import { parseWithZod } from "@conform-to/zod/v4";
import { endOfDate, startOfDate } from "#app/lib/gates/local-time";
import { actsOf, formAct, photosIn } from "#app/lib/http/form-acts.server";
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
import { anchorOfCrib, type CheckShown } from "#app/lib/views/crib";
import { lapsesByBadCheck } from "#app/lib/views/what-lapses";

/** The reply to a bad check also carries what it makes lapse. */
export type CribReply = FormReply & { checking?: CheckShown };
export type CribActed = { done: true; anchor: string } | { done: false; reply: CribReply; status: number };

/** Null where the form is none of the crib's. @param photoFault why a photo that was sent could not be taken. */
export async function actOnCrib(install: InstallContext, sent: FormData, photoFault: string | null): Promise<CribActed | null> {
  const acts = actsOf(install);
  const row = (field: "tool" | "extinguisher") => anchorOfCrib(String(sent.get(field) ?? ""));
  const ofRow = (field: "tool" | "extinguisher", which: string) => ({ sent, form: `${row(field)}-${which}`, anchor: () => row(field) });
  const intent = sent.get("intent");
  const [photo = null] = intent === "good-check" || intent === "bad-check" ? photosIn(sent, "photo") : [];
  if (photoFault && (intent === "good-check" || intent === "bad-check")) {
    const form = `${row("tool")}-${intent === "good-check" ? "good" : "bad"}`;
    return { done: false, reply: replyOf(form, sent, { photo: [photoFault] }), status: 422 };
  }
  switch (intent) {
    case "add-tool":
      return formAct({
        sent,
        form: "add-tool",
        schema: addToolForm,
        serve: ({ commandId, name, serial }) => addTool(acts(commandId), { name, serial }),
        anchor: ({ tool }) => anchorOfCrib(tool),
      });
    case "add-extinguisher":
      return formAct({
        sent,
        form: "add-extinguisher",
        schema: addExtinguisherForm(install.me.units),
        serve: ({ commandId, intent: _, ...input }) => addExtinguisher(acts(commandId), input),
        anchor: ({ extinguisher }) => anchorOfCrib(extinguisher),
      });
    case "good-check":
      return formAct({
        ...ofRow("tool", "good"),
        schema: goodCheckForm,
        serve: ({ commandId, intent: _, ...check }) => recordToolCheck(acts(commandId), { ...check, photo, good: true }),
      });
    case "bad-check":
      return (
        previewBad(install, sent, `${row("tool")}-bad`) ??
        formAct({
          ...ofRow("tool", "bad"),
          schema: badCheckForm,
          serve: ({ commandId, intent: _, ...check }) => recordToolCheck(acts(commandId), { ...check, photo, good: false, due: null }),
        })
      );
    case "look":
      return formAct({
        ...ofRow("extinguisher", "look"),
        schema: lookForm,
        serve: ({ commandId, intent, ...look }) => recordLook(acts(commandId), { ...look, kind: intent }),
      });
    case "service":
      return formAct({
        ...ofRow("extinguisher", "service"),
        schema: serviceForm,
        serve: ({ commandId, intent, ...look }) => recordLook(acts(commandId), { ...look, kind: intent }),
      });
    case "withdrawn":
      return formAct({
        ...ofRow("extinguisher", "withdrawn"),
        schema: withdrawForm,
        serve: ({ commandId, intent, ...look }) => recordLook(acts(commandId), { ...look, kind: intent, due: null }),
      });
    default:
      return null;
  }
}

/** What a bad check makes lapse is shown once before it is recorded; null where that was seen already, or where nothing lapses. */
function previewBad({ e, snapshot }: InstallContext, sent: FormData, form: string): CribActed | null {
  const read = parseWithZod(sent, { schema: badCheckForm });
  const zone = snapshot.install.timeZone;
  if (read.status !== "success") return null;
  const { tool, on, since } = read.value;
  const day = endOfDate(on, zone);
  if (day === null) return null;
  const seen = [tool, on, since ?? "", e.result.runs.find((r) => r.go)?.id ?? ""].join("|");
  if (sent.get("seen") === seen) return null;
  const lapses = lapsesByBadCheck(e, tool, { at: Math.min(day, e.at), since: since === null ? null : startOfDate(since, zone) });
  if (!lapses.gates.length && !lapses.hold) return null;
  return { done: false, reply: { ...replyOf(form, sent, {}), checking: { form, seen, lapses } }, status: 200 };
}
