import { Form } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { Stamp } from "#app/components/ui/Stamp";

interface SignatureModel {
  id: string | null;
  role: string;
  name: string;
  time: string;
  waits: boolean;
  lapsed: boolean;
  mayWithdraw: boolean;
  hash?: string;
}

interface SignaturesProps {
  signatures: SignatureModel[];
  former: string[];
  until: string | null;
  commandId: (item: string, act: string) => string;
}

/** Two signatures, one nut; those that no longer hold stay listed. */
export function Signatures({ signatures, former, until, commandId }: SignaturesProps) {
  if (!signatures.length && !former.length) return null;
  const mine = signatures.filter((s) => s.id && s.mayWithdraw);
  return (
    <section id="signatures" className="signatures" aria-labelledby="signatures-title">
      <h2 id="signatures-title">Signatures</h2>
      <Stamp signatures={signatures.map(({ role, name, time, waits, lapsed, hash }) => ({ role, name, time, waits, lapsed, hash }))} />
      {until && <p className="signatures-until">What stands here stands until {until}, or until something of it is opened.</p>}
      {mine.map((s) => (
        <details key={s.id} className="proof-withdraw">
          <summary>Take back the signature of {s.name}</summary>
          <Form method="post" preventScrollReset className="proof-act">
            <HiddenIds commandId={commandId(s.id ?? "", "unsign")} intent="unsign" also={{ signature: s.id ?? "" }} />
            <TextInput id={`unsign-${s.id}`} name="reason" label="Why" rows={2} maxLength={1000} />
            <Fitting>Take it back</Fitting>
          </Form>
        </details>
      ))}
      {former.length > 0 && (
        <details className="item-history">
          <summary>{former.length === 1 ? "1 signature that no longer holds" : `${former.length} signatures that no longer hold`}</summary>
          <ol>
            {former.map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ol>
        </details>
      )}
    </section>
  );
}
