import type { ShownTable } from "./shown-table.ts";

export interface RowChoice {
  readonly words: string;
  readonly onlyProblems: boolean;
  readonly sort?: Sorting;
}

/** An order of rows by a column, as they stood when it was asked for: rows do not jump while a person types. */
export interface Sorting {
  readonly column: number;
  readonly isDown: boolean;
  /** Rows by the numbers by which edits know them. */
  readonly rows: readonly number[];
}

/** Places of the rows to show: those that hold the words in some cell, those with a problem, in the order asked for. */
export function chosenRows(table: ShownTable, { words, onlyProblems, sort }: RowChoice): readonly number[] {
  const sought = words.trim().toLowerCase();
  const places = ordered(table, sort);
  if (sought === "" && !onlyProblems) return places;
  const troubled = new Set(table.problems.map(({ row }) => row));
  return places.filter(
    (place) =>
      (!onlyProblems || troubled.has(table.rowNumbers[place])) &&
      (sought === "" || table.rows[place]?.some((cell) => cell.toLowerCase().includes(sought))),
  );
}

function ordered({ rows, rowIds }: ShownTable, sort: Sorting | undefined): readonly number[] {
  if (sort === undefined) return [...rows.keys()];
  const placeOf = new Map(rowIds.map((row, place) => [row, place]));
  const kept = sort.rows.flatMap((row) => placeOf.get(row) ?? []);
  for (const row of sort.rows) placeOf.delete(row);
  // Rows that were added since stand above the row that is below them in the file, else behind all.
  for (const place of [...placeOf.values()].toReversed()) {
    const below = kept.indexOf(place + 1);
    if (below < 0) kept.push(place);
    else kept.splice(below, 0, place);
  }
  return kept;
}

/** Numbers by size before texts by letter, blanks last in either direction. */
export function sortedBy({ rows, rowIds }: ShownTable, column: number, isDown: boolean): Sorting {
  const sign = isDown ? -1 : 1;
  const keys = rows.map((row) => (row[column] ?? "").trim());
  const numbers = keys.map((key) => (key === "" ? Number.NaN : Number(key.replace(",", "."))));
  const compare = (a: number, b: number): number => {
    const [one, other] = [keys[a] ?? "", keys[b] ?? ""];
    if (one === "" || other === "") return Number(one === "") - Number(other === "");
    const [x, y] = [numbers[a] ?? Number.NaN, numbers[b] ?? Number.NaN];
    if (Number.isNaN(x) !== Number.isNaN(y)) return sign * (Number.isNaN(x) ? 1 : -1);
    return sign * (Number.isNaN(x) ? one.localeCompare(other) : x - y);
  };
  return { column, isDown, rows: [...rows.keys()].toSorted(compare).map((place) => rowIds[place] ?? 0) };
}
