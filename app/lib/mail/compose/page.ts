/**
 * A mail before it is text or HTML: the same parts in the same order for both, so that neither says less than the other.
 * Pure data; every string in it is one line.
 */
import type { RunMailModel, RunMailReader } from "#app/lib/mail/compose/model";

export interface MailRow {
  head: string;
  text: string;
  /** Smaller, under it. */
  note?: string;
  /** The reader's own row. */
  you?: boolean;
}

export interface MailPage {
  subject: string;
  /** "N0417B Wren, run 1, First start" */
  registration: string;
  what: string;
  word: "GO" | "No-go" | "HOLD" | "SCRUB" | "Runs out" | "Due soon";
  /** How far the pipe under the word is filled, 0 to 1, and whether a spade stands there. */
  pipe: { fill: number; spade: boolean };
  /** Shown by mail programs beside the subject. */
  preview: string;
  /** The reader's own line, first of all. */
  reader: string;
  /** The reader's places and what to do there. */
  places: MailRow[];
  /** What it comes to: the first sentence is the heavy one. */
  lead: string[];
  /** "cleared to" and the figure. */
  box: { label: string; figure: string; unit: string; note: string } | null;
  stops: { title: string; sentence: string; onIt: string }[];
  sections: { title: string; rows: MailRow[] }[];
  abort: { word: string; lines: string[] }[];
  button: { label: string; href: string };
  /** Small print, each a paragraph. */
  small: string[];
  /** Of the record: the line that this mail stands on. */
  record: { line: string; hash: string };
  board: string;
}

export type Compose = (model: RunMailModel, reader: RunMailReader) => MailPage;
