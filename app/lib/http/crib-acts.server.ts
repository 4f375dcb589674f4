// What the crib's page can do: the form as it arrives, and the service that it asks for.
import { actsOf, type FormActed, formAct } from "#app/lib/http/form-acts.server";
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
import { addExtinguisher, addTool, recordLook, recordToolCheck } from "#app/lib/services/crib.server";
import { anchorOfCrib } from "#app/lib/views/crib";

/** Null where the form is none of the crib's. */
export async function actOnCrib(install: InstallContext, sent: FormData): Promise<FormActed | null> {
  const acts = actsOf(install);
  const row = (field: "tool" | "extinguisher") => anchorOfCrib(String(sent.get(field) ?? ""));
  const ofRow = (field: "tool" | "extinguisher", which: string) => ({ sent, form: `${row(field)}-${which}`, anchor: () => row(field) });
  switch (sent.get("intent")) {
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
        serve: ({ commandId, intent: _, ...check }) => recordToolCheck(acts(commandId), { ...check, good: true }),
      });
    case "bad-check":
      return formAct({
        ...ofRow("tool", "bad"),
        schema: badCheckForm,
        serve: ({ commandId, intent: _, ...check }) => recordToolCheck(acts(commandId), { ...check, good: false, due: null }),
      });
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
