import type { ProofView } from "#app/lib/views/gate-proof";

const STATE = { done: "done", failed: "not right", na: "does not apply" };

/** Every proof that an item ever had, newest first: nothing is edited or deleted. */
export function ItemHistory({ proofs, name }: { proofs: ProofView[]; name: string }) {
  if (!proofs.length) return null;
  return (
    <details className="item-history">
      <summary>
        History of {name}: {proofs.length === 1 ? "1 proof" : `${proofs.length} proofs`}
      </summary>
      <ol>
        {proofs.map((p) => (
          <li key={p.id} className={p.withdrawn ? "item-history-withdrawn" : undefined}>
            <b>
              {p.did}, {p.when}: {STATE[p.state]}
            </b>
            {p.late && ", late entry"}
            {p.recordedBy && `, written down by ${p.recordedBy}`}
            {p.words && p.state !== "na" && `. ${p.words}`}
            {p.tools && `, with ${p.tools}`}
            {p.note && `. ${p.note}`}
            {[...p.said, ...(p.withdrawn ? [p.withdrawn] : [])].map((line) => (
              <span key={line}>{line}</span>
            ))}
          </li>
        ))}
      </ol>
    </details>
  );
}
