/** SCRUB: the run is given up for good; nobody comes, and no GO of it stands. Pure. */
import type { Compose } from "#app/lib/mail/compose/page";
import { actSection, crewSection, frame, runName, subjectOf, timeAndPlace } from "#app/lib/mail/compose/sections";
import { cut, dayAndTime, oneLine } from "#app/lib/mail/compose/words";

export const scrubPage: Compose = (model, reader) => {
  const { run, install, act } = model;
  const off = run.plannedStart === null ? "This run is given up." : `There is no run on ${dayAndTime(run.plannedStart, install.timeZone)}.`;
  return {
    ...frame(model, reader),
    subject: subjectOf("SCRUB", model, cut(oneLine(act.reason), 60) || "given up"),
    word: "SCRUB",
    pipe: { fill: 0.2, spade: true },
    preview: `${off} Nobody starts the engine.`,
    lead: [off, `The lead gave up ${runName(model)} for good. Nobody starts the engine; no GO of it stands.`],
    box: null,
    stops: [],
    sections: [
      actSection(model, "Scrubbed by"),
      {
        title: "",
        rows: [
          { head: "It was planned", text: timeAndPlace(model) },
          { head: "What comes next", text: "the rung stays as it was; another run of it is planned and called anew" },
        ],
      },
      crewSection(model, reader),
    ],
    abort: [],
    button: { label: `Open ${runName(model)}`, href: model.links.run },
    small: ["You get a GO mail before the next try. No GO mail means no run.", ...model.cautions.map(oneLine)],
  };
};
