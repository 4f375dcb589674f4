import { ReasonPage } from "#app/components/run/ReasonPage";
import { StopList } from "#app/components/run/StopList";
import { mayCallNoGo } from "#app/lib/gates/run-verdicts";
import { installContext } from "#app/lib/http/install.server";
import { actWithReason, reasonSheet } from "#app/lib/http/reason-acts.server";
import { callNoGo } from "#app/lib/services/call-no-go.server";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.no-go";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `No-go, run ${loaderData?.run.label ?? ""} · Bladecount` }];

export const loader = ({ context, params }: Route.LoaderArgs) => reasonSheet(context.get(installContext), params.runId, mayCallNoGo);

export const action = ({ context, params, request }: Route.ActionArgs) =>
  actWithReason(context.get(installContext), request, params.runId, callNoGo);

export default function CallNoGo({ loaderData, actionData }: Route.ComponentProps) {
  const { run } = loaderData;
  return (
    <ReasonPage
      sheet={loaderData}
      reply={actionData}
      title={`Send a no-go for run ${run.label}`}
      label="Note to the crew"
      hint="Why, and when the next try may be. Answers and state of the run stay as they are."
      act="Send the no-go"
      back="Back, no mail goes out"
      told={{ title: "Who gets it", what: "no-go mail" }}
    >
      <section>
        <h2 className="mb-2 text-h3">What the mail says stops it</h2>
        {run.stops.length ? (
          <StopList stops={run.stops} here={run.href} />
        ) : (
          <p>Nothing on the board stops it: the reason below is all that the crew reads.</p>
        )}
      </section>
    </ReasonPage>
  );
}
