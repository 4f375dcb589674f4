import type { Page } from "@playwright/test";
import { expect, test } from "./support";

test.use({ own: "new-install" });

const ANSWERS: [question: string, answer: string][] = [
  ["How does fuel reach the engine?", "Gravity alone"],
  ["What meters the fuel?", "Carburettor"],
  ["What fires the plugs?", "Magnetos"],
  ["How many engine computers?", "None"],
  ["What cools it?", "Air"],
  ["Where is the oil?", "In a sump under the engine"],
  ["How is the propeller driven?", "Straight from the crankshaft"],
  ["Which kind of propeller?", "Fixed pitch"],
  ["Where is the third wheel?", "At the nose"],
  ["How is it started?", "Electric starter"],
  ["Has this engine run before?", "No: new or overhauled"],
];

async function choose(page: Page, question: string, answer: string): Promise<void> {
  const radio = page.getByRole("group", { name: question }).getByRole("radio", { name: answer, exact: true });
  await radio.check({ force: true });
  await expect(radio).toBeChecked();
}

async function answerFirstPage(page: Page): Promise<void> {
  await page.goto("/hangar");
  await page
    .getByRole("link", { name: /new install/i })
    .first()
    .click();
  await page.waitForURL("**/installs/new*");
  await page.getByLabel("Registration", { exact: true }).fill("N0834S");
  await page.getByLabel("Name", { exact: true }).fill("Sundew");
  for (const [question, answer] of ANSWERS) await choose(page, question, answer);
}

test("answering the questions makes the board that they promised", async ({ visit, complaints }) => {
  const page = await visit("Sefa", "tablet");
  await answerFirstPage(page);
  const makes = await page.getByRole("complementary").textContent();
  const [, gates, items] = /(\d+)\s+gates,\s+(\d+)\s+items/.exec(makes ?? "") ?? [];
  expect(Number(items)).toBeGreaterThan(60);

  await page.getByRole("button", { name: /^Next: details/ }).click();
  await page.waitForURL("**/installs/new/details*");
  await page.getByRole("button", { name: /^Next: ratings and limits/ }).click();
  await page.waitForURL("**/installs/new/ratings*");
  await expect(page.getByRole("contentinfo")).toContainText(`${gates} gates, ${items} items before the first start`);

  const redline = page.getByRole("group", { name: "Redline" });
  await redline.getByLabel(/^Value in rpm/).fill("2,850");
  await redline.getByLabel("Where it was read").fill("engine maker’s manual p. 6");
  await page.getByRole("button", { name: /^Make the board/ }).click();
  await expect(page.getByRole("alert")).toContainText("can be read two ways");
  expect(complaints.splice(0)).toEqual([expect.stringContaining("status of 400")]);
  await expect(redline.getByLabel("Where it was read")).toHaveValue("engine maker’s manual p. 6");
  await redline.getByLabel(/^Value in rpm/).fill("2850");
  await page.getByRole("button", { name: /^Make the board/ }).click();
  await page.waitForURL(/\/installs\/[0-9A-Za-z]{22}$/);
  await expect(page.getByRole("heading", { level: 1 })).toContainText("Not clear for run 1");
  await expect(page.getByRole("banner")).toContainText("N0834S");

  type Board = {
    gates: Record<string, { present: boolean; of: number }>;
    items: Record<string, { key: string }>;
    install: { registration: string };
  };
  const board = (await (await page.request.get(`/api/v1${new URL(page.url()).pathname}/board`)).json()) as Board;
  const before = Object.values(board.items).filter((i) => !/^(SV|RL)/.test(i.key));
  expect(before).toHaveLength(Number(items));
  await page.goto("/hangar");
  await expect(page.getByRole("main")).toContainText("N0834S");
});

test("what is left open and what cannot both be true is said, and nothing is made", async ({ visit }) => {
  const page = await visit("Bram", "phone");
  await page.goto("/installs/new");
  await page.getByRole("button", { name: /^Next: details/ }).click();
  await expect(page.getByRole("alert")).toBeVisible();
  await expect(page).toHaveURL(/\/installs\/new\?/);
  await answerFirstPage(page);
  await choose(page, "What meters the fuel?", "Electronic injection");
  await page.getByRole("button", { name: /^Next: details/ }).click();
  await expect(page).toHaveURL(/\/installs\/new\?/);
  await expect(page.getByRole("alert")).toBeVisible();
  await page.goto("/hangar");
  await expect(page.getByRole("main")).not.toContainText("N0834S");
});
