/** What goes back to a page with several forms when one is refused: which form, its text as typed, what is wrong with each field. Pure. */

export interface FormReply {
  form: string;
  typed: Record<string, string>;
  /** By field; "" = about the whole form. */
  errors: Record<string, string[]>;
}

/** @param errors as conform reports them, or a refusal under the field that it is about. */
export function replyOf(form: string, sent: FormData, errors: Record<string, string[] | null> | null | undefined): FormReply {
  const typed: Record<string, string> = {};
  for (const [name, value] of sent) if (typeof value === "string" && name !== "commandId") typed[name] = value;
  const said = Object.entries(errors ?? {}).flatMap(([field, list]) => (list?.length ? [[field, list] as const] : []));
  return { form, typed, errors: Object.fromEntries(said) };
}

/** What a form's fields take: an id of their own on the page, the text as typed before, and its errors. */
export interface FieldProps {
  id: string;
  name: string;
  defaultValue: string;
  errors?: string[];
}

/** Fields of one form: `field("due", "2027-03-14")`. The reply counts only when it is this form's. */
export function fieldsOf(form: string, reply: FormReply | null | undefined) {
  const mine = reply?.form === form ? reply : null;
  return {
    /** This form came back. */
    back: mine !== null,
    /** What is wrong with the form as a whole. */
    faults: mine?.errors[""] ?? [],
    field: (name: string, otherwise = ""): FieldProps => ({
      id: `${form}-${name}`,
      name,
      defaultValue: mine?.typed[name] ?? otherwise,
      errors: mine?.errors[name],
    }),
    /** A box that was ticked when the form was sent. */
    ticked: (name: string, otherwise: boolean): boolean => (mine ? name in mine.typed : otherwise),
  };
}
