import type { Coded } from "../coded.ts";

const hasWhiteEnd = (text: string): boolean => text.trim().length !== text.length;

/** Equal numbers for cells that are equal but for white space around them; undefined where none has any. */
function trimmedCodes({ values }: Coded<string>): Int32Array | undefined {
  if (!values.some(hasWhiteEnd)) return undefined;
  const known = new Map<string, number>();
  return Int32Array.from(values, (text) => {
    const plain = text.trim();
    const code = known.get(plain) ?? known.size;
    known.set(plain, code);
    return code;
  });
}

const mixed = (hash: number, code: number): number => Math.imul((hash ^ code) + 0x7f4a7c15, 0x85ebca6b);

/**
 * The first row with the same cells as a row, white space around them left aside, by place; undefined for a row that is
 * the first of its kind. Rows are asked for from above downward.
 */
export const repeatedRows = (columns: readonly Coded<string>[], rows: number): FirstAlike =>
  firstAlike(
    columns.map((column) => {
      const trimmed = trimmedCodes(column);
      return trimmed === undefined ? column.codes : column.codes.map((code) => trimmed[code]);
    }),
    rows,
  );

type FirstAlike = (row: number) => number | undefined;

/** Combinations of codes that a sieve holds at most: eight million bytes hold them. */
const MOST_COMBINED = 2 ** 26;

/** A bit for each combination of codes that is possible in some columns. */
interface Sieve {
  readonly columns: readonly ArrayLike<number>[];
  readonly sizes: readonly number[];
  readonly bits: Int32Array;
}

/**
 * The first row with the same codes in every column; undefined for a row that is the first of its kind. Rows are asked
 * for from above downward. Most tables never repeat the codes of the columns that differ most: only from the first row
 * that does are rows sought by all their codes.
 */
export function firstAlike(columns: readonly ArrayLike<number>[], rows: number): FirstAlike {
  const sieve = sieveOf(columns, rows);
  if (sieve === undefined) return exactAlike(columns, rows);
  const wasAsked = new Uint8Array(rows);
  let exact: FirstAlike | undefined;
  return (row) => {
    if (exact !== undefined) return exact(row);
    wasAsked[row] = 1;
    if (isNew(sieve, row)) return undefined;
    exact = exactAlike(columns, rows);
    for (let before = 0; before < row; before++) if (wasAsked[before] === 1) exact(before);
    return exact(row);
  };
}

function isNew({ columns, sizes, bits }: Sieve, row: number): boolean {
  let combined = 0;
  for (let at = 0; at < columns.length; at++) combined = combined * sizes[at] + columns[at][row];
  const bit = 1 << (combined & 31);
  if ((bits[combined >>> 5] & bit) !== 0) return false;
  bits[combined >>> 5] |= bit;
  return true;
}

/** A sieve of the columns with most codes, as many as it can hold; undefined for few rows. */
function sieveOf(all: readonly ArrayLike<number>[], rows: number): Sieve | undefined {
  if (rows < 1000) return undefined;
  const columns: ArrayLike<number>[] = [];
  const sizes: number[] = [];
  let combined = 1;
  const bySize = all.map((column) => ({ column, size: sizeOf(column, rows) }));
  for (const { column, size } of bySize.toSorted((a, b) => b.size - a.size)) {
    if (size === 1 || combined * size > MOST_COMBINED) continue;
    combined *= size;
    columns.push(column);
    sizes.push(size);
  }
  return { columns, sizes, bits: new Int32Array(combined / 32 + 1) };
}

function sizeOf(column: ArrayLike<number>, rows: number): number {
  let most = 0;
  for (let row = 0; row < rows; row++) if (column[row] > most) most = column[row];
  return most + 1;
}

function exactAlike(columns: readonly ArrayLike<number>[], rows: number): FirstAlike {
  let size = 16;
  while (size < 2 * rows) size *= 2;
  const slots = new Int32Array(size);
  return (row) => {
    let hash = 0;
    for (let at = 0; at < columns.length; at++) hash = mixed(hash, columns[at][row]);
    let slot = (hash ^ (hash >>> 15)) & (size - 1);
    for (let first = slots[slot] - 1; first !== -1; first = slots[slot] - 1) {
      if (areAlike(columns, first, row)) return first;
      slot = (slot + 1) & (size - 1);
    }
    slots[slot] = row + 1;
    return undefined;
  };
}

/** True for two rows with the same codes in every column. */
export function areAlike(columns: readonly ArrayLike<number>[], one: number, other: number): boolean {
  for (let at = 0; at < columns.length; at++) if (columns[at][one] !== columns[at][other]) return false;
  return true;
}
