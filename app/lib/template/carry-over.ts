/**
 * When a rating changes, the template says some things anew (places, counts, bands that follow from it). What people entered
 * on the board stays: a three-way merge of what the template said before, what it says now, and what is stored.
 */

type Data = null | boolean | number | string | Data[] | { [key: string]: Data };

const isObject = (x: unknown): x is Record<string, unknown> => typeof x === "object" && x !== null && !Array.isArray(x);

/** @returns whether two JSON values are the same, whatever the order of their keys. */
export function same(a: unknown, b: unknown): boolean {
  if (Array.isArray(a) && Array.isArray(b)) return a.length === b.length && a.every((x, n) => same(x, b[n]));
  if (isObject(a) && isObject(b)) {
    const keys = new Set([...Object.keys(a), ...Object.keys(b)]);
    return [...keys].every((k) => same(a[k], b[k]));
  }
  return Object.is(a, b);
}

/**
 * @param before what the template said, @param after what it says now, @param stored what the board has.
 * @returns `stored` with every change from `before` to `after` in it, but for what somebody had changed on the board.
 */
export function carryOver<T>(before: T, after: T, stored: T): T {
  return merge(before as Data, after as Data, stored as Data) as T;
}

function merge(before: Data, after: Data, stored: Data): Data {
  if (same(before, after)) return stored;
  if (same(before, stored)) return after;
  if (
    Array.isArray(before) &&
    Array.isArray(after) &&
    Array.isArray(stored) &&
    before.length === after.length &&
    before.length === stored.length
  )
    return stored.map((s, n) => merge(before[n] ?? null, after[n] ?? null, s));
  if (isObject(before) && isObject(after) && isObject(stored)) {
    const merged: { [key: string]: Data } = {};
    for (const key of new Set([...Object.keys(stored), ...Object.keys(after)])) {
      const value = merge(before[key] ?? null, after[key] ?? null, stored[key] ?? null);
      if (value !== null || key in stored || key in after) merged[key] = value;
    }
    return merged;
  }
  return stored;
}
