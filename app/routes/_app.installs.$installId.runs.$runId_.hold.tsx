import { ReasonPage } from "#app/components/run/ReasonPage";
import { Notice } from "#app/components/ui/Notice";
import { mayHold } from "#app/lib/gates/run-verdicts";
import { installContext } from "#app/lib/http/install.server";
import { actWithReason, reasonSheet } from "#app/lib/http/reason-acts.server";
import { callHold } from "#app/lib/services/call-hold.server";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.hold";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `HOLD, run ${loaderData?.run.label ?? ""} · Bladecount` }];

export const loader = ({ context, params }: Route.LoaderArgs) => reasonSheet(context.get(installContext), params.runId, mayHold);

export const action = ({ context, params, request }: Route.ActionArgs) =>
  actWithReason(context.get(installContext), request, params.runId, callHold);

export default function CallHold({ loaderData, actionData }: Route.ComponentProps) {
  return (
    <ReasonPage
      sheet={loaderData}
      reply={actionData}
      title={`Call HOLD, run ${loaderData.run.label}`}
      hint="In a few words: they stand in the mail and in the record."
      act="HOLD"
      stop
      back="Back, GO stays as it is"
      told={{ title: "Who is told", what: "HOLD mail" }}
      toldAfter
    >
      <Notice kind="hold" title="Is the engine running? Shout STOP first, or cross your arms overhead.">
        HOLD is for the record and the mail: GO is over at once, nobody starts the engine, and everybody answers again before the next GO.
      </Notice>
    </ReasonPage>
  );
}
