/** A cell that differs between two runs of the same table. */
export interface Difference {
  readonly table: string;
  /** As a spreadsheet counts; absent where the whole table is meant. */
  readonly row?: number;
  readonly column?: string;
  readonly was: string;
  readonly now: string;
}

/** A table as it stands in a file: its header cells and its rows, all as text. */
export type CellReader = (text: string) => {
  readonly headers: readonly string[];
  readonly rows: readonly (readonly string[])[];
};

/** Compares result tables by name, cell by cell; the text of a number is its exact value, so text decides. */
export function compareTables(
  before: ReadonlyMap<string, string>,
  after: ReadonlyMap<string, string>,
  readCells: CellReader,
): readonly Difference[] {
  const names = [...new Set([...before.keys(), ...after.keys()])].toSorted();
  return names.flatMap((table) => {
    const [was, now] = [before.get(table), after.get(table)];
    if (was === now) return [];
    if (was === undefined) return [{ table, was: "no such table", now: "a table" }];
    if (now === undefined) return [{ table, was: "a table", now: "no such table" }];
    return compareCells(table, readCells(was), readCells(now));
  });
}

type Cells = ReturnType<CellReader>;

function compareCells(table: string, was: Cells, now: Cells): Difference[] {
  if (was.headers.join() !== now.headers.join())
    return [{ table, row: 1, was: was.headers.join(), now: now.headers.join() }];
  const differences: Difference[] = [];
  for (let i = 0; i < Math.max(was.rows.length, now.rows.length); i++) {
    const [old, fresh] = [was.rows[i], now.rows[i]];
    const row = i + 2;
    if (old === undefined) differences.push({ table, row, was: "no such row", now: fresh.join() });
    else if (fresh === undefined) differences.push({ table, row, was: old.join(), now: "no such row" });
    else
      for (const [k, column] of was.headers.entries())
        if (old[k] !== fresh[k])
          differences.push({ table, row, column, was: old[k] ?? "", now: fresh[k] ?? "" });
  }
  return differences;
}
