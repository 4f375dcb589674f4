import AxeBuilder from "@axe-core/playwright";
import { expect, people, signIn, test } from "./support";

const [person] = people;
if (!person) throw new Error("The demo has no people");

test("a wrong password says so in words and keeps the address, and the right one leads to where one wanted to go", async ({
  page,
  complaints,
}) => {
  await page.goto("/account");
  await expect(page).toHaveURL(/\/sign-in\?to=%2Faccount$/);
  await page.getByLabel("E-mail").fill(person.email);
  await page.getByLabel("Password", { exact: true }).fill("not the password at all");
  await page.getByRole("button", { name: /^Sign in/ }).click();
  await expect(page.getByRole("alert")).toContainText("do not belong together");
  await expect(page.getByRole("alert")).toBeFocused();
  await expect(page.getByLabel("E-mail")).toHaveValue(person.email);
  // The browser itself reports each answer of 400 and above.
  expect(complaints.splice(0)).toEqual([expect.stringContaining("status of 400")]);
  await page.getByLabel("Password", { exact: true }).fill(person.password);
  await page.getByRole("button", { name: /^Sign in/ }).click();
  await page.waitForURL("**/account");
  complaints.splice(0);
});

test("the password can be shown", async ({ page }) => {
  await page.goto("/sign-in");
  const field = page.getByLabel("Password", { exact: true });
  await page.getByRole("button", { name: "Show the password" }).click();
  await expect(field).toHaveAttribute("type", "text");
  await page.getByRole("button", { name: "Hide the password" }).click();
  await expect(field).toHaveAttribute("type", "password");
});

test("signing out ends the session on the server too", async ({ page, context }) => {
  await signIn(page, person);
  const kept = await context.cookies();
  await page.evaluate(() => fetch("/sign-out", { method: "POST" }));
  await context.addCookies(kept);
  await page.goto("/hangar");
  await expect(page).toHaveURL(/\/sign-in/);
});

test.describe("without scripts", () => {
  test.use({ javaScriptEnabled: false });
  test("one can sign in", async ({ page }) => {
    await signIn(page, person);
    await page.goto("/sign-in");
    await expect(page).toHaveURL(/\/hangar$/);
  });
});

test("an address that leads nowhere says so and leads back", async ({ page, complaints }) => {
  await page.goto("/nowhere");
  await expect(page.getByRole("heading", { level: 1 })).toHaveText("This pipe ends here");
  await expect(page.getByRole("link", { name: "Back to the hangar" })).toHaveAttribute("href", "/hangar");
  expect(complaints.splice(0)).toEqual([expect.stringContaining("status of 404")]);
});

for (const path of ["/sign-in", "/nowhere"]) {
  for (const theme of ["apron", "hangar"]) {
    test(`${path} is accessible in the ${theme} theme, at 320 px too`, async ({ page, context, complaints }) => {
      await context.addCookies([{ name: "theme", value: theme, url: test.info().project.use.baseURL }]);
      await page.setViewportSize({ width: 320, height: 640 });
      await page.goto(path);
      await expect(page.locator("html")).toHaveAttribute("data-theme", theme);
      const { violations } = await new AxeBuilder({ page }).withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"]).analyze();
      expect(violations.map((v) => `${v.id}: ${v.nodes.map((n) => n.target).join(", ")}`)).toEqual([]);
      expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(320);
      complaints.splice(0);
    });
  }
}
