import { withDecimalPoint } from "../../study/cells.ts";
import type { Sheet } from "../../study/model.ts";
import { type TableDeclaration, tables } from "../../study/tables/index.ts";
import { takeOffApostrophe } from "../apostrophes.ts";
import { baseName } from "../base-name.ts";
import { decodeText, parseRecords, unguardedHeaders } from "../csv.ts";
import { readDataPackage } from "../data-package.ts";
import { decodeBytes } from "../dialect/encoding.ts";
import { packParts } from "./pack-study.ts";
import { MOST_DECIMALS, type WorkbookCell, type WorkbookSheet, workbookParts } from "./workbook-parts.ts";

/** A table among the files: what it is and how its file is written. */
export type WorkbookTable = Pick<Sheet, "file" | "headers" | "columns" | "dialect"> &
  Partial<Pick<Sheet, "table">>;

const LONGEST_NAME = 31;
const LONGEST_CELL = 32_767;
const MOST_ROWS = 1_048_576;

/**
 * The tables among plain files as a workbook, a sheet each with every row at its place: numbers of number columns as
 * numbers shown with the decimals they were written with, everything else as text, whatever it looks like. Settings and
 * other files are no part of it.
 *
 * @throws RangeError where a cell or a table is larger than the format allows
 */
export function packWorkbook(
  files: ReadonlyMap<string, Uint8Array>,
  sheets: readonly WorkbookTable[],
): Uint8Array {
  const guarded = guardedByFile(files);
  const names = new Set<string>();
  const written = sheets.flatMap((sheet): WorkbookSheet[] => {
    const bytes = [...files].find(([path]) => baseName(path) === sheet.file)?.[1];
    const text = bytes && decodeBytes(bytes, sheet.dialect.encoding)?.text;
    if (text === undefined) return [];
    const name = freeName(sheet.table ?? sheet.file, names);
    return [{ name, rows: rowsOf(text, sheet, guarded.get(sheet.file) ?? new Set()) }];
  });
  const encoder = new TextEncoder();
  const parts = [...workbookParts(written)].map(([path, text]) => [path, encoder.encode(text)] as const);
  return packParts(new Map(parts));
}

function guardedByFile(files: ReadonlyMap<string, Uint8Array>): ReadonlyMap<string, ReadonlySet<string>> {
  const bytes = [...files].find(([path]) => baseName(path) === "datapackage.json")?.[1];
  const described = bytes && readDataPackage(decodeText(bytes) ?? "");
  return new Map([...(described?.apostrophes ?? [])].map(([path, columns]) => [baseName(path), columns]));
}

/** A sheet's name as the format allows it, and no other sheet has. */
function freeName(name: string, taken: Set<string>): string {
  const plain = name.replace(/[[\]:*?/\\]/g, " ").slice(0, LONGEST_NAME);
  let own = plain;
  for (let number = 2; taken.has(own.toLowerCase()); number++)
    own = `${plain.slice(0, LONGEST_NAME - 4)} ${number}`;
  taken.add(own.toLowerCase());
  return own;
}

function rowsOf(text: string, sheet: WorkbookTable, guarded: ReadonlySet<string>): WorkbookSheet["rows"] {
  const { file, headers, dialect } = sheet;
  const { records } = parseRecords(text, { delimiter: dialect.delimiter });
  const below = Math.max(0, ...dialect.headerRows, ...dialect.notes.map(({ row }) => row));
  const write = headers.map((header, column) =>
    cellWriter(sheet, { column, isGuarded: guarded.has(header) }),
  );
  return records.map(({ row, cells }) => {
    if (row > MOST_ROWS)
      throw new RangeError(
        `packWorkbook: expected at most ${MOST_ROWS} rows in ${file}, got row ${row}; save it as CSV`,
      );
    const long = cells.find((cell) => cell.length > LONGEST_CELL);
    if (long !== undefined)
      throw new RangeError(
        `packWorkbook: expected cells of at most ${LONGEST_CELL} signs in ${file}, got ${long.length} in row ${row}; save it as CSV`,
      );
    return {
      row,
      cells:
        row <= below
          ? unguardedHeaders(cells, guarded)
          : cells.map((cell, column) => write[column]?.(cell) ?? cell),
    };
  });
}

interface WrittenColumn {
  readonly column: number;
  readonly isGuarded: boolean;
}

/** How a column's cells are written: what they say stays the same. */
function cellWriter(
  { table, columns, dialect }: WorkbookTable,
  { column, isGuarded }: WrittenColumn,
): (cell: string) => WorkbookCell {
  const declared: TableDeclaration | undefined = tables.find(({ name }) => name === table);
  const name = columns[column];
  const type = name === undefined ? undefined : declared?.columns[name]?.type;
  const isNumber = type === "number" || type === "integer" || name === "value";
  return (cell) => {
    const plain = isGuarded ? takeOffApostrophe(cell) : cell;
    if (name !== undefined && !isNumber) return plain;
    const own = isNumber && dialect.decimal === "comma" ? (withDecimalPoint(plain) ?? plain) : plain;
    const number = numberCell(own);
    return number !== undefined && (isNumber || String(number.value) === plain) ? number : own;
  };
}

const isDecimal = /^-?(?:0|[1-9]\d*)(?:\.(\d+))?$/;

/** The number of a plain decimal that a double holds as it is written, trailing zeros aside. */
function numberCell(cell: string) {
  const [, fraction] = isDecimal.exec(cell) ?? [];
  if (!isDecimal.test(cell)) return undefined;
  const value = Number(cell);
  const shortest = fraction === undefined ? cell : cell.replace(/\.?0+$/, "");
  const decimals = fraction?.length ?? 0;
  const isHeld = String(value) === shortest && !Object.is(value, -0);
  return isHeld && (decimals <= MOST_DECIMALS || shortest === cell) ? { value, decimals } : undefined;
}
