import { MiniLine } from "#app/components/line/MiniLine";
import { ANSWERS } from "#app/components/new-install/AnswersForm";
import { Fitting } from "#app/components/ui/Fitting";
import type { Made, Makes } from "#app/lib/views/new-install-makes";

/** Reasons shown before the list is opened. */
const SHOWN = 5;

/** The board that comes of the answers: how much of it, what they add, what they leave out. */
export function WhatItMakes({ makes, open }: { makes: Makes; open: number }) {
  return (
    <div className="flex flex-col gap-4">
      <div>
        <h2 id="makes" className="text-lead">
          What these answers make
        </h2>
        <p className="mt-2 text-h3 leading-tight font-[650]">
          <span className="fig text-h2 font-bold">{makes.gates}</span> gates, <span className="fig text-h2 font-bold">{makes.items}</span>{" "}
          items
        </p>
        <p className="text-ink-2">
          before the first start. {makes.laterItems} more follow: after each run, at the service, for the release.
        </p>
        {open > 0 && (
          <p className="mt-2">
            {open === 1 ? "1 question is" : `${open} questions are`} still open. Here each is counted with the plainest answer, until you
            give yours.
          </p>
        )}
      </div>
      <MiniLine
        gates={Array.from({ length: makes.gates }, () => ({ state: "waiting", part: 0 }))}
        runs={makes.runs.map(({ key, share }) => ({ id: key, share, state: "planned", spade: false }))}
      />
      <noscript>
        <Fitting form={ANSWERS}>Show what my answers make</Fitting>
      </noscript>
      <Reasons
        title={open > 0 ? "Added by these answers" : "Added by your answers"}
        list={makes.added}
        none="Nothing yet beyond what every install has."
      />
      <Reasons title="Left out" list={makes.leftOut} none="Nothing." />
      <p className="text-note text-ink-2">
        What is left out stays listed, with its reason, in the record and for the inspector who countersigns first.
      </p>
    </div>
  );
}

function Reasons({ title, list, none }: { title: string; list: Made[]; none: string }) {
  const items = list.reduce((sum, made) => sum + made.items.length, 0);
  return (
    <section>
      <h3 className="text-body leading-snug">
        {title}
        {items > 0 && `: ${items === 1 ? "1 item" : `${items} items`}`}
      </h3>
      {items === 0 && <p>{none}</p>}
      <ul>
        {list.slice(0, SHOWN).map((made) => (
          <li key={made.because} className="mt-1">
            {made.keys}: {made.because}.
          </li>
        ))}
      </ul>
      {items > 0 && (
        <details className="mt-1">
          <summary className="flex min-h-hit items-center font-[600] text-fitting-ink underline decoration-2 underline-offset-4">
            {items === 1 ? "In full" : `All ${items}, in full`}
            <span className="sr-only">: {title.toLowerCase()}</span>
          </summary>
          <dl className="border-t border-line">
            {list.map((made) => (
              <div key={made.because} className="border-b border-line py-2">
                <dt className="font-[640]">{`${made.because.charAt(0).toUpperCase()}${made.because.slice(1)}`}</dt>
                {made.items.map((item) => (
                  <dd key={item.key} className="grid grid-cols-[56px_minmax(0,1fr)] gap-x-2 text-note">
                    <span className="fig">{item.key}</span> <span>{item.words}</span>
                  </dd>
                ))}
              </div>
            ))}
          </dl>
        </details>
      )}
    </section>
  );
}
