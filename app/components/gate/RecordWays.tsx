import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import type { RecordLinks } from "#app/lib/views/record-links";

/** From an item's row to where bad news is written down, with what is known here chosen already; an offered loose end stands open. */
export function RecordWays({ links, about, offers }: { links: RecordLinks; about: string; offers: boolean }) {
  const { opening, looseEnd, finding } = links;
  return (
    <>
      {offers && <Fitting href={looseEnd.href}>{looseEnd.label}</Fitting>}
      <details>
        <summary className="text-note decoration-1">
          Opened, left off or wrong<span className="sr-only">: {about}</span>
        </summary>
        <ul className="flex flex-wrap gap-x-6 py-2">
          {[opening, ...(offers ? [] : [looseEnd]), finding].map((place) => (
            <li key={place.href}>
              <Anchor href={place.href} className="inline-flex min-h-hit items-center font-semibold text-fitting-ink">
                {place.label}
                <span className="sr-only">: {about}</span>
              </Anchor>
            </li>
          ))}
        </ul>
      </details>
    </>
  );
}

/** The same for the whole gate, with all of its systems. */
export function RecordBar({ links: { opening, looseEnd, finding } }: { links: RecordLinks }) {
  return (
    <section
      aria-labelledby="write-down"
      className="flex flex-wrap items-center gap-x-6 gap-y-3 border-b border-line px-4 py-4 tablet:px-6"
    >
      <h2 id="write-down" className="text-lead">
        Something opened, left off or wrong?
      </h2>
      <p className="flex flex-wrap gap-3">
        {[opening, looseEnd, finding].map((place) => (
          <Fitting key={place.href} href={place.href}>
            {place.label}
          </Fitting>
        ))}
      </p>
    </section>
  );
}
