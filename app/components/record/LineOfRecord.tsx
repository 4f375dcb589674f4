import { Link } from "react-router";
import type { RecordRow } from "#app/lib/views/record";

/** One line of the record: its number, who did what and when, and what became of it later. */
export function LineOfRecord({ row }: { row: RecordRow }) {
  return (
    <li
      id={row.anchor}
      className="grid scroll-mt-24 grid-cols-[56px_minmax(0,1fr)] gap-x-4 border-t border-line px-4 py-4 tablet:grid-cols-[72px_minmax(0,1fr)_minmax(0,16rem)] tablet:px-6"
    >
      <span className="fig text-lead tabular-nums">
        <span className="sr-only">Line </span>
        {row.seq}
      </span>
      <div className="min-w-0">
        <p className="text-lead">
          <b>{row.who}</b> {row.did}.
        </p>
        {row.details.length > 0 && (
          <ul className="mt-1 max-w-[72ch] text-ink-2">
            {row.details.map((detail) => (
              <li key={detail} className="break-words">
                {detail}
              </li>
            ))}
          </ul>
        )}
        {row.about && (
          <p className="mt-1">
            Speaks of <Link to={row.about.href}>line {row.about.seq}</Link>.
          </p>
        )}
        {row.later.map((l) => (
          <p key={l.seq} className="mt-1">
            <b>Later:</b> {l.who} {l.did}, <Link to={l.href}>line {l.seq}</Link>.
          </p>
        ))}
      </div>
      <div className="max-tablet:col-start-2 max-tablet:mt-1">
        <p className="tabular-nums">
          <time>{row.when}</time>
        </p>
        <p className="text-ink-2">as {row.as}</p>
        {row.gate && (
          <p>
            <Link to={row.gate.href}>{row.gate.label}</Link>
          </p>
        )}
        <p className="fig text-note text-ink-2" title={row.hash}>
          {row.hash.slice(0, 12)}
        </p>
      </div>
    </li>
  );
}
