// What browser tests share: the demo's people, signing in, and a page on which nothing may complain.
import { test as base, expect, type Page } from "@playwright/test";
import type { DemoPerson } from "../../scripts/running.mjs";

export { expect };

export const people: DemoPerson[] = JSON.parse(process.env.E2E_PEOPLE ?? "[]");
export const inbox = process.env.E2E_INBOX ?? "";

/** A test that fails when its page writes an error or a warning to the console, or throws. */
export const test = base.extend<{ complaints: string[] }>({
  complaints: [
    async ({ page }, use) => {
      const complaints: string[] = [];
      page.on("console", (message) => {
        if (message.type() === "error" || message.type() === "warning") complaints.push(message.text());
      });
      page.on("pageerror", (error) => complaints.push(error.message));
      await use(complaints);
      expect(complaints).toEqual([]);
    },
    { auto: true },
  ],
});

export async function signIn(page: Page, person: { email: string; password: string }): Promise<void> {
  await page.goto("/sign-in");
  await page.getByLabel("E-mail").fill(person.email);
  await page.getByLabel("Password", { exact: true }).fill(person.password);
  await page.getByRole("button", { name: /^Sign in/ }).click();
  await page.waitForURL("**/hangar");
}
