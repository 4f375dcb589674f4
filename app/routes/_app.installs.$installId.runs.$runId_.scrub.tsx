import { ReasonPage } from "#app/components/run/ReasonPage";
import { Notice } from "#app/components/ui/Notice";
import { mayScrub } from "#app/lib/gates/run-verdicts";
import { installContext } from "#app/lib/http/install.server";
import { actWithReason, reasonSheet } from "#app/lib/http/reason-acts.server";
import { scrubRun } from "#app/lib/services/scrub-run.server";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.scrub";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `Scrub run ${loaderData?.run.label ?? ""} · Bladecount` }];

export const loader = ({ context, params }: Route.LoaderArgs) => reasonSheet(context.get(installContext), params.runId, mayScrub);

export const action = ({ context, params, request }: Route.ActionArgs) =>
  actWithReason(context.get(installContext), request, params.runId, scrubRun);

export default function ScrubRun({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <ReasonPage
      sheet={loaderData}
      reply={actionData}
      title={`Scrub run ${loaderData.run.label}`}
      hint="In a few words: they stand in the mail and in the record."
      act="Scrub the run"
      back="Back, the run stays planned"
      told={{ title: "Who is told", what: "SCRUB mail" }}
      toldAfter
    >
      <Notice kind="plain" title="The run is given up for good.">
        A GO of it is over at once. Its rung stays as it is and can be planned again as another run; the record keeps this one, with the
        reason.
      </Notice>
    </ReasonPage>
  );
}
