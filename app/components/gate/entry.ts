/** What came back from a row that could not be taken: the text as typed, and what is wrong with each field. */
export interface Entry {
  /** By field name, one text per row. */
  typed: Record<string, string[]>;
  /** "p0.value.1": field name and row. */
  errors: { field: string; message: string }[];
}

export const NO_ENTRY: Entry = { typed: {}, errors: [] };

export const typedIn = (entry: Entry, name: string, row: number, otherwise = ""): string => entry.typed[name]?.[row] ?? otherwise;

export function errorsOf(entry: Entry, name: string, row = 0): string[] {
  return entry.errors.filter((e) => e.field === `${name}.${row}` || (row === 0 && e.field === name)).map((e) => e.message);
}

/** Ids of controls, unique on the page: the row's id before the field's. */
export const controlId = (item: string, name: string, row = 0): string => `${item}-${name.replaceAll(".", "-")}-${row}`;

/** What every group of fields of a part takes. */
export interface PartProps {
  item: string;
  n: number;
  entry: Entry;
  units: "si" | "us";
}
