/** HOLD: nobody starts the engine; why, who is on it, and what brings GO back. Pure. */
import type { Compose } from "#app/lib/mail/compose/page";
import {
  abortWords,
  actSection,
  clearanceBox,
  crewSection,
  frame,
  runName,
  stopsOf,
  subjectOf,
  timeAndPlace,
} from "#app/lib/mail/compose/sections";
import { cut, dayAndTime, oneLine } from "#app/lib/mail/compose/words";

export const holdPage: Compose = (model, reader) => {
  const { act, install, stops } = model;
  const why = cut(oneLine(stops[0]?.title ?? act.reason) || "see the run", 60);
  const since = dayAndTime(act.at, install.timeZone);
  const whose = act.auto ? "It turned to HOLD by itself" : `${oneLine(act.by)} called HOLD`;
  return {
    ...frame(model, reader),
    subject: subjectOf("HOLD", model, why),
    word: "HOLD",
    pipe: { fill: 0.7, spade: true },
    preview: `Nobody starts the engine. ${why}`,
    lead: ["No GO stands now. Nobody starts the engine.", `${whose}, ${since}. If the engine is running: STOP.`],
    box: null,
    stops: stopsOf(model),
    sections: [
      actSection(model, "HOLD since"),
      {
        title: "",
        rows: [
          { head: "Back to GO", text: "only when a lead calls GO again; everybody answers the roll call again before that" },
          { head: "Planned", text: timeAndPlace(model) },
          { head: "Cleared to", text: `${clearanceBox(model).figure} rpm now`, note: clearanceBox(model).note },
        ],
      },
      crewSection(model, reader),
    ],
    abort: abortWords(model),
    button: { label: `Open ${runName(model)}`, href: model.links.run },
    small: ["If you are at the aircraft, stay at your place until the run lead says “In”.", ...model.cautions.map(oneLine)],
  };
};
