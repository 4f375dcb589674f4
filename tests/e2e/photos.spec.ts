import sharp from "sharp";
import { expect, placeOf, test } from "./support";

test.use({ own: "photos" });

const picture = (background: string) =>
  sharp({ create: { width: 1600, height: 1200, channels: 3, background } })
    .jpeg()
    .toBuffer();

test("photos go by themselves, one that broke off is sent again, and the record shows them", async ({ visit, complaints }) => {
  const sorrel = placeOf("N0382L");
  const page = await visit("Jonas", "phone");
  await page.goto(`${sorrel.board}/findings`);
  const form = page.locator("form", { has: page.locator("input[type=file]") }).first();
  const details = page.locator("details", { has: form }).first();
  if ((await details.count()) && !(await details.evaluate((d) => (d as HTMLDetailsElement).open)))
    await details.locator("summary").first().click();

  await form.locator("input[type=file]").setInputFiles({ name: "mount.jpg", mimeType: "image/jpeg", buffer: await picture("#a33") });
  const sent = form.getByRole("list", { name: "Sent" });
  await expect(sent).toContainText("arrived");

  await page.context().setOffline(true);
  await form.locator("input[type=file]").setInputFiles({ name: "bolt.jpg", mimeType: "image/jpeg", buffer: await picture("#3a3") });
  await expect(sent).toContainText("No network");
  await page.context().setOffline(false);
  await sent.getByRole("button", { name: "Send again" }).click();
  await expect(sent.getByText("arrived")).toHaveCount(2);
  // The browser itself reports the cut; the page said it in words.
  complaints.splice(0);

  await form
    .locator("input[type=file]")
    .setInputFiles({ name: "note.txt.jpg", mimeType: "image/jpeg", buffer: Buffer.from("no picture at all".repeat(5)) });
  await expect(sent).toContainText("no JPEG, PNG or WebP picture");
  await sent.getByRole("button", { name: "Take note.txt.jpg out" }).click();
  complaints.splice(0);

  await form.getByLabel("What you see").fill("Bolt head marked on the left mount");
  await form.getByLabel("System", { exact: true }).selectOption({ index: 1 });
  await form.getByRole("radio", { name: /^watch/i }).check();
  await form.getByRole("button", { name: /^Raise/ }).click();
  const row = page.getByRole("listitem").filter({ hasText: "Bolt head marked on the left mount" }).first();
  await expect(row.getByRole("link", { name: /photo 1 of 2/ })).toBeVisible();
  await row.getByRole("link", { name: /photo 1 of 2/ }).click();
  const view = page.getByRole("dialog", { name: /photo 1 of 2/ });
  await expect(view.getByRole("img")).toBeVisible();
  const small = await view.getByRole("img").evaluate((img) => img.clientWidth);
  await view.getByRole("img").click();
  expect(await view.getByRole("img").evaluate((img) => img.clientWidth)).toBeGreaterThan(small);
  await view.getByRole("button", { name: "Close" }).click();
  await expect(view).toBeHidden();
});
