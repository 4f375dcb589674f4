import { ReasonPage } from "#app/components/run/ReasonPage";
import { Notice } from "#app/components/ui/Notice";
import { mayHold } from "#app/lib/gates/run-verdicts";
import { installContext } from "#app/lib/http/install.server";
import { actWithReason, reasonSheet } from "#app/lib/http/reason-acts.server";
import { callHold } from "#app/lib/services/call-hold.server";
import { holdWords } from "#app/lib/views/hold-words";
import type { Route } from "./+types/_app.installs.$installId.runs.$runId_.hold";

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `HOLD, run ${loaderData?.run.label ?? ""} · Bladecount` }];

export function loader({ context, params }: Route.LoaderArgs) {
  const sheet = reasonSheet(context.get(installContext), params.runId, mayHold);
  return { ...sheet, words: holdWords(sheet.run.state, sheet.run.label) };
}

export const action = ({ context, params, request }: Route.ActionArgs) =>
  actWithReason(context.get(installContext), request, params.runId, callHold);

export default function CallHold({ loaderData, actionData }: Route.ComponentProps) {
  const { words } = loaderData;
  return (
    <ReasonPage
      sheet={loaderData}
      reply={actionData}
      title={words.title}
      hint="In a few words: they stand in the mail and in the record."
      act={words.act}
      stop
      back={words.back}
      told={{ title: "Who is told", what: "HOLD mail" }}
      toldAfter
    >
      <Notice kind="hold" title="Is the engine running? Shout STOP first, or cross your arms overhead.">
        {words.text}
      </Notice>
    </ReasonPage>
  );
}
