import { data, Form, redirect } from "react-router";
import { TemplateItem } from "#app/components/board-edit/TemplateItem";
import { FieldErrors } from "#app/components/forms/Field";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";
import { Strip } from "#app/components/ui/Strip";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { ownTemplates } from "#app/db/queries/own-templates.server";
import { actorOf } from "#app/lib/auth/actor.server";
import { readForm } from "#app/lib/http/form.server";
import { actOnTemplates } from "#app/lib/http/template-acts.server";
import { newId } from "#app/lib/ids";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { templateRow } from "#app/lib/views/own-templates";
import { everywhereLinks } from "#app/lib/views/strip";
import type { Route } from "./+types/_app.templates";

export const meta: Route.MetaFunction = () => [{ title: "Own templates · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { userId, name, isAdmin } = actorOf(context);
  return {
    name,
    links: everywhereLinks("/templates", isAdmin),
    rows: (await ownTemplates(db(), userId)).map(templateRow),
    zones: [...new Set([...Intl.supportedValuesOf("timeZone"), "UTC"])].sort(),
    serverZone: Intl.DateTimeFormat().resolvedOptions().timeZone,
    formId: newId(),
  };
}

export async function action({ context, request }: Route.ActionArgs) {
  let file: string | null = null;
  const sent = await readForm(request, {
    most: 1,
    bytes: 2_000_000,
    what: { one: "template", many: "templates" },
    take: async (upload) => {
      const text = await upload.text();
      if (text) file = text;
    },
  });
  const acted = await actOnTemplates(actorOf(context).userId, sent, file);
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if ("to" in acted) return redirect(acted.to, 303);
  return data(acted.reply, { status: acted.status });
}

export default function OwnTemplates({ loaderData, actionData }: Route.ComponentProps) {
  const { name, links, rows, zones, serverZone, formId } = loaderData;
  const read = fieldsOf("read", actionData);
  const { errors } = read.field("file");
  return (
    <div className="page">
      <Strip homeHref="/hangar" navLabel="Everywhere" links={links} person={name} />
      <main id="main">
        <TitlePipe title="Own templates" state={rows.length === 1 ? "1 template" : `${rows.length} templates`} />
        <p className="max-w-[72ch] px-4 py-4 tablet:px-6">
          {rows.length
            ? "Boards that you keep to start other installs from. Nobody else sees them; hand one on as a file."
            : "No template yet. Keep a board as one in the board editor of an install, or read one in from a file below."}
        </p>
        <ul className="border-t-2 border-ink">
          {rows.map((row) => (
            <TemplateItem
              key={row.id}
              row={row}
              zones={zones}
              serverZone={serverZone}
              commandId={`${formId}-${row.id}`}
              reply={actionData}
            />
          ))}
        </ul>
        <section aria-labelledby="read-in" className="px-4 py-5 tablet:px-6">
          <h2 id="read-in" className="text-h3">
            Read one in
          </h2>
          <Form method="post" encType="multipart/form-data" className="flex flex-col items-start gap-3 pt-2">
            <FormFaults faults={read.faults} />
            <HiddenIds commandId={`${formId}-read`} intent="read" />
            <div className="field photo-field">
              <label htmlFor="template-file">File of a template, JSON</label>
              <input
                id="template-file"
                type="file"
                name="file"
                accept="application/json,.json"
                aria-describedby={errors ? "template-file-errors" : undefined}
                aria-invalid={errors ? true : undefined}
              />
              <FieldErrors id="template-file-errors" errors={errors} />
            </div>
            <Fitting note="it is checked first">Read it in</Fitting>
          </Form>
        </section>
      </main>
    </div>
  );
}
