import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import type { RecordLinks } from "#app/lib/views/record-links";

/** From a gate or one of its rows to where bad news is written down, with what is known here chosen already. */
export function RecordWays({ links, about, offers = false }: { links: RecordLinks; about: string; offers?: boolean }) {
  const { opening, looseEnd, finding } = links;
  return (
    <>
      {offers && <Fitting href={looseEnd.href}>{looseEnd.label}</Fitting>}
      <details className="item-again">
        <summary>
          Opened, left off or wrong here? <span className="sr-only">{about}</span>
        </summary>
        <ul className="flex flex-wrap gap-x-6 gap-y-1 py-2">
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
