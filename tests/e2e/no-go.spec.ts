import { expect, messagesIn, personOf, placeOf, test } from "./support";

test.use({ own: "no-go" });

const sorrel = placeOf("N0382L");

test("one item stops it all: the lead cannot call GO, sends a no-go, and the mail says which item and who is on it", async ({
  visit,
  instance,
}) => {
  const page = await visit("Odalys", "tablet");
  await page.goto(`${sorrel.run("1")}/go`);
  await expect(page.locator("ol > li").filter({ hasText: "Walk-round is not finished" })).toBeVisible();
  const call = page.getByRole("button", { name: /^Call GO/ });
  await expect(call).toHaveAttribute("aria-disabled", "true");

  await page.goto(`${sorrel.run("1")}/no-go`);
  await page.getByLabel("Note to the crew").fill("Cowl screws are at the shop. Next try tomorrow, I tell you by noon.");
  await page.getByRole("button", { name: /^Send the no-go/ }).click();
  await page.waitForURL(`**${sorrel.run("1")}`);

  const about = (subject: string) => subject.startsWith("No-go: run 1 of N0382L");
  await expect.poll(async () => (await messagesIn(instance.inbox)).filter((m) => about(m.subject)).length, { timeout: 20_000 }).toBe(6);
  for (const mail of (await messagesIn(instance.inbox)).filter((m) => about(m.subject))) {
    const text = mail.text.replace(/\s+/g, " ");
    expect(mail.subject).toContain("3 things stop it");
    expect(text).toContain("1. Walk-round is not finished. 1 item of 8 left. Next: cowl as the card says;");
    expect(text).toMatch(/On it: Odalys Gudgeon, Jonas Tappet/);
    expect(text).toContain("2. 1 member has not read the card.");
    expect(text).toContain("Cowl screws are at the shop.");
  }

  await page.goto(sorrel.board);
  await expect(page.getByRole("heading", { level: 1 })).toHaveText(/Not clear for run 1\s+3 things stop it/);
  await expect(page.getByText(personOf("Noor").name).first()).toBeVisible();
});
