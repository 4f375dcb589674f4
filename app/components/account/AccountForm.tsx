import type { ReactNode } from "react";
import { Form, useNavigation } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";
import type { FormReply } from "#app/lib/schemas/form-reply";

interface AccountFormProps {
  /** Id of the form on its page. */
  form: string;
  reply: FormReply | undefined;
  commandId?: string;
  intent?: string;
  also?: Record<string, string>;
  act: string;
  note?: string;
  children?: ReactNode;
}

/** One form about an account: what is wrong above it, the fields, the act. It cannot be sent twice while it is on its way. */
export function AccountForm({ form, reply, commandId, intent, also, act, note, children }: AccountFormProps) {
  const busy = useNavigation().state !== "idle";
  const mine = reply?.form === form ? reply : null;
  const wrong = Object.entries(mine?.errors ?? {}).flatMap(([field, list]) =>
    list.map((message) => ({ field: field ? `${form}-${field}` : null, message })),
  );
  return (
    <Form method="post" aria-label={act} className="flex max-w-[640px] flex-col gap-5">
      <ErrorSummary errors={wrong} title="Not taken" />
      {commandId && <HiddenIds commandId={commandId} />}
      {intent && <input type="hidden" name="intent" value={intent} />}
      {Object.entries(also ?? {}).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      {children}
      <Fitting size="act" note={note} busy={busy}>
        {act}
      </Fitting>
    </Form>
  );
}
