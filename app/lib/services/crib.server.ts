// The crib's acts: tools and extinguishers come in, and are checked. A bad check reaches back to the last good one by itself.
import { extinguisherChecks, extinguishers, toolChecks, tools } from "#app/db/schema/crib";
import { mayRaise } from "#app/lib/gates/happening-verdicts";
import { endOfDate, startOfDate } from "#app/lib/gates/local-time";
import { mayEditCrib } from "#app/lib/gates/set-up-verdicts";
import type { AddExtinguisher, AddTool, RecordLook, RecordToolCheck } from "#app/lib/schemas/crib";
import { done, invalid, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { photosMissing } from "#app/lib/services/own-photos.server";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

const keeper = (d: Doing) => roleOf(d.member, "builder", "lead", "inspector");

export function addTool(act: Act, input: AddTool): Promise<Outcome<{ tool: string }>> {
  return perform({ ...act, kind: "add-tool", input }, async (d) => {
    const refusal = refusalOf(mayEditCrib(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const { id } = await d.record(keeper(d), { type: "tool-added", data: input });
    await d.tx.insert(tools).values({ id, installId: d.installId, ...input });
    return done({ tool: id });
  });
}

/** An out-of-tolerance check is bad news: any member may record it. */
export function recordToolCheck(act: Act, input: RecordToolCheck): Promise<Outcome<{ check: string }>> {
  const { on = null, good, due: dueDate = null, since: sinceDate = null, certificate = "", photo = null, note = "" } = input;
  return perform({ ...act, kind: "record-tool-check", input }, async (d) => {
    const refusal = refusalOf(good ? mayEditCrib(d.e, { member: d.member.id }) : mayRaise(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    if (!d.e.facts.tools.has(input.tool)) return notFound("That tool");
    const zone = d.e.snapshot.install.timeZone;
    const dayEnd = on === null ? d.now : endOfDate(on, zone);
    const due = dueDate === null ? null : endOfDate(dueDate, zone);
    const since = sinceDate === null ? null : startOfDate(sinceDate, zone);
    if (dayEnd === null || (dueDate !== null && due === null) || (sinceDate !== null && since === null))
      return invalid("There is no such date. Enter it again.");
    // A good check of a past day counts from that day's end, a bad one too: it reaches back, never less far.
    const at = Math.min(dayEnd, d.now);
    if (on !== null && dayEnd - 86_400_000 > d.now) return invalid("That day has not come yet. Enter the day of the check.");
    if (good !== (due !== null))
      return invalid(good ? "Enter the last day on which the tool is in date." : "A tool that is out of tolerance has no date to run to.");
    if (due !== null && due <= at) return invalid("The last day in date is before the check. Enter it again.");
    if (since !== null && (good || since > at))
      return invalid(
        good ? "A good check leaves no doubt." : "The first day of doubt is after the day on which it was found. Enter it again.",
      );
    const missing = await photosMissing(d, photo === null ? [] : [photo], "enter the check");
    if (missing) return missing;
    const row = { at, good, due, note };
    const more = { since: since ?? undefined, certificate: certificate || undefined, photo: photo ?? undefined };
    const base = await d.record(keeper(d), { type: "tool-checked", data: { tool: input.tool, ...row, ...more } });
    await d.tx.insert(toolChecks).values({ ...base, toolId: input.tool, ...row, ...more });
    return done({ check: base.id });
  });
}

export function addExtinguisher(act: Act, input: AddExtinguisher): Promise<Outcome<{ extinguisher: string }>> {
  return perform({ ...act, kind: "add-extinguisher", input }, async (d) => {
    const refusal = refusalOf(mayEditCrib(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const { name, agent, classB, charge, rating = "", position = "" } = input;
    if (rating && classB !== /B/.test(rating))
      return invalid(
        classB
          ? `A rating of ${rating} has no B, so it is not class B. Look at the label again.`
          : `A rating of ${rating} has a B: it is class B. Look at the label again.`,
      );
    const row = { name, agent, classB, charge };
    const { id } = await d.record(keeper(d), {
      type: "extinguisher-added",
      data: { ...row, rating: rating || undefined, position: position || undefined },
    });
    await d.tx.insert(extinguishers).values({ id, installId: d.installId, ...row, rating, position });
    return done({ extinguisher: id });
  });
}

/** A monthly look, a yearly service, or its withdrawal from use, which any member may record. */
export function recordLook(act: Act, input: RecordLook): Promise<Outcome<{ check: string }>> {
  return perform({ ...act, kind: "record-look", input }, async (d) => {
    const { kind, note } = input;
    const refusal = refusalOf(kind === "withdrawn" ? mayRaise(d.e, { member: d.member.id }) : mayEditCrib(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const bottle = d.e.snapshot.extinguishers.find((x) => x.id === input.extinguisher);
    if (!bottle) return notFound("That extinguisher");
    if (bottle.withdrawn) return invalid(`${bottle.name} was withdrawn from use. Add another one.`);
    const due = input.due === null ? null : endOfDate(input.due, d.e.snapshot.install.timeZone);
    if (kind === "withdrawn" ? due !== null : due === null)
      return invalid(kind === "withdrawn" ? "Withdrawn from use has no date to run to." : "Enter the last day to which it is in date.");
    if (due !== null && due <= d.now) return invalid("That day is over. Enter the last day to which it is in date.");
    const row = { kind, at: d.now, due, note };
    const base = await d.record(keeper(d), { type: "extinguisher-checked", data: { extinguisher: bottle.id, ...row } });
    await d.tx.insert(extinguisherChecks).values({ ...base, extinguisherId: bottle.id, ...row });
    return done({ check: base.id });
  });
}
