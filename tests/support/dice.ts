/** Chance that a test can shrink: every throw is a value that fast-check draws, smallest and most harmless first. */
import fc from "fast-check";

export interface Dice {
  /** A whole number from `min` to `max`, both included. */
  int(min: number, max: number): number;
  /** True in about `percent` of 100 throws; shrinks to false. */
  chance(percent: number): boolean;
  one<T>(list: readonly T[]): T;
  /** One of the list, or undefined where it is empty. */
  maybeOne<T>(list: readonly T[]): T | undefined;
  some<T>(list: readonly T[], percent: number): T[];
}

export function diceFrom(g: fc.GeneratorValue): Dice {
  const int = (min: number, max: number): number => g(fc.integer, { min, max });
  const chance = (percent: number): boolean => int(0, 99) >= 100 - percent;
  const maybeOne = <T>(list: readonly T[]): T | undefined => (list.length === 0 ? undefined : list[int(0, list.length - 1)]);
  return {
    int,
    chance,
    maybeOne,
    one: <T>(list: readonly T[]): T => {
      const found = maybeOne(list);
      if (found === undefined) throw new Error("nothing to choose from");
      return found;
    },
    some: <T>(list: readonly T[], percent: number): T[] => list.filter(() => chance(percent)),
  };
}
