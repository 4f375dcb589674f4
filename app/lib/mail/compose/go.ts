/** GO: when, where, as what, up to which speed, until when it stands, and the whole card. Pure. */
import { rpmText } from "#app/lib/gates/clearance";
import type { Compose } from "#app/lib/mail/compose/page";
import {
  abortWords,
  actSection,
  cardSections,
  clearanceBox,
  crewSection,
  frame,
  limitSection,
  runName,
  stopsOf,
  subjectOf,
  timeAndPlace,
  windSection,
} from "#app/lib/mail/compose/sections";
import { oneLine, timeInBoth } from "#app/lib/mail/compose/words";

export const goPage: Compose = (model, reader) => {
  const cleared = `cleared to ${rpmText(model.clearance.rpm)}`;
  const ends = model.goEnds === null ? null : timeInBoth(model.goEnds, model.install.timeZone);
  return {
    ...frame(model, reader),
    subject: subjectOf("GO", model, cleared),
    word: "GO",
    pipe: { fill: 1, spade: false },
    preview: `${runName(model)}, ${cleared}. ${timeAndPlace(model)}`,
    lead: [timeAndPlace(model), ...(ends ? [`GO stands until ${ends}.`] : [])],
    box: clearanceBox(model),
    stops: stopsOf(model),
    sections: [
      crewSection(model, reader),
      windSection(model, reader),
      ...cardSections(model),
      limitSection(model, reader),
      actSection(model, "GO called"),
    ],
    abort: abortWords(model),
    button: { label: `Open ${runName(model)}`, href: model.links.run },
    small: [
      "If anything changes that the run stands on, GO turns into HOLD by itself and you get a mail. Anyone may call HOLD, and STOP.",
      ...model.cautions.map(oneLine),
    ],
  };
};
