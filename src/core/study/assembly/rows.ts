import { type Coded, valueAt } from "../coded.ts";
import type { Sheet } from "../model.ts";
import type { Stand } from "../origin.ts";
import { columnsOf } from "../sheet-rows.ts";
import type { ColumnDeclaration, RowOf, TableDeclaration } from "../tables/declare.ts";
import type { TableName } from "../tables/index.ts";
import { type Assembly, originOf, type ReadSheet, type Row } from "./context.ts";
import { type CellFault, type CellPlace, readCell, tellCell } from "./read-cell.ts";
import { repeatedRows } from "./repeated-rows.ts";

/** The values of a declared table's cells by column, and the rows that can be used. */
export interface ReadCells<T extends TableDeclaration> {
  readonly file: string;
  readonly columns: ColumnsOf<T>;
  readonly rowNumbers: Sheet["rowNumbers"];
  readonly stands?: Coded<Stand>;
  /** Places of the rows without an error, from above downward. */
  readonly usable: Int32Array;
}

type ColumnsOf<T extends TableDeclaration> = { readonly [K in keyof RowOf<T>]: Coded<RowOf<T>[K]> };

/** The validated rows of a declared table; rows with an error are left out, and every error is told. */
export function rowsOf<T extends TableDeclaration & { readonly name: TableName }>(
  table: T,
  assembly: Assembly,
): readonly Row<T>[] {
  const read = readCells(table, assembly);
  return read === undefined ? [] : [...rowsFrom(read, table)];
}

function* rowsFrom<T extends TableDeclaration>(read: ReadCells<T>, table: T): Generator<Row<T>> {
  const { file, rowNumbers, usable, stands } = read;
  const columns = Object.entries<Coded<unknown>>(read.columns);
  for (const index of usable) {
    const cells: Record<string, unknown> = {};
    for (const [name, { values, codes }] of columns) cells[name] = values[codes[index]];
    if (isRowOf(cells, table))
      yield { cells, origin: { file: stands ? valueAt(stands, index).file : file, row: rowNumbers[index] } };
  }
}

/** True where every declared column has its value; `readCells` has checked each one's type. */
function isRowOf<T extends TableDeclaration>(cells: object, table: T): cells is RowOf<T> {
  for (const name in table.columns) if (!(name in cells)) return false;
  return true;
}

const isColumnsOf = <T extends TableDeclaration>(columns: object, table: T): columns is ColumnsOf<T> =>
  Object.keys(table.columns).every((name) => Object.hasOwn(columns, name));

/** Reads every cell of a declared table, each distinct one once, and tells every error; undefined where there is no table. */
export function readCells<T extends TableDeclaration & { readonly name: TableName }>(
  table: T,
  assembly: Assembly,
): ReadCells<T> | undefined {
  const read = assembly.sheets.get(table.name);
  if (!read) return undefined;
  const { sheet } = read;
  const cells = columnsOf(sheet.rows, sheet.columns.length);
  const declared = Object.entries(table.columns).map(([name, column]) =>
    readColumn(cells[sheet.columns.indexOf(name)], column, { name, read }),
  );
  const columns = Object.fromEntries(declared.map(({ name, coded }) => [name, coded]));
  const usable = usableRows({ table, read, assembly, cells, declared });
  if (!isColumnsOf(columns, table)) return undefined;
  const { stands } = read;
  return { file: sheet.file, columns, rowNumbers: sheet.rowNumbers, usable, ...(stands && { stands }) };
}

interface ReadColumn {
  readonly name: string;
  readonly column: ColumnDeclaration;
  readonly coded: Coded<unknown>;
  readonly faults: readonly (CellFault | undefined)[];
  /** By code: 1 for what can be used, and for what is there. */
  readonly isGood: Uint8Array;
  readonly isThere: Uint8Array;
}

const NO_CELL: Coded<string> = { values: [""], codes: new Uint8Array(0) };

function readColumn(
  cells: Coded<string> | undefined,
  column: ColumnDeclaration,
  place: Pick<CellPlace, "name" | "read">,
): ReadColumn {
  const { values, codes } = cells ?? { ...NO_CELL, codes: new Uint8Array(place.read.sheet.rows.length) };
  const read = values.map((text) => readCell(text, column, place));
  return {
    name: place.name,
    column,
    coded: { values: read.map(({ value }) => value), codes },
    faults: read.map(({ fault }) => fault),
    isGood: Uint8Array.from(read, ({ fault }) => (fault === undefined ? 1 : 0)),
    isThere: Uint8Array.from(read, ({ value }) => (value === undefined ? 0 : 1)),
  };
}

interface Reading {
  readonly table: TableDeclaration;
  readonly read: ReadSheet;
  readonly assembly: Assembly;
  readonly cells: readonly Coded<string>[];
  readonly declared: readonly ReadColumn[];
}

/** The rows that can be used; what is wrong with the others is told, from above downward. */
function usableRows(reading: Reading): Int32Array {
  const { table, read, assembly, cells, declared } = reading;
  const { rows, rowNumbers } = read.sheet;
  const firstLike = repeatedRows(cells, rows.length);
  const faulty = declared.filter(({ isGood }) => isGood.includes(0));
  const ways = openWays(table, declared);
  const isOdd = faulty.length > 0 || ways.length > 0;
  const usable = new Int32Array(rows.length);
  let count = 0;
  for (let index = 0; index < rows.length; index++) {
    const first = firstLike(index);
    if (first !== undefined) {
      const found = (rows.at(index) ?? []).join(",");
      const detail = String(rowNumbers[first]);
      assembly.problems.add("duplicate-row", { ...originOf(read, index), found, detail });
    } else if (!isOdd) {
      usable[count] = index;
      count += 1;
    } else if (faulty.some(({ isGood, coded: { codes } }) => isGood[codes[index]] === 0)) {
      tellRow(index, reading);
    } else if (ways.length > 0 && !ways.some((set) => isFilled(set, index))) {
      const detail = (table.oneOf ?? []).map((set) => set.join(" and ")).join(", or ");
      assembly.problems.add("one-of", { ...originOf(read, index), found: "", detail });
    } else {
      usable[count] = index;
      count += 1;
    }
  }
  return usable.subarray(0, count);
}

/** The sets of columns of which a row must fill one; none where every row fills one of them. */
function openWays(
  table: TableDeclaration,
  declared: readonly ReadColumn[],
): readonly (readonly ReadColumn[])[] {
  const ways = (table.oneOf ?? []).map((set) => declared.filter(({ name }) => set.includes(name)));
  return ways.some((set) => set.every(({ isThere }) => !isThere.includes(0))) ? [] : ways;
}

const isFilled = (columns: readonly ReadColumn[], index: number): boolean =>
  columns.every(({ isThere, coded: { codes } }) => isThere[codes[index]] === 1);

/** Tells what is wrong with the cells of a row. */
function tellRow(index: number, { read, assembly, declared }: Reading): void {
  const { sheet } = read;
  const origin = originOf(read, index);
  const stand = read.stands && valueAt(read.stands, index);
  const cells = sheet.rows.at(index) ?? [];
  for (const { name, column, faults, isGood, coded } of declared) {
    const code = coded.codes[index];
    const fault = isGood[code] === 1 ? undefined : faults[code];
    const text = cells[sheet.columns.indexOf(name)] ?? "";
    if (fault !== undefined) tellCell(text, column, { fault, name, ...origin, stand, cells, read, assembly });
  }
}
