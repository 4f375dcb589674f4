import type { ReactNode } from "react";
import { Blade } from "#app/components/ui/Blade";
import { ItemNut } from "#app/components/ui/ItemNut";
import { Valve } from "#app/components/ui/Valve";

/** What the hangar will show, and the two ways in. */
export function NoInstalls() {
  return (
    <div className="px-4 py-6 tablet:px-6">
      <ul className="grid gap-x-8 gap-y-5 tablet:grid-cols-3">
        <Part name="gates" says="what has to be proved before the first start, each signed by two people">
          <svg viewBox="-32 -46 64 64" width="64" height="64" aria-hidden="true">
            <Valve state="in-work" part={0.5} lever={36} />
          </svg>
        </Part>
        <Part name="items" says="each with its evidence: a value in its band, a torque, a photo">
          <ItemNut state="done" />
        </Part>
        <Part name="runs" says="from first start to full power, one step at a time, each reviewed before the next">
          <svg viewBox="-32 -56 64 64" width="64" height="64" aria-hidden="true">
            <Blade length={46} state="next" />
          </svg>
        </Part>
      </ul>
      <p className="mt-6 max-w-[68ch] text-lead">
        An install is one engine on one aircraft, with its board, its crew and its record. Each of yours gets a row here: where it stands,
        and what waits for you.
      </p>
      <p className="mt-3 max-w-[68ch] text-lead">
        Two ways in: set one up yourself, or have the lead of an install add you on its Crew page, by the address that you sign in with.
      </p>
    </div>
  );
}

function Part({ name, says, children }: { name: string; says: string; children: ReactNode }) {
  return (
    <li>
      {children}
      <h2 className="mt-2 text-lead">{name}</h2>
      <p className="text-ink-2">{says}</p>
    </li>
  );
}
