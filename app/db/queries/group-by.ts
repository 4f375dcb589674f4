/** @returns the rows by key, each list in the order of `rows`. (Map.groupBy needs a newer Node.js than this program runs on.) */
export function groupBy<T>(rows: T[], key: (row: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const list = groups.get(key(row));
    if (list) list.push(row);
    else groups.set(key(row), [row]);
  }
  return groups;
}
