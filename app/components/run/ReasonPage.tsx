import type { ReactNode } from "react";
import { Form, useNavigation } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";

interface ReasonPageProps {
  /** What comes before the reason: who gets it, what it means. */
  children: ReactNode;
  /** Below the act: details that must not push it off a phone. */
  after?: ReactNode;
  commandId: string;
  label: string;
  hint: string;
  act: string;
  note: string;
  stop?: boolean;
  /** Why it cannot be done now. */
  why: string | null;
  back: { href: string; label: string };
  errors: { reason?: string[]; form?: string[] };
  reason?: string;
}

/** An act that needs a reason: what it does, the reason, one big act, and the way back. */
export function ReasonPage(props: ReasonPageProps) {
  const { children, after, commandId, label, hint, act, note, stop, why, back, errors, reason } = props;
  const busy = useNavigation().state === "submitting";
  const wrong = [
    ...(errors.form ?? []).map((message) => ({ field: null, message })),
    ...(errors.reason ?? []).map((message) => ({ field: "reason", message })),
  ];
  return (
    <div className="mx-auto flex w-full max-w-[820px] flex-col gap-6 px-4 py-6 tablet:px-6">
      <ErrorSummary errors={wrong} />
      {children}
      <Form method="post" className="flex flex-col gap-4">
        <HiddenIds commandId={commandId} />
        <TextInput
          name="reason"
          label={label}
          hint={hint}
          rows={3}
          maxLength={1000}
          defaultValue={reason}
          errors={errors.reason}
          required
        />
        <Fitting size="act" variant={stop ? "stop" : "filled"} note={note} reason={why ?? undefined} busy={busy}>
          {act}
        </Fitting>
      </Form>
      {after}
      <p className="pt-6">
        <Fitting href={back.href} className="w-fit">
          {back.label}
        </Fitting>
      </p>
    </div>
  );
}
