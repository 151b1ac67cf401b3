import type { Coded } from "../coded.ts";

/** Equal numbers for cells that are equal but for white space around them. */
function trimmedCodes({ values }: Coded<string>): Int32Array {
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
      return trimmed.length === new Set(trimmed).size
        ? column.codes
        : column.codes.map((code) => trimmed[code]);
    }),
    rows,
  );

type FirstAlike = (row: number) => number | undefined;

/** The first row with the same codes in every column; undefined for a row that is the first of its kind. */
export function firstAlike(columns: readonly ArrayLike<number>[], rows: number): FirstAlike {
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

function areAlike(columns: readonly ArrayLike<number>[], one: number, other: number): boolean {
  for (let at = 0; at < columns.length; at++) if (columns[at][one] !== columns[at][other]) return false;
  return true;
}
