/** Text after a closing quote, or a quote that nothing closes. */
export type QuoteFault = "malformed" | "unclosed" | undefined;

/** A row that has another number of cells than its table, or odd quotes. */
export interface UnevenRow {
  readonly index: number;
  readonly cells: number;
  /** True where a cell beyond the last column holds something. */
  readonly isOverfull: boolean;
  readonly quotes: QuoteFault;
  /** Where it stands among the bytes. */
  readonly from: number;
  readonly to: number;
}

/** Uneven rows in little memory: a file may hold millions of them. */
export interface UnevenRows extends Iterable<UnevenRow> {
  readonly add: (row: UnevenRow) => void;
}

const NUMBERS = 5;
const FIRST_ROWS = 64;
const faults: readonly QuoteFault[] = [undefined, "malformed", "unclosed"];

export function unevenRows(): UnevenRows {
  let numbers = new Int32Array(NUMBERS * FIRST_ROWS);
  let length = 0;
  return {
    add: ({ index, cells, isOverfull, quotes, from, to }) => {
      if (length + NUMBERS > numbers.length) {
        const more = new Int32Array(2 * numbers.length);
        more.set(numbers);
        numbers = more;
      }
      numbers.set([index, cells, 2 * faults.indexOf(quotes) + (isOverfull ? 1 : 0), from, to], length);
      length += NUMBERS;
    },
    *[Symbol.iterator]() {
      for (let at = 0; at < length; at += NUMBERS) {
        const [index, cells, kind, from, to] = numbers.subarray(at, at + NUMBERS);
        yield { index, cells, isOverfull: kind % 2 === 1, quotes: faults[kind >> 1], from, to };
      }
    },
  };
}
