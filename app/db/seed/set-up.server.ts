// The demo's first evenings: an install is set up, its people are let in, its figures are read out of the manuals, its crib is stocked.
import type { PastClock } from "#app/db/seed/clock";
import { type Crew, crewOf, value } from "#app/db/seed/crew.server";
import { dateAfter } from "#app/db/seed/days";
import { newId } from "#app/lib/ids";
import { confirmValue } from "#app/lib/services/confirm-value.server";
import { createInstall } from "#app/lib/services/create-install.server";
import { addExtinguisher, addTool, recordLook, recordToolCheck } from "#app/lib/services/crib.server";
import { enterNumber } from "#app/lib/services/enter-number.server";
import { addMember } from "#app/lib/services/members.server";
import { toSI } from "#app/lib/units/convert";
import { PEOPLE } from "../../../fixtures/demo/people";
import type { DemoInstall, MakersWord } from "../../../fixtures/demo/types";

/** Sets the install up at the clock's instant and lets its people in. */
export async function setUp(data: DemoInstall, clock: PastClock, ids: ReadonlyMap<string, string>, timeZone: string): Promise<Crew> {
  const lead = ids.get(data.lead);
  if (!lead) throw new Error("An install of the demo has no lead");
  const { registration, name, traits } = data;
  const made = value(
    await createInstall({ actor: { userId: lead }, commandId: newId() }, { registration, name, timeZone, traits, values: {} }),
  );
  const crew = crewOf(made.install, data, clock, ids);
  for (const [person, role] of data.members) {
    clock.minutes(1);
    const email = PEOPLE.find((p) => p.key === person)?.email ?? "";
    value(await addMember(crew.act(data.lead), { email, role }));
  }
  return crew;
}

/** Ratings and limits as the lead reads them out of the manuals, then the makers' numbers of the items. */
export async function readManuals({ data, act, clock, board }: Crew): Promise<void> {
  for (const [key, number, unit, source] of data.values) {
    clock.minutes(1);
    value(await confirmValue(act(data.lead), { key, value: toSI(number, unit), source }));
  }
  for (const [key, words] of Object.entries(data.makers)) {
    const item = (await board()).snapshot.items.find((i) => i.key === key);
    for (const [part, word] of words.entries()) {
      if (!item || !word.source) continue;
      clock.minutes(2);
      value(await enterNumber(act(data.lead), { item: item.id, part, source: word.source, ...said(word) }));
    }
  }
}

export function said(word: MakersWord) {
  if ("text" in word) return { band: null, text: word.text };
  const end = (n: number | undefined) => (n === undefined ? null : toSI(n, word.unit));
  return { band: { min: end(word.min), max: end(word.max) }, text: null };
}

/** A wrench and the extinguishers, in date to some months after the present. */
export async function stockCrib({ data, act, clock, board }: Crew): Promise<void> {
  const zone = (await board()).snapshot.install.timeZone;
  const due = (days: number) => dateAfter(clock.present, days, zone);
  const { certificate, ...wrench } = data.wrench;
  const { tool } = value(await addTool(act(data.lead), wrench));
  value(
    await recordToolCheck(act(data.lead), {
      tool,
      on: null,
      good: true,
      due: due(240),
      certificate,
      note: "Checked against the club's beam wrench",
    }),
  );
  for (const { name, agent, charge, rating, position } of data.extinguishers) {
    clock.minutes(3);
    const { extinguisher } = value(await addExtinguisher(act(data.lead), { name, agent, classB: true, charge, rating, position }));
    value(await recordLook(act(data.lead), { extinguisher, kind: "service", due: due(200), note: "" }));
    value(await recordLook(act(data.lead), { extinguisher, kind: "look", due: due(26), note: "" }));
  }
}
