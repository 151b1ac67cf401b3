import { type Coded, encode } from "./coded.ts";
import type { List } from "./list.ts";

/** The cells of a table, row by row; where they are kept by column, those columns. */
export interface SheetRows extends List<readonly string[]> {
  readonly columns?: readonly Coded<string>[];
}

/** Rows that are put together from columns when they are asked for. */
class ColumnRows implements SheetRows {
  readonly columns: readonly Coded<string>[];
  readonly length: number;

  constructor(columns: readonly Coded<string>[], length: number) {
    this.columns = columns;
    this.length = length;
  }

  at(index: number): readonly string[] | undefined {
    const row = index < 0 ? index + this.length : index;
    if (!(row >= 0 && row < this.length)) return undefined;
    return this.columns.map(({ values, codes }) => values[codes[row]]);
  }

  *[Symbol.iterator](): Generator<readonly string[]> {
    for (let row = 0; row < this.length; row++)
      yield this.columns.map(({ values, codes }) => values[codes[row]]);
  }
}

/** Rows kept by column: each distinct cell of a column once. */
export const columnRows = (columns: readonly Coded<string>[], length: number): SheetRows =>
  new ColumnRows(columns, length);

/** The columns of rows, so many of them; a cell that a row lacks is blank. */
export function columnsOf(rows: SheetRows, width: number): readonly Coded<string>[] {
  if (rows.columns !== undefined) return rows.columns;
  const all = [...rows];
  return Array.from({ length: width }, (_, column) => encode(all.map((cells) => cells[column] ?? "")));
}

/** The rows with one more cell, the same in each. */
export const withColumn = (rows: SheetRows, cell: string): SheetRows =>
  rows.columns === undefined
    ? Array.from(rows, (cells) => [...cells, cell])
    : columnRows([...rows.columns, { values: [cell], codes: new Uint8Array(rows.length) }], rows.length);
