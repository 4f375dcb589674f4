import { expect, messagesIn, people, personOf, placeOf, test } from "./support";

test.use({ own: "go" });
test.describe.configure({ mode: "serial" });

const sorrel = placeOf("N0382L");
const crew = {
  "Jonas Tappet": "operator",
  "Odalys Gudgeon": "run lead",
  "Priya Fairlead": "fire guard",
  "Tomasz Windsock": "area guard",
  "Noor Lanyard": "observer",
  "Adaeze Grommet": "recorder",
};

test("the builder sees what stops the first start, proves the last item and signs", async ({ visit }) => {
  const page = await visit("Jonas", "tablet");
  await page.goto(sorrel.board);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText(/Not clear for run 1\s+3 things stop it/);
  const stops = page.locator("ol.stops > li");
  await expect(stops).toHaveCount(3);
  await expect(stops.first()).toContainText("Walk-round is not finished");
  await stops.first().getByRole("link").click();
  await page.waitForURL(`**${sorrel.gate("WR")}#*`);
  await page.getByRole("button", { name: "WR8, press when it is done" }).click();
  await page.getByRole("link", { name: /^Sign/ }).click();
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("Sign as builder");
  await page.getByLabel("Your signing PIN").fill(personOf("Jonas").pin);
  await page.getByRole("button", { name: /^Sign as builder/ }).click();
  await expect(page).toHaveURL(`${sorrel.gate("WR")}#signatures`);
  await expect(page.getByRole("heading", { level: 1 }).locator("..")).toContainText("half signed");
});

test("the inspector countersigns on a phone", async ({ visit }) => {
  const page = await visit("Henrik", "phone");
  await page.goto(sorrel.board);
  await page.getByRole("link", { name: /^Countersign Walk-round/ }).click();
  await page.getByLabel("Your signing PIN").fill(personOf("Henrik").pin);
  await page.getByRole("button", { name: /^Countersign as inspector/ }).click();
  await expect(page).toHaveURL(`${sorrel.gate("WR")}#signatures`);
  await page.goto(sorrel.board);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText(/Not clear for run 1\s+2 things stop it/);
});

test("the observer reads the card on a phone, acknowledges it and says go", async ({ visit }) => {
  const page = await visit("Noor", "phone");
  await page.goto(sorrel.board);
  await page.getByRole("link", { name: "Open the run card" }).click();
  await expect(page).toHaveURL(sorrel.run("1"));
  await expect(page.getByText("You are observer").first()).toBeVisible();
  await page.getByRole("button", { name: /^I have read card version 1/ }).click();
  await page.getByRole("button", { name: /^Go\b/ }).click();
  await expect(page.getByRole("heading", { name: "You are go" })).toBeVisible();
});

test("the lead calls GO with PIN, and each of the crew has the mail", async ({ visit, instance }) => {
  const page = await visit("Odalys", "tablet");
  await page.goto(sorrel.board);
  await expect(page.getByRole("heading", { level: 1 })).toContainText("Clear for run 1");
  await page.goto(`${sorrel.run("1")}/go`);
  await page.getByLabel("Lead’s PIN").fill(personOf("Odalys").pin);
  await page.getByRole("button", { name: /^Call GO/ }).click();
  await page.waitForURL(`**${sorrel.run("1")}`);
  await page.goto(sorrel.board);
  await expect(page.getByRole("heading", { level: 1 })).toContainText("GO");

  const about = (subject: string) => subject.startsWith("GO: run 1 of N0382L");
  await expect.poll(async () => (await messagesIn(instance.inbox)).filter((m) => about(m.subject)).length, { timeout: 20_000 }).toBe(6);
  const mails = (await messagesIn(instance.inbox)).filter((m) => about(m.subject));
  for (const [name, position] of Object.entries(crew)) {
    const mail = mails.find((m) => m.to.includes(people.find((p) => p.name === name)?.email ?? ""));
    const text = mail?.text.replace(/\s+/g, " ") ?? "";
    expect(text).toContain(`${name}: you are ${position}.`);
    expect(text).toMatch(/\d\d:\d\d [A-Z]{2,5}.*Upper Meadow, apron south/);
    expect(text).toContain("Cleared to 1,375 rpm.");
    expect(text).toMatch(/LIMITS .*Redline: 2,900 rpm.*Oil pressure, least: 210 kPa/);
    expect(text).toMatch(/ABORT WORDS STOP: .*KILL: .*FIRE: /);
    expect(mail?.html).toContain("1,375");
  }
});

test("a fuel line is opened: the preview says what falls, GO turns to HOLD, and everyone is told", async ({ visit, instance }) => {
  const page = await visit("Priya", "tablet");
  await page.goto(sorrel.gate("FP"));
  await page
    .getByRole("link", { name: /^Opened a system/ })
    .first()
    .click();
  await expect(page).toHaveURL(/\/openings\?.*from=/);
  await page.getByRole("checkbox", { name: /^Fuel, forward of the firewall/ }).check();
  await page.getByLabel("What was done, and why").fill("Hose nut turned: it wept");
  await page.getByRole("button", { name: /^See what will lapse/ }).click();
  await expect(page.getByRole("heading", { name: "What will lapse" }).locator("..")).toContainText("HOLD");
  await expect(page.getByRole("heading", { name: "What will lapse" }).locator("..")).toContainText("Fuel flow and prime");
  // Nothing counts before it is confirmed.
  const board = async () => (await (await page.request.get(`/api/v1${sorrel.board}/board`)).json()).next;
  expect((await board()).state).toBe("called");
  await page.locator("footer, .foot").getByRole("button").last().click();
  await expect.poll(async () => (await board()).state).toBe("held");
  await page.goto(sorrel.board);
  await expect(page.getByRole("heading", { level: 1 })).toContainText("HOLD, run 1");
  await expect
    .poll(async () => (await messagesIn(instance.inbox)).filter((m) => m.subject.startsWith("HOLD: run 1")).length, { timeout: 20_000 })
    .toBe(6);

  await page.goto(`${sorrel.board}/record?kind=openings`);
  await expect(page.getByRole("main")).toContainText("Priya Fairlead opened");
  await expect(page.getByRole("main")).toContainText("Hose nut turned: it wept");
  await page.goto(`${sorrel.board}/record?check=1`);
  await expect(page.getByRole("main")).toContainText("The chain is whole.");
});
