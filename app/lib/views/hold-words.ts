/** What HOLD means now, by the run's state: on the sheet that calls it. Pure. */
import type { RunState } from "#app/lib/gates/result";

export interface HoldWords {
  title: string;
  /** What calling it does, after the words that stop an engine. */
  text: string;
  act: string;
  back: string;
}

const ASKED = "everybody answers again before the next GO";

export function holdWords(state: RunState, label: string): HoldWords {
  switch (state) {
    case "called":
      return {
        title: `Call HOLD, run ${label}`,
        text: `HOLD is for the record and the mail: GO is over at once, nobody starts the engine, and ${ASKED}.`,
        act: "HOLD",
        back: "Back, GO stays as it is",
      };
    case "running":
      return {
        title: `Call HOLD, run ${label}`,
        text: `HOLD is for the record and the mail: no other start follows on this GO, and ${ASKED}.`,
        act: "HOLD",
        back: "Back, the run goes on as it is",
      };
    case "held":
      return {
        title: `HOLD stands already, run ${label}`,
        text: `GO is over and nobody starts the engine. Say HOLD again only for another reason: it is mailed, and who has answered since answers again.`,
        act: "HOLD for another reason",
        back: "Back, HOLD stays as it is",
      };
    case "planned":
      return {
        title: `Call HOLD, run ${label}`,
        text: `GO was not called yet. HOLD tells the crew why this run must wait, and ${ASKED.replace("the next GO", "GO")}.`,
        act: "HOLD",
        back: "Back, the run stays as planned",
      };
    default:
      return { title: `HOLD, run ${label}`, text: "This run is over: there is nothing to hold.", act: "HOLD", back: "Back to the run" };
  }
}
