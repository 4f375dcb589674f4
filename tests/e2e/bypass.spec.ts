import type { APIResponse, Page } from "@playwright/test";
import { coversOf, expect, personOf, placeOf, postForm, postJson, test, textOf } from "./support";

test.use({ own: "bypass" });
test.describe.configure({ mode: "serial" });

const sorrel = placeOf("N0382L");
const REGISTRATION = "N0382L";

type As = "builder" | "inspector" | "lead";

/** Tries to sign the gate past its page: by a form sent by hand, and by the API. */
async function trySigning(page: Page, first: string, gate: string, as: As): Promise<{ form: APIResponse; api: APIResponse }> {
  const { covers } = await coversOf(page, REGISTRATION, gate);
  const { pin } = personOf(first);
  const sheet = JSON.stringify({ gate: sorrel.gates[gate], covers });
  return {
    form: await postForm(page, `${sorrel.gate(gate)}/sign?as=${as}`, { as, pin, sheet }),
    api: await postJson(page, `/api/v1${sorrel.gate(gate)}/signatures`, { as, pin, covers }),
  };
}

/** Both refuse with this status and sentence. */
async function expectRefused(page: Page, tried: { form: APIResponse; api: APIResponse }, status: number, sentence: string) {
  expect([tried.form.status(), tried.api.status()]).toEqual([status, status]);
  expect(((await tried.api.json()) as { message: string }).message).toBe(sentence);
  expect(await textOf(page, tried.form)).toContain(sentence);
}

async function sign(page: Page, first: string, as: As): Promise<void> {
  await page.goto(`${sorrel.gate("WR")}/sign?as=${as}`);
  await page.getByLabel("Your signing PIN").fill(personOf(first).pin);
  await page.getByRole("button", { name: as === "builder" ? /^Sign as builder/ : /^Countersign/ }).click();
  await page.waitForURL("**#signatures");
}

test("a gate that is not ready is not signed: page, form and API say the same", async ({ visit }) => {
  const page = await visit("Jonas", "tablet");
  await page.goto(`${sorrel.gate("WR")}/sign`);
  await expect(page.getByLabel("Your signing PIN")).toHaveCount(0);
  const sentence = "Not done yet.";
  await expect(page.getByRole("main")).toContainText(sentence);
  await expectRefused(page, await trySigning(page, "Jonas", "WR", "builder"), 409, sentence);
  expect((await coversOf(page, REGISTRATION, "WR")).state).toBe("in work");
});

test("a run that is not clear is not called, by page or by form", async ({ visit }) => {
  const page = await visit("Odalys", "tablet");
  await page.goto(`${sorrel.run("1")}/go`);
  await expect(page.getByRole("button", { name: /^Call GO/ })).toHaveAttribute("aria-disabled", "true");
  await expect(page.getByRole("main")).toContainText("1 item of 8 left");
  const tried = await postForm(page, `${sorrel.run("1")}/go`, { version: "1", pin: personOf("Odalys").pin });
  expect(tried.status()).toBe(409);
  expect(await textOf(page, tried)).toContain("1 item of 8 left");
  const board = (await (await page.request.get(`/api/v1${sorrel.board}/board`)).json()) as { next: { state: string; go: unknown } };
  expect(board.next).toMatchObject({ state: "planned", go: null });
});

test("nobody but a lead calls GO: page and form say the same", async ({ visit }) => {
  const page = await visit("Jonas", "tablet");
  const sentence = "Only a lead can call GO. You are here as builder.";
  await page.goto(`${sorrel.run("1")}/go`);
  await expect(page.getByRole("button", { name: /^Call GO/ })).toHaveAttribute("aria-disabled", "true");
  await expect(page.getByRole("main")).toContainText(sentence);
  const tried = await postForm(page, `${sorrel.run("1")}/go`, { version: "1", pin: personOf("Jonas").pin });
  expect(tried.status()).toBe(403);
  expect(await textOf(page, tried)).toContain(sentence);
});

test("whoever did a part of the work does not countersign it: page, form and API say the same", async ({ visit }) => {
  const inspector = await visit("Henrik", "tablet");
  await inspector.goto(sorrel.gate("WR"));
  await inspector.getByRole("button", { name: "WR8, press when it is done" }).click();
  await expect(inspector.getByRole("button", { name: "WR8, press when it is done" })).toHaveCount(0);
  const builder = await visit("Jonas", "tablet");
  await sign(builder, "Jonas", "builder");

  await inspector.goto(`${sorrel.gate("WR")}/sign`);
  const sentence = "You did or recorded part of Walk-round yourself. Whoever countersigns did none of it: another lead or inspector must.";
  await expect(inspector.getByRole("main")).toContainText(sentence);
  await expect(inspector.getByLabel("Your signing PIN")).toHaveCount(0);
  await expectRefused(inspector, await trySigning(inspector, "Henrik", "WR", "inspector"), 403, sentence);
  expect((await coversOf(inspector, REGISTRATION, "WR")).state).toBe("half signed");
});

for (const [who, first] of [
  ["builder", "Adaeze"],
  ["crew member", "Noor"],
] as const) {
  test(`a ${who} does not countersign: the page offers no PIN, form and API say the same`, async ({ visit }) => {
    const page = await visit(first, "tablet");
    await page.goto(`${sorrel.gate("WR")}/sign?as=inspector`);
    await expect(page.getByLabel("Your signing PIN")).toHaveCount(0);
    for (const as of ["inspector", "lead"] as const) {
      const tried = await trySigning(page, first, "WR", as);
      const { message } = (await tried.api.json()) as { message: string };
      expect(message).toMatch(/countersign Walk-round/);
      await expectRefused(page, tried, 403, message);
    }
    expect((await coversOf(page, REGISTRATION, "WR")).state).toBe("half signed");
  });
}

test("a wrong PIN signs nothing", async ({ visit }) => {
  const page = await visit("Odalys", "tablet");
  await page.goto(`${sorrel.gate("WR")}/sign?as=lead`);
  const { covers } = await coversOf(page, REGISTRATION, "WR");
  const tried = await postJson(page, `/api/v1${sorrel.gate("WR")}/signatures`, { as: "lead", pin: "975310", covers });
  expect(tried.status()).toBe(403);
  expect((await tried.json()) as object).toMatchObject({ code: "pin-wrong" });
  expect((await coversOf(page, REGISTRATION, "WR")).state).toBe("half signed");
});

test("a member of another install finds nothing there: pages, forms and API answer 404", async ({ visit, complaints }) => {
  const page = await visit("Sefa", "tablet");
  for (const path of [sorrel.board, sorrel.gate("WR"), `${sorrel.gate("WR")}/sign`, sorrel.run("1"), `${sorrel.run("1")}/go`]) {
    const answer = await page.goto(path);
    expect(answer?.status(), path).toBe(404);
    await expect(page.getByRole("heading", { level: 1 })).toHaveText("This pipe ends here");
  }
  complaints.splice(0);
  const { pin } = personOf("Sefa");
  for (const [path, form] of [
    [sorrel.gate("WR"), { intent: "prove", item: sorrel.item("WR8"), revision: "1", as: "builder" }],
    [`${sorrel.gate("WR")}/sign`, { as: "inspector", pin, sheet: JSON.stringify({ gate: sorrel.gates.WR, covers: [] }) }],
    [`${sorrel.run("1")}/go`, { version: "1", pin }],
    [sorrel.run("1"), { intent: "acknowledge", version: "1" }],
  ] as [string, Record<string, string>][])
    expect((await postForm(page, path, form)).status(), path).toBe(404);
  expect((await page.request.get(`/api/v1${sorrel.board}/board`)).status()).toBe(404);
  const signing = await postJson(page, `/api/v1${sorrel.gate("WR")}/signatures`, { as: "inspector", pin, covers: [] });
  expect(signing.status()).toBe(404);
});

test("somebody who is not signed in is sent to sign in, and the API says 401", async ({ page, request }) => {
  for (const path of [sorrel.board, sorrel.gate("WR"), `${sorrel.gate("WR")}/sign`, `${sorrel.run("1")}/go`]) {
    await page.goto(path);
    await expect(page).toHaveURL(/\/sign-in\?to=/);
  }
  expect((await request.get(`/api/v1${sorrel.board}/board`)).status()).toBe(401);
  const Origin = new URL(page.url()).origin;
  const signing = await request.post(`/api/v1${sorrel.gate("WR")}/signatures`, { data: {}, headers: { Origin } });
  expect(signing.status()).toBe(401);
  const form = await request.post(`${sorrel.gate("WR")}/sign`, { form: { pin: "1" }, headers: { Origin }, maxRedirects: 0 });
  expect(form.status()).toBe(302);
  expect(form.headers().location).toMatch(/^\/sign-in/);
});

test("a write that another site sends is refused, and nothing is written", async ({ visit }) => {
  const page = await visit("Noor", "tablet");
  await page.goto(sorrel.run("1"));
  const form = { commandId: "0123456789abcdef", intent: "acknowledge", version: "1" };
  const foreign: Record<string, string>[] = [{ Origin: "https://elsewhere.example" }, {}];
  for (const headers of foreign) {
    const tried = await page.request.post(sorrel.run("1"), { form, headers, maxRedirects: 0 });
    expect([400, 403]).toContain(tried.status());
  }
  await page.reload();
  await expect(page.getByRole("button", { name: /^I have read card version 1/ })).toBeVisible();
});
