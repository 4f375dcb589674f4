import { useEffect, useState } from "react";
import { redirect } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { ANSWERS, AnswersForm } from "#app/components/new-install/AnswersForm";
import { NewInstallPage } from "#app/components/new-install/NewInstallPage";
import { WhatItMakes } from "#app/components/new-install/WhatItMakes";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { actorOf } from "#app/lib/auth/actor.server";
import { LONGEST_REGISTRATION } from "#app/lib/schemas/set-up";
import {
  type Errors,
  firstQuestions,
  judgeFirst,
  PAGES,
  placeOfPage,
  plainest,
  readDraft,
  type ShownQuestion,
  writeDraft,
} from "#app/lib/views/new-install";
import { whatItMakes } from "#app/lib/views/new-install-makes";
import type { Route } from "./+types/_app.installs.new";

export const meta = () => [{ title: "New install, page 1 of 3 · Bladecount" }];

export function loader({ context, url }: Route.LoaderArgs) {
  const draft = readDraft(url.searchParams);
  const judged = judgeFirst(draft);
  const goOn = url.searchParams.has("next");
  if (goOn && judged.ready) throw redirect(placeOfPage(2, draft));
  const questions = firstQuestions(draft);
  const here = new Set<string>(["registration", "name", "zone", ...questions.map((q) => q.key)]);
  return {
    person: actorOf(context).name,
    draft,
    questions,
    carried: [...writeDraft(draft)].filter(([name]) => !here.has(name)),
    left: judged.open.length,
    ready: judged.ready,
    errors: goOn ? { ...Object.fromEntries(judged.open.map((key) => [key, ["Choose an answer."]])), ...judged.errors } : judged.errors,
    identity: goOn ? judged.identity : {},
    goOn,
    makes: whatItMakes(plainest(draft)),
    zones: [...new Set([...Intl.supportedValuesOf("timeZone"), "UTC"])].sort(),
    serverZone: Intl.DateTimeFormat().resolvedOptions().timeZone,
  };
}

export default function NewInstall({ loaderData: page }: Route.ComponentProps) {
  const { draft, questions, errors, identity, left } = page;
  const total = questions.length;
  return (
    <NewInstallPage
      page={1}
      person={page.person}
      about="what hangs on it"
      fill={(total - left) / total / 3}
      side={<WhatItMakes makes={page.makes} open={left} />}
      foot={
        <Foot
          says={<output>{left === 0 ? "All answered" : left === 1 ? "1 question left" : `${left} questions left`}</output>}
          note="The answers stand in this page’s address: keep it to go on later."
        >
          <Fitting
            form={ANSWERS}
            name="next"
            value="details"
            size="act"
            variant={page.ready ? "filled" : "outline"}
            note={`when all ${total} and the name are there`}
          >
            Next: details
          </Fitting>
        </Foot>
      }
    >
      {page.goOn && (
        <div className="pb-4">
          <ErrorSummary errors={listed(identity, errors, questions)} />
        </div>
      )}
      <AnswersForm action={PAGES[0]} questions={questions} errors={errors} carried={page.carried}>
        <div className="flex flex-wrap items-start gap-x-4 gap-y-3 border-b border-line pb-4">
          <TextInput
            name="registration"
            label="Registration"
            figures
            size={LONGEST_REGISTRATION}
            maxLength={LONGEST_REGISTRATION}
            autoComplete="off"
            defaultValue={draft.registration}
            errors={identity.registration}
            className={SHRINKS}
          />
          <TextInput
            name="name"
            label="Name"
            size={16}
            maxLength={80}
            autoComplete="off"
            defaultValue={draft.name}
            errors={identity.name}
            className={SHRINKS}
          />
          <Zone chosen={draft.timeZone} zones={page.zones} server={page.serverZone} errors={identity.timeZone} />
        </div>
      </AnswersForm>
    </NewInstallPage>
  );
}

/** A field is as wide as what it holds, and no wider than the page. */
const SHRINKS = "min-w-0 max-w-full";

/** Preset to the server's zone, or the tablet's once it can be asked. */
function Zone({ chosen, zones, server, errors }: { chosen: string; zones: string[]; server: string; errors?: string[] }) {
  const [zone, setZone] = useState(chosen || server);
  useEffect(() => {
    const own = Intl.DateTimeFormat().resolvedOptions().timeZone;
    if (!chosen && zones.includes(own)) setZone(own);
  }, [chosen, zones]);
  return (
    <Select
      name="zone"
      label="Time zone of the place where it runs"
      options={zones.map((name) => ({ value: name, label: name }))}
      value={zone}
      onChange={setZone}
      className={SHRINKS}
      errors={errors}
    />
  );
}

function listed(identity: Errors, errors: Errors, questions: ShownQuestion[]) {
  const own = Object.entries(identity).flatMap(([key, list]) =>
    list.map((message) => ({ field: key === "timeZone" ? "zone" : key, message })),
  );
  const wrong = questions.flatMap((q) =>
    q.answer === null ? [] : (errors[q.key] ?? []).map((message) => ({ field: q.key, message: `${q.no}. ${message}` })),
  );
  const [open, ...more] = questions.filter((q) => q.answer === null);
  const left =
    more.length === 0 ? `${open?.no}. ${open?.label}` : `${more.length + 1} questions have no answer yet. The first is ${open?.no}.`;
  return [...own, ...wrong, ...(open ? [{ field: open.key, message: left }] : [])];
}
