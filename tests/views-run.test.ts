import { describe, expect, it } from "vitest";
import { evaluate } from "#app/lib/gates/evaluate";
import type { RunState } from "#app/lib/gates/result";
import { planForm, windForm } from "#app/lib/schemas/run-forms";
import { crewRule } from "#app/lib/template/positions";
import { buildUpView } from "#app/lib/views/build-up";
import { goView } from "#app/lib/views/go";
import { holdWords } from "#app/lib/views/hold-words";
import { mailView } from "#app/lib/views/mail";
import { mailReaders, planView } from "#app/lib/views/plan";
import { runView, type Viewer } from "#app/lib/views/run";
import { inShort, rpmFigure } from "#app/lib/views/run-words";
import { HOUR, START } from "./support/parts";
import { SAMPLES } from "./support/sample-traits";
import { makeBoard, signAll } from "./support/snapshots";

const lead: Viewer = { id: "la", roles: ["lead"] };
const crew: Viewer = { id: "fi", roles: ["crew"] };

/** A board with one signed gate and a run that is planned, briefed and answered. */
function ready() {
  const board = signAll(makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } }));
  const run = board.run("1");
  board.brief(run);
  return { board, run, view: (me = lead, place = "apron south") => runView(evaluate(board.s, board.now), run.id, me, place) };
}

describe("the plan form", () => {
  const rule = crewRule("1", SAMPLES.boostedConstantSpeed);
  const form = planForm(
    {
      rung: { key: "1", rpm: 2337.5 / 60, crew: rule },
      redline: 2700 / 60,
      windMost: 15 * (1852 / 3600),
      gustMost: 23 * (1852 / 3600),
      nameOf: (m) => m.toUpperCase(),
      isMember: (m) => m !== "gone",
    },
    "Europe/Berlin",
  );
  const typed = {
    commandId: "a".repeat(22),
    date: "2026-12-05",
    time: "09:30",
    place: "apron south",
    rpm: "2337",
    windLimit: "15",
    gustLimit: "23",
    crew: { operator: ["ana"], observer: ["bo", ""], recorder: ["bo"] },
  };
  const faults = (over: object) => {
    const read = form.safeParse({ ...typed, ...over });
    return read.success ? {} : Object.fromEntries(read.error.issues.map((i) => [i.path.join("."), i.message]));
  };

  it("reads the time at the install, the speeds in SI and the places that are filled", () => {
    const read = form.parse(typed);
    expect(read.plannedStart).toBe(Date.UTC(2026, 11, 5, 8, 30));
    expect(read.windLimit).toBeCloseTo(7.7167, 4);
    expect(read.positions).toEqual([
      { position: "operator", member: "ana" },
      { position: "observer", member: "bo" },
      { position: "recorder", member: "bo" },
    ]);
  });
  it("takes the rung's whole figure as the rung's own speed, so that the run settles it", () =>
    expect(form.parse(typed).rpm).toBe(2337.5 / 60));
  it("leaves a lower speed as typed", () => expect(form.parse({ ...typed, rpm: "2000" }).rpm).toBeCloseTo(2000 / 60));
  it("says that more than the rung's speed is not clear", () => expect(faults({ rpm: "2400" }).rpm).toContain("is not clear above"));
  it("says the redline", () => expect(faults({ rpm: "2800" }).rpm).toContain("2,700 rpm"));
  it("keeps to the install's wind", () =>
    expect(faults({ windLimit: "16", gustLimit: "24" })).toMatchObject({
      windLimit: expect.stringContaining("15 kt"),
      gustLimit: expect.stringContaining("23 kt"),
    }));
  it("names the person and the pair that is forbidden", () =>
    expect(faults({ crew: { operator: ["ana"], fireguard: ["ana"] } })["crew.fireguard"]).toBe(
      "ANA cannot be operator and fire guard on this run. Give one of them to another person.",
    ));
  it("refuses one person twice in one position, and who is no member now", () =>
    expect(faults({ crew: { operator: ["gone"], fireguard: ["x", "x"] } })).toMatchObject({
      "crew.operator": expect.stringContaining("GONE is no member here now"),
      "crew.fireguard": expect.stringContaining("X stands as fire guard twice"),
    }));
  it("wants the gust limit at or above the wind limit", () =>
    expect(faults({ windLimit: "15", gustLimit: "14" }).gustLimit).toContain("not below the wind limit"));
  it("puts a time that the clocks leave out at its field", () =>
    expect(faults({ date: "2027-03-28", time: "02:30" }).time).toContain("the clocks go forward"));
});

describe("the wind form", () => {
  const typed = { intent: "wind", commandId: "a".repeat(22), speed: "8", gust: "11,5", tail: "no" };
  it("reads knots", () => expect(windForm.parse(typed).gust).toBeCloseTo(11.5 * (1852 / 3600)));
  it("refuses gusts below the wind, and no answer about the tail", () => {
    expect(windForm.safeParse({ ...typed, gust: "5" }).error?.issues[0]?.path).toEqual(["gust"]);
    expect(windForm.safeParse({ ...typed, tail: undefined }).success).toBe(false);
  });
});

describe("the run's page", () => {
  it("is clear, offers GO to the lead alone, and says why not to the others", () => {
    const { view } = ready();
    expect(view()).toMatchObject({
      state: "planned",
      stops: [],
      notice: null,
      acts: { go: { ok: true } },
      foot: { says: "Clear for run 1a" },
    });
    expect(view(crew)?.acts.go).toMatchObject({ ok: false, why: expect.stringContaining("Only a lead can call GO") });
    expect(view()?.when).toContain("apron south");
  });

  it("counts the roll call by people, not by places, and knows the reader", () => {
    const roll = ready().view(crew)?.roll;
    expect(roll?.title).toBe("Roll call: all 3 said go");
    expect(roll?.entries).toHaveLength(4);
    expect(roll?.entries.filter((r) => r.you).map((r) => r.role)).toEqual(["Fire guard"]);
  });

  it("asks the reader for the card first, then for the answer", () => {
    const { board, run, view } = ready();
    expect(view(crew)?.mine).toMatchObject({ title: "You are fire guard", acknowledge: null, said: { answer: "go" } });
    board.wait();
    board.plan(run, { rpm: 18 });
    const again = view(crew)?.mine;
    expect(again).toMatchObject({ version: 2, acknowledge: { ok: true }, go: { ok: false }, noGo: { ok: true }, said: { answer: "none" } });
    expect(again?.go.why).toContain("version 2");
    expect(view()?.stops.map((s) => s.title)).toContain("3 members have not read the card");
  });

  it("has no brief for somebody without a place", () => expect(ready().view({ id: "di", roles: ["inspector"] })?.mine).toBeNull());

  it("shows a no-go with its reason to its sayer, and struck through in the roll call", () => {
    const { board, run, view } = ready();
    board.wait();
    board.answer(run, "fi", { answer: "no-go", reason: "Extinguisher is empty" });
    expect(view(crew)?.mine?.said).toMatchObject({ answer: "no-go", words: expect.stringContaining("Extinguisher is empty") });
    expect(view()?.roll.entries.find((r) => r.name === "Member fi")?.answer).toBe("no-go");
    expect(view()?.acts.go.ok).toBe(false);
  });

  it("says how long GO stands, and turns to HOLD with who and why; then nobody's answer counts", () => {
    const { board, run, view } = ready();
    board.act(run, "go", { ends: board.now + 4 * HOUR });
    expect(view()).toMatchObject({ state: "called", notice: { kind: "done" }, acts: { hold: { ok: true }, noGo: { ok: false } } });
    board.wait();
    board.act(run, "hold", { reason: "Dog on the apron" }, { by: "fi", as: "crew" });
    expect(view()).toMatchObject({
      state: "held",
      notice: { kind: "hold", title: expect.stringContaining("Member fi called it: Dog on the apron") },
    });
    expect(view()?.roll.title).toBe("Roll call: 0 of 3 said go");
    expect(view(crew)?.mine?.said.words).toContain("asked again");
  });

  it("names what binds, what the plan wanted, and where to raise it", () => {
    const { board, view } = ready();
    board.finding("limiting", { words: "hose rub", cap: 15 });
    const { clearance, stops } = view() ?? {};
    expect(clearance).toMatchObject({ figure: "900", binds: "Hose rub binds.", next: "The plan goes to 1,200 rpm.", lower: 900 });
    expect(clearance?.raise?.place.href).toBe("/installs/install/findings");
    expect(clearance?.limits[0]).toMatchObject({ binds: true, text: "900" });
    expect(stops?.[0]).toMatchObject({ n: 1, place: { label: expect.any(String) } });
  });

  it("lets the flow in the title come no further than the gates do", () => {
    const { board, view } = ready();
    expect(view()?.gates).toBe(1);
    board.open(["fuelsup"]);
    board.find("FP1").systems.push("fuelsup");
    expect(view()?.gates).toBe(0);
  });

  it("is not there for an unknown run", () => {
    const { board } = ready();
    expect(runView(evaluate(board.s, board.now), "other", lead, "")).toBeNull();
  });

  it("rounds a clearing figure down", () => expect(rpmFigure(1374.96 / 60)).toBe("1,374"));
});

describe("the GO tag", () => {
  it("reads back run, time, speed and end, and says who gets the mail", () => {
    const { board, run } = ready();
    const e = evaluate(board.s, board.now);
    const tag = goView(e, run.id, lead);
    expect(tag).toMatchObject({ me: "Member la", figure: "1,200", version: 1, why: null, stops: [] });
    expect(tag?.also).toBe("the plan binds, wind 5.8 kt, limit 13.6 kt, all 3 said go");
    expect(tag?.ends).toMatch(/UTC$/);
    expect(mailReaders(e, run.id).map((r) => `${r.name}: ${r.places}`)).toEqual([
      "Member la: operator",
      "Member cy: run lead, observer",
      "Member fi: fire guard",
    ]);
  });
  it("carries the blockers when the run is not clear", () => {
    const { board, run } = ready();
    board.finding("grounding", { words: "fuel leak" });
    const tag = goView(evaluate(board.s, board.now), run.id, lead);
    expect(tag?.why).toBeTruthy();
    expect(tag?.stops.some((s) => s.title.includes("fuel leak"))).toBe(true);
  });
  it("mails a lead who has no place too", () => {
    const { board, run } = ready();
    board.member("le", "lead");
    expect(mailReaders(evaluate(board.s, board.now), run.id).at(-1)).toMatchObject({ id: "le", places: "lead, no place" });
  });
});

describe("the HOLD sheet", () => {
  it("speaks of GO only where one stands", () => {
    const back = (state: RunState) => holdWords(state, "2").back;
    expect(back("called")).toContain("GO stays");
    for (const state of ["planned", "held", "running", "ended", "scrubbed", "reviewed"] as const) expect(back(state)).not.toContain("GO");
    expect(holdWords("held", "2")).toMatchObject({ title: "HOLD stands already, run 2", act: "HOLD for another reason" });
  });
});

describe("the ladder and the plan's start", () => {
  it("offers the next rung to the lead until a run of it is under way", () => {
    const board = makeBoard({ FP: { items: { FP1: {} } } });
    board.rung("2", 30);
    const rungs = () => buildUpView(evaluate(board.s, board.now), "la").rungs;
    expect(rungs().map((r) => [r.key, r.word, r.plan?.ok ?? null])).toEqual([
      ["1", "next", true],
      ["2", "after run 1", null],
    ]);
    expect(buildUpView(evaluate(board.s, board.now), "fi").rungs[0]?.plan).toMatchObject({
      ok: false,
      why: expect.stringContaining("Only a lead"),
    });
    board.plan(board.run("1"));
    expect(rungs()[0]).toMatchObject({ plan: null, runs: [{ label: "1a", state: "planned" }] });
  });

  it("says why the numbers skip a rung that the traits leave out", () => {
    const board = makeBoard({ FP: { items: { FP1: {} } } });
    const leftOut = () => buildUpView(evaluate(board.s, board.now), "la").leftOut;
    board.s.traits = { ...board.s.traits, propeller: "fixed" };
    expect(leftOut()).toEqual(["Run 4, propeller, is not on this ladder: no hydraulic governor and no electric pitch drive."]);
    board.s.traits = { ...board.s.traits, propeller: "cshyd" };
    expect(leftOut()).toEqual([]);
  });

  it("starts from the rung's speed and crew, with room for one fire guard an extinguisher", () => {
    const board = makeBoard({ FP: { items: { FP1: {} } } });
    const e = evaluate(board.s, board.now);
    const rung = e.facts.rungs[0];
    if (!rung) throw new Error("no rung");
    const view = planView(e, rung, null);
    expect(view.start.rpm).toBe("1200");
    expect(view.positions.find((p) => p.key === "fireguard")?.slots).toHaveLength(3);
    expect(view.rules[1]).toBe("One person may be run lead and observer; no other two places.");
    expect(view.members.map((m) => m.label)).toContain("Member fi");
  });

  it("tells a card in one sentence", () =>
    expect(
      inShort({
        steps: [
          { no: 1, rpm: null, hold: null, title: "Start", see: "", marks: [] },
          { no: 2, rpm: { min: 18, max: 20 }, hold: 90, title: "Look and listen", see: "", marks: [] },
        ],
        cowl: "",
        begin: [],
        end: [],
        calls: [],
        abort: { stop: [], kill: [], fire: [] },
      }),
    ).toBe("Start, look and listen 1,080 to 1,200 rpm for 1:30."));
});

describe("the mail page", () => {
  const row = {
    kind: "go",
    act: "a1",
    to: "a@n0100.example",
    name: "Ana",
    subject: "GO: run 1",
    createdAt: START,
    sentAt: START + 1000,
    nextTryAt: START + 5000,
    tries: 1,
    lastError: null,
  };
  it("groups one act's mails and says what became of each", () => {
    const view = mailView(
      [
        { ...row, id: "1", state: "sent" },
        {
          ...row,
          id: "2",
          state: "waiting",
          createdAt: START + 3,
          sentAt: null,
          tries: 2,
          lastError: "The mail server cannot be reached.",
        },
        { ...row, id: "3", state: "given up", sentAt: null, tries: 10, lastError: "No such mailbox." },
        { ...row, id: "4", state: "sent", subject: "HOLD: run 1", tries: 3 },
      ],
      START + HOUR,
      "UTC",
      ({ act }) => ({ ok: false, why: `not ${act}` }),
    );
    expect(view.groups[0]?.lines.map((l) => l.again)).toEqual([null, null, { ok: false, why: "not a1" }]);
    expect(view).toMatchObject({ state: "2 sent, 1 not through yet, 1 given up", lost: 1, sent: 0.5 });
    expect(view.groups.map((g) => g.lines.length)).toEqual([3, 1]);
    expect(view.groups[0]?.lines.map((l) => l.words)).toEqual([
      "sent 06:00 UTC",
      "not through yet after 2 tries, next try 06:00 UTC",
      "given up after 10 tries: tell the person yourself",
    ]);
    expect(view.groups[1]?.lines[0]?.words).toBe("sent 06:00 UTC, after 3 tries");
  });
  it("says when there is nothing", () =>
    expect(mailView([], START, "UTC", () => ({ ok: true, why: "" })).state).toBe("nothing has been sent yet"));
});
