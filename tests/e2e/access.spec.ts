import AxeBuilder from "@axe-core/playwright";
import { expect, personOf, placeOf, SIZES, type Size, test } from "./support";

test.use({ own: "access" });

const sorrel = placeOf("N0382L");
const teasel = placeOf("N0526P");
const tansy = placeOf("N0719T");

const inAMonth = new Date(Date.now() + 30 * 86_400_000).toISOString().slice(0, 10);

const TIP = "units=si&rotation=2700&reduction=1&diameter=1829&forward=0&temperature=15&blades=metal&ceiling=";

const NEW =
  "registration=N0834S&name=Sundew&zone=UTC&delivery=gravity&metering=carb&ignition=mag&computers=0&cooling=air&lubrication=wet&drive=direct&propeller=fixed&gear=nose&starter=estart&history=new";

/** Every kind of page, as somebody for whom it is full. */
const PAGES: [name: string, first: string, path: string][] = [
  ["hangar", "Jonas", "/hangar"],
  ["a new install", "Sefa", "/installs/new"],
  ["account", "Jonas", "/account"],
  ["board with something to do", "Jonas", sorrel.board],
  ["board of the crew", "Noor", sorrel.board],
  ["board in HOLD", "Adaeze", teasel.board],
  ["board not begun", "Sefa", tansy.board],
  ["gate in work", "Jonas", sorrel.gate("WR")],
  ["gate signed", "Henrik", sorrel.gate("FP")],
  ["gate with sheets and tallies", "Jonas", sorrel.gate("OP")],
  ["gate without its numbers", "Bram", tansy.gate("MF")],
  ["sign sheet, refused", "Henrik", `${sorrel.gate("WR")}/sign`],
  ["several sheets", "Jonas", `${sorrel.board}/sign`],
  ["build-up", "Adaeze", `${teasel.board}/build-up`],
  ["run, to answer", "Noor", sorrel.run("1")],
  ["run, held", "Adaeze", teasel.run("3")],
  ["live card, not called", "Odalys", `${sorrel.run("1")}/live`],
  ["review of a run", "Henrik", `${teasel.run("1")}/review`],
  ["crank clock", "Jonas", `${sorrel.gate("OP")}/crank/${sorrel.item("OP4")}`],
  ["run, reviewed", "Henrik", teasel.run("1")],
  ["plan", "Odalys", `${sorrel.run("1")}/plan`],
  ["GO", "Odalys", `${sorrel.run("1")}/go`],
  ["no-go", "Odalys", `${sorrel.run("1")}/no-go`],
  ["HOLD", "Priya", `${sorrel.run("1")}/hold`],
  ["mail", "Adaeze", `${teasel.board}/mail`],
  ["set-up", "Sefa", `${tansy.board}/set-up`],
  ["details of a new install", "Sefa", `/installs/new/details?${NEW}`],
  ["ratings of a new install", "Sefa", `/installs/new/ratings?${NEW}`],
  ["people", "Odalys", `${sorrel.board}/crew`],
  ["scrub", "Adaeze", `${teasel.run("3")}/scrub`],
  ["plan of a new run", "Sefa", `${tansy.board}/runs/new?rung=1`],
  ["crib", "Odalys", `${sorrel.board}/crib`],
  ["openings", "Jonas", `${sorrel.board}/openings`],
  ["findings", "Adaeze", `${teasel.board}/findings`],
  ["loose ends", "Jonas", `${sorrel.board}/loose-ends`],
  ["record", "Henrik", `${teasel.board}/record`],
  ["record, checked", "Henrik", `${teasel.board}/record?check=1`],
  ["bench", "Jonas", `${sorrel.board}/bench`],
  ["bench, calculator not worked out", "Jonas", `${sorrel.board}/bench/restraint`],
  ["bench, worked out", "Jonas", `${sorrel.board}/bench/tip-speed?${TIP}`],
  ["bench, to be put right", "Jonas", `${sorrel.board}/bench/crank?units=si&bursts.seconds=10`],
  ["board as it will stand", "Jonas", `${sorrel.board}?date=${inAMonth}&time=09:00`],
];

const RULES = ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"];
/** The themes differ in nothing but their colours. */
const COLOURS = ["color-contrast", "link-in-text-block"];

for (const [name, first, path] of PAGES) {
  test(`${name}: no breach of WCAG 2.2 AA and nothing wider than the screen, on tablet and phone, in both themes`, async ({ visit }) => {
    const found: string[] = [];
    for (const theme of ["apron", "hangar"] as const) {
      const page = await visit(first, "tablet", { theme });
      const answer = await page.goto(path);
      expect(answer?.status()).toBe(200);
      for (const size of ["tablet", "phone"] satisfies Size[]) {
        await page.setViewportSize(SIZES[size]);
        const axe = new AxeBuilder({ page }).setLegacyMode();
        const { violations } = await (theme === "apron" ? axe.withTags(RULES) : axe.withRules(COLOURS)).analyze();
        found.push(...violations.map((v) => `${theme}, ${size}: ${v.id}: ${v.nodes.map((n) => n.target).join(", ")}`));
        const width = await page.evaluate(() => document.documentElement.scrollWidth);
        if (width > SIZES[size].width) found.push(`${size}: ${width} px wide`);
      }
    }
    expect(found).toEqual([]);
  });
}

test("one signs in with the keyboard alone", async ({ page }) => {
  const { email, password } = personOf("Jonas");
  await page.goto("/sign-in");
  const reach = async (name: string) => {
    for (let step = 0; step < 12; step++) {
      const focused = await page.evaluate(() => {
        const element = document.activeElement;
        return element instanceof HTMLInputElement ? element.name : (element?.textContent ?? "");
      });
      if (focused.includes(name)) return;
      await page.keyboard.press("Tab");
    }
    throw new Error(`The keyboard does not reach ${name}`);
  };
  await reach("email");
  await page.keyboard.type(email);
  await reach("password");
  await page.keyboard.type(password);
  await page.keyboard.press("Enter");
  await page.waitForURL("**/hangar");
});

test("without scripts one proves an item and signs the gate", async ({ visit }) => {
  const page = await visit("Jonas", "tablet", { javaScript: false });
  await page.goto(sorrel.gate("WR"));
  await page.getByRole("button", { name: "WR8, press when it is done" }).click();
  await expect(page.getByRole("button", { name: "WR8, press when it is done" })).toHaveCount(0);
  await page.getByRole("link", { name: /^Sign/ }).click();
  await page.getByLabel("Your signing PIN").fill(personOf("Jonas").pin);
  await page.getByRole("button", { name: /^Sign as builder/ }).click();
  await expect(page).toHaveURL(`${sorrel.gate("WR")}#signatures`);
  await expect(page.getByRole("main")).toContainText("half signed");
});
