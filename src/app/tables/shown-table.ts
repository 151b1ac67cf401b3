import type { Analysis } from "../../core/analysis-result.ts";
import type { Study } from "../../core/study/model.ts";
import type { Problem } from "../../core/study/problem.ts";
import { baseName } from "../../core/tables/base-name.ts";
import type { ResultDeclaration } from "../../report/tables/result-table.ts";
import { editedHeaders, NO_EDITS, type TableEdits } from "./edits.ts";
import type { GivenTable } from "./given-table.ts";
import { rowNumbering, rowsInOrder } from "./row-order.ts";

/** A table as the grid shows it: a table of the study, or one of results. */
export interface ShownTable {
  /** The sheet's file, or the result table's name: its `table` in the address. */
  readonly id: string;
  readonly title: string;
  readonly columns: readonly ShownColumn[];
  readonly rows: readonly (readonly string[])[];
  /** As a spreadsheet counts them, the header being row 1. */
  readonly rowNumbers: readonly number[];
  /** The numbers by which edits know the rows. */
  readonly rowIds: readonly number[];
  /** The rows of the file that the header takes; none where the names of the columns cannot be written in. */
  readonly headerRows: readonly number[];
  readonly problems: readonly Problem[];
  readonly isEditable: boolean;
  /** Why each row that is set aside is, by the number by which edits know it. */
  readonly setAside: ReadonlyMap<number, string>;
  /** Rows that could not be read as given, with their columns that are quoted wrongly, likewise. */
  readonly unread: ReadonlyMap<number, readonly number[]>;
  /** By which edits will know the next added row, and the number that it is shown under behind all rows. */
  readonly nextRow: { readonly id: number; readonly shown: number };
}

export interface ShownColumn {
  readonly header: string;
  /** What the column was taken to be, or what it holds. */
  readonly meaning: string;
  readonly isNumber: boolean;
  /** Whether it lies beyond the header: only rows that could not be read have cells there. */
  readonly isBeyond?: boolean;
}

/** A table as it was given, with what the last analysis says of it: all that no edit changes. */
export interface ReadTable {
  readonly given: GivenTable;
  readonly meanings: readonly string[];
  readonly isNumber: readonly boolean[];
  /** Problems with the rows' numbers by which edits know them. */
  readonly problems: readonly Problem[];
  /** The last row that the file has. */
  readonly lastRow: number;
}

/** What a reading found, and the edits that it rests on. */
export interface Found extends Pick<Study, "sheets" | "problems" | "sections"> {
  readonly edits: ReadonlyMap<string, TableEdits>;
}

/** More columns than this beyond the header are not shown. */
const MOST_BEYOND = 64;

export function readTables(tables: readonly GivenTable[], found: Found): readonly ReadTable[] {
  return tables.map((given) => {
    const { file, headers, rows, rowNumbers, unread } = given;
    const now = found.sheets.find((sheet) => sheet.file === file);
    const columns = now?.columns.length === headers.length ? now.columns : given.columns;
    const numbering = rowNumbering(found.edits.get(file)?.added ?? []);
    const beyond = [...unread.keys()].reduce(
      (most, row) => Math.max(most, (rows[rowNumbers.indexOf(row)]?.length ?? 0) - headers.length),
      0,
    );
    const few = rows.slice(0, 200);
    return {
      given,
      meanings: [
        ...headers.map((_, index) => columns[index] ?? (now === undefined ? "not read" : "kept, not used")),
        ...Array.from({ length: Math.min(beyond, MOST_BEYOND) }, () => BEYOND),
      ],
      isNumber: headers.map((_, index) => holdsNumbers(few.map((row) => row[index] ?? ""))),
      problems: found.problems
        .filter((problem) => baseName(problem.file) === file)
        .map((problem) =>
          problem.row === undefined ? problem : { ...problem, row: numbering.known(problem.row) },
        ),
      lastRow: Math.max(rowNumbers.at(-1) ?? 1, ...given.dialect.headerRows),
    };
  });
}

const BEYOND = "no column is named here";

/** The study's tables with the edits made, marked with the problems of the last analysis. */
export const studyTables = (
  tables: readonly ReadTable[],
  edits: ReadonlyMap<string, TableEdits>,
): readonly ShownTable[] => tables.map((table) => studyTable(table, edits.get(table.given.file) ?? NO_EDITS));

function studyTable(
  { given, meanings, isNumber, problems, lastRow }: ReadTable,
  edits: TableEdits,
): ShownTable {
  const { cells, added, setAside } = edits;
  const { file, dialect, rows: read, rowNumbers: readNumbers, unread } = given;
  const headers = editedHeaders(given, edits);
  const rowIds = rowsInOrder(readNumbers, added);
  const numbering = rowNumbering(added);
  const isMoved = added.some(({ above }) => above !== undefined);
  const nextId = added.reduce((most, { row }) => Math.max(most, row), lastRow) + 1;
  return {
    id: file,
    title: file,
    columns: meanings.map((meaning, index) => ({
      header: headers[index] ?? "",
      meaning,
      isNumber: index < isNumber.length && isNumber[index],
      ...(index >= headers.length && { isBeyond: true }),
    })),
    rows:
      cells.size === 0 && added.length === 0
        ? read
        : editedRows(given, rowIds, { cells, width: headers.length }),
    rowIds,
    rowNumbers: isMoved ? rowIds.map(numbering.shown) : rowIds,
    headerRows: dialect.headerRows,
    problems: isMoved
      ? problems.map((problem) =>
          problem.row === undefined ? problem : { ...problem, row: numbering.shown(problem.row) },
        )
      : problems,
    isEditable: true,
    setAside,
    unread,
    nextRow: { id: nextId, shown: lastRow + added.length + 1 },
  };
}

function editedRows(
  { rows: read, rowNumbers: readNumbers }: GivenTable,
  rowIds: readonly number[],
  { cells, width }: Pick<TableEdits, "cells"> & { readonly width: number },
): readonly (readonly string[])[] {
  let place = 0;
  return rowIds.map((id) => {
    const isRead = readNumbers[place] === id;
    const row = isRead ? read[place++] : undefined;
    const changed = cells.get(id);
    if (changed === undefined && row !== undefined) return row;
    const length = Math.max(
      width,
      row?.length ?? 0,
      ...[...(changed?.keys() ?? [])].map((column) => column + 1),
    );
    return Array.from({ length }, (_, column) => changed?.get(column) ?? row?.[column] ?? "");
  });
}

function holdsNumbers(cells: readonly string[]): boolean {
  const filled = cells.filter((cell) => cell.trim() !== "");
  return filled.length > 0 && filled.every((cell) => /^[-+−]?[\d.]+(e[-+]?\d+)?$/i.test(cell.trim()));
}

export function shownResult(declaration: ResultDeclaration, analysis: Analysis): ShownTable {
  const { name, columns, rows } = declaration.fill(analysis);
  return {
    id: name,
    title: name,
    columns: columns.map((column) => ({
      header: column.name,
      meaning: column.help,
      isNumber: column.type === "number" || column.type === "integer",
    })),
    rows: rows.map((row) => row.map((cell) => (cell === undefined ? "" : String(cell)))),
    rowNumbers: rows.map((_, index) => index + 2),
    rowIds: rows.map((_, index) => index + 2),
    headerRows: [],
    problems: [],
    isEditable: false,
    setAside: new Map(),
    unread: new Map(),
    nextRow: { id: rows.length + 2, shown: rows.length + 2 },
  };
}

/** The problems of each cell, by row number and place of the column; -1 where the whole row is meant. */
export function problemsByCell(
  columns: readonly ShownColumn[],
  problems: readonly Problem[],
): ReadonlyMap<string, readonly Problem[]> {
  const byCell = new Map<string, Problem[]>();
  const placeOf = remembered((name: string | undefined) =>
    columns.findIndex(({ header, meaning }) => meaning === name || header === name),
  );
  for (const problem of problems) {
    const place = placeOf(problem.column);
    const key = cellKey(problem.row ?? 1, place);
    const own = byCell.get(key);
    if (own === undefined) byCell.set(key, [problem]);
    else own.push(problem);
  }
  return byCell;
}

function remembered<Key, Value>(find: (key: Key) => Value): (key: Key) => Value {
  const known = new Map<Key, Value>();
  return (key) => {
    const value = known.get(key) ?? find(key);
    known.set(key, value);
    return value;
  };
}

export const cellKey = (row: number, column: number): string => `${row}:${column}`;
