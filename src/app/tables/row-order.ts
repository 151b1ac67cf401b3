/** A row that was added: its own number for edits, counting on from the file's rows, and the row it was put above. */
export interface AddedRow {
  readonly row: number;
  /** Absent where it stands behind all rows. */
  readonly above?: number;
}

/** Where added rows stand among those of the file. */
export interface RowOrder {
  /** The last row that the file has. */
  readonly last: number;
  /** Added rows directly above a row of the file, from above downward. */
  readonly above: ReadonlyMap<number, readonly number[]>;
  /** Added rows behind the last. */
  readonly behind: readonly number[];
}

/** The order that adding rows one after another comes to; a row put above another stands directly above it. */
export function rowOrder(added: readonly AddedRow[]): RowOrder {
  const last = Math.min(...added.map(({ row }) => row)) - 1;
  const above = new Map<number, number[]>();
  const behind: number[] = [];
  const lists = new Map<number, number[]>();
  for (const { row, above: below } of added) {
    const list = (below !== undefined && (lists.get(below) ?? listAbove(above, below, last))) || behind;
    const at = below === undefined ? -1 : list.indexOf(below);
    list.splice(at < 0 ? list.length : at, 0, row);
    lists.set(row, list);
  }
  return { last, above, behind };
}

function listAbove(above: Map<number, number[]>, row: number, last: number): number[] | undefined {
  if (row > last) return undefined;
  const list = above.get(row) ?? [];
  above.set(row, list);
  return list;
}

/** The number that the page and a spreadsheet show for each row, by its number for edits, and back. */
export interface RowNumbering {
  readonly shown: (row: number) => number;
  readonly known: (shown: number) => number;
}

const SAME: RowNumbering = { shown: (row) => row, known: (shown) => shown };

/** How rows are counted once rows have been added: as a spreadsheet counts the file with them in it. */
export function rowNumbering(added: readonly AddedRow[]): RowNumbering {
  if (added.length === 0) return SAME;
  const { last, above, behind } = rowOrder(added);
  const shown = new Map<number, number>();
  const starts: { readonly row: number; readonly by: number }[] = [{ row: 0, by: 0 }];
  let by = 0;
  for (const [row, rows] of [...above].toSorted(([a], [b]) => a - b)) {
    for (const [at, own] of rows.entries()) shown.set(own, row + by + at);
    by += rows.length;
    starts.push({ row, by });
  }
  for (const [at, own] of behind.entries()) shown.set(own, last + by + 1 + at);
  const known = new Map([...shown].map(([row, number]) => [number, row]));
  const shiftOf = (row: number) => starts.findLast((start) => start.row <= row)?.by ?? 0;
  return {
    shown: (row) => shown.get(row) ?? row + shiftOf(row),
    known: (number) => known.get(number) ?? number - shiftOfShown(starts, number),
  };
}

const shiftOfShown = (
  starts: readonly { readonly row: number; readonly by: number }[],
  number: number,
): number => starts.findLast(({ row, by }) => row + by <= number)?.by ?? 0;

/** Rows in their order on the page, given those that the file has. */
export function rowsInOrder(given: readonly number[], added: readonly AddedRow[]): readonly number[] {
  if (added.length === 0) return given;
  const { above, behind } = rowOrder(added);
  if (above.size === 0) return [...given, ...behind];
  return [...given.flatMap((row) => [...(above.get(row) ?? []), row]), ...behind];
}
