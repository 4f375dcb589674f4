import { Form, Link } from "react-router";
import { Select } from "#app/components/forms/Select";
import { LineOfRecord } from "#app/components/record/LineOfRecord";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { installContext } from "#app/lib/http/install.server";
import { verify } from "#app/lib/record/chain";
import { recordFilter, recordView } from "#app/lib/views/record";
import type { Route } from "./+types/_app.installs.$installId.record";

export const meta: Route.MetaFunction = () => [{ title: "Record · Bladecount" }];

export async function loader({ context, request }: Route.LoaderArgs) {
  const { me, installId } = context.get(installContext);
  const query = new URL(request.url).searchParams;
  const lines = await recordLines(db(), installId);
  return {
    view: recordView(lines, recordFilter(query), installId, me.units),
    checked: query.has("check") ? verify(lines) : null,
  };
}

export default function Record({ loaderData }: Route.ComponentProps) {
  const { view, checked } = loaderData;
  return (
    <main id="main">
      <TitlePipe
        title="Record"
        state={view.state}
        then="Everything that anybody did here, as it was done. A correction is a new line that points back; the old one stays."
      />
      {checked && (
        <Notice
          kind={checked.ok ? "done" : "danger"}
          title={checked.ok ? "The chain is whole." : `The chain is broken at line ${checked.line}.`}
          band
        >
          {checked.ok
            ? `${checked.lines} lines follow from each other, each by its hash. Compare the head below with one that was mailed or printed earlier: only that shows that nobody wrote the whole record anew.`
            : `${checked.why}. Somebody changed the database outside this program. Keep the file, and tell the lead.`}
        </Notice>
      )}
      <section aria-labelledby="head" className="border-b-2 border-ink px-4 py-4 tablet:px-6">
        <h2 id="head" className="text-h3">
          Head of the chain
        </h2>
        <p className="mt-1 max-w-[72ch] text-ink-2">
          Line {view.head.seq}. Each line carries a hash over itself and the line before, so this one speaks for all of them. It stands in
          each GO, HOLD and release mail.
        </p>
        <p className="mt-2 fig break-all">{view.head.hash}</p>
        <div className="mt-3 flex flex-wrap gap-3">
          <Fitting href={view.checkHref}>Check the chain</Fitting>
          <Fitting href={view.exportHref} document>
            Save the record (JSON lines)
          </Fitting>
        </div>
      </section>
      <Form method="get" className="flex flex-wrap items-end gap-4 border-b border-line px-4 py-4 tablet:px-6" aria-label="Filter">
        <Select name="gate" label="Gate" empty="All gates" defaultValue={view.filter.gate ?? ""} options={view.gates} />
        <Select name="person" label="Person" empty="Everybody" defaultValue={view.filter.person ?? ""} options={view.people} />
        <Select name="kind" label="Kind" empty="Everything" defaultValue={view.filter.kind ?? ""} options={view.kinds} />
        <Fitting>Show</Fitting>
      </Form>
      <p className="px-4 pt-4 text-ink-2 tablet:px-6" role="status">
        {view.shown}, newest first
      </p>
      {view.newest && (
        <p className="px-4 pt-2 tablet:px-6">
          <Link to={view.newest}>Back to the newest</Link>
        </p>
      )}
      {view.rows.length === 0 && (
        <p className="px-4 py-6 text-lead tablet:px-6">No line fits this. Choose less in the three lists above.</p>
      )}
      <ol className="mt-2">
        {view.rows.map((row) => (
          <LineOfRecord key={row.seq} row={row} />
        ))}
      </ol>
      {view.older && (
        <div className="flex border-t border-line px-4 py-5 tablet:px-6">
          <Fitting href={view.older}>Older lines</Fitting>
        </div>
      )}
    </main>
  );
}
