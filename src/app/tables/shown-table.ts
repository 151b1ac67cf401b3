import type { Analysis } from "../../core/analysis-result.ts";
import type { Sheet } from "../../core/study/model.ts";
import type { Problem } from "../../core/study/problem.ts";
import { resultTables } from "../../report/tables/index.ts";
import { NO_EDITS, type TableEdits } from "./edits.ts";

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
  readonly isEditable: boolean;
  /** Why each row that is set aside is. */
  readonly setAside: ReadonlyMap<number, string>;
  /** The number that the next added row gets. */
  readonly nextRow: number;
}

export interface ShownColumn {
  readonly header: string;
  /** What the column was taken to be, or what it holds. */
  readonly meaning: string;
  readonly isNumber: boolean;
}

/** A table as it was read, with what the last analysis says of it: all that no edit changes. */
export type ReadTable = Pick<ShownTable, "columns" | "problems"> & {
  readonly sheet: Sheet;
  /** The last row that was read or told of. */
  readonly lastRow: number;
};

export function readTables(sheets: readonly Sheet[], problems: readonly Problem[]): readonly ReadTable[] {
  return sheets.map((sheet) => {
    const { file, headers, columns, rows, rowNumbers } = sheet;
    const own = problems.filter((problem) => problem.file === file);
    return {
      sheet,
      columns: headers.map((header, index) => ({
        header,
        meaning: columns[index] ?? "kept, not used",
        isNumber: holdsNumbers(rows.slice(0, 200).map((row) => row[index] ?? "")),
      })),
      problems: own,
      lastRow: own.reduce((most, { row = 0 }) => Math.max(most, row), rowNumbers.at(-1) ?? 1),
    };
  });
}

/** The study's tables with the edits made, marked with the problems of the last analysis. */
export const studyTables = (
  tables: readonly ReadTable[],
  edits: ReadonlyMap<string, TableEdits>,
): readonly ShownTable[] => tables.map((table) => studyTable(table, edits.get(table.sheet.file) ?? NO_EDITS));

function studyTable(
  { sheet, columns, problems, lastRow }: ReadTable,
  { cells, added, setAside }: TableEdits,
): ShownTable {
  const { file, headers, rows: read, rowNumbers: readNumbers } = sheet;
  const rowNumbers = added.length === 0 ? readNumbers : [...readNumbers, ...added];
  return {
    id: file,
    title: file,
    columns,
    rows: cells.size === 0 && added.length === 0 ? read : editedRows(read, rowNumbers, { cells, headers }),
    rowNumbers,
    problems,
    isEditable: true,
    setAside,
    nextRow: Math.max(lastRow, added.at(-1) ?? 0) + 1,
  };
}

function editedRows(
  read: readonly (readonly string[])[],
  rowNumbers: readonly number[],
  { cells, headers }: Pick<TableEdits, "cells"> & Pick<Sheet, "headers">,
): readonly (readonly string[])[] {
  return rowNumbers.map((number, place) => {
    const changed = cells.get(number);
    const row = read[place];
    if (changed === undefined && row !== undefined) return row;
    return headers.map((_, column) => changed?.get(column) ?? row?.[column] ?? "");
  });
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
    isEditable: false,
    setAside: new Map(),
    nextRow: rows.length + 2,
  }));
}

/** The problems of each cell, by row number and place of the column; -1 where the whole row is meant. */
export function problemsByCell(
  columns: readonly ShownColumn[],
  problems: readonly Problem[],
): ReadonlyMap<string, readonly Problem[]> {
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

export interface RowChoice {
  readonly words: string;
  readonly onlyProblems: boolean;
  readonly sort?: Sorting;
}

/** An order of rows by a column, as they stood when it was asked for: rows do not jump while a person types. */
export interface Sorting {
  readonly column: number;
  readonly isDown: boolean;
  readonly places: readonly number[];
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

function ordered({ rows }: ShownTable, sort: Sorting | undefined): readonly number[] {
  if (sort === undefined) return [...rows.keys()];
  const kept = sort.places.filter((place) => place < rows.length);
  return [...kept, ...Array.from({ length: rows.length - kept.length }, (_, at) => kept.length + at)];
}

/** Numbers by size before texts by letter, blanks last in either direction. */
export function sortedBy({ rows }: ShownTable, column: number, isDown: boolean): Sorting {
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
  return { column, isDown, places: [...rows.keys()].toSorted(compare) };
}
