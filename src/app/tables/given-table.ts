import type { Sheet } from "../../core/study/model.ts";
import type { Problem } from "../../core/study/problem.ts";
import type { TableName } from "../../core/study/tables/index.ts";
import { takeOffApostrophe } from "../../core/tables/apostrophes.ts";
import { baseName } from "../../core/tables/base-name.ts";
import { unguardedHeaders } from "../../core/tables/csv.ts";
import { bestParting, previews } from "../../core/tables/dialect/delimiter.ts";
import { decodeBytes } from "../../core/tables/dialect/encoding.ts";
import { MOST_COLUMNS } from "../../core/tables/limits.ts";
import { tableNamed } from "../../core/tables/table-of-file.ts";
import type { TableForm } from "./edits.ts";
import { guardedColumns } from "./package-file.ts";
import { rowsOf, type WrittenRow } from "./patch-csv.ts";

/** A table as it was given: rows that could be read and those that could not, each at its place. */
export interface GivenTable extends TableForm {
  /** Absent where no reading could tell which it is. */
  readonly table?: TableName;
  readonly columns: Sheet["columns"];
  readonly rows: readonly (readonly string[])[];
  readonly rowNumbers: readonly number[];
  /** Rows that could not be read, each with the columns whose cells are quoted wrongly. */
  readonly unread: ReadonlyMap<number, readonly number[]>;
}

type Files = ReadonlyMap<string, Uint8Array>;

/** What a reading left out of the tables. */
export interface LeftOut {
  readonly rows: ReadonlyMap<string, readonly WrittenRow[]>;
  /** Tables that could not be read at all, as far as their cells can be told apart. */
  readonly tables: readonly GivenTable[];
}

export type LeavingSheet = TableForm & Pick<Sheet, "rowNumbers">;

const LEAVING = new Set(["too-many-cells", "malformed-quote", "unclosed-quote"]);

/** The sheets that left rows out, as far as looking for these rows needs them. */
export const leavingSheets = (
  sheets: readonly Sheet[],
  problems: readonly Problem[],
): readonly LeavingSheet[] => {
  const files = new Set(problems.filter(({ code }) => LEAVING.has(code)).map(({ file }) => file));
  return sheets
    .filter(({ file }) => files.has(file))
    .map(({ file, headers, dialect, rowNumbers }) => ({ file, headers, dialect, rowNumbers }));
};

/** Files that hold a table which could not be read. */
export function unreadFiles(sheets: readonly Sheet[], problems: readonly Problem[]): readonly string[] {
  const read = new Set(sheets.map(({ file }) => file));
  const names = problems
    .filter(({ severity, code }) => severity === "error" || code === "unknown-file")
    .map(({ file }) => baseName(file))
    .filter((file) => /(?:\.(?:csv|tsv|tab)|\])$/i.test(file) && !read.has(file));
  return [...new Set(names)];
}

/** Looks in the files for what the reading left out. */
export function leftOut(files: Files, leaving: readonly LeavingSheet[], unread: readonly string[]): LeftOut {
  const guarded = guardedColumns(files);
  const bytesOf = (file: string) => [...files].find(([path]) => baseName(path) === file)?.[1];
  const rows = leaving.flatMap((sheet) => {
    const bytes = bytesOf(sheet.file);
    return bytes ? [[sheet.file, unreadRows(bytes, sheet, guarded.get(sheet.file))] as const] : [];
  });
  const tables = unread.flatMap((file) => {
    const bytes = bytesOf(file);
    return (bytes && unreadTable(file, bytes, guarded.get(file))) ?? [];
  });
  return { rows: new Map(rows), tables };
}

function unreadRows(
  bytes: Uint8Array,
  { headers, dialect, rowNumbers }: LeavingSheet,
  guarded: ReadonlySet<string> = new Set(),
): readonly WrittenRow[] {
  const text = decodeBytes(bytes, dialect.encoding)?.text ?? "";
  const read = new Set(rowNumbers);
  const first = Math.max(0, ...dialect.headerRows, ...dialect.notes.map(({ row }) => row)) + 1;
  return [...rowsOf(text, dialect.delimiter)]
    .filter(({ row, cells }) => row >= first && !read.has(row) && cells.some((cell) => cell.trim() !== ""))
    .map((row) => ({ ...row, cells: withoutGuard(row.cells, headers, guarded) }));
}

const withoutGuard = (
  cells: readonly string[],
  headers: readonly string[],
  guarded: ReadonlySet<string>,
): readonly string[] =>
  cells.map((cell, column) => (guarded.has(headers[column] ?? "") ? takeOffApostrophe(cell) : cell));

/** Most bytes of a table that is shown although it could not be read. */
const MOST_UNREAD = 2 ** 24;

function unreadTable(
  file: string,
  bytes: Uint8Array,
  guarded: ReadonlySet<string> = new Set(),
): GivenTable | undefined {
  const decoded = bytes.byteLength > MOST_UNREAD ? undefined : decodeBytes(bytes, undefined);
  if (decoded === undefined) return undefined;
  const ways = previews(decoded.text);
  const table = tableNamed(file);
  const parting = bestParting(ways, table ?? ANY_TABLE);
  if (parting === undefined || parting.header.headers.length > MOST_COLUMNS) return undefined;
  const { delimiter, header } = parting;
  const records = ways.find((way) => way.delimiter === delimiter)?.records ?? [];
  const headerRows = records.slice(header.from, header.below).map(({ row }) => row);
  const headers = unguardedHeaders(header.headers, guarded);
  const { encoding } = decoded;
  const rows = [...rowsOf(decoded.text, delimiter)].filter(
    ({ row, cells }) => row > Math.max(0, ...headerRows) && cells.some((cell) => cell.trim() !== ""),
  );
  return {
    file,
    ...(table && { table: table.name }),
    headers,
    columns: headers.map(() => undefined),
    dialect: {
      encoding,
      delimiter,
      decimal: "point",
      missing: [],
      headerRows,
      notes: records.slice(0, header.from),
    },
    rows: rows.map(({ cells }) => withoutGuard(cells, headers, guarded)),
    rowNumbers: rows.map(({ row }) => row),
    unread: new Map(rows.filter(isOdd(headers.length)).map(({ row, malformed }) => [row, malformed])),
  };
}

/** A table that nothing is known of: the sign that makes the most columns parts it. */
const ANY_TABLE = { name: "", title: "", help: "", columns: {} };

const isOdd =
  (width: number) =>
  ({ cells, malformed }: WrittenRow): boolean =>
    malformed.length > 0 || cells.slice(width).some((cell) => cell.trim() !== "");

/** The table of a sheet, its rows taken out of it, with those that its reading left out at their places. */
export function givenTable(
  sheet: Sheet,
  rows: GivenTable["rows"],
  unread: readonly WrittenRow[] = [],
): GivenTable {
  const { file, table, headers, dialect, columns } = sheet;
  const rowNumbers = Array.from(sheet.rowNumbers);
  const own = { file, table, headers, dialect, columns };
  if (unread.length === 0) return { ...own, rows, rowNumbers, unread: new Map() };
  const merged: { readonly row: number; readonly cells: readonly string[] }[] = [];
  let next = 0;
  for (const [place, row] of rowNumbers.entries()) {
    for (; next < unread.length && unread[next].row < row; next++) merged.push(unread[next]);
    merged.push({ row, cells: rows[place] });
  }
  for (const row of unread.slice(next)) merged.push(row);
  return {
    ...own,
    rows: merged.map(({ cells }) => cells),
    rowNumbers: merged.map(({ row }) => row),
    unread: new Map(unread.map(({ row, malformed }) => [row, malformed])),
  };
}
