/** Which earlier record an event speaks of: what it withdraws, confirms, closes, accepts or answers. */
import type { RecordEvent } from "#app/lib/record/events";

/** @returns the id of that record; null where the event speaks of none. */
export function pointsTo(event: RecordEvent): string | null {
  switch (event.type) {
    case "proof-withdrawn":
    case "proof-confirmed":
    case "not-applicable-accepted":
    case "proof-kept":
      return event.data.proof;
    case "signature-withdrawn":
    case "release-signature-withdrawn":
      return event.data.signature;
    case "opening-closed":
    case "opening-mistaken":
    case "opening-undisturbed":
      return event.data.opening;
    case "loose-end-restored":
    case "loose-end-confirmed":
    case "loose-end-accepted":
      return event.data.looseEnd;
    case "finding-severity":
    case "finding-fixed":
    case "finding-not-fixed":
    case "finding-closed":
      return event.data.finding;
    case "tool-checked":
      return event.data.tool;
    case "extinguisher-checked":
      return event.data.extinguisher;
    case "board-edited":
      return event.data.proposal;
    case "edit-answered":
      return event.data.edit;
    case "exceedance-answered":
      return event.data.exceedance;
    default:
      return null;
  }
}
