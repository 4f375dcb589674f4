import { spawn } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import AxeBuilder from "@axe-core/playwright";
import type { Browser, Page } from "@playwright/test";
import { expect, messagesIn, personOf, placeOf, SIZES, signIn, test } from "./support";

test.use({ own: "accounts" });
test.describe.configure({ mode: "serial" });

const sorrel = placeOf("N0382L");
const NEW = { email: "rhea@demo.example", name: "Rhea Bellcrank", password: "five odd rivets in a jar", pin: "314159" };

/** The newest mail to an address with these words in its subject, once it has come. */
async function mailTo(inbox: string, address: string, subject: string) {
  const found = async () => (await messagesIn(inbox)).filter((m) => m.to.includes(address) && m.subject.includes(subject)).at(-1);
  await expect.poll(async () => Boolean(await found()), { timeout: 20_000 }).toBe(true);
  return (await found()) ?? { text: "", html: "" };
}
const linkIn = (mail: { text: string }) => /https?:\/\/\S+\/[0-9A-Za-z]{43}/.exec(mail.text)?.[0] ?? "";

/** A browser of somebody who is not signed in. */
async function stranger(browser: Browser, address: string, options: { javaScriptEnabled?: boolean } = {}): Promise<Page> {
  const context = await browser.newContext({ baseURL: address, viewport: SIZES.phone, hasTouch: true, ...options });
  return context.newPage();
}

test("a lead invites a new person by mail, who makes an account on a phone, joins and signs a gate", async ({
  visit,
  instance,
  browser,
}) => {
  const page = await visit("Odalys", "tablet");
  await page.goto(`${sorrel.board}/crew`);
  await page.getByLabel("Mail address").fill(NEW.email);
  await page.getByRole("radio", { name: /^builder/ }).check();
  await page.getByRole("button", { name: /^Invite/ }).click();
  await expect(page.getByRole("status").filter({ hasText: "on its way" })).toBeVisible();
  await expect(page.getByRole("listitem").filter({ hasText: NEW.email })).toContainText("the link is good to");

  const mail = await mailTo(instance.inbox, NEW.email, "invites you to N0382L");
  expect(mail.text).toContain("as builder");
  const guest = await stranger(browser, instance.address);
  await guest.goto(linkIn(mail));
  await expect(guest.getByRole("heading", { level: 1 })).toHaveText("Join N0382L");
  await guest.getByLabel("Your name").fill(NEW.name);
  await guest.getByLabel("New password", { exact: true }).fill("too short");
  await guest.getByLabel("Signing PIN").fill(NEW.pin);
  await guest.getByLabel("The same PIN once more").fill(NEW.pin);
  await guest.getByRole("button", { name: /^Join N0382L as builder/ }).click();
  await expect(guest.getByRole("alert")).toContainText("at least 15 characters");
  // Nothing that was typed is lost.
  await expect(guest.getByLabel("Your name")).toHaveValue(NEW.name);
  await expect(guest.getByLabel("Signing PIN")).toHaveValue(NEW.pin);
  await guest.getByLabel("New password", { exact: true }).fill(NEW.password);
  await guest.getByRole("button", { name: /^Join N0382L as builder/ }).click();
  await guest.waitForURL(`**${sorrel.board}`);

  await guest.goto(sorrel.gate("WR"));
  await guest.getByRole("button", { name: "WR8, press when it is done" }).click();
  await guest.getByRole("link", { name: /^Sign/ }).click();
  await guest.getByLabel("Your signing PIN").fill(NEW.pin);
  await guest.getByRole("button", { name: /^Sign as builder/ }).click();
  await expect(guest).toHaveURL(`${sorrel.gate("WR")}#signatures`);
  await expect(guest.locator("main").getByText(NEW.name).first()).toBeVisible();

  await page.goto(`${sorrel.board}/crew`);
  await expect(page.getByRole("heading", { name: NEW.name })).toBeVisible();
  await expect(page.getByText("Nobody. Whoever you invite shows here")).toBeVisible();
  await guest.goto(linkIn(mail));
  await expect(guest.getByRole("heading", { level: 1 })).toHaveText("This invitation is over");
  await guest.context().close();
});

test("somebody with an account joins only when they accept, and leaves again by themselves", async ({ visit, instance }) => {
  const lead = await visit("Odalys", "tablet");
  await lead.goto(`${sorrel.board}/crew`);
  await lead.getByLabel("Mail address").fill(personOf("Bram").email);
  await lead.getByRole("radio", { name: /^crew/ }).check();
  await lead.getByRole("button", { name: /^Invite/ }).click();
  await expect(lead.getByRole("status").filter({ hasText: "on its way" })).toBeVisible();
  const link = linkIn(await mailTo(instance.inbox, personOf("Bram").email, "invites you to N0382L"));

  const other = await visit("Noor", "phone");
  await other.goto(link);
  await expect(other.getByText(/You are signed in as noor@demo.example/)).toBeVisible();

  const page = await visit("Bram", "phone");
  await page.goto("/hangar");
  await expect(page.getByText("N0382L")).toHaveCount(0);
  await page.goto(link);
  await page.getByRole("button", { name: /^Join N0382L as crew/ }).click();
  await page.waitForURL(`**${sorrel.board}`);
  await page.goto(`${sorrel.board}/crew`);
  await page.getByText("Leave this install").first().click();
  await page.getByRole("button", { name: "Leave this install" }).click();
  await page.waitForURL("**/hangar");
  await expect(page.getByText("N0382L")).toHaveCount(0);
});

test("an invitation is withdrawn, and its link is over", async ({ visit, instance, browser, complaints }) => {
  const lead = await visit("Odalys", "tablet");
  await lead.goto(`${sorrel.board}/crew`);
  await lead.getByLabel("Mail address").fill("late@demo.example");
  await lead.getByRole("radio", { name: /^inspector/ }).check();
  await lead.getByRole("button", { name: /^Invite/ }).click();
  const link = linkIn(await mailTo(instance.inbox, "late@demo.example", "invites you to N0382L"));
  await lead.getByRole("button", { name: /^Withdraw the invitation of late@demo.example/ }).click();
  await expect(lead.getByText("late@demo.example")).toHaveCount(0);
  const guest = await stranger(browser, instance.address);
  expect((await guest.goto(link))?.status()).toBe(404);
  await expect(guest.getByRole("heading", { level: 1 })).toHaveText("This invitation is over");
  await guest.context().close();
  complaints.splice(0);
});

for (const javaScriptEnabled of [true, false]) {
  test(`a lost password is set anew by mail, ${javaScriptEnabled ? "with" : "without"} scripts`, async ({ visit, instance, browser }) => {
    const first = javaScriptEnabled ? "Noor" : "Tomasz";
    const { email, password } = personOf(first);
    const signedIn = await visit(first, "phone");
    await signedIn.goto("/hangar");
    await expect(signedIn).toHaveURL(/\/hangar$/);

    const page = await stranger(browser, instance.address, { javaScriptEnabled });
    await page.goto("/sign-in");
    await page.getByRole("link", { name: "Forgot the password?" }).click();
    const ask = async (address: string) => {
      await page.goto("/forgot");
      await page.getByLabel("E-mail").fill(address);
      await page.getByRole("button", { name: "Send me the link" }).click();
      await expect(page.getByRole("heading", { level: 1 })).toHaveText("Look into your mail");
      return page.locator("main").textContent();
    };
    expect(await ask("nobody@demo.example")).toBe(await ask(email));
    await page.goto(linkIn(await mailTo(instance.inbox, email, "Choose a new password")));
    const anew = `${password} ${first} anew`;
    await page.getByLabel("New password", { exact: true }).fill(anew);
    await page.getByRole("button", { name: /^Use this password/ }).click();
    await page.waitForURL("**/sign-in?reset");
    await expect(page.getByRole("status")).toContainText("Your new password is set");
    await signIn(page, { email, password: anew });
    await signedIn.goto("/hangar");
    await expect(signedIn).toHaveURL(/\/sign-in/);
    await mailTo(instance.inbox, email, "Your password was changed");
    await page.context().close();
  });
}

test("the signing PIN is changed with the password, and is the one that signs from then on", async ({ visit, complaints, instance }) => {
  const page = await visit("Henrik", "phone");
  const { password, email } = personOf("Henrik");
  await page.goto(sorrel.board);
  await page.getByRole("link", { name: /^Account of/ }).click();
  await page.getByRole("link", { name: "Change the signing PIN" }).click();
  await page.getByLabel("Your password", { exact: true }).fill("not the password at all");
  await page.getByLabel("Signing PIN").fill("161803");
  await page.getByLabel("The same PIN once more").fill("161803");
  await page.getByRole("button", { name: /^Change the PIN/ }).click();
  await expect(page.getByRole("alert")).toContainText("That is not your password. Nothing was changed.");
  expect(complaints.splice(0)).toEqual([expect.stringContaining("status of 403")]);
  await page.getByLabel("Your password", { exact: true }).fill(password);
  await page.getByRole("button", { name: /^Change the PIN/ }).click();
  await page.waitForURL("**/account?pin");
  await mailTo(instance.inbox, email, "Your signing PIN was changed");

  await page.goto(`${sorrel.gate("WR")}/sign`);
  await page.getByLabel("Your signing PIN").fill("161803");
  await page.getByRole("button", { name: /^Countersign as inspector/ }).click();
  await expect(page).toHaveURL(`${sorrel.gate("WR")}#signatures`);
});

test("a session elsewhere is ended from the list, and then all of them", async ({ visit, instance, browser }) => {
  const page = await visit("Priya", "tablet");
  const elsewhere = await stranger(browser, instance.address);
  await signIn(elsewhere, personOf("Priya"));
  await page.goto("/account/sessions");
  await expect(page.getByRole("heading", { level: 1 })).toContainText("2 browsers");
  await page
    .getByRole("listitem")
    .filter({ hasNotText: "this one" })
    .filter({ hasText: "signed in" })
    .getByRole("button", { name: /^Sign out/ })
    .click();
  await expect(page.getByRole("heading", { level: 1 })).toContainText("1 browser");
  await elsewhere.goto("/hangar");
  await expect(elsewhere).toHaveURL(/\/sign-in/);
  await page.getByRole("button", { name: "Sign out everywhere, here too" }).click();
  await page.waitForURL("**/sign-in");
  await elsewhere.context().close();
});

test("the mail address changes when the new one is confirmed; the old one is told", async ({ visit, instance }) => {
  const page = await visit("Sefa", "tablet");
  const { email, password } = personOf("Sefa");
  await page.goto("/account/address");
  await page.getByLabel("New mail address").fill("sefa@new.example");
  await page.getByLabel("Your password", { exact: true }).fill(password);
  await page.getByRole("button", { name: /^Send the link/ }).click();
  await expect(page.getByRole("status")).toContainText("on its way to the new address");
  await page.goto(linkIn(await mailTo(instance.inbox, "sefa@new.example", "Is this your new address?")));
  await page.getByRole("button", { name: /^Use sefa@new.example/ }).click();
  await page.waitForURL("**/account?address");
  await expect(page.getByRole("heading", { level: 1 })).toContainText("sefa@new.example");
  await mailTo(instance.inbox, email, "The mail address of your account was changed");
});

test("a token of the API is shown once and reads the board until it is ended", async ({ visit, instance }) => {
  const page = await visit("Jonas", "tablet");
  await page.goto("/account/tokens");
  await page.getByLabel("What it is for").fill("Display in the hangar");
  await page.getByLabel("Your password", { exact: true }).fill(personOf("Jonas").password);
  await page.getByRole("button", { name: /^Make the token/ }).click();
  const token = await page.locator("output").textContent();
  const ask = () => fetch(`${instance.address}/api/v1${sorrel.board}/board`, { headers: { Authorization: `Bearer ${token}` } });
  expect((await ask()).status).toBe(200);
  await page.goto("/account/tokens");
  await expect(page.locator("output")).toHaveCount(0);
  await page.getByRole("button", { name: "End the token Display in the hangar" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toContainText("no program asks");
  expect((await ask()).status).toBe(401);
});

test("an administrator disables an account and enables it again; nobody else finds the page", async ({ visit, complaints }) => {
  const page = await visit("Bram", "tablet");
  await page.goto("/hangar");
  await page.getByRole("link", { name: "Instance" }).click();
  const row = page.getByRole("listitem").filter({ hasText: "adaeze@demo.example" });
  const adaeze = await visit("Adaeze", "phone");
  await adaeze.goto("/hangar");
  await row.getByText("Disable").first().click();
  await row.getByRole("button", { name: /^Disable the account of Adaeze/ }).click();
  await expect(row).toContainText("disabled");
  await adaeze.goto("/hangar");
  await expect(adaeze).toHaveURL(/\/sign-in/);
  await row.getByRole("button", { name: /^Enable the account of Adaeze/ }).click();
  await expect(row.getByRole("button", { name: /^Send Adaeze/ })).toBeVisible();
  await page.getByRole("navigation", { name: "Instance" }).getByRole("link", { name: "Mail" }).click();
  await expect(page.getByRole("heading", { level: 1 })).toContainText("Mail of the instance");
  await expect(page.getByRole("heading", { name: "Your account was disabled" })).toBeVisible();
  await page.goto("/admin/people");
  const jonas = await visit("Jonas", "phone");
  expect((await jonas.goto("/admin/people"))?.status()).toBe(404);
  complaints.splice(0);
});

test("no breach of WCAG 2.2 AA on these pages, at 320 px too, in both themes", async ({ visit, instance, browser }) => {
  test.slow();
  const rules = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];
  const found: string[] = [];
  const look = async (page: Page, path: string) => {
    await page.goto(path);
    const { violations } = await new AxeBuilder({ page }).setLegacyMode().withTags(rules).analyze();
    found.push(...violations.map((v) => `${path} ${v.id}: ${v.nodes.map((n) => n.target).join(", ")}`));
    const width = await page.evaluate(() => document.documentElement.scrollWidth);
    if (width > 320) found.push(`${path} is ${width} px wide`);
  };
  const lead = await visit("Odalys", "tablet");
  await lead.goto(`${sorrel.board}/crew`);
  await lead.getByLabel("Mail address").fill("somebody.with.a.long.name@a-flying-field.example");
  await lead.getByRole("radio", { name: /^crew/ }).check();
  await lead.getByRole("button", { name: /^Invite/ }).click();
  const link = linkIn(await mailTo(instance.inbox, "somebody.with.a.long.name@a-flying-field.example", "invites you"));
  for (const theme of ["apron", "hangar"] as const) {
    const page = await visit("Bram", "phone", { theme });
    await page.setViewportSize({ width: 320, height: 640 });
    for (const path of ["", "/password", "/address", "/pin", "/sessions", "/mail", "/tokens"]) await look(page, `/account${path}`);
    for (const path of ["/admin/people", "/admin/mail"]) await look(page, path);
    const odalys = await visit("Odalys", "phone", { theme });
    await odalys.setViewportSize({ width: 320, height: 640 });
    await look(odalys, `${sorrel.board}/crew`);
    const guest = await stranger(browser, instance.address);
    await guest.context().addCookies([{ name: "theme", value: theme, url: instance.address }]);
    await guest.setViewportSize({ width: 320, height: 640 });
    for (const path of [new URL(link).pathname, "/forgot", "/forgot?asked", "/sign-in"]) await look(guest, path);
    await guest.context().close();
  }
  expect(found).toEqual([]);
});

test("the first person of an empty instance comes in by the link that the server printed", async ({ page, instance }) => {
  const folder = mkdtempSync(join(tmpdir(), "bladecount-empty-"));
  const port = String(Number(new URL(instance.address).port) + 1);
  const env = { ...process.env, NODE_ENV: "production", DATA_DIR: folder, HOST: "127.0.0.1", PORT: port, LOG_LEVEL: "warn" };
  const server = spawn(process.execPath, ["server.mjs"], { env, stdio: ["ignore", "ignore", "pipe"] });
  const ended = new Promise((done) => server.once("exit", done));
  try {
    let said = "";
    server.stderr.on("data", (chunk: Buffer) => {
      said += chunk;
    });
    await expect.poll(() => linkIn({ text: said }), { timeout: 20_000 }).toContain("/start/");
    const link = linkIn({ text: said });
    await expect.poll(async () => (await fetch(`http://127.0.0.1:${port}/ready`).catch(() => null))?.ok, { timeout: 20_000 }).toBe(true);
    await page.goto(`http://127.0.0.1:${port}/sign-in`);
    await expect(page.getByText("Nobody has an account here yet.")).toBeVisible();
    await page.goto(link);
    await page.getByLabel("Your name").fill(NEW.name);
    await page.getByLabel("E-mail").fill(NEW.email);
    await page.getByLabel("New password", { exact: true }).fill(NEW.password);
    await page.getByLabel("Signing PIN").fill(NEW.pin);
    await page.getByLabel("The same PIN once more").fill(NEW.pin);
    await page.getByRole("button", { name: /^Open the account/ }).click();
    await page.waitForURL("**/hangar");
    await page.getByRole("link", { name: "Instance" }).click();
    await expect(page.getByRole("heading", { level: 1 })).toContainText("1 person");
  } finally {
    server.kill("SIGTERM");
    await ended;
    rmSync(folder, { recursive: true, force: true });
  }
});
