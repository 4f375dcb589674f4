import { Link } from "react-router";
import { Answer } from "#app/components/board/Answer";
import { CrewBoard } from "#app/components/board/CrewBoard";
import { Now } from "#app/components/board/Now";
import { Ahead, StandAt } from "#app/components/board/StandAt";
import { StopList } from "#app/components/board/StopList";
import { useBoardWatch } from "#app/components/board/useBoardWatch";
import { Line } from "#app/components/line/Line";
import { ClearanceBars } from "#app/components/ui/ClearanceBars";
import { Figure } from "#app/components/ui/Figure";
import { installContext } from "#app/lib/http/install.server";
import { boardView } from "#app/lib/views/board";
import { boardAnswer, tagOf } from "#app/lib/views/board-answer";
import { boardOf, recordPlaces } from "#app/lib/views/places";
import { standAt } from "#app/lib/views/stand-at";
import type { Route } from "./+types/_app.installs.$installId._index";

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `${loaderData.view.answer.title} · ${loaderData.registration}` : "Bladecount" },
];

export function loader({ context, url }: Route.LoaderArgs) {
  const { e: now, me, head, installId, snapshot } = context.get(installContext);
  const planned = snapshot.runs.find((r) => r.id === now.result.next?.id)?.plannedStart ?? null;
  const { e, view: later } = standAt(now, url.searchParams, planned);
  return {
    later,
    registration: snapshot.install.registration,
    home: boardOf(installId),
    records: recordPlaces(snapshot),
    view: boardView(e, me),
    whole: url.searchParams.has("whole"),
    edits: snapshot.editsWaiting.length,
    watch: { address: `/api/v1/installs/${installId}/board`, tag: tagOf(boardAnswer(now, head)) },
  };
}

export default function Board({ loaderData }: Route.ComponentProps) {
  const { view, home, whole, watch, records, later, edits } = loaderData;
  useBoardWatch(watch.address, watch.tag);
  const { answer, stops, line, acts, clearance, crew } = view;
  const short = crew !== null && !whole;
  return (
    <main id="main">
      <Ahead view={later} here={home} />
      <section className="board-top" aria-label="Where it stands">
        <Answer {...answer} />
        <div className="board-stops">
          <StopList
            stops={stops}
            most={short ? 1 : 2}
            nothing={answer.tone === "running" ? "The run card is live on the run’s page." : "Nothing stops it."}
          />
        </div>
      </section>
      {short ? (
        <>
          <CrewBoard {...crew} />
          {!later.when && <Now acts={acts} nothing="Nothing is asked of you now." records={records} />}
          <p className="board-whole">
            <Link to={`${home}?whole`}>See the whole board</Link>
          </p>
        </>
      ) : (
        <>
          <Line {...line} />
          {!later.when && (
            <Now acts={acts} nothing="Nothing waits for you here. What others do shows above as it happens." records={records} />
          )}
          {edits > 0 && (
            <p className="border-t border-line px-4 py-4 tablet:px-6">
              {edits === 1 ? "1 edit of the board waits" : `${edits} edits of the board wait`} for an inspector. Until then the old rule
              holds. <Link to={`${home}/set-up/board#waiting`}>Board editor</Link>
            </p>
          )}
          {clearance && (
            <section className="board-clearance" aria-labelledby="clearance-title">
              <h2 id="clearance-title">
                Clearance: <Figure value={clearance.rpm} className="font-bold" />
              </h2>
              <p>
                Crankshaft speed. The least of these binds: {clearance.binds}. The maker’s manual, the local rules and licensed judgement
                come before this figure.
              </p>
              <ClearanceBars limits={clearance.limits} />
            </section>
          )}
        </>
      )}
      <StandAt key={later.when} view={later} here={home} />
    </main>
  );
}
