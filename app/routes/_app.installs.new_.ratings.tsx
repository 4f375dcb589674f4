import { getFormProps, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect, useNavigation } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { NewInstallPage } from "#app/components/new-install/NewInstallPage";
import { RatingFields, ratingId, ratingName } from "#app/components/new-install/RatingFields";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { actorOf } from "#app/lib/auth/actor.server";
import { readForm } from "#app/lib/http/form.server";
import { newId } from "#app/lib/ids";
import { ratingsForm } from "#app/lib/schemas/new-install";
import { createInstallSchema } from "#app/lib/schemas/set-up";
import { createInstall } from "#app/lib/services/create-install.server";
import type { Traits } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { type Draft, judgeFirst, judgeSecond, placeOfPage, readDraft, traitsOf } from "#app/lib/views/new-install";
import { whatItMakes } from "#app/lib/views/new-install-makes";
import { ratingGroups } from "#app/lib/views/new-install-ratings";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.new_.ratings";

export const meta = () => [{ title: "New install, page 3 of 3 · Bladecount" }];

export function loader({ context, url }: Route.LoaderArgs) {
  const { draft, traits } = answered(url);
  const { name, units } = actorOf(context);
  const { gates, items } = whatItMakes(traits);
  return {
    person: name,
    registration: draft.registration,
    groups: ratingGroups(traits, units),
    gates,
    items,
    back: placeOfPage(2, draft),
    commandId: newId(),
  };
}

export async function action({ context, request, url }: Route.ActionArgs) {
  const { draft, traits } = answered(url);
  const { userId, units } = actorOf(context);
  const submission = parseWithZod(await readForm(request), { schema: ratingsForm(valueDefs(traits), units) });
  if (submission.status !== "success") return data({ result: submission.reply() }, { status: 400 });
  const { commandId, values } = submission.value;
  const { registration, name, timeZone } = draft;
  const input = createInstallSchema.parse({ registration, name, timeZone, traits, values });
  const outcome = await createInstall({ actor: { userId }, commandId }, input);
  if (!outcome.ok) return data({ result: submission.reply({ formErrors: [outcome.message] }) }, { status: outcome.status });
  return redirect(boardOf(outcome.value.install), 303);
}

/** The answers of the first two pages; where they are not complete, the way back to the page that says why. */
function answered(url: URL): { draft: Draft; traits: Traits } {
  const draft = readDraft(url.searchParams);
  const traits = traitsOf(draft);
  if (!traits || !judgeFirst(draft).ready) throw redirect(`${placeOfPage(1, draft)}&next=details`, 303);
  if (!judgeSecond(traits).ready) throw redirect(`${placeOfPage(2, draft)}&next=ratings`, 303);
  return { draft, traits };
}

interface Typed {
  values: Record<string, { value: string; source: string }>;
}

export default function NewInstallRatings({ loaderData: page, actionData }: Route.ComponentProps) {
  const busy = useNavigation().state === "submitting";
  const rows = page.groups.flatMap((group) => group.rows);
  const [form, fields] = useForm<Typed>({
    id: "ratings-form",
    lastResult: busy ? undefined : actionData?.result,
    defaultValue: { values: Object.fromEntries(rows.map((row) => [row.key, { value: row.preset, source: "" }])) },
  });
  const values = fields.values.getFieldset();
  const field = (key: string, which: "value" | "source") => values[key]?.getFieldset()[which];
  const wrong = [
    ...(form.errors ?? []).map((message) => ({ field: null, message })),
    ...rows.flatMap((row) =>
      (["value", "source"] as const).flatMap((which) =>
        (form.allErrors[ratingName(row.key, which)] ?? []).map((message) => ({
          field: ratingId(row.key, which),
          message: `${row.label}: ${message}`,
        })),
      ),
    ),
  ];
  return (
    <NewInstallPage
      page={3}
      person={page.person}
      about={`ratings and limits of ${page.registration}`}
      fill={1}
      foot={
        <Foot says={`${page.gates} gates, ${page.items} items before the first start`} note="You become its lead. Nobody is told yet.">
          <Fitting form={form.id} size="act" busy={busy} note="empty numbers can follow later">
            Make the board
          </Fitting>
        </Foot>
      }
    >
      <CautionSlab title="Numbers come from the maker.">
        Bladecount never replaces the engine, propeller or kit maker’s manual, the authority’s rules, or the judgement of a licensed person.
        Where they differ from what stands here, they count.
      </CautionSlab>
      <Form method="post" {...getFormProps(form)}>
        <HiddenIds commandId={page.commandId} />
        <div className="flex flex-col gap-4 px-4 py-5 tablet:px-6">
          <ErrorSummary errors={wrong} />
          <p className="max-w-[72ch] text-lead">
            All of it may stay empty today. A number counts once you say where you read it, such as “engine manual, issue 4, p. 12”. Until
            then it is a starting point, marked as not confirmed; a starting point that you clear comes back.
          </p>
        </div>
        {page.groups.map((group) => (
          <RatingFields
            key={group.id}
            group={group}
            initial={(key, which) => String(field(key, which)?.initialValue ?? "")}
            errors={(key, which) => form.allErrors[ratingName(key, which)]}
          />
        ))}
      </Form>
      <p className="border-t-2 border-ink px-4 py-5 tablet:px-6">
        <Fitting href={page.back} note="numbers typed here are not kept" className="w-fit">
          Back to page 2
        </Fitting>
      </p>
    </NewInstallPage>
  );
}
