import { Form } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, type Entry, errorsOf, typedIn } from "#app/components/gate/entry";
import { Fitting } from "#app/components/ui/Fitting";
import type { ItemView } from "#app/lib/views/gate-item";

interface ProofActsProps {
  item: ItemView;
  commandId: (item: string, act: string) => string;
  entry: Entry;
}

function partsOf({ item, commandId, entry }: ProofActsProps, proof: string) {
  const hidden = (intent: string, also: Record<string, string> = {}) => (
    <HiddenIds commandId={commandId(item.id, intent)} intent={intent} also={{ item: item.id, proof, ...also }} />
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
  return { hidden, reason };
}

/** What another person can say about the proof that is there: seen, or its reason accepted. */
export function ProofActs(props: ProofActsProps) {
  const { proof, confirm, accept } = props.item;
  if (!proof) return null;
  const { hidden, reason } = partsOf(props, proof.id);
  return (
    <>
      {confirm && !confirm.ok && <p className="field-hint">{confirm.reason}</p>}
      {confirm?.ok && (
        <Form method="post" preventScrollReset className="proof-act">
          {hidden("confirm", { as: confirm.as })}
          <Fitting size="act" note={`as ${confirm.as}, the second person`}>
            I have seen this
          </Fitting>
        </Form>
      )}
      {accept && !accept.ok && <p className="field-hint">{accept.reason}</p>}
      {accept?.ok && (
        <Form method="post" preventScrollReset className="proof-act">
          {hidden("accept")}
          {reason("accept", "Why it is accepted")}
          <Fitting>Accept: it does not apply</Fitting>
        </Form>
      )}
    </>
  );
}

/** The quieter ways: a lapsed proof kept by an inspector, and taking a proof back. */
export function ProofWays(props: ProofActsProps) {
  const { proof, keep, withdraw } = props.item;
  if (!proof) return null;
  const { entry } = props;
  const { hidden, reason } = partsOf(props, proof.id);
  return (
    <>
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
