/** A tool's calibration or an extinguisher's look or service that runs out soon, worded for one reader. Pure. */
import type { DueSoon } from "#app/lib/gates/crib-dues";
import { toHtml } from "#app/lib/mail/compose/html";
import type { RunMailText } from "#app/lib/mail/compose/model";
import type { MailPage } from "#app/lib/mail/compose/page";
import { toText } from "#app/lib/mail/compose/text";
import { cut, dayOnly, oneLine } from "#app/lib/mail/compose/words";

export interface DueMailModel {
  install: { registration: string; name: string; timeZone: string };
  due: DueSoon;
  /** Instant of writing. */
  at: number;
  /** Items whose present proof names the tool, by key. */
  used: string[];
  head: { seq: number; hash: string };
  links: { crib: string; board: string };
}

const DAY = 86_400_000;

const WHAT: Record<DueSoon["kind"], { name: string; after: string; act: string }> = {
  calibration: {
    name: "Calibration",
    after: "After that nothing can be proved with it. What was proved with it while it was in date stands.",
    act: "Have it checked, then enter the check in the crib with its certificate.",
  },
  look: {
    name: "Monthly look",
    after:
      "After that it does not count for the fire stand-by: no run clears without enough extinguishers in date, and a GO turns into HOLD.",
    act: "Look at it as its label says, then enter the look in the crib.",
  },
  service: {
    name: "Yearly service",
    after:
      "After that it does not count for the fire stand-by: no run clears without enough extinguishers in date, and a GO turns into HOLD.",
    act: "Have it serviced, then enter the service in the crib.",
  },
};

/** @returns subject (one line), text (lines of at most 72 characters but for links) and HTML. */
export function composeDueMail(model: DueMailModel, reader: { name: string }): RunMailText {
  const page = duePage(model, reader);
  return { subject: page.subject, text: toText(page), html: toHtml(page) };
}

function duePage({ install, due, at, used, head, links }: DueMailModel, reader: { name: string }): MailPage {
  const { name, after, act } = WHAT[due.kind];
  const thing = oneLine(due.name);
  const registration = oneLine(install.registration);
  const lastDay = dayOnly(due.ends - 1, install.timeZone);
  const left = Math.max(1, Math.ceil((due.ends - at) / DAY));
  const days = left === 1 ? "its last day" : `${left} days left`;
  return {
    subject: cut(oneLine(`Due soon: ${thing} of ${registration}, ${name.toLowerCase()} to the end of ${lastDay}`), 150),
    registration,
    what: `${oneLine(install.name)}, crib`,
    word: "Due soon",
    pipe: { fill: Math.min(1, Math.max(0.04, (due.ends - at) / (30 * DAY))), spade: false },
    preview: `${thing}: ${name.toLowerCase()}, ${days}. Nothing is wrong yet.`,
    reader: `${oneLine(reader.name)}: this is for you as lead or builder.`,
    places: [],
    lead: [`${thing}: ${days}.`, act],
    box: null,
    stops: [],
    sections: [
      {
        title: "",
        rows: [
          { head: name, text: `in date to the end of ${lastDay}`, note: `days end at midnight, ${install.timeZone}` },
          { head: "Then", text: after },
          ...(used.length ? [{ head: "Used for", text: used.join(", ") }] : []),
        ],
      },
    ],
    abort: [],
    button: { label: "Open the crib", href: links.crib },
    small: ["This mail is written once for this date. The maker's manuals, the label on the bottle and the local rules come before it."],
    record: { line: `Record line ${head.seq}, SHA-256`, hash: oneLine(head.hash) },
    board: links.board,
  };
}
