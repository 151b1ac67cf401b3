import type { HeaderHint, ReadSheet } from "../study/assembly/context.ts";
import { mapValues, takeRows } from "../study/coded.ts";
import { type RecognisedColumn, recogniseColumns } from "../study/columns.ts";
import type { Dialect } from "../study/model.ts";
import type { ProblemList } from "../study/problem-list.ts";
import { columnRows } from "../study/sheet-rows.ts";
import type { TableDeclaration } from "../study/tables/declare.ts";
import type { TableName } from "../study/tables/index.ts";
import { takeOffApostrophe } from "./apostrophes.ts";
import { areColumnsSound } from "./check-columns.ts";
import { unguardedHeaders } from "./csv.ts";
import { decimalSign } from "./dialect/decimal.ts";
import { type DeclaredDialect, tablePath } from "./dialect/declared.ts";
import { tellDialect } from "./dialect/tell-dialect.ts";
import { MOST_BYTES, MOST_COLUMNS, mebibytes } from "./limits.ts";
import { type OddRow, type PartedTable, type PartFault, partTable } from "./part-table.ts";
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
  const { file, table, problems } = source;
  const parted = partedSheet(source);
  if (parted === undefined) return undefined;
  const { header, head } = parted;
  const headers = withoutEmptyEnd(unguardedHeaders(header.headers, source.guarded), parted);
  const columns = recogniseColumns(headers, table);
  const row = head[header.from].row;
  if (!areColumnsSound(columns, { file, row, table, problems })) return undefined;
  const dialect = dialectOf(parted, columns, source);
  if (dialect === undefined) return undefined;
  const { rows, rowNumbers } = cellsOf(parted, columns, source);
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

/** The bytes of a table parted into cells; undefined, told, where they cannot be. */
function partedSheet(source: SheetSource): PartedTable | undefined {
  const { file, bytes, problems } = source;
  if (bytes.byteLength > MOST_BYTES) {
    const found = mebibytes(bytes.byteLength);
    problems.add("file-too-large", { file, found, detail: mebibytes(MOST_BYTES) });
    return undefined;
  }
  const parted = partTable(source, MOST_COLUMNS);
  if (parted.kind === "parted" && parted.rows.length > 0) return parted;
  tellUnparted(parted, source);
  return undefined;
}

function tellUnparted(fault: PartedTable | PartFault, { file, problems }: SheetSource): void {
  switch (fault.kind) {
    case "not-text":
      return problems.add("undecodable-bytes", { file, found: "bytes that are not text" });
    case "empty":
      return problems.add("empty-file", { file, found: "an empty file" });
    case "too-wide":
      return problems.add("too-many-columns", {
        file,
        found: `${fault.columns} columns`,
        detail: String(MOST_COLUMNS),
      });
    case "parted":
      return problems.add("header-only", { file, found: "a header row alone" });
    default:
      return fault satisfies never;
  }
}

const isBlank = (cell: string): boolean => cell.trim() === "";

/** Headers without the blank ones at the end under which nothing stands. */
function withoutEmptyEnd(headers: readonly string[], { columns, odd }: PartedTable): readonly string[] {
  let width = headers.length;
  while (width > 0 && isBlank(headers[width - 1])) width -= 1;
  const isEmpty =
    columns.slice(width).every(({ values }) => values.every(isBlank)) &&
    odd.every(({ written }) => written.slice(width).every(isBlank));
  return isEmpty ? headers.slice(0, width) : headers;
}

/** The file's dialect, told where it is not the plain one; undefined where its decimal sign must be asked for. */
function dialectOf(
  { encoding, isTaken, head, header, delimiter, columns: cells, rows }: PartedTable,
  columns: readonly RecognisedColumn[],
  source: SheetSource,
): Dialect | undefined {
  const { file, declared, table, problems } = source;
  const sign =
    declared.decimal === undefined
      ? decimalSign(columnRows(cells, rows.length), columns, { table, delimiter })
      : { kind: "decided" as const, decimal: declared.decimal };
  if (sign.kind === "ambiguous") {
    problems.add("decimal-ambiguous", { file, found: sign.found, detail: tablePath(file) });
    return undefined;
  }
  const dialect = {
    encoding,
    delimiter,
    decimal: sign.decimal,
    missing: declared.missing ?? [],
    headerRows: head.slice(header.from, header.below).map(({ row }) => row),
    notes: head.slice(0, header.from),
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
  { columns: cells, rows, odd }: PartedTable,
  columns: readonly RecognisedColumn[],
  source: SheetSource,
) {
  const { guarded } = source;
  const read = columns.map(({ header }, column) =>
    guarded.has(header) ? mapValues(cells[column], takeOffApostrophe) : cells[column],
  );
  const leftOut = odd.filter((one) => isLeftOut(one, rows[one.index], { width: columns.length, source }));
  if (leftOut.length === 0) return { rows: columnRows(read, rows.length), rowNumbers: rows };
  const without = new Set(leftOut.map(({ index }) => index));
  const kept = rows.map((_, index) => index).filter((index) => !without.has(index));
  const keptColumns = read.map((column) => takeRows(column, kept));
  return { rows: columnRows(keptColumns, kept.length), rowNumbers: kept.map((index) => rows[index]) };
}

/** Tells a row that has not as many cells as the header; true where it cannot be used. */
function isLeftOut(
  { kind, cells, written }: OddRow,
  row: number,
  { width, source: { file, problems } }: { readonly width: number; readonly source: SheetSource },
): boolean {
  const detail = String(width);
  if (kind === "unclosed") problems.add("unclosed-quote", { file, row, found: written.join(",") });
  else if (kind === "malformed") problems.add("malformed-quote", { file, row, found: written.join(",") });
  else if (kind === "overfull")
    problems.add("too-many-cells", { file, row, found: `${cells} cells: ${written.join(",")}`, detail });
  else if (cells < width) problems.add("too-few-cells", { file, row, found: `${cells} cells`, detail });
  return kind !== "short";
}
