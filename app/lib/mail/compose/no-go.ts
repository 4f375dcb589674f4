/** No-go: nobody comes; what stops the run and who is on it. Pure. */
import type { Compose } from "#app/lib/mail/compose/page";
import { actSection, clearanceBox, crewSection, frame, runName, stopsOf, subjectOf, timeAndPlace } from "#app/lib/mail/compose/sections";
import { dayAndTime, oneLine } from "#app/lib/mail/compose/words";

export const noGoPage: Compose = (model, reader) => {
  const { run, install, stops } = model;
  const count = stops.length === 0 ? "the lead says no-go" : stops.length === 1 ? "1 thing stops it" : `${stops.length} things stop it`;
  const off =
    run.plannedStart === null ? "There is no run for now." : `There is no run on ${dayAndTime(run.plannedStart, install.timeZone)}.`;
  return {
    ...frame(model, reader),
    subject: subjectOf("No-go", model, count),
    word: "No-go",
    pipe: { fill: 0.4, spade: false },
    preview: `${off} ${count}.`,
    lead: [off, `For ${runName(model)}, ${count}. It was planned for: ${timeAndPlace(model)}`],
    box: null,
    stops: stopsOf(model),
    sections: [
      actSection(model, "Sent by"),
      {
        title: "Plan",
        rows: [
          { head: "Cleared to", text: `${clearanceBox(model).figure} rpm now`, note: clearanceBox(model).note },
          { head: "Run card", text: `version ${run.version}` },
        ],
      },
      crewSection(model, reader),
    ],
    abort: [],
    button: { label: "See what stops it", href: model.links.run },
    small: ["You get a GO mail before the next try. No GO mail means no run.", ...model.cautions.map(oneLine)],
  };
};
