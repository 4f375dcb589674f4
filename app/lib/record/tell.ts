/**
 * One event of the record in plain words, as the history page, the dossier and the archive tell it.
 * From the event and the names that the record itself gives; it needs no board and no database.
 */
import { rpmText } from "#app/lib/gates/clearance";
import { when } from "#app/lib/gates/when";
import { inSentence } from "#app/lib/gates/who";
import type { EventType, RecordEvent } from "#app/lib/record/events";
import { evidenceWords } from "#app/lib/record/evidence-words";
import { type Names, partsAt } from "#app/lib/record/names";
import { pointsTo } from "#app/lib/record/points-to";
import { SYSTEM_NAMES } from "#app/lib/template/systems";
import type { SystemKey } from "#app/lib/template/types";
import { VALUES_BY_KEY } from "#app/lib/template/values";
import { format, formatBand, type UnitSystem } from "#app/lib/units/display";

export const KINDS = ["work", "signatures", "openings", "loose ends", "findings", "crib", "runs", "set-up and people"] as const;
export type Kind = (typeof KINDS)[number];

const KIND_OF: Record<EventType, Kind> = {
  "install-created": "set-up and people",
  "rules-changed": "set-up and people",
  "member-added": "set-up and people",
  "role-ended": "set-up and people",
  "number-entered": "set-up and people",
  "value-confirmed": "set-up and people",
  "board-edited": "set-up and people",
  "edit-proposed": "set-up and people",
  "edit-answered": "set-up and people",
  proof: "work",
  "proof-withdrawn": "work",
  "proof-confirmed": "work",
  "not-applicable-accepted": "work",
  "proof-kept": "work",
  "file-stored": "work",
  signed: "signatures",
  "signature-withdrawn": "signatures",
  "release-signed": "signatures",
  "release-signature-withdrawn": "signatures",
  opened: "openings",
  "opening-closed": "openings",
  "opening-mistaken": "openings",
  "opening-undisturbed": "openings",
  "loose-end-made": "loose ends",
  "loose-end-restored": "loose ends",
  "loose-end-confirmed": "loose ends",
  "loose-end-accepted": "loose ends",
  "finding-raised": "findings",
  "finding-severity": "findings",
  "finding-fixed": "findings",
  "finding-not-fixed": "findings",
  "finding-closed": "findings",
  "tool-added": "crib",
  "tool-checked": "crib",
  "extinguisher-added": "crib",
  "extinguisher-checked": "crib",
  "rung-left-out": "runs",
  "rung-set-back": "runs",
  "run-planned": "runs",
  "brief-acknowledged": "runs",
  "roll-call-answered": "runs",
  "wind-recorded": "runs",
  "go-called": "runs",
  "no-go-sent": "runs",
  "hold-called": "runs",
  "run-scrubbed": "runs",
  "run-started": "runs",
  "start-taken-back": "runs",
  "run-ended": "runs",
  "outcome-stated": "runs",
  "log-read": "runs",
  "log-missing-accepted": "runs",
  exceedance: "runs",
  "exceedance-answered": "runs",
};

export interface Told {
  kind: Kind;
  /** Follows the person's name: "proved “FP3 Purge the supply line”". No full stop. */
  did: string;
  /** What was measured, given as the reason, or listed; may be empty. */
  details: string[];
  /** The gate that it is about; null = none. */
  gate: string | null;
  /** The earlier line that it corrects, closes or answers; null = none. */
  about: number | null;
}

/**
 * @param names from `namesIn` over the whole record. @param units for measured values.
 * @returns the sentence and its details; times with their zone, numbers with their unit.
 */
export function tell(event: RecordEvent, names: Names, units: UnitSystem): Told {
  const target = pointsTo(event);
  const known = target === null ? undefined : names.of.get(target);
  const own = names.of.get(event.id);
  const [did, ...details] = sentence(event, names, units);
  return {
    kind: KIND_OF[event.type],
    did: did ?? event.type,
    details: details.filter((d) => d.trim() !== ""),
    gate: gateOf(event, names) ?? known?.gate ?? own?.gate ?? null,
    about: known && known.seq < event.seq ? known.seq : null,
  };
}

function gateOf(event: RecordEvent, names: Names): string | null {
  if (event.type === "proof" || event.type === "number-entered") return names.of.get(event.data.item)?.gate ?? null;
  if (event.type === "signed") return event.data.gate;
  return null;
}

const quote = (words: string): string => `“${words.replace(/\.$/, "")}”`;
const systemsWords = (systems: SystemKey[]): string => systems.map((s) => SYSTEM_NAMES[s]).join(", ");

/** What was done, then its details. */
function sentence(event: RecordEvent, names: Names, units: UnitSystem): string[] {
  const name = (id: string) => names.of.get(id)?.words ?? "something that this record does not name";
  const person = (id: string) => (names.of.has(id) ? name(id) : "somebody else");
  const at = (instant: number) => when(instant, names.timeZone, true);
  const proved = (proof: string) => quote(name(proof));
  switch (event.type) {
    case "install-created":
      return [
        `set up ${event.data.registration}, ${event.data.name}`,
        `Template ${event.data.templateVersion}, times in ${event.data.timeZone}`,
      ];
    case "rules-changed":
      return [
        `started a program whose rules are version ${event.data.to}, before them ${event.data.from}`,
        event.data.stands.length ? `Stands signed by them: ${event.data.stands.join(", ")}` : "No gate stands signed by them",
      ];
    case "member-added":
      return [`gave ${event.data.name} the role ${event.data.role}`];
    case "role-ended":
      return [`ended the role ${event.data.role} of ${event.data.name}`];
    case "number-entered":
      return [
        `entered the maker's number of ${quote(name(event.data.item))}`,
        enteredWords(event, names, units),
        `Read in: ${event.data.source}`,
        `Revision ${event.data.revision}`,
      ];
    case "value-confirmed":
      return [
        `${event.data.source ? "confirmed" : "entered"} the install's ${valueWords(event.data.key)}: ${valueShown(event.data.key, event.data.value, units)}`,
        event.data.source ? `Read in: ${event.data.source}` : "",
        event.data.revised.length ? `New revision of ${event.data.revised.map((r) => quote(name(r.item))).join(", ")}` : "",
      ];
    case "proof":
      return proofSentence(event, names, units);
    case "proof-withdrawn":
      return [`withdrew the proof of ${proved(event.data.proof)}`, event.data.reason];
    case "proof-confirmed":
      return [`confirmed ${proved(event.data.proof)} as the second person`];
    case "not-applicable-accepted":
      return [`accepted that ${proved(event.data.proof)} is not applicable`, event.data.reason];
    case "proof-kept":
      return [`stated that ${proved(event.data.proof)} is still true`, event.data.reason];
    case "signed":
      return [
        `signed ${name(event.data.gate)} as ${event.as}`,
        event.data.meaning,
        `Covers ${event.data.covers.length} items; text hash ${event.data.shownHash.slice(0, 12)}`,
      ];
    case "signature-withdrawn":
      return [`withdrew the signature of ${name(event.data.signature)}`, event.data.reason];
    case "release-signed":
      return [`signed the release for taxi tests as ${event.as}`, event.data.meaning];
    case "release-signature-withdrawn":
      return ["withdrew the signature of the release", event.data.reason];
    case "board-edited":
      return [
        event.data.proposal === null ? "changed the board" : "let the change of the board count",
        ...event.data.says,
        event.data.reason,
        event.data.wordsOnly ? "Words only: what was proved before still speaks for it" : "",
      ];
    case "edit-proposed":
      return ["asked for a change of the board, which waits for an inspector", event.data.subject, ...event.data.says, event.data.reason];
    case "edit-answered":
      return [`${ANSWERED[event.data.answer]} ${quote(name(event.data.edit))}`, event.data.reason];
    case "file-stored":
      return [
        `stored the photo ${event.data.name || "without a name"}`,
        `${Math.ceil(event.data.size / 1024)} kB, SHA-256 ${event.data.hash.slice(0, 12)}`,
      ];
    case "opened":
      return [
        `opened ${systemsWords(event.data.systems)}`,
        event.data.reason,
        event.data.happened === undefined ? "" : `Happened ${at(event.data.happened)}; it counts from ${at(event.data.opened)}`,
        event.data.undisturbed ? "Says that nothing was disturbed; a second person must confirm that" : "",
      ];
    case "opening-closed":
      return [`closed the opening ${quote(name(event.data.opening))}`, event.data.note];
    case "opening-mistaken":
      return [`marked the opening ${quote(name(event.data.opening))} as recorded by mistake`, event.data.reason];
    case "opening-undisturbed":
      return [`confirmed as the second person that nothing was disturbed: ${quote(name(event.data.opening))}`];
    case "loose-end-made":
      return [
        `left a loose end: ${event.data.what}`,
        `${event.data.count} of it, ${SYSTEM_NAMES[event.data.system]}`,
        event.data.why,
        photosWords(event.data.photos?.length ?? 0),
      ];
    case "loose-end-restored":
      return [`restored the loose end ${quote(name(event.data.looseEnd))}`];
    case "loose-end-confirmed":
      return [`saw the loose end ${quote(name(event.data.looseEnd))} restored, as the second person`];
    case "loose-end-accepted":
      return [`accepted the loose end ${quote(name(event.data.looseEnd))} for run ${event.data.rung}`, event.data.reason];
    case "finding-raised":
      return [
        `raised a ${event.data.severity} finding: ${event.data.words}`,
        SYSTEM_NAMES[event.data.system],
        capWords(event.data.cap),
        photosWords((event.data.photo === null ? 0 : 1) + (event.data.morePhotos?.length ?? 0)),
      ];
    case "finding-severity":
      return [`made the finding ${quote(name(event.data.finding))} ${event.data.severity}`, event.data.words, capWords(event.data.cap)];
    case "finding-fixed":
      return [`fixed the finding ${quote(name(event.data.finding))}`, event.data.words];
    case "finding-not-fixed":
      return [`found the finding ${quote(name(event.data.finding))} not fixed`, event.data.words];
    case "finding-closed":
      return [`closed the finding ${quote(name(event.data.finding))}`, event.data.words];
    case "tool-added":
      return [`put ${event.data.name} into the crib`, event.data.serial ? `Serial ${event.data.serial}` : ""];
    case "tool-checked":
      return [
        event.data.good ? `entered a good check of ${name(event.data.tool)}` : `recorded ${name(event.data.tool)} as out of tolerance`,
        `Checked ${at(event.data.at)}${event.data.due === null ? "" : `, in date until ${at(event.data.due)}`}`,
        event.data.since === undefined ? "" : `In doubt since ${at(event.data.since)}`,
        event.data.certificate ? `Certificate ${event.data.certificate}` : "",
        photosWords(event.data.photo === undefined ? 0 : 1),
        event.data.note,
      ];
    case "extinguisher-added":
      return [
        `put the extinguisher ${event.data.name} into the crib`,
        event.data.rating ? `Rated ${event.data.rating}` : "",
        event.data.position ? `Stands: ${event.data.position}` : "",
      ];
    case "extinguisher-checked":
      return [
        event.data.kind === "withdrawn"
          ? `withdrew the extinguisher ${name(event.data.extinguisher)}`
          : `entered the ${event.data.kind === "look" ? "monthly look" : "yearly service"} of ${name(event.data.extinguisher)}`,
        event.data.due === null ? "" : `In date until ${at(event.data.due)}`,
        event.data.note,
      ];
    case "rung-left-out":
      return [`accepted leaving out run ${event.data.rung}`, event.data.reason];
    case "rung-set-back":
      return [`set run ${event.data.rung} back: it is to be done again`, event.data.reason];
    case "run-planned":
      return [
        `planned run ${event.data.label}, run card version ${event.data.version}`,
        `${event.data.plannedStart === null ? "No time yet" : at(event.data.plannedStart)}, ${event.data.place || "no place yet"}, up to ${rpmText(event.data.rpm)}`,
        event.data.positions.map((p) => `${p.position}: ${person(p.member)}`).join(", "),
      ];
    case "brief-acknowledged":
      return [`read and acknowledged the card of ${name(event.data.run)}, version ${event.data.version}`];
    case "roll-call-answered":
      return [`answered ${event.data.answer} for ${name(event.data.run)}`, event.data.reason];
    case "wind-recorded":
      return [
        `read the wind for ${name(event.data.run)}: ${format("speed", event.data.speed, units).text}, gusting ${format("speed", event.data.gust, units).text}${event.data.tail ? ", from behind" : ""}`,
      ];
    case "go-called":
      return [
        `called GO for ${name(event.data.run)}, cleared to ${rpmText(event.data.cap)}`,
        `Stands on ${event.data.signatures.length} signatures, ends ${at(event.data.ends)}`,
      ];
    case "no-go-sent":
      return [`sent a no-go for ${name(event.data.run)}`, event.data.reason, ...event.data.stops];
    case "hold-called":
      return [
        event.data.auto ? `held ${name(event.data.run)}: what it stood on changed` : `called HOLD on ${name(event.data.run)}`,
        event.data.reason,
        ...event.data.stops,
      ];
    case "run-scrubbed":
      return [`scrubbed ${name(event.data.run)}`, event.data.reason];
    case "run-started":
      return [event.data.unstarted ? "recorded a run that nobody started here" : `started ${name(event.data.run)}`];
    case "start-taken-back":
      return [`took the start of ${name(event.data.run)} back: the engine never fired`];
    case "run-ended":
      return [`reported ${name(event.data.run)} ended`, `Ended ${at(event.data.at)}`];
    case "outcome-stated":
      return [`stated that ${name(event.data.run)} was ${event.data.outcome}`];
    case "log-read":
      return [`read the engine log of ${name(event.data.run)}`];
    case "log-missing-accepted":
      return [`accepted that ${name(event.data.run)} has no engine log`, event.data.reason];
    case "exceedance":
      return [`recorded an exceedance of ${name(event.data.run)}`, event.data.sentence];
    case "exceedance-answered":
      return [`answered the exceedance ${quote(name(event.data.exceedance))}`, event.data.words];
  }
}

function proofSentence(event: Extract<RecordEvent, { type: "proof" }>, names: Names, units: UnitSystem): string[] {
  const { data } = event;
  const item = names.of.get(data.item);
  const words = quote(item?.words ?? data.key);
  const verb = { done: "proved", failed: "found not right:", na: "marked not applicable:" }[data.state];
  const details = data.evidence.flatMap((given, n) => {
    const part = partsAt(item, data.revision)[n];
    return part ? [evidenceWords(part, given, units, names.timeZone)] : [];
  });
  const doer = data.did === event.by ? "" : `Done by ${names.of.get(data.did)?.words ?? "somebody else"}`;
  const late = data.late ? `Entered late: done ${when(data.counts, names.timeZone, true)}` : "";
  const tools = data.tools.length ? `With ${data.tools.map((t) => names.of.get(t)?.words ?? "a tool").join(", ")}` : "";
  return [`${verb} ${words}`, details.filter((d) => d !== "done").join("; "), doer, late, tools, data.note];
}

const ANSWERED = {
  accepted: "accepted the change of the board",
  "accepted as words only": "accepted as words only the change of the board",
  rejected: "rejected the change of the board",
  "taken back": "took back the change of the board",
} as const;
const photosWords = (n: number): string => (n === 0 ? "" : n === 1 ? "With a photo" : `With ${n} photos`);
const capWords = (cap: number | null): string => (cap === null ? "" : `Not above ${rpmText(cap)}`);
function valueShown(key: string, value: number | null, units: UnitSystem): string {
  const known = VALUES_BY_KEY.get(key);
  if (value === null) return "left empty";
  return known ? format(known.quantity, value, units, known.shownIn).text : String(value);
}

/** A maker's number as it was entered: a band in the part's own quantity, or words. */
function enteredWords({ data }: Extract<RecordEvent, { type: "number-entered" }>, names: Names, units: UnitSystem): string {
  if (typeof data.entered === "string") return data.entered;
  const band = data.entered as { min: number | null; max: number | null } | null;
  const part = partsAt(names.of.get(data.item), data.revision)[data.part];
  return band && part && "criterion" in part ? `${part.label}: ${formatBand(part.criterion.quantity, band, units)}` : "";
}

const valueWords = (key: string): string => inSentence(VALUES_BY_KEY.get(key)?.label ?? key);
