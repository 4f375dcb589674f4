/**
 * Words the three mails that a crew gets about a run. The reader's own name and positions come first.
 * Pure: the same model and reader give the same text.
 */
import { when } from "#app/lib/gates/when";
import type { RunMailKind, RunMailModel, RunMailReader, RunMailText } from "#app/lib/mail/compose/model";
import { format } from "#app/lib/units/display";

/** @returns subject and plain text. Every number carries its unit, every time its zone. */
export function composeRunMail(kind: RunMailKind, model: RunMailModel, reader: RunMailReader): RunMailText {
  const { install, run, act } = model;
  const word = kind === "go" ? "GO" : kind === "hold" ? "HOLD" : "NO-GO";
  const time = (at: number) => when(at, install.timeZone, true);
  const mine = model.crew.find((c) => c.member === reader.member)?.positions.map((p) => p.name) ?? [];
  const lines = [
    `${reader.name}: ${mine.length ? `you are ${mine.join(" and ")}.` : "you hold no position on this run."}`,
    "",
    `${word} for run ${run.label} (${run.rung}) of ${install.registration}, ${install.name}.`,
    ...(act.reason ? [`${act.auto ? "The board held it" : act.by}: ${act.reason}`] : []),
    `Called by ${act.auto ? "the board" : act.by} on ${time(act.at)}.`,
    `Planned start: ${run.plannedStart === null ? "not set" : time(run.plannedStart)}. Place: ${run.place || "not given"}.`,
    ...(model.goEnds === null ? [] : [`GO ends on ${time(model.goEnds)}.`]),
    ...stops(model),
    "",
    ...runCard(model, reader),
    "",
    ...model.cautions,
    "",
    `Run: ${model.links.run}`,
    `Board: ${model.links.board}`,
    `Record line ${model.head.seq}, SHA-256 ${model.head.hash}`,
  ];
  return { subject: `${word}: ${install.registration} run ${run.label}`, text: `${lines.join("\n")}\n` };
}

function stops({ stops: list }: RunMailModel): string[] {
  if (list.length === 0) return [];
  return [
    "",
    "What stops it:",
    ...list.map((s) => `- ${s.title}. ${s.sentence} On it: ${s.who.length ? s.who.join(", ") : (s.next ?? "nobody yet")}.`),
  ];
}

function runCard({ run, clearance, wind, crew, card, limits }: RunMailModel, { units }: RunMailReader): string[] {
  const rpm = (value: number) => format("rotation", value, units).text;
  const speed = (value: number) => format("speed", value, units).text;
  return [
    `Planned highest: ${rpm(run.rpm)}. Cleared to ${rpm(clearance.rpm)}${clearance.binds ? `, bound by ${clearance.binds.label}` : ""}.`,
    `Wind at most ${speed(wind.limit)}, gusts at most ${speed(wind.gustLimit)}.`,
    "",
    "Crew:",
    ...crew.map((c) => `- ${c.name}: ${c.positions.map((p) => `${p.name} (${p.place})`).join("; ")}`),
    "",
    `Card, cowl ${card.cowl}:`,
    ...card.steps.map(
      (s) =>
        `${s.no}. ${s.title}${s.rpm ? `, ${rpm(s.rpm.min)} to ${rpm(s.rpm.max)}` : ""}${s.hold === null ? "" : `, ${format("time", s.hold, units).text}`}. ${s.see}`,
    ),
    "",
    "Limits:",
    ...limits.map(
      (l) =>
        `- ${l.label}: ${l.value === null ? "not entered" : format(l.quantity, l.value, units).text}${l.confirmed ? "" : " (a default, not confirmed)"}`,
    ),
    "",
    `STOP: ${card.abort.stop.join("; ")}`,
    `KILL: ${card.abort.kill.join("; ")}`,
    `FIRE: ${card.abort.fire.join("; ")}`,
  ];
}
