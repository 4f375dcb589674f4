// What has happened on each install of the demo, up to the present.
import type { PastClock } from "#app/db/seed/clock";
import { type Crew, value } from "#app/db/seed/crew.server";
import { daysBefore } from "#app/db/seed/days";
import { brief, go, type Places, plan, readLog, readWind, runIt, sayGo } from "#app/db/seed/runs.server";
import { readManuals, setUp, stockCrib } from "#app/db/seed/set-up.server";
import { openSystem } from "#app/lib/services/open-system.server";
import { raiseFinding } from "#app/lib/services/raise-finding.server";
import { answerExceedance } from "#app/lib/services/review-run.server";
import { closeFinding, fixFinding } from "#app/lib/services/settle-finding.server";
import { toSI } from "#app/lib/units/convert";
import { SORREL } from "../../../fixtures/demo/sorrel";
import { TANSY } from "../../../fixtures/demo/tansy";
import { TEASEL } from "../../../fixtures/demo/teasel";

interface Setting {
  clock: PastClock;
  /** User ids by the keys of the demo's people. */
  ids: ReadonlyMap<string, string>;
  zone: string;
}

const MINUTE = 60_000;
/** The next quarter of an hour, that many minutes from the present at least. */
const quarterIn = (present: number, minutes: number) => Math.ceil((present + minutes * MINUTE) / (15 * MINUTE)) * 15 * MINUTE;

const BEFORE_ENGINE = ["EC", "EL", "IX", "FS", "OC", "PR"];
const DAY_GATES = ["FI", "TD", "DY"];

/** The gates from the mount to the oil prime, worked and signed between `from` and `prime` days before the present. */
async function build(crew: Crew, { clock, zone }: Setting, from: number, prime: [fuel: number, oil: number]): Promise<void> {
  const day = (days: number, time: string) => clock.to(daysBefore(clock.present, days, time, zone));
  const inspect = async (keys: string[]) => {
    clock.minutes(45);
    await crew.sign("henrik", "inspector", keys);
  };
  const stage = async (days: number, keys: string[], signer: string) => {
    day(days, "09:10");
    await crew.work(keys);
    await crew.sign(signer, "builder", keys);
    await inspect(keys);
  };
  await stage(from, ["MF"], crew.data.hands.MF?.[0] ?? "jonas");
  await stage(from - 2, BEFORE_ENGINE, "jonas");
  await stage(from - 5, ["IG", "IN"], "adaeze");
  await stage(prime[0], ["FP"], "jonas");
  await stage(prime[1], ["OP"], "jonas");
}

/** The gates of the day, worked from `morning` on, and the walk-round from `round` on, all but the items `but`; without `but` it is signed. */
async function workDay(crew: Crew, morning: number, round: number, but: string[] = []): Promise<void> {
  crew.clock.to(morning);
  await crew.work(DAY_GATES, { pace: 3 });
  await crew.sign("jonas", "builder", DAY_GATES);
  await crew.sign("henrik", "inspector", DAY_GATES);
  await crew.work(["CR"], { pace: 3 });
  await crew.sign("jonas", "builder", ["CR"]);
  await crew.sign("henrik", "inspector", ["CR"]);
  crew.clock.to(round);
  await crew.work(["WR"], { pace: 3, but });
  if (but.length) return;
  await crew.sign("jonas", "builder", ["WR"]);
  await crew.sign("henrik", "inspector", ["WR"]);
}

const SORREL_PLACES: Places = [
  ["operator", "jonas"],
  ["runlead", "odalys"],
  ["fireguard", "priya"],
  ["areaguard", "tomasz"],
  ["observer", "noor"],
  ["recorder", "adaeze"],
];

/** One step from the first start: the last item of the walk-round is to do, and the observer has not answered. */
export async function sorrel(setting: Setting): Promise<void> {
  const { clock, zone, ids } = setting;
  const past = (days: number, time: string) => clock.to(daysBefore(clock.present, days, time, zone));
  past(27, "19:20");
  const crew = await setUp(SORREL, clock, ids, zone);
  await readManuals(crew);
  past(26, "18:30");
  await stockCrib(crew);
  await build(crew, setting, 24, [4, 2]);

  past(1, "18:10");
  const run = await plan(crew, "1", SORREL_PLACES, quarterIn(clock.present, 110), "Upper Meadow, apron south");
  const there = SORREL_PLACES.map(([, person]) => person).filter((person) => person !== "noor");
  clock.minutes(20);
  await brief(crew, run, there);

  const ago = (minutes: number) => clock.present - minutes * MINUTE;
  await workDay(crew, ago(170), ago(30), ["WR8"]);
  await sayGo(crew, run, there);
  await readWind(crew, run, "tomasz", 6, 9);
}

const TEASEL_PLACES: Places = [
  ["operator", "adaeze"],
  ["runlead", "odalys"],
  ["fireguard", "priya"],
  ["areaguard", "tomasz"],
  ["observer", "noor"],
  ["recorder", "jonas"],
];
const TEASEL_CREW = TEASEL_PLACES.map(([, person]) => person);

/** Two runs completed and reviewed, one finding closed, one open: it caps the third run below its plan, so its GO turned into HOLD. */
export async function teasel(setting: Setting): Promise<void> {
  const { clock, zone, ids } = setting;
  const past = (days: number, time: string) => clock.to(daysBefore(clock.present, days, time, zone));
  past(49, "20:05");
  const crew = await setUp(TEASEL, clock, ids, zone);
  await readManuals(crew);
  past(48, "18:15");
  await stockCrib(crew);
  await build(crew, setting, 44, [12, 9]);

  const first = await runOnDay(crew, setting, 8, "1");
  const soot = await raise(crew, "jonas", "exh", "Soot at the slip joint of cylinder 3: a thin fan, dry", "watch", null);
  await readLog(crew, first, "jonas", []);
  await postRun(crew, "PO 1");
  await mendSlipJoint(crew, setting, soot);

  const second = await runOnDay(crew, setting, 4, "2");
  const [hot] = await readLog(crew, second, "jonas", ["Coolant 116 °C for 6 s at 65 %, limit 115 °C, as the pumps were changed over."]);
  clock.minutes(8);
  const words = "Sender stepped with the pump change-over: both heads stayed under 104 °C. Watch it on run 3.";
  value(await answerExceedance(crew.act("henrik"), { exceedance: hot ?? "", finding: null, words }));
  await postRun(crew, "PO 2");

  past(1, "18:40");
  const third = await plan(crew, "3", TEASEL_PLACES, quarterIn(clock.present, 75), "Long Acre, hard stand");
  await brief(crew, third, TEASEL_CREW);
  const ago = (minutes: number) => clock.present - minutes * MINUTE;
  await workDay(crew, ago(200), ago(75));
  await sayGo(crew, third, TEASEL_CREW);
  await readWind(crew, third, "tomasz", 5, 8);
  await go(crew, third);
  clock.to(ago(12));
  await raise(crew, "noor", "prop", "Spinner tip runs out 2 mm, seen while it was pulled through", "limiting", 4000);
}

/** A day's gates, the run of the rung with the whole crew, ended and its outcome stated. */
async function runOnDay(crew: Crew, { clock, zone }: Setting, days: number, rung: string): Promise<string> {
  const past = (before: number, time: string) => clock.to(daysBefore(clock.present, before, time, zone));
  past(days + 1, "19:00");
  const start = daysBefore(clock.present, days, "11:30", zone);
  const run = await plan(crew, rung, TEASEL_PLACES, start, "Long Acre, hard stand");
  await brief(crew, run, TEASEL_CREW);
  const at = (time: string) => daysBefore(clock.present, days, time, zone);
  await workDay(crew, at("07:40"), at("10:05"));
  past(days, "11:05");
  await sayGo(crew, run, TEASEL_CREW);
  await readWind(crew, run, "tomasz", 4, 7);
  await go(crew, run);
  past(days, "11:32");
  await runIt(crew, run, rung === "1" ? 5 : 11);
  return run;
}

async function postRun(crew: Crew, gate: string): Promise<void> {
  await crew.work([gate], { pace: 5 });
  await crew.sign("jonas", "builder", [gate]);
  await crew.sign("henrik", "inspector", [gate]);
}

async function raise(
  { act, clock }: Crew,
  person: string,
  system: "exh" | "prop",
  words: string,
  severity: "watch" | "limiting",
  rpm: number | null,
): Promise<string> {
  const cap = rpm === null ? null : toSI(rpm, "rpm");
  const { finding } = value(await raiseFinding(act(person), { system, words, severity, cap, photo: null }));
  clock.minutes(4);
  return finding;
}

/** The joint is opened, so what was proved of the exhaust lapses and is done and signed again. */
async function mendSlipJoint(crew: Crew, { clock, zone }: Setting, finding: string): Promise<void> {
  clock.to(daysBefore(clock.present, 7, "17:30", zone));
  value(
    await openSystem(crew.act("jonas"), {
      systems: ["exh"],
      reason: "Slip joint of cylinder 3 apart, new seal ring, springs",
      closed: true,
    }),
  );
  await crew.work(["MF", "IX"]);
  await crew.sign("jonas", "builder", ["MF"]);
  value(await fixFinding(crew.act("jonas"), { finding, words: "New seal ring, joint greased, both springs changed" }));
  clock.to(daysBefore(clock.present, 6, "18:00", zone));
  await crew.sign("henrik", "inspector", ["MF"]);
  await crew.sign("jonas", "builder", ["IX"]);
  await crew.sign("henrik", "inspector", ["IX"]);
  value(await closeFinding(crew.act("henrik"), { finding, words: "Looked at it with a mirror: ring seated, springs locked" }));
}

/** Set up last night, and part of its ratings read out of the manual. */
export async function tansy({ clock, zone, ids }: Setting): Promise<void> {
  clock.to(daysBefore(clock.present, 1, "20:10", zone));
  const crew = await setUp(TANSY, clock, ids, zone);
  await readManuals(crew);
}
