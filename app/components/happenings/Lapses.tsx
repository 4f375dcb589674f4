import { Anchor } from "#app/components/ui/Anchor";
import type { ValveState } from "#app/components/ui/states";
import { Valve } from "#app/components/ui/Valve";
import type { LapsedGate } from "#app/lib/views/what-lapses";

const MOST = 4;

/** Gate by gate what lapses: its valve before and after, the states in words, the items to do again. */
export function Lapses({ gates }: { gates: LapsedGate[] }) {
  return (
    <ul>
      {gates.map((gate) => (
        <li
          key={gate.id}
          className="grid grid-cols-[150px_minmax(0,1fr)] items-center gap-x-4 gap-y-1 border-t border-line py-3 tablet:grid-cols-[180px_minmax(0,1fr)]"
        >
          <Flip before={gate.before} after={gate.after} />
          <div className="min-w-0">
            <h3 className="text-lead leading-tight">
              <Anchor href={gate.href} className="text-ink decoration-fitting">
                {gate.name}
              </Anchor>
            </h3>
            <p className="text-note text-ink-2">{gate.words}</p>
            {gate.waits && <p>waits for {gate.waits}</p>}
          </div>
          {gate.items.length > 0 && <LapsedItems items={gate.items} />}
        </li>
      ))}
    </ul>
  );
}

function LapsedItems({ items }: { items: LapsedGate["items"] }) {
  const rest = items.slice(MOST);
  return (
    <ul className="col-span-2 leading-snug">
      {items.slice(0, MOST).map((item) => (
        <li key={item.id}>
          <b>{item.key}</b> {item.words}
        </li>
      ))}
      {rest.length > 0 && (
        <li>
          and <b>{rest.map((i) => i.key).join(", ")}</b>
        </li>
      )}
    </ul>
  );
}

type Shown = { state: ValveState; part: number };

function Flip({ before, after }: { before: Shown; after: Shown }) {
  return (
    <svg viewBox="0 -46 216 66" className="block h-auto w-full" aria-hidden="true">
      <OnPipe at={45} {...before} />
      <path className="fill-none stroke-ink" strokeWidth="3" d="M98 0h20M110-7l8 7-8 7" />
      <OnPipe at={171} {...after} />
    </svg>
  );
}

function OnPipe({ at, state, part }: Shown & { at: number }) {
  const flows = state === "signed";
  const fed = state !== "waiting";
  return (
    <g transform={`translate(${at} 0)`} className="pipe-small">
      <path className="pipe-wall" d="M-45 0H45" />
      <path className="pipe-bore" d="M-43 0H43" />
      {fed && <path className="pipe-flow" d={flows ? "M-45 0H45" : "M-45 0H-16"} />}
      <Valve state={state} part={part} fed={fed} scale={0.86} lever={38} />
    </g>
  );
}
