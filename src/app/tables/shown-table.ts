import type { Analysis } from "../../core/analysis-result.ts";
import type { Problem } from "../../core/study/problem.ts";
import { resultTables } from "../../report/tables/index.ts";

/** A table as the grid shows it: a sheet that was read, or a table of results. */
export interface ShownTable {
  /** The sheet's file, or the result table's name: its `table` in the address. */
  readonly id: string;
  readonly title: string;
  readonly columns: readonly ShownColumn[];
  readonly rows: readonly (readonly string[])[];
  /** As a spreadsheet counts them, the header being row 1. */
  readonly rowNumbers: readonly number[];
  readonly problems: readonly Problem[];
}

export interface ShownColumn {
  readonly header: string;
  /** What the column was taken to be, or what it holds. */
  readonly meaning: string;
  readonly isNumber: boolean;
}

export function studyTables({ study }: Analysis): readonly ShownTable[] {
  return study.sheets.map(({ file, headers, columns, rows, rowNumbers }) => ({
    id: file,
    title: file,
    columns: headers.map((header, index) => ({
      header,
      meaning: columns[index] ?? "kept, not used",
      isNumber: holdsNumbers(rows.slice(0, 200).map((row) => row[index] ?? "")),
    })),
    rows,
    rowNumbers,
    problems: study.problems.filter((problem) => problem.file === file),
  }));
}

function holdsNumbers(cells: readonly string[]): boolean {
  const filled = cells.filter((cell) => cell.trim() !== "");
  return filled.length > 0 && filled.every((cell) => /^[-+−]?[\d.]+(e[-+]?\d+)?$/i.test(cell.trim()));
}

export function shownResults(analysis: Analysis): readonly ShownTable[] {
  return resultTables(analysis).map(({ name, columns, rows }) => ({
    id: name,
    title: name,
    columns: columns.map((column) => ({
      header: column.name,
      meaning: column.help,
      isNumber: column.type === "number" || column.type === "integer",
    })),
    rows: rows.map((row) => row.map((cell) => (cell === undefined ? "" : String(cell)))),
    rowNumbers: rows.map((_, index) => index + 2),
    problems: [],
  }));
}

/** The problems of each cell, by row number and place of the column; -1 where the whole row is meant. */
export function problemsByCell({ columns, problems }: ShownTable): ReadonlyMap<string, readonly Problem[]> {
  const byCell = new Map<string, Problem[]>();
  for (const problem of problems) {
    const place = columns.findIndex(
      ({ header, meaning }) => meaning === problem.column || header === problem.column,
    );
    const key = cellKey(problem.row ?? 1, place);
    byCell.set(key, [...(byCell.get(key) ?? []), problem]);
  }
  return byCell;
}

export const cellKey = (row: number, column: number): string => `${row}:${column}`;

/** Places of the rows that hold the words in some cell; all of them where nothing is looked for. */
export function rowsWith({ rows }: ShownTable, words: string): readonly number[] {
  const sought = words.trim().toLowerCase();
  const places = [...rows.keys()];
  if (sought === "") return places;
  return places.filter((place) => rows[place]?.some((cell) => cell.toLowerCase().includes(sought)));
}
