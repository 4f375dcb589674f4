import { type FocusEvent, type FormEvent, type ReactNode, useRef } from "react";
import { Form, useSubmit } from "react-router";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import type { Errors, ShownQuestion } from "#app/lib/views/new-install";

interface AnswersFormProps {
  action: string;
  questions: ShownQuestion[];
  errors: Errors;
  /** Answers of other pages, which travel along. */
  carried: [name: string, value: string][];
  /** Above the questions. */
  children?: ReactNode;
}

/** Id of the form: the fittings in the foot belong to it. */
export const ANSWERS = "answers";

/** Questions whose answers stand in the address. With scripts each answer goes there at once, so that what it makes is seen. */
export function AnswersForm({ action, questions, errors, carried, children }: AnswersFormProps) {
  const submit = useSubmit();
  const before = useRef("");
  const send = (form: HTMLFormElement) => submit(form, { replace: true, preventScrollReset: true });
  const changed = (event: FormEvent<HTMLFormElement>) => {
    const { target, currentTarget } = event;
    if (target instanceof HTMLSelectElement || (target instanceof HTMLInputElement && target.type === "radio")) send(currentTarget);
  };
  // What is typed counts when the field is left: each key would move the page.
  const entered = ({ target }: FocusEvent<HTMLFormElement>) => {
    if (target instanceof HTMLInputElement) before.current = target.value;
  };
  const left = ({ target, currentTarget }: FocusEvent<HTMLFormElement>) => {
    if (target instanceof HTMLInputElement && target.type === "text" && target.value !== before.current) send(currentTarget);
  };
  return (
    <Form id={ANSWERS} method="get" action={action} onChange={changed} onFocus={entered} onBlur={left} noValidate>
      {carried.map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      {children}
      {questions.map((q) => (
        <ChoiceGroup
          key={q.key}
          id={q.key}
          name={q.key}
          no={q.no}
          label={q.label}
          hint={q.help}
          options={q.options}
          defaultValue={q.answer ?? undefined}
          open={q.answer === null}
          errors={errors[q.key]}
        />
      ))}
    </Form>
  );
}
