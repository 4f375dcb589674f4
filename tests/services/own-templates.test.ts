import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { leftOutOf } from "#app/db/queries/left-out.server";
import { loadSnapshot } from "#app/db/queries/load-snapshot.server";
import { ownTemplate, ownTemplates, templateBaseOf } from "#app/db/queries/own-templates.server";
import { recordLines } from "#app/db/queries/record-lines.server";
import { templateOf } from "#app/lib/gates/board-template";
import type { Snapshot } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import { verify } from "#app/lib/record/chain";
import { readTemplate } from "#app/lib/schemas/own-template";
import { createInstallSchema } from "#app/lib/schemas/set-up";
import { createInstall } from "#app/lib/services/create-install.server";
import { editBoard } from "#app/lib/services/edit-board.server";
import { keepTemplate, MOST_TEMPLATES, throwTemplateAway } from "#app/lib/services/keep-template.server";
import type { OwnTemplate } from "#app/lib/template/own-template";
import { MINUTE, TRAITS, value, type Workshop, workshop } from "../support/workshop";

vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
let body: OwnTemplate;
const lio = { userId: "lio" };
/** An item that nothing rests on and that guards no life. */
const plain = (s: Snapshot) =>
  s.items.find((i) => !i.killer && !i.step && i.parts.every((p) => p.kind === "tick") && !s.items.some((o) => o.follows.includes(i.id)));
beforeAll(async () => {
  w = await workshop();
  await w.confirmValues();
  const item = plain((await w.board()).snapshot);
  value(await editBoard(w.act("lio"), { edit: { kind: "hide", subject: { kind: "item", id: item?.id ?? "" } }, reason: "" }));
  w.clock.add(MINUTE);
  body = templateOf((await w.board()).snapshot, "Ours", await templateBaseOf(db(), w.installId));
}, 60_000);
afterAll(() => w.clock.stop());

describe("an own template", () => {
  it("is kept once however often its form is sent, seen by its owner alone, and thrown away by nobody else", async () => {
    const act = { actor: lio, commandId: newId() };
    const [a, b] = [value(await keepTemplate(act, body)), value(await keepTemplate(act, body))];
    expect(a).toEqual(b);
    expect(await ownTemplates(db(), "lio")).toMatchObject([{ id: a.template, name: "Ours" }]);
    expect(await ownTemplate(db(), "olga", a.template)).toBeNull();
    expect(await throwTemplateAway({ actor: { userId: "olga" } }, a.template)).toMatchObject({ ok: false, status: 404 });
    expect(readTemplate(JSON.stringify((await ownTemplate(db(), "lio", a.template))?.body)).ok).toBe(true);
    value(await throwTemplateAway({ actor: lio }, a.template));
    expect(await ownTemplates(db(), "lio")).toEqual([]);
  });

  it("makes an install with its board, without what it hides, and with numbers that nobody has confirmed", async () => {
    const values = Object.fromEntries(Object.entries(body.values).map(([key, v]) => [key, { value: v ?? null, source: null }]));
    const form = createInstallSchema.parse({ registration: "N0212S", name: "From ours", timeZone: "UTC", traits: TRAITS, values });
    const { install } = value(await createInstall({ actor: lio, commandId: newId() }, form, body));
    const snapshot = (await loadSnapshot(db(), install)) as Snapshot;
    const hidden = body.items.filter((i) => i.hidden).map((i) => i.key);
    expect(hidden).toHaveLength(1);
    expect(snapshot.items.map((i) => i.key).sort()).toEqual(body.items.flatMap((i) => (i.hidden ? [] : [i.key])).sort());
    expect(snapshot.values.map((v) => [v.key, v.value])).toEqual((await w.board()).snapshot.values.map((v) => [v.key, v.value]));
    expect(snapshot.values.every((v) => v.source === null)).toBe(true);
    expect(await leftOutOf(db(), install)).toContainEqual(
      expect.objectContaining({ key: hidden[0], because: expect.stringContaining("Ours") }),
    );
    expect(verify(await recordLines(db(), install)).ok).toBe(true);
  });

  it(`is refused where an account keeps ${MOST_TEMPLATES} of them`, async () => {
    for (let n = 0; n < MOST_TEMPLATES; n++) value(await keepTemplate({ actor: lio, commandId: newId() }, body));
    expect(await keepTemplate({ actor: lio, commandId: newId() }, body)).toMatchObject({ ok: false, code: "too-many-templates" });
  });
});
