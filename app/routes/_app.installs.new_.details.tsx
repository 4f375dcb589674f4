import { redirect } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { ANSWERS, AnswersForm } from "#app/components/new-install/AnswersForm";
import { NewInstallPage } from "#app/components/new-install/NewInstallPage";
import { WhatItMakes } from "#app/components/new-install/WhatItMakes";
import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { Notice } from "#app/components/ui/Notice";
import { actorOf } from "#app/lib/auth/actor.server";
import {
  changedOf,
  judgeFirst,
  judgeSecond,
  PAGES,
  placeOfPage,
  readDraft,
  secondQuestions,
  traitsOf,
  writeDraft,
} from "#app/lib/views/new-install";
import { whatItMakes } from "#app/lib/views/new-install-makes";
import type { Route } from "./+types/_app.installs.new_.details";

export const meta = () => [{ title: "New install, page 2 of 3 · Bladecount" }];

export function loader({ context, url }: Route.LoaderArgs) {
  const draft = readDraft(url.searchParams);
  const next = url.searchParams.get("next");
  const traits = traitsOf(draft);
  if (next === "back") throw redirect(placeOfPage(1, draft));
  if (!traits || !judgeFirst(draft).ready) throw redirect(`${placeOfPage(1, draft)}&next=details`);
  const judged = judgeSecond(traits);
  if (next && judged.ready) throw redirect(placeOfPage(3, draft));
  const questions = secondQuestions(traits);
  const here = new Set<string>(questions.map((q) => q.key));
  const [first] = judged.onFirst;
  return {
    person: actorOf(context).name,
    registration: draft.registration,
    questions,
    // What does not apply now comes back as it was when it applies again.
    carried: [...writeDraft(draft)].filter(([name]) => !here.has(name)),
    errors: judged.errors,
    ready: judged.ready,
    goOn: next !== null,
    changed: changedOf(traits),
    toFirst: first ? `${placeOfPage(1, draft)}#${first}` : null,
    makes: whatItMakes(traits),
  };
}

export default function NewInstallDetails({ loaderData: page }: Route.ComponentProps) {
  const { questions, errors, changed } = page;
  const wrong = questions.flatMap((q) => (errors[q.key] ?? []).map((message) => ({ field: q.key, message: `${q.no}. ${message}` })));
  return (
    <NewInstallPage
      page={2}
      person={page.person}
      about={`details of ${page.registration}`}
      fill={2 / 3}
      side={<WhatItMakes makes={page.makes} open={0} />}
      foot={
        <Foot
          says={
            <output>
              {wrong.length > 0
                ? `${wrong.length === 1 ? "1 answer contradicts" : `${wrong.length} answers contradict`} another`
                : `${questions.length} details, ${changed === 0 ? "all as preset" : `${changed} changed by you`}`}
            </output>
          }
          note="Look at each: a preset is the likeliest answer, not yours."
        >
          <Fitting
            form={ANSWERS}
            name="next"
            value="ratings"
            size="act"
            variant={page.ready ? "filled" : "outline"}
            note={page.ready ? "no number has to be known today" : "when the answers agree"}
          >
            Next: ratings and limits
          </Fitting>
        </Foot>
      }
    >
      {page.goOn && (
        <div className="pb-4">
          <ErrorSummary errors={wrong} />
        </div>
      )}
      <p className="max-w-[62ch] pb-2 text-lead">
        Each is preset to the likeliest answer for what page 1 says. Change what is different on this aircraft.
      </p>
      {page.toFirst && (
        <Notice
          kind="refused"
          title="An answer here and one on page 1 cannot both be true."
          action={<Anchor href={page.toFirst}>Change it on page 1</Anchor>}
        >
          The sentence stands at the cycle below. Change that, or the answer on page 1.
        </Notice>
      )}
      <AnswersForm action={PAGES[1]} questions={questions} errors={errors} carried={page.carried} />
      <p className="border-t border-line pt-4">
        <Fitting form={ANSWERS} name="next" value="back" className="w-fit">
          Back to page 1, with these answers
        </Fitting>
      </p>
    </NewInstallPage>
  );
}
