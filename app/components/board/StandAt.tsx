import { Form, Link } from "react-router";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import type { StandAtView } from "#app/lib/views/stand-at";

/** Above a page that shows a later instant: what it is, and the way back. */
export function Ahead({ view, here }: { view: StandAtView; here: string }) {
  if (!view.when) return null;
  return (
    <Notice
      kind="plain"
      title={`As it will stand on ${view.when}, if nothing is recorded until then.`}
      band
      action={<Link to={here}>Back to now</Link>}
    >
      Wind and roll call are given on the day, so they stop a run until then.
    </Notice>
  );
}

/** Asks for a later instant: what will have run out by then is seen today. */
export function StandAt({ view, here }: { view: StandAtView; here: string }) {
  return (
    <details className="border-t border-line px-4 py-2 tablet:px-6" open={view.when !== null || view.error !== null}>
      <summary className="min-h-hit py-3 font-semibold text-fitting-ink">How will it stand later?</summary>
      <Form method="get" action={here} className="flex flex-wrap items-end gap-4 pb-4" preventScrollReset>
        <TextInput
          name="date"
          type="date"
          label="Day"
          defaultValue={view.date}
          errors={view.error?.field === "date" ? [view.error.sentence] : undefined}
        />
        <TextInput
          name="time"
          type="time"
          label={`Time at ${view.timeZone.replace(/_/g, " ")}`}
          defaultValue={view.time}
          errors={view.error?.field === "time" ? [view.error.sentence] : undefined}
        />
        <Fitting>Show that time</Fitting>
        {view.when && (
          <Fitting href={here} variant="quiet">
            Back to now
          </Fitting>
        )}
      </Form>
    </details>
  );
}
