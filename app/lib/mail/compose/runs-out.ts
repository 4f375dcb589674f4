/** Before a planned run: what stands now and will have run out by then, while there is time to do it again. Pure. */
import type { Compose } from "#app/lib/mail/compose/page";
import { frame, runName, stopsOf, subjectOf, timeAndPlace } from "#app/lib/mail/compose/sections";
import { oneLine } from "#app/lib/mail/compose/words";

export const runsOutPage: Compose = (model, reader) => {
  const { stops } = model;
  const count = stops.length === 1 ? "1 proof runs out" : `${stops.length} proofs run out`;
  return {
    ...frame(model, reader),
    subject: subjectOf("Runs out", model, count),
    word: "Runs out",
    pipe: { fill: 0.7, spade: false },
    preview: `${count} before the run. Nothing is wrong yet.`,
    lead: [
      `${count} before ${runName(model)} is due.`,
      `It is planned for: ${timeAndPlace(model)} Nothing is wrong yet; done again in time, nothing will be.`,
    ],
    box: null,
    stops: stopsOf(model),
    sections: [],
    abort: [],
    button: { label: "Open the board", href: model.links.board },
    small: ["This mail is written once for these proofs.", ...model.cautions.map(oneLine)],
  };
};
