import { SeveritySign } from "#app/components/happenings/SeveritySign";
import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import type { RunFindings as View } from "#app/lib/views/run-findings";

/** Findings that stop the run or cap it, each leading to its row; a new one is raised from here. */
export function RunFindings({ list, raise }: View) {
  return (
    <section aria-labelledby="run-findings" className="flex flex-col gap-3">
      <h2 id="run-findings" className="text-h3">
        Findings
      </h2>
      {list.length === 0 && <p>None stops this run or caps it.</p>}
      {list.length > 0 && (
        <ul className="border-t border-line">
          {list.map((f) => (
            <li key={f.id} className="grid grid-cols-[40px_minmax(0,1fr)] gap-x-3 border-b border-line py-3">
              <SeveritySign severity={f.severity} size={36} />
              <p>
                <Anchor href={f.href} className="font-semibold text-fitting-ink">
                  <span className="fig">{f.tag}</span> {f.words}
                </Anchor>
                <span className="block">
                  {f.severity}, {f.state}: <b>{f.does}</b>
                </span>
              </p>
            </li>
          ))}
        </ul>
      )}
      <p className="flex flex-wrap">
        <Fitting href={raise.href}>Raise a finding</Fitting>
      </p>
    </section>
  );
}
