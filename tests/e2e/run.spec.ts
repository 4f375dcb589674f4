import { coversOf, expect, personOf, placeOf, postForm, postJson, test } from "./support";

test.use({ own: "run" });
test.describe.configure({ mode: "serial" });

const sorrel = placeOf("N0382L");

test("from GO by the live card to the review: start list, oil pressure, steps, end, outcome, log, exceedance", async ({ visit }) => {
  test.setTimeout(240_000);
  const lead = await visit("Odalys", "phone");
  const builder = await visit("Jonas", "tablet");
  const inspector = await visit("Henrik", "tablet");
  const crew = await visit("Noor", "phone");
  const sign = async (page: typeof lead, who: string, as: string) => {
    const { covers } = await coversOf(page, "N0382L", "WR");
    const answer = await postJson(page, `/api/v1${sorrel.gate("WR")}/signatures`, { as, pin: personOf(who).pin, covers });
    expect(answer.status(), await answer.text()).toBe(201);
  };
  for (const page of [lead, builder, inspector, crew]) await page.goto(sorrel.board);
  await builder.goto(sorrel.gate("WR"));
  await builder.getByRole("button", { name: "WR8, press when it is done" }).click();
  await expect(builder.getByRole("button", { name: "WR8, press when it is done" })).toHaveCount(0);
  await sign(builder, "Jonas", "builder");
  await sign(inspector, "Henrik", "inspector");
  for (const intent of ["acknowledge", "go"]) expect((await postForm(crew, sorrel.run("1"), { intent, version: "1" })).status()).toBe(303);
  expect((await postForm(lead, `${sorrel.run("1")}/go`, { version: "1", pin: personOf("Odalys").pin })).status()).toBe(303);

  await lead.goto(sorrel.run("1"));
  await lead.getByRole("link", { name: /^Live card/ }).click();
  await expect(lead.getByRole("heading", { level: 1 })).toContainText("Run 1");
  const startButton = lead.getByRole("button", { name: /^Engine starts/ });
  await expect(startButton).toHaveAttribute("aria-disabled", "true");
  for (;;) {
    const next = lead.getByRole("button", { name: "Answered" });
    if ((await next.count()) === 0) break;
    await next.first().click();
  }
  await startButton.click();
  await expect(lead.getByRole("heading", { level: 1 })).toContainText("running since");

  // Another one of the crew follows, and may press nothing that the lead does.
  await crew.goto(`${sorrel.run("1")}/live`);
  await expect(crew.getByText("You follow this run.")).toBeVisible();
  await expect(crew.getByRole("button", { name: /^Propeller stands/ })).toHaveCount(0);
  // No clock that nobody presses there: it would cry STOP by itself. The word itself is at hand for everybody.
  await expect(crew.getByLabel("Oil pressure")).toHaveCount(0);
  await crew.getByRole("button", { name: /^STOP/ }).click();
  await expect(crew.getByRole("dialog", { name: "STOP" })).toContainText("Throttle shut, usual stop");
  await crew.getByRole("button", { name: "Back to the card" }).click();
  const second = await visit("Odalys", "tablet");
  await second.goto(`${sorrel.run("1")}/live`);
  await expect(second.getByText("Another device holds the card.")).toBeVisible();
  await second.goto(sorrel.board);
  await expect(second.getByRole("link", { name: /^Live card of run 1/ })).toBeVisible();
  expect((await postForm(crew, `${sorrel.run("1")}/live`, { intent: "ended" })).status()).toBe(403);

  await lead.getByRole("button", { name: /^Above its least/ }).click();
  await expect(lead.getByLabel("Oil pressure")).toContainText("Above its least after");
  // What was pressed survives a reload and a lost network.
  await lead.getByRole("button", { name: /^Next step/ }).click();
  const title = await lead.locator("#step").textContent();
  await lead.reload();
  await expect(lead.locator("#step")).toHaveText(title ?? "");
  await lead.getByRole("button", { name: /^Propeller stands/ }).click();
  await lead.getByRole("button", { name: /^Completed/ }).click();
  await expect(lead.getByRole("link", { name: /^Review the run/ })).toBeVisible();

  await lead.goto(`${sorrel.run("1")}/review`);
  await expect(lead.getByRole("main")).toContainText("This run was completed.");
  await expect(lead.getByRole("main")).toContainText("Engine log not read");
  await expect(lead.getByRole("button", { name: /^Accept that there is none/ })).toHaveAttribute("aria-disabled", "true");

  await builder.goto(`${sorrel.run("1")}/review`);
  await builder.getByLabel("What was outside its limit").fill("CHT 3 over 200 °C for 12 s at 9:41");
  await builder.getByRole("button", { name: /^I have read the log/ }).click();
  await expect(builder.getByRole("heading", { name: "Exceedances" })).toBeVisible();
  await inspector.goto(`${sorrel.run("1")}/review`);
  const exceedance = inspector.getByRole("listitem").filter({ hasText: "CHT 3 over 200" }).last();
  await exceedance.getByLabel("In words").fill("Probe touched the baffle; moved, and seen right");
  await exceedance.getByRole("button", { name: /^Answer it/ }).click();
  await expect(inspector.getByRole("listitem").filter({ hasText: "CHT 3 over 200" }).last()).toContainText("answered");
  await expect(inspector.getByRole("main")).toContainText("After run 1");
  const board = await (await inspector.request.get(`/api/v1${sorrel.board}/board`)).json();
  expect(board.runs.find((r: { label: string }) => r.label === "1").state).toBe("ended");
});
