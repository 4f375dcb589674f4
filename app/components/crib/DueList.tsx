import { ItemNut } from "#app/components/ui/ItemNut";
import type { DueRow } from "#app/lib/views/crib";

const MOST = 6;

/** What runs out next, in order: what is out of date first, then by days left. */
export function DueList({ rows }: { rows: DueRow[] }) {
  if (!rows.length) return null;
  const rest = rows.slice(MOST);
  return (
    <section aria-labelledby="due" className="border-b-2 border-ink">
      <h2 id="due" className="px-4 pt-5 pb-3 text-h3 tablet:px-6">
        What runs out next
      </h2>
      <Rows rows={rows.slice(0, MOST)} start={1} />
      {rest.length > 0 && (
        <details>
          <summary className="min-h-hit px-4 py-3 font-semibold text-fitting-ink tablet:px-6">and {rest.length} later</summary>
          <Rows rows={rest} start={MOST + 1} />
        </details>
      )}
    </section>
  );
}

function Rows({ rows, start }: { rows: DueRow[]; start: number }) {
  return (
    <ol start={start}>
      {rows.map((row) => (
        <li
          key={row.key}
          className="grid grid-cols-[44px_minmax(0,1fr)] items-center gap-x-3 border-t border-line px-4 py-2 tablet:grid-cols-[44px_minmax(0,1fr)_minmax(0,14rem)_minmax(0,11rem)] tablet:px-6"
        >
          <ItemNut state={row.state === "out" ? "lapsed" : "done"} size={32} />
          <a href={`#${row.anchor}`} className="inline-flex min-h-hit flex-wrap items-center gap-x-2">
            <b>{row.name}</b> <span>{row.what}</span>
          </a>
          <b className={row.state === "in date" ? "fig max-tablet:col-start-2" : "fig max-tablet:col-start-2 text-seal-ink"}>{row.word}</b>
          <span className="text-note text-ink-2 max-tablet:col-start-2">{row.until && `to the end of ${row.until}`}</span>
        </li>
      ))}
    </ol>
  );
}
