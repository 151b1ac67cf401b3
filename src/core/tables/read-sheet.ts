import type { HeaderHint, ReadSheet } from "../study/assembly/context.ts";
import { mapValues, takeRows } from "../study/coded.ts";
import { type RecognisedColumn, recogniseColumns } from "../study/columns.ts";
import type { Dialect } from "../study/model.ts";
import { MOST_ALIKE, type ProblemList } from "../study/problem-list.ts";
import { columnRows } from "../study/sheet-rows.ts";
import type { TableDeclaration } from "../study/tables/declare.ts";
import type { TableName } from "../study/tables/index.ts";
import { takeOffApostrophe } from "./apostrophes.ts";
import { areColumnsSound } from "./check-columns.ts";
import { unguardedHeaders } from "./csv.ts";
import { decimalSign } from "./dialect/decimal.ts";
import { type DeclaredDialect, tablePath } from "./dialect/declared.ts";
import { tellDialect } from "./dialect/tell-dialect.ts";
import { MOST_BYTES, MOST_CELLS, MOST_CELLS_AT_ONCE, MOST_COLUMNS, mebibytes } from "./limits.ts";
import { type OddRow, type PartedTable, type PartFault, type PartLimits, partTable } from "./part-table.ts";
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
  /** Limits other than the usual ones. */
  readonly limits?: Partial<PartLimits>;
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
  const parted = partTable(source, {
    mostColumns: MOST_COLUMNS,
    mostCells: MOST_CELLS,
    mostAtOnce: MOST_CELLS_AT_ONCE,
    ...source.limits,
  });
  if (parted.kind === "parted" && parted.rows.length > 0) return parted;
  tellUnparted(parted, source);
  return undefined;
}

function tellUnparted(fault: PartedTable | PartFault, source: SheetSource): void {
  const { file, problems } = source;
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
    case "too-large":
      return problems.add("table-too-large", {
        file,
        found: "more cells",
        detail: String(source.limits?.mostCells ?? MOST_CELLS),
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
  if (width === headers.length) return headers;
  const isEmpty =
    columns.slice(width).every(({ values }) => values.every(isBlank)) &&
    Array.from(odd).every(({ written }) => written().slice(width).every(isBlank));
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
  const isKept = new Uint8Array(rows.length).fill(1);
  let leftOut = 0;
  const tell = oddRowTeller(columns.length, source);
  for (const one of odd) {
    tell(one, rows[one.index]);
    if (one.kind === "short") continue;
    isKept[one.index] = 0;
    leftOut += 1;
  }
  if (leftOut === 0) return { rows: columnRows(read, rows.length), rowNumbers: rows };
  const kept = new Int32Array(rows.length - leftOut);
  let count = 0;
  for (let index = 0; index < rows.length; index++) {
    if (isKept[index] === 0) continue;
    kept[count] = index;
    count += 1;
  }
  const keptColumns = read.map((column) => takeRows(column, kept));
  return { rows: columnRows(keptColumns, kept.length), rowNumbers: kept.map((index) => rows[index]) };
}

const oddCodes = {
  malformed: "malformed-quote",
  unclosed: "unclosed-quote",
  overfull: "too-many-cells",
  short: "too-few-cells",
} as const;

/** Tells rows that have not as many cells as the header, or odd quotes; what stands in more than are told is not looked up. */
function oddRowTeller(width: number, { file, problems }: SheetSource): (odd: OddRow, row: number) => void {
  const told = { malformed: 0, unclosed: 0, overfull: 0, short: 0 };
  const detail = String(width);
  return ({ kind, cells, written }, row) => {
    if (kind === "short" && cells >= width) return;
    told[kind] += 1;
    const text = told[kind] <= MOST_ALIKE ? written().join(",") : "";
    const found = {
      malformed: text,
      unclosed: text,
      overfull: `${cells} cells: ${text}`,
      short: `${cells} cells`,
    };
    problems.add(oddCodes[kind], { file, row, found: found[kind], detail });
  };
}
