import { type AbortPart, AbortWords } from "#app/components/run/AbortWords";
import { Figure } from "#app/components/ui/Figure";

export interface RunCardProps {
  version: number | null;
  cowl: string;
  begin: string[];
  end: string[];
  steps: { no: number; title: string; rpm: string; hold: string; see: string }[];
  calls: { call: string; by: string; answer: string }[];
  abort: AbortPart[];
  /** Heading level of the card's name. */
  level?: 2 | 3;
  /** Steps alone, for the ladder of the build-up. */
  short?: boolean;
}

/** The card as it is read out: how it begins, each step with speed, hold and what must be seen, how it ends, the calls, the abort words. */
export function RunCardView({ version, cowl, begin, end, steps, calls, abort, level = 2, short = false }: RunCardProps) {
  const Heading = level === 2 ? "h2" : "h3";
  return (
    <div className="flex flex-col gap-3">
      {version !== null && <Heading className="text-h3">Run card, version {version}</Heading>}
      <p>
        <b>{cowl}.</b> {!short && <>Begin: {begin.join("; ")}.</>}
      </p>
      <ol className="border-t border-line">
        {steps.map((s) => (
          <li key={s.no} className="grid grid-cols-[32px_minmax(0,1fr)_auto] items-baseline gap-x-3 border-b border-line py-2">
            <Figure value={s.no} className="font-bold" />
            <b>
              {s.title}
              {s.rpm && `, ${s.rpm}`}
            </b>
            <span>
              {s.hold && (
                <>
                  <span className="sr-only">hold </span>
                  <Figure value={s.hold} className="text-lead" />
                </>
              )}
            </span>
            <span className="col-start-2 text-ink-2">{s.see}</span>
          </li>
        ))}
      </ol>
      {!short && (
        <>
          <p>
            <b>End.</b> {end.join("; ")}.
          </p>
          <AbortWords parts={abort} />
          {calls.length > 0 && (
            <details>
              <summary className="min-h-hit py-3 font-semibold text-fitting-ink">The calls and who answers</summary>
              <table className="w-full">
                <thead className="sr-only">
                  <tr>
                    <th scope="col">Call</th>
                    <th scope="col">Answer</th>
                  </tr>
                </thead>
                <tbody>
                  {calls.map((c) => (
                    <tr key={c.call} className="border-t border-line align-top">
                      <th scope="row" className="w-1/2 py-2 pr-3 text-left">
                        “{c.call}” <span className="font-normal text-ink-2">{c.by}</span>
                      </th>
                      <td className="py-2">{c.answer}</td>
                    </tr>
                  ))}
                </tbody>
              </table>
            </details>
          )}
        </>
      )}
    </div>
  );
}
