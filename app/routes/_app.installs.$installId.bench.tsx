import { BenchCards } from "#app/components/bench/BenchCards";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { allKeptOf } from "#app/db/queries/bench-inputs.server";
import { installContext } from "#app/lib/http/install.server";
import { benchCards } from "#app/lib/views/bench";
import type { Route } from "./+types/_app.installs.$installId.bench";

export const meta: Route.MetaFunction = () => [{ title: "Bench · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { e, installId } = context.get(installContext);
  return { cards: benchCards(e, await allKeptOf(db(), installId)) };
}

export default function Bench({ loaderData }: Route.ComponentProps) {
  const { cards } = loaderData;
  const worked = cards.filter((card) => card.last).length;
  return (
    <main id="main">
      <TitlePipe
        title="Bench"
        state={worked ? `${worked} of ${cards.length} worked out` : "Nothing worked out yet"}
        fill={worked / cards.length}
        then="Work things out here. What counts for a gate is the sheet at its item; nothing on the board rests on this page."
      />
      <BenchCards cards={cards} />
    </main>
  );
}
