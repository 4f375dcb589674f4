/**
 * The mails that a crew gets about a run, worded for one reader: plain text complete in itself, HTML beside it.
 * Pure: the same model and reader give the same mail.
 */
import { goPage } from "#app/lib/mail/compose/go";
import { holdPage } from "#app/lib/mail/compose/hold";
import { toHtml } from "#app/lib/mail/compose/html";
import type { RunMailKind, RunMailModel, RunMailReader, RunMailText } from "#app/lib/mail/compose/model";
import { noGoPage } from "#app/lib/mail/compose/no-go";
import type { Compose } from "#app/lib/mail/compose/page";
import { runsOutPage } from "#app/lib/mail/compose/runs-out";
import { scrubPage } from "#app/lib/mail/compose/scrub";
import { toText } from "#app/lib/mail/compose/text";

const PAGES: Record<RunMailKind, Compose> = { go: goPage, "no-go": noGoPage, hold: holdPage, scrub: scrubPage, "runs-out": runsOutPage };

/** @returns subject (one line), text (lines of at most 72 characters but for links) and HTML. Every number has its unit, every time its zone. */
export function composeRunMail(kind: RunMailKind, model: RunMailModel, reader: RunMailReader): RunMailText {
  const page = PAGES[kind](model, reader);
  return { subject: page.subject, text: toText(page), html: toHtml(page) };
}
