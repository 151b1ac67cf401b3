import type { HeaderHint, ReadSheet } from "../study/assembly/context.ts";
import { isDecimalComma, parseNumber } from "../study/cells.ts";
import { type RecognisedColumn, recogniseColumns } from "../study/columns.ts";
import { suggestName } from "../study/nearest.ts";
import type { ProblemList } from "../study/problem-list.ts";
import type { TableDeclaration } from "../study/tables/declare.ts";
import type { TableName } from "../study/tables/index.ts";
import { isFixedUnit, lengthUnits } from "../study/units.ts";
import { takeOffApostrophe } from "./apostrophes.ts";
import { type CsvRecords, decodeText, otherDelimiter, parseCsv, unguardedHeaders } from "./csv.ts";

export interface SheetSource {
  readonly file: string;
  readonly bytes: Uint8Array;
  readonly table: TableDeclaration & { readonly name: TableName };
  /** Columns whose text cells carry an apostrophe before a sign that starts a formula, by header. */
  readonly guarded: ReadonlySet<string>;
  readonly problems: ProblemList;
}

/** Reads one table's bytes; undefined where the whole file cannot be used, with the reason told. */
export function readSheet(source: SheetSource): ReadSheet | undefined {
  const { file, bytes, problems, table } = source;
  const text = decodeText(bytes);
  if (text === undefined) {
    problems.add("undecodable-bytes", { file, found: "bytes that are not UTF-8" });
    return undefined;
  }
  const written = parseCsv(text);
  const records = { ...written, headers: unguardedHeaders(written.headers, source.guarded) };
  if (!isWhole(records, source)) return undefined;
  const columns = recogniseColumns(records.headers, table);
  if (!areColumnsSound(columns, source)) return undefined;
  const sheet = sheetOf(records, columns, source);
  if (sheet === undefined) return undefined;
  const hints = new Map<string, HeaderHint>();
  for (const { column, header, axis, unit, bracket } of columns) {
    if (column !== undefined) hints.set(column, { header, axis, unit, bracket });
  }
  return { sheet, hints };
}

function isWhole({ headers, rows, faults }: CsvRecords, { file, problems }: SheetSource): boolean {
  const unclosed = faults.find(({ code }) => code === "unclosed-quote");
  const delimiter = otherDelimiter(headers);
  if (headers.length === 0) problems.add("empty-file", { file, found: "an empty file" });
  else if (unclosed) problems.add("unclosed-quote", { file, row: unclosed.row, found: '"' });
  else if (delimiter !== undefined) {
    problems.add("wrong-delimiter", { file, found: headers.join(","), detail: delimiter });
  } else if (rows.length === 0) problems.add("header-only", { file, found: "a header row alone" });
  else return true;
  return false;
}

/** Tells every column that is missing, doubled, unknown or of unknown unit; false where the file cannot be used. */
function areColumnsSound(columns: readonly RecognisedColumn[], source: SheetSource): boolean {
  const { file, table, problems } = source;
  const seen = new Set<string>();
  let isSound = true;
  for (const recognised of columns) {
    const { header, column } = recognised;
    if (column === undefined) tellUnused(header, source);
    else if (seen.has(column)) {
      problems.add("duplicate-header", { file, row: 1, column: header, found: header });
      isSound = false;
    }
    const expected = unitsExpected(recognised, table);
    if (expected !== undefined) {
      const found = recognised.bracket ?? "";
      const nearest = suggestName(found, expected);
      const place = { file, row: 1, column: header, found };
      problems.add("unknown-unit", { ...place, detail: expected.join(", "), nearest });
      isSound = false;
    }
    if (column !== undefined) seen.add(column);
  }
  return tellMissing(columns, source) && isSound;
}

/** The units that a header's column can have, where the one written is none of them. */
function unitsExpected(
  { column, bracket }: RecognisedColumn,
  table: TableDeclaration,
): readonly string[] | undefined {
  const unit = column === undefined ? undefined : table.columns[column].unit;
  if (unit === undefined || bracket === undefined) return undefined;
  if (unit === "section") return lengthUnits;
  return isFixedUnit(bracket, unit) ? undefined : [unit];
}

function tellUnused(header: string, { file, table, problems }: SheetSource): void {
  const name = header.trim();
  if (name === "") problems.add("blank-header", { file, row: 1, found: "a blank cell" });
  else if (!table.furtherColumns) {
    const nearest = suggestName(name, Object.keys(table.columns));
    problems.add("unknown-column", { file, row: 1, column: name, found: name, nearest });
  }
}

function tellMissing(columns: readonly RecognisedColumn[], { file, table, problems }: SheetSource): boolean {
  const found = new Set(columns.flatMap(({ column }) => column ?? []));
  const hasUnitInHeader = columns.some(({ column, bracket }) => column === "value" && bracket !== undefined);
  const missing = Object.entries(table.columns)
    .filter(([name, { required }]) => required && !found.has(name) && !(name === "unit" && hasUnitInHeader))
    .map(([name]) => name);
  const isOneOfMet =
    table.oneOf === undefined || table.oneOf.some((set) => set.every((name) => found.has(name)));
  if (!isOneOfMet) missing.push((table.oneOf ?? []).map((set) => set.join(" and ")).join(", or "));
  const unused = columns.filter(({ column }) => column === undefined).map(({ header }) => header);
  for (const detail of missing) {
    problems.add("missing-column", {
      file,
      row: 1,
      found: columns.map(({ header }) => header).join(","),
      detail,
      nearest: suggestName(detail, unused),
    });
  }
  return missing.length === 0;
}

function sheetOf(records: CsvRecords, columns: readonly RecognisedColumn[], source: SheetSource) {
  const { file, table, problems } = source;
  if (hasDecimalComma(records, columns, table)) {
    problems.add("decimal-comma", { file, found: firstDecimalComma(records, columns, table) });
    return undefined;
  }
  const malformed = new Set(records.faults.map(({ row }) => row));
  const rows: string[][] = [];
  const rowNumbers: number[] = [];
  for (const [index, cells] of records.rows.entries()) {
    const row = records.rowNumbers[index];
    if (malformed.has(row)) problems.add("malformed-quote", { file, row, found: cells.join(",") });
    else if (isOfWidth(cells, row, { width: columns.length, source })) {
      rows.push(columns.map(({ header }, at) => takeOff(cells[at] ?? "", header, source)));
      rowNumbers.push(row);
    }
  }
  const declared = columns.map(({ column }) => column);
  return { file, table: table.name, headers: records.headers, columns: declared, rows, rowNumbers };
}

const takeOff = (cell: string, header: string, { guarded }: SheetSource): string =>
  guarded.has(header) ? takeOffApostrophe(cell) : cell;

/** Blank cells beyond the header are nothing; filled ones leave the row out; short rows are told. */
function isOfWidth(
  cells: readonly string[],
  row: number,
  { width, source }: { readonly width: number; readonly source: SheetSource },
): boolean {
  const { file, problems } = source;
  const detail = String(width);
  if (cells.slice(width).some((cell) => cell.trim() !== "")) {
    problems.add("too-many-cells", { file, row, found: `${cells.length} cells: ${cells.join(",")}`, detail });
    return false;
  }
  if (cells.length < width)
    problems.add("too-few-cells", { file, row, found: `${cells.length} cells`, detail });
  return true;
}

/** The cells of columns that hold numbers. */
function* numberCells({ rows }: CsvRecords, columns: readonly RecognisedColumn[], table: TableDeclaration) {
  const indices = columns.flatMap(({ column }, index) => {
    const type = column === undefined ? undefined : table.columns[column].type;
    return type === "number" || type === "integer" || column === "value" ? [index] : [];
  });
  for (const cells of rows) for (const index of indices) yield cells[index] ?? "";
}

/** Decided per file: commas as decimal signs, and no number with a decimal point. */
function hasDecimalComma(
  records: CsvRecords,
  columns: readonly RecognisedColumn[],
  table: TableDeclaration,
): boolean {
  let hasComma = false;
  for (const cell of numberCells(records, columns, table)) {
    if (isDecimalComma(cell)) hasComma = true;
    else if (cell.includes(".") && typeof parseNumber(cell) === "number") return false;
  }
  return hasComma;
}

function firstDecimalComma(
  records: CsvRecords,
  columns: readonly RecognisedColumn[],
  table: TableDeclaration,
): string {
  for (const cell of numberCells(records, columns, table)) if (isDecimalComma(cell)) return cell;
  return "";
}
