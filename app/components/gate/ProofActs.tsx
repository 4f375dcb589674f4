import { Form } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, type Entry, errorsOf, typedIn } from "#app/components/gate/entry";
import type { ItemModel } from "#app/components/gate/ItemRow";
import { Fitting } from "#app/components/ui/Fitting";

interface ProofActsProps {
  item: ItemModel;
  commandId: (item: string, act: string) => string;
  entry: Entry;
}

/** What others say about the proof that is there: seen, accepted, kept; and taking it back. */
export function ProofActs({ item, commandId, entry }: ProofActsProps) {
  const { proof, confirm, accept, keep, withdraw } = item;
  if (!proof) return null;
  const hidden = (intent: string, also: Record<string, string> = {}) => (
    <HiddenIds commandId={commandId(item.id, intent)} intent={intent} also={{ item: item.id, proof: proof.id, ...also }} />
  );
  const reason = (intent: string, label: string) => (
    <TextInput
      id={controlId(item.id, `${intent}-reason`)}
      name="reason"
      label={label}
      rows={2}
      maxLength={1000}
      defaultValue={entry.typed.intent?.[0] === intent ? typedIn(entry, "reason", 0) : ""}
      errors={entry.typed.intent?.[0] === intent ? errorsOf(entry, "reason") : undefined}
    />
  );
  return (
    <>
      {confirm && (
        <Form method="post" preventScrollReset className="proof-act">
          {hidden("confirm", { as: confirm.as })}
          <Fitting size="act" reason={confirm.ok ? undefined : confirm.reason} note={`as ${confirm.as}, the second person`}>
            I have seen this
          </Fitting>
        </Form>
      )}
      {accept && (
        <Form method="post" preventScrollReset className="proof-act">
          {hidden("accept")}
          {accept.ok && reason("accept", "Why it is accepted")}
          <Fitting reason={accept.ok ? undefined : accept.reason}>Accept: it does not apply</Fitting>
        </Form>
      )}
      {keep?.ok && (
        <details className="proof-keep" open={entry.typed.intent?.[0] === "keep"}>
          <summary>Keep it: it is still true</summary>
          <Form method="post" preventScrollReset className="proof-act">
            {hidden("keep")}
            {reason("keep", "Why it is still true")}
            <Fitting>Keep it</Fitting>
          </Form>
        </details>
      )}
      {keep && !keep.ok && <p className="field-hint">{keep.reason}</p>}
      {withdraw?.ok && (
        <details className="proof-withdraw" open={entry.typed.intent?.[0] === "withdraw"}>
          <summary>Take this proof back</summary>
          <Form method="post" preventScrollReset className="proof-act">
            {hidden("withdraw")}
            {reason("withdraw", "Why")}
            <p className="field-hint">It stays in the history, and the item is to do again. Signatures that cover it lapse.</p>
            <Fitting>Take it back</Fitting>
          </Form>
        </details>
      )}
    </>
  );
}
