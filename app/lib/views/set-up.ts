/** Ratings and limits as the set-up page shows them: what each is, where it was read, and which of them stop the runs. Pure. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { mayConfirmValue } from "#app/lib/gates/set-up-verdicts";
import { count } from "#app/lib/gates/who";
import type { Basis, Value, ValueDef } from "#app/lib/template/types";
import { symbolOf } from "#app/lib/units/convert";
import { displayUnit, format, type UnitSystem } from "#app/lib/units/display";
import type { Viewer } from "#app/lib/views/board";

export interface ValueRow {
  key: string;
  anchor: string;
  label: string;
  help: string;
  state: "confirmed" | "default" | "missing";
  /** "read", "not confirmed", "not entered" */
  word: string;
  /** The figure alone, "2,700"; null = not entered. */
  value: string | null;
  /** The same as it is typed, "2700". */
  typed: string;
  unit: string;
  /** Where it was read, or where the starting point comes from. */
  source: string;
  /** As typed in the form's source field: only what somebody entered. */
  typedSource: string;
  /** Beside the form, where another figure is not this person's to enter. */
  note: string | null;
}

export interface ValueGroup {
  key: "runs" | "release" | "ratings";
  title: string;
  says: string;
  rows: ValueRow[];
}

export interface SetUpView {
  state: string;
  /** Share of what stops the runs that is confirmed, 0 to 1. */
  fill: number;
  groups: ValueGroup[];
  /** The first that stops the runs and is not confirmed. */
  next: { label: string; anchor: string; left: number } | null;
  may: { ok: boolean; why: string };
}

type Entered = ValueDef & Value;

/** The rules let no run clear while one of these is not confirmed. */
const stopsRuns = (v: Entered): boolean => v.card || v.key === "redline";

export function setUpView(e: Evaluation, me: Viewer, units: UnitSystem): SetUpView {
  const { values } = e.snapshot;
  const redlineFirst = [...values].sort((a, b) => Number(b.key === "redline") - Number(a.key === "redline"));
  const row = (v: Entered) => valueRow(e, me, v, units);
  const runs = redlineFirst.filter(stopsRuns).map(row);
  const release = values.filter((v) => !stopsRuns(v) && v.limit).map(row);
  const ratings = values.filter((v) => !stopsRuns(v) && !v.limit).map(row);
  const open = runs.filter((r) => r.state !== "confirmed");
  const verdict = mayConfirmValue(e, { member: me.id });
  const groups: ValueGroup[] = [
    {
      key: "runs",
      title: "These stop every run",
      says: "On the run cards. No run is clear until each is confirmed with where it was read.",
      rows: runs,
    },
    {
      key: "release",
      title: "These stop the release",
      says: "Items use them. Runs may go on without, the release for taxi tests may not.",
      rows: release,
    },
    {
      key: "ratings",
      title: "Ratings",
      says: "The ladder of runs, the sheets of the bench and the counts come from these.",
      rows: ratings,
    },
  ];
  return {
    state: open.length
      ? `${open.length} of ${count(runs.length, "limit")} that stop the runs ${open.length === 1 ? "is" : "are"} not confirmed`
      : `all ${count(runs.length, "limit")} that stop the runs are confirmed`,
    fill: runs.length ? (runs.length - open.length) / runs.length : 1,
    groups: groups.filter((g) => g.rows.length),
    next: open[0] ? { label: open[0].label, anchor: open[0].anchor, left: open.length - 1 } : null,
    may: verdict.ok ? { ok: true, why: "" } : { ok: false, why: verdict.blockers[0]?.sentence ?? "" },
  };
}

export const anchorOfValue = (key: string): string => `value-${key}`;

const WORDS = { confirmed: "read", default: "not confirmed", missing: "not entered" } as const;

function valueRow(e: Evaluation, me: Viewer, v: Entered, units: UnitSystem): ValueRow {
  const state = v.value === null ? "missing" : v.source === null ? "default" : "confirmed";
  const shown = v.value === null ? null : format(v.quantity, v.value, units, v.shownIn);
  const may = (changes: boolean) => mayConfirmValue(e, { member: me.id, value: { key: v.key, changes } }).ok;
  return {
    key: v.key,
    anchor: anchorOfValue(v.key),
    label: v.label,
    help: v.help,
    state,
    word: WORDS[state],
    value: shown && grouped(shown.value),
    typed: shown?.value ?? "",
    unit: shown?.unit ?? symbolOf(v.shownIn ?? displayUnit(v.quantity, units)),
    source: v.source ?? (v.value === null ? "Only the maker can say." : `A starting point: ${basisWords(v.basis)}.`),
    typedSource: v.source ?? "",
    note: may(false) && !may(true) ? "Work has begun: another figure is an inspector’s to enter. You may correct where it was read." : null,
  };
}

function basisWords(basis: Basis): string {
  switch (basis.kind) {
    case "standard":
      return basis.source;
    case "common":
      return "common practice, no source";
    default:
      return "entered without a source";
  }
}

/** "13.5" stays, "2700" becomes "2,700". */
const grouped = (figure: string): string => figure.replace(/^\d{4,}/, (whole) => whole.replace(/\d(?=(\d{3})+$)/g, "$&,"));
