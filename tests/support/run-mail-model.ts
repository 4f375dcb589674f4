/** The model of a mail for one invented run: a full card, a crew of five, three limits. */
import type { RunMailModel } from "#app/lib/mail/compose/model";
import { POSITIONS } from "#app/lib/template/positions";
import { rungsOf } from "#app/lib/template/runs";
import type { PositionKey } from "#app/lib/template/types";
import { SAMPLES } from "./sample-traits";

const place = (...keys: PositionKey[]) => POSITIONS.filter((p) => keys.includes(p.key));

export function runMailModel(more: Partial<RunMailModel> = {}): RunMailModel {
  const [rung] = rungsOf(SAMPLES.boostedConstantSpeed, {
    ratedRpm: 2750 / 60,
    redline: 2900 / 60,
    idleRpm: 900 / 60,
    oilPressureMin: 200_000,
  });
  if (!rung) throw new Error("The template has no first rung");
  const plan = { kind: "plan" as const, id: "plan", label: "plan, run card version 3", rpm: 1375 / 60 };
  const straps = { kind: "restraint" as const, id: "straps", label: "straps and surface", rpm: 1450 / 60 };
  const redline = { kind: "redline" as const, id: "redline", label: "redline", rpm: 2900 / 60 };
  return {
    install: { id: "install1", registration: "N0417B", name: "Wren", timeZone: "Europe/Berlin" },
    run: {
      id: "run1",
      label: "1",
      rung: rung.name,
      place: "apron south",
      plannedStart: Date.UTC(2026, 11, 5, 8, 30),
      rpm: 1375 / 60,
      version: 3,
    },
    clearance: { rpm: plan.rpm, binds: plan, limits: [plan, redline, straps] },
    wind: { limit: 15 * 0.514444, gustLimit: 23 * 0.514444, newest: { speed: 3.1, gust: 4.6, recorded: Date.UTC(2026, 11, 5, 8, 5) } },
    crew: [
      { member: "osei", name: "Osei Brandt", positions: place("operator") },
      { member: "mirela", name: "Mirela Tansen", positions: place("runlead") },
      { member: "joss", name: "Joss Amaral", positions: place("fireguard") },
      { member: "tibor", name: "Tibor Vale", positions: place("areaguard") },
      { member: "ana", name: "Ana Reyl", positions: place("observer", "recorder") },
    ],
    card: rung.card,
    limits: [
      { label: "Redline", quantity: "rotation", value: 2900 / 60, confirmed: true },
      { label: "Oil pressure, least", quantity: "pressure", value: 200_000, confirmed: false },
      { label: "Coolant, most", quantity: "temperature", value: null, confirmed: false },
    ],
    stops: [],
    goEnds: Date.UTC(2026, 11, 5, 12, 30),
    act: { by: "Mirela Tansen", at: Date.UTC(2026, 11, 5, 8, 14), reason: "", auto: false },
    head: { seq: 412, hash: "9b1e04d766aa".padEnd(64, "0") },
    links: { run: "https://board.example/installs/install1/runs/run1", board: "https://board.example/installs/install1" },
    cautions: ["The maker's manuals, the local rules and the judgement of licensed people come before this mail."],
    ...more,
  };
}

export const STOPS: RunMailModel["stops"] = [
  {
    title: "Fuel prime has lapsed",
    sentence: "The fuel system was opened on 3 Dec 14:10 CET; prime it again.",
    who: ["Mirela Tansen", "Osei Brandt"],
    next: null,
  },
  {
    title: "Grounding finding: hose rub",
    sentence: "Fixed; an inspector must look and close it.",
    who: [],
    next: "Nobody here can: invite an inspector on the Crew page.",
  },
];
