/**
 * The rungs of one install: the build-up's shares turned into crankshaft speeds and cards.
 * Speeds stay null until the ratings they come from are entered.
 */
import { BUILD_UP, LEAK_CHECK } from "#app/lib/template/build-up";
import type { RungRow, StepRow } from "#app/lib/template/build-up-steps";
import { CARD_BEGIN, cardAbort, cardCalls, cardEnd } from "#app/lib/template/card-texts";
import { applies, whyNot } from "#app/lib/template/condition";
import { crewRule } from "#app/lib/template/positions";
import { type TraitWord, traitWords } from "#app/lib/template/trait-words";
import type { CardStep, RungDef, Traits, ValueDef, ValueKey } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { format } from "#app/lib/units/display";

export type Values = Partial<Record<ValueKey, number>>;

/** Margin over the expected static speed that the plan of run 5 leaves. */
const STATIC_MARGIN = 1.03;
/** Cooling down is done at one and a half times idle. */
const COOL_DOWN = 1.5;

interface Install {
  traits: Traits;
  words: ReadonlySet<TraitWord>;
  values: Values;
  defs: ReadonlyMap<ValueKey, ValueDef>;
}

function installOf(traits: Traits, values: Values): Install {
  const defs = new Map(valueDefs(traits).map((def) => [def.key, def]));
  return { traits, words: traitWords(traits), values, defs };
}

/** Planned highest speed of full power: the lower of the redline and the expected static speed + 3 %. */
function fullSpeed({ values }: Install): number | null {
  const { redline, staticRpmMax } = values;
  return redline === undefined || staticRpmMax === undefined ? null : Math.min(redline, staticRpmMax * STATIC_MARGIN);
}

function stepSpeed(speed: StepRow["speed"], install: Install): CardStep["rpm"] {
  const { values } = install;
  const held = (rpm: number | null | undefined) => (rpm === null || rpm === undefined ? null : { min: rpm, max: rpm });
  if (speed === null) return null;
  if (speed === "idle") return held(values.idleRpm);
  if (speed === "cool-down") return held(values.idleRpm === undefined ? null : values.idleRpm * COOL_DOWN);
  if (speed === "full") {
    const max = fullSpeed(install);
    return max === null ? null : { min: Math.min(values.staticRpmMin ?? max, max), max };
  }
  return values.ratedRpm === undefined ? null : { min: speed[0] * values.ratedRpm, max: speed[1] * values.ratedRpm };
}

/** Braces in a card's text become the value with its unit, in both systems where they differ. */
function fillIn(text: string, { values, defs }: Install): string {
  return text.replace(/\{(\w+)\}/g, (_, key: ValueKey) => {
    const def = defs.get(key);
    const value = values[key] ?? def?.preset ?? null;
    if (!def || value === null) return `the maker's figure (${(def?.label ?? key).toLowerCase()}, not entered)`;
    const si = format(def.quantity, value, "si", def.shownIn).text;
    const us = format(def.quantity, value, "us", def.shownIn).text;
    return si === us ? si : `${si} (${us})`;
  });
}

function avoidLine({ values }: Install): string[] {
  const { avoidRpmMin, avoidRpmMax } = values;
  if (avoidRpmMin === undefined || avoidRpmMax === undefined) return [];
  return [`Never stay between ${format("rotation", avoidRpmMin, "si").value} and ${format("rotation", avoidRpmMax, "si").text}`];
}

function toRung(row: RungRow, install: Install): RungDef {
  const { words, values } = install;
  const rated = values.ratedRpm;
  const full = row.key === "5";
  const rpm = full ? fullSpeed(install) : rated === undefined ? null : rated * row.share;
  const steps = row.steps
    .filter((step) => applies(step.when, words))
    .map((step, index) => ({
      no: index + 1,
      rpm: stepSpeed(step.speed, install),
      hold: step.hold,
      title: step.title,
      see: fillIn(step.see, install),
      marks: step.marks ?? [],
      ...(step.source === undefined ? {} : { source: step.source }),
    }));
  return {
    key: row.key,
    name: row.name,
    rpm,
    share: full && rpm !== null && rated !== undefined ? rpm / rated : row.share,
    card: {
      steps,
      cowl: row.cowl,
      begin: [...CARD_BEGIN, ...avoidLine(install)],
      end: cardEnd(row.stop),
      calls: cardCalls(words),
      abort: cardAbort(words),
    },
    crew: crewRule(row.key, install.traits),
  };
}

/** The ladder of an install, in order. The propeller's rung is there only where pitch moves in flight. */
export function rungsOf(traits: Traits, values: Values = {}): RungDef[] {
  const install = installOf(traits, values);
  return BUILD_UP.filter((row) => applies(row.when, install.words)).map((row) => toRung(row, install));
}

/** Rungs of the template that the traits leave out, and why: "no propeller whose pitch moves". */
export function rungsLeftOut(traits: Traits): { key: string; name: string; because: string }[] {
  const words = traitWords(traits);
  return BUILD_UP.flatMap(({ key, name, when }) =>
    when === undefined || applies(when, words) ? [] : [{ key, name, because: whyNot(when, words) }],
  );
}

/** The leak check, which a lead adds at the end where the release asks for it. */
export function leakCheckRung(traits: Traits, values: Values = {}): RungDef {
  return toRung(LEAK_CHECK, installOf(traits, values));
}
