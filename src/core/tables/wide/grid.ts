import type { CsvRecord } from "../csv.ts";

/** Cells of a sheet as it is read here, samples down and taxa across, each with its row in the file. */
export interface Grid {
  readonly height: number;
  readonly width: number;
  readonly at: (row: number, column: number) => string;
  /** The row of the file in which a cell stands, as a spreadsheet counts. */
  readonly rowOf: (row: number, column: number) => number;
  /** The column of the file in which a cell stands. */
  readonly columnOf: (row: number, column: number) => number;
}

/** The records as they stand, or turned so that their columns are rows. */
export function gridOf(records: readonly CsvRecord[], isTurned: boolean): Grid {
  const breadth = records.reduce((most, { cells }) => Math.max(most, cells.length), 0);
  const at = (row: number, column: number) => records[row]?.cells[column]?.trim() ?? "";
  const rowOf = (row: number) => records[row]?.row ?? 0;
  return isTurned
    ? {
        height: breadth,
        width: records.length,
        at: (row, column) => at(column, row),
        rowOf: (_, column) => rowOf(column),
        columnOf: (row) => row,
      }
    : { height: records.length, width: breadth, at, rowOf, columnOf: (_, column) => column };
}

export const columnCells = ({ at, height }: Grid, column: number, from: number): string[] =>
  Array.from({ length: Math.max(0, height - from) }, (_, index) => at(from + index, column));
