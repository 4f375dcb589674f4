import type { ReactNode } from "react";
import { Form, useNavigation } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { MailReaders } from "#app/components/run/MailReaders";
import { type LadderRung, RunTitle } from "#app/components/run/RunTitle";
import type { StopRow } from "#app/components/run/StopList";
import { Fitting } from "#app/components/ui/Fitting";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";

/** What the sheet stands on: the run, whether it can be done now, and who gets the mail. */
export interface ReasonSheet {
  run: { id: string; label: string; when: string; ladder: LadderRung[]; gates: number; stops: StopRow[]; href: string };
  /** Why it cannot be done now. */
  why: string | null;
  readers: { id: string; name: string; places: string }[];
  commandId: string;
}

interface ReasonPageProps {
  sheet: ReasonSheet;
  reply: FormReply | undefined;
  title: string;
  /** What comes before the reason: what it means. */
  children: ReactNode;
  label?: string;
  hint: string;
  act: string;
  stop?: boolean;
  /** On the way back: "Back, no mail goes out". */
  back: string;
  /** Of the list of readers, and what each of them gets. */
  told: { title: string; what: string };
  /** The readers stand below the act, so that they do not push it off a phone. */
  toldAfter?: boolean;
}

/** An act on a run that needs a reason: what it does, who is told, the reason, one big act, and the way back. */
export function ReasonPage(props: ReasonPageProps) {
  const { sheet, reply, title, children, label = "Why", hint, act, stop, back, told, toldAfter = false } = props;
  const { run, why, readers, commandId } = sheet;
  const busy = useNavigation().state === "submitting";
  const { field, faults } = fieldsOf("sheet", reply);
  const reason = field("reason");
  const wrong = [
    ...faults.map((message) => ({ field: null, message })),
    ...(reason.errors ?? []).map((message) => ({ field: reason.id, message })),
  ];
  const list = <MailReaders title={told.title} readers={readers} what={told.what} />;
  return (
    <main id="main">
      <RunTitle title={title} state={run.when} rungs={run.ladder} gates={run.gates} here={run.id} />
      <div className="mx-auto flex w-full max-w-[820px] flex-col gap-6 px-4 py-6 tablet:px-6">
        <ErrorSummary errors={wrong} />
        {children}
        {!toldAfter && list}
        <Form method="post" className="flex flex-col gap-4">
          <HiddenIds commandId={commandId} />
          <TextInput {...reason} label={label} hint={hint} rows={3} maxLength={1000} required />
          <Fitting
            size="act"
            variant={stop ? "stop" : "filled"}
            note={readers.length === 1 ? "1 person gets a mail" : `${readers.length} people get a mail`}
            reason={why ?? undefined}
            busy={busy}
          >
            {act}
          </Fitting>
        </Form>
        {toldAfter && list}
        <p className="pt-6">
          <Fitting href={run.href} className="w-fit">
            {back}
          </Fitting>
        </p>
      </div>
    </main>
  );
}
