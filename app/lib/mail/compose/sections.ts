/**
 * The parts that several mails have: whose mail it is, the clearance, the crew, the card, the limits, what stops the run.
 * Pure: from the mail's model to parts of a page, every typed text made one line.
 */
import { rpmText } from "#app/lib/gates/clearance";
import type { RunMailModel, RunMailReader } from "#app/lib/mail/compose/model";
import type { MailPage, MailRow } from "#app/lib/mail/compose/page";
import { cut, dayAndTime, duration, list, oneLine, small, speedRange, stopped, timeInBoth } from "#app/lib/mail/compose/words";
import { format } from "#app/lib/units/display";

type Section = MailPage["sections"][number];

export const runName = ({ run }: RunMailModel): string => `run ${oneLine(run.label)}`;

/** "GO: run 1 of N0417B, Sat 5 Dec 09:30 CET, cleared to 1,375 rpm": one line, at most 150 characters. */
export function subjectOf(word: string, model: RunMailModel, also: string): string {
  const { install, run } = model;
  const time = run.plannedStart === null ? "no time set" : dayAndTime(run.plannedStart, install.timeZone);
  return cut(oneLine(`${word}: ${runName(model)} of ${install.registration}, ${time}, ${also}`), 150);
}

/** What is the same in the head and the foot of every mail. */
export function frame(model: RunMailModel, reader: RunMailReader) {
  const { install, run, head, links } = model;
  const mine = model.crew.find((c) => c.member === reader.member)?.positions ?? [];
  const name = oneLine(reader.name);
  return {
    registration: oneLine(install.registration),
    what: `${oneLine(install.name)}, ${runName(model)}, ${small(oneLine(run.rung))}`,
    reader: mine.length
      ? `${name}: you are ${list(mine.map((p) => small(oneLine(p.name))))}.`
      : `${name}: you hold no place on this run; this is for you to know.`,
    places: mine.map((p) => ({ head: oneLine(p.name), text: stopped(oneLine(p.place)), note: stopped(oneLine(p.duty)), you: true })),
    record: { line: `Record line ${head.seq}, SHA-256`, hash: oneLine(head.hash) },
    board: links.board,
  };
}

/** Planned time at the install and in UTC, with the place. */
export function timeAndPlace({ install, run }: RunMailModel): string {
  const time = run.plannedStart === null ? "No time is set" : timeInBoth(run.plannedStart, install.timeZone);
  return `${time}, ${oneLine(run.place) || "place not given"}.`;
}

export function clearanceBox({ clearance, run }: RunMailModel): NonNullable<MailPage["box"]> {
  const { binds, limits } = clearance;
  const next = limits.filter((l) => l !== binds && l.rpm > clearance.rpm).sort((a, b) => a.rpm - b.rpm)[0];
  const [figure = "", unit = ""] = rpmText(clearance.rpm).split(" ");
  const words = [
    binds ? `What binds: ${oneLine(binds.label)}.` : "",
    next ? `Next: ${oneLine(next.label)}, ${rpmText(next.rpm)}.` : "",
    `The plan goes to ${rpmText(run.rpm)}, not above.`,
  ];
  return { label: "cleared to", figure, unit, note: words.filter(Boolean).join(" ") };
}

export function crewSection({ crew }: RunMailModel, reader: RunMailReader): Section {
  return {
    title: "Crew",
    rows: crew.map((c) => {
      const you = c.member === reader.member;
      return { head: list(c.positions.map((p) => oneLine(p.name))), text: `${oneLine(c.name)}${you ? " (you)" : ""}`, you };
    }),
  };
}

export function windSection({ wind, install }: RunMailModel, { units }: RunMailReader): Section {
  const speed = (v: number) => format("speed", v, units).text;
  const rows: MailRow[] = [{ head: "Limit", text: `${speed(wind.limit)}, gusts ${speed(wind.gustLimit)}, none from behind` }];
  if (wind.newest)
    rows.push({
      head: "Last read",
      text: `${speed(wind.newest.speed)}, gusts ${speed(wind.newest.gust)}`,
      note: dayAndTime(wind.newest.recorded, install.timeZone),
    });
  return { title: "Wind", rows };
}

export function cardSections({ card, run }: RunMailModel): Section[] {
  const steps = card.steps.map((step) => {
    const held = [step.rpm && speedRange(step.rpm), step.hold === null ? null : `hold ${duration(step.hold)}`].filter(Boolean);
    return { head: String(step.no), text: [oneLine(step.title), ...held].join(", "), note: oneLine(step.see) };
  });
  return [
    {
      title: `Run card, version ${run.version}`,
      rows: [
        { head: "Cowl", text: oneLine(card.cowl) },
        { head: "Begin", text: joined(card.begin) },
      ],
    },
    { title: "", rows: steps },
    { title: "", rows: [{ head: "End", text: joined(card.end) }] },
  ];
}

const joined = (lines: string[]): string => lines.map(oneLine).join("; ") || "not given";

export function limitSection({ limits }: RunMailModel, { units }: RunMailReader): Section {
  return {
    title: "Limits",
    rows: limits.map((l) => {
      const value =
        l.value === null ? "not entered" : l.quantity === "rotation" ? rpmText(l.value) : format(l.quantity, l.value, units).text;
      return { head: oneLine(l.label), text: l.confirmed || l.value === null ? value : `${value}, a default, not confirmed` };
    }),
  };
}

/** STOP, KILL and FIRE as the card has them; the card's first line repeats the word, so it is taken apart. */
export function abortWords({ card }: RunMailModel): MailPage["abort"] {
  const part = (word: string, lines: string[]) => ({
    word,
    lines: lines.map((line) => oneLine(line).replace(new RegExp(`^${word}: `), "")),
  });
  return [part("STOP", card.abort.stop), part("KILL", card.abort.kill), part("FIRE", card.abort.fire)].filter((a) => a.lines.length);
}

export function stopsOf({ stops }: RunMailModel): MailPage["stops"] {
  return stops.map((s) => ({
    title: stopped(oneLine(s.title)),
    sentence: stopped(oneLine(s.sentence)),
    onIt: stopped(s.who.length ? `On it: ${list(s.who.map(oneLine))}` : oneLine(s.next ?? "Nobody is on it yet")),
  }));
}

/** Who did it and when. */
export function actSection({ act, install }: RunMailModel, word: string): Section {
  const rows = [{ head: word, text: `${act.auto ? "by the board itself" : oneLine(act.by)}, ${dayAndTime(act.at, install.timeZone)}` }];
  if (oneLine(act.reason)) rows.push({ head: act.auto ? "Why" : "In their words", text: oneLine(act.reason) });
  return { title: "", rows };
}
