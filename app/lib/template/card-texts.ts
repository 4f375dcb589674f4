/**
 * What stands on every run card besides its steps: how it begins and ends, the calls, and the words that stop the run.
 */
import { applies } from "#app/lib/template/condition";
import type { TraitWord } from "#app/lib/template/trait-words";
import type { RunCard } from "#app/lib/template/types";

type Words = ReadonlySet<TraitWord>;

export const CARD_BEGIN = [
  "Brief read out at the aircraft, this card in hand",
  'Roll call: every position answers "go"',
  "Clear propeller: called, and answered twice",
];

/** `stop` says by which means the engine is stopped on this card. */
export function cardEnd(stop: string): string[] {
  return ["Throttle to idle", stop, "Ignition off", "Fuel off", "Master off", "Key out, in the run lead's hand"];
}

export function cardCalls(words: Words): RunCard["calls"] {
  const start = words.has("hand")
    ? { call: "Contact", by: "swinger", answer: '"Contact" by the operator, throttle set and switch on; never before the swinger\'s call' }
    : { call: "Starting", by: "operator", answer: "Nobody moves" };
  const first = words.has("oilsys") ? { call: "Pressure, with its value", by: "operator", answer: "Time by the recorder" } : null;
  return [
    { call: "Clear propeller", by: "operator", answer: '"Clear" by the area guard, then by the run lead' },
    start,
    ...(first ? [first] : []),
    { call: "Step and rpm", by: "run lead", answer: "The value seen, by the operator" },
    { call: "BACK", by: "run lead", answer: "Throttle to idle" },
    { call: "STOP, or arms crossed overhead", by: "anybody", answer: "Throttle shut, usual stop" },
    { call: "FIRE", by: "anybody", answer: "The fire drill" },
    { call: "Switches off, propeller stopped", by: "operator", answer: 'Nobody moves until the run lead says "In"' },
  ];
}

const STOP: [text: string, when?: string][] = [
  ["STOP: throttle shut, usual stop, for any of these"],
  ["Oil pressure late or falling", "oilsys"],
  ["A temperature, fuel pressure or volts outside its limit and not back after 10 s at idle"],
  ["Rough running, noise, vibration"],
  ["Leak, smoke, smell of fuel"],
  ["A fault lamp, or carbon monoxide in the cockpit"],
  ["A slack strap, a wheel that moves"],
  ["Anybody inside the line"],
  ["No contact for 5 s"],
  ["Wind over the limit"],
  ["The word STOP, from anybody"],
];

const KILL: [text: string, when?: string][] = [
  ["KILL: ignition or computers, cut-off, fuel, master, all at once, for any of these", "!diesel"],
  ["KILL: fuel cut-off, air shut, master, all at once, for any of these", "diesel"],
  ["Running below the least oil pressure", "oilsys"],
  ["Speed 100 rpm over plan, or rising by itself"],
  ["The throttle does nothing"],
  ["Pitch moves uncommanded", "cshyd|cselec"],
  ["The starter stays in", "estart"],
  ["Something seen wrong at propeller or mount"],
  ["The aircraft breaks loose"],
];

const FIRE: [text: string, when?: string][] = [
  ["The engine maker's own fire drill comes first", "efi|turbo|diesel"],
  ["In the intake while cranking: keep cranking or running, cut-off, throttle open, fuel off", "estart"],
  ["In the intake while starting by hand: swinger clear, cut-off, throttle open, fuel off; keep it running if it runs", "hand"],
  ["Not out in 10 s: KILL, and out"],
  ["Any other fire: KILL, and out"],
  ["Guards go in when the propeller has stopped, never from the front"],
];

const chosen = (lines: [text: string, when?: string][], words: Words) =>
  lines.filter(([, when]) => applies(when, words)).map(([text]) => text);

export function cardAbort(words: Words): RunCard["abort"] {
  return { stop: chosen(STOP, words), kill: chosen(KILL, words), fire: chosen(FIRE, words) };
}
