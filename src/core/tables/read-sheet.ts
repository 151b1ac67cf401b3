import type { HeaderHint, ReadSheet } from "../study/assembly/context.ts";
import { type RecognisedColumn, recogniseColumns } from "../study/columns.ts";
import type { Dialect } from "../study/model.ts";
import type { ProblemList } from "../study/problem-list.ts";
import type { TableDeclaration } from "../study/tables/declare.ts";
import type { TableName } from "../study/tables/index.ts";
import { takeOffApostrophe } from "./apostrophes.ts";
import { areColumnsSound } from "./check-columns.ts";
import { type CsvRecord, type CsvRecords, parseRecords, unguardedHeaders } from "./csv.ts";
import { decimalSign } from "./dialect/decimal.ts";
import { type DeclaredDialect, settingName } from "./dialect/declared.ts";
import { bestParting, type Preview, previews, widest } from "./dialect/delimiter.ts";
import { type DecodedText, decodeBytes } from "./dialect/encoding.ts";
import { type FoundHeader, findHeader } from "./dialect/header.ts";
import { tellDialect } from "./dialect/tell-dialect.ts";
import { MOST_BYTES, MOST_COLUMNS, mebibytes } from "./limits.ts";
import { recognitions } from "./recognition.ts";

export interface SheetSource {
  readonly file: string;
  readonly bytes: Uint8Array;
  readonly table: TableDeclaration & { readonly name: TableName };
  /** Columns whose text cells carry an apostrophe before a sign that starts a formula, by header. */
  readonly guarded: ReadonlySet<string>;
  /** What is said about the file; the rest is found in it. */
  readonly declared: DeclaredDialect;
  readonly problems: ProblemList;
}

/** Reads one table's bytes; undefined where the whole file cannot be used, with the reason told. */
export function readSheet(source: SheetSource): ReadSheet | undefined {
  const { file, table, declared, problems } = source;
  const decoded = decodedSheet(source);
  if (decoded === undefined) return undefined;
  const ways = previews(decoded.text, declared);
  if (!isOfBreadth(widest(ways), source)) return undefined;
  const records = wholeRecords(decoded.text, ways, source);
  if (records === undefined) return undefined;
  const header = headerOf(records.records, source);
  if (!isOfBreadth(header.headers.length, source)) return undefined;
  const below = records.records.slice(header.below);
  if (below.length === 0) {
    problems.add("header-only", { file, found: "a header row alone" });
    return undefined;
  }
  const headers = withoutEmptyEnd(unguardedHeaders(header.headers, source.guarded), below);
  const columns = recogniseColumns(headers, table);
  const row = records.records[header.from].row;
  if (!areColumnsSound(columns, { file, row, table, problems })) return undefined;
  const parts = { header, below, columns, delimiter: records.delimiter };
  const dialect = dialectOf(decoded, records.records, parts, source);
  if (dialect === undefined) return undefined;
  const { rows, rowNumbers } = cellsOf(below, columns, records, source);
  const declaredColumns = columns.map(({ column }) => column);
  const recognised = recognitions(columns, rows, table);
  const sheet = {
    file,
    table: table.name,
    dialect,
    headers,
    columns: declaredColumns,
    recognised,
    rows,
    rowNumbers,
  };
  return { sheet, hints: hintsOf(columns) };
}

/** Text of bytes that are text and not too many; the reason is told where they are not. */
function decodedSheet({ file, bytes, declared, problems }: SheetSource): DecodedText | undefined {
  if (bytes.byteLength > MOST_BYTES) {
    const found = mebibytes(bytes.byteLength);
    problems.add("file-too-large", { file, found, detail: mebibytes(MOST_BYTES) });
    return undefined;
  }
  const decoded = decodeBytes(bytes, declared.encoding);
  if (decoded === undefined) problems.add("undecodable-bytes", { file, found: "bytes that are not text" });
  return decoded;
}

function isOfBreadth(columns: number, { file, problems }: SheetSource): boolean {
  if (columns <= MOST_COLUMNS) return true;
  problems.add("too-many-columns", { file, found: `${columns} columns`, detail: String(MOST_COLUMNS) });
  return false;
}

interface WholeRecords extends CsvRecords {
  readonly delimiter: Dialect["delimiter"];
}

/** Every record of the file; undefined where there is none, or a quote never closes. */
function wholeRecords(
  text: string,
  ways: readonly Preview[],
  { file, table, declared, problems }: SheetSource,
): WholeRecords | undefined {
  const delimiter = bestParting(ways, table)?.delimiter ?? ",";
  const read = parseRecords(text, { delimiter, quote: declared.quote });
  const unclosed = read.faults.find(({ code }) => code === "unclosed-quote");
  if (read.records.length === 0) problems.add("empty-file", { file, found: "an empty file" });
  else if (unclosed) problems.add("unclosed-quote", { file, row: unclosed.row, found: '"' });
  else return { ...read, delimiter };
  return undefined;
}

const headerOf = (records: readonly CsvRecord[], { declared, table }: SheetSource): FoundHeader =>
  declared.headers === undefined
    ? findHeader(records, table)
    : { headers: declared.headers, from: 0, below: 0, recognised: 0, isComplete: false };

/** Headers without the blank ones at the end under which nothing stands. */
function withoutEmptyEnd(headers: readonly string[], below: readonly CsvRecord[]): readonly string[] {
  let width = headers.length;
  while (width > 0 && headers[width - 1].trim() === "") width -= 1;
  const isEmpty = below.every(({ cells }) => cells.slice(width).every((cell) => cell.trim() === ""));
  return isEmpty ? headers.slice(0, width) : headers;
}

interface Parts {
  readonly header: FoundHeader;
  readonly below: readonly CsvRecord[];
  readonly columns: readonly RecognisedColumn[];
  readonly delimiter: Dialect["delimiter"];
}

/** The file's dialect, told where it is not the plain one; undefined where its decimal sign must be asked for. */
function dialectOf(
  { encoding, isTaken }: DecodedText,
  records: readonly CsvRecord[],
  { header, below, columns, delimiter }: Parts,
  source: SheetSource,
): Dialect | undefined {
  const { file, declared, table, problems } = source;
  const rows = below.map(({ cells }) => cells);
  const sign =
    declared.decimal === undefined
      ? decimalSign(rows, columns, { table, delimiter })
      : { kind: "decided" as const, decimal: declared.decimal };
  if (sign.kind === "ambiguous") {
    problems.add("decimal-ambiguous", { file, found: sign.found, detail: settingName(file) });
    return undefined;
  }
  const dialect = {
    encoding,
    delimiter,
    decimal: sign.decimal,
    missing: declared.missing ?? [],
    headerRows: records.slice(header.from, header.below).map(({ row }) => row),
    notes: records.slice(0, header.from),
  };
  tellDialect(dialect, { file, declared, isEncodingTaken: isTaken, problems });
  return dialect;
}

function hintsOf(columns: readonly RecognisedColumn[]): ReadonlyMap<string, HeaderHint> {
  const hints = new Map<string, HeaderHint>();
  for (const { column, header, axis, unit, bracket } of columns) {
    if (column !== undefined) hints.set(column, { header, axis, unit, bracket });
  }
  return hints;
}

/** The cells below the header; rows that cannot be parted rightly are told and left out. */
function cellsOf(
  below: readonly CsvRecord[],
  columns: readonly RecognisedColumn[],
  { faults }: CsvRecords,
  source: SheetSource,
) {
  const malformed = new Set(faults.map(({ row }) => row));
  const rows: string[][] = [];
  const rowNumbers: number[] = [];
  for (const { cells, row } of below) {
    if (malformed.has(row)) {
      source.problems.add("malformed-quote", { file: source.file, row, found: cells.join(",") });
    } else if (isOfWidth(cells, row, { width: columns.length, source })) {
      rows.push(columns.map(({ header }, at) => takeOff(cells[at] ?? "", header, source)));
      rowNumbers.push(row);
    }
  }
  return { rows, rowNumbers };
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
