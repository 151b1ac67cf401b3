/** Places in a list of distinct values, in as few bytes as they need. */
export type Codes = Uint8Array | Uint16Array | Int32Array;

/**
 * A column of many rows in little memory: each distinct value once, and for each row its place among them. Plain data:
 * it goes from thread to thread as it is.
 */
export interface Coded<T> {
  readonly values: readonly T[];
  readonly codes: Codes;
}

/** Room for codes of so many distinct values, all 0. */
export function codesFor(values: number, rows: number): Codes {
  if (values <= 0x100) return new Uint8Array(rows);
  return values <= 0x10000 ? new Uint16Array(rows) : new Int32Array(rows);
}

export const valueAt = <T>({ values, codes }: Coded<T>, row: number): T => values[codes[row]];

/** The same rows with every distinct value turned into another, once; those that become one are one. */
export function mapValues<T, U>({ values, codes }: Coded<T>, turn: (value: T) => U): Coded<U> {
  const turned = encode(values.map(turn));
  if (turned.values.length === values.length) return { values: turned.values, codes };
  const merged = codesFor(turned.values.length, codes.length);
  for (let row = 0; row < codes.length; row++) merged[row] = turned.codes[codes[row]];
  return { values: turned.values, codes: merged };
}

/** Some of the rows, in the order given, with the values that stand in them, in the order met. */
export function takeRows<T>({ values, codes }: Coded<T>, rows: Int32Array): Coded<T> {
  if (values.length === 1)
    return { values: rows.length === 0 ? [] : values, codes: new Uint8Array(rows.length) };
  const { least, most } = reach(codes, rows);
  const placeOf = new Int32Array(Math.max(0, most - least + 1));
  const met: T[] = [];
  for (let at = 0; at < rows.length; at++) {
    const code = codes[rows[at]];
    if (placeOf[code - least] === 0) placeOf[code - least] = met.push(values[code]);
  }
  const taken = codesFor(met.length, rows.length);
  for (let at = 0; at < rows.length; at++) taken[at] = placeOf[codes[rows[at]] - least] - 1;
  return { values: met, codes: taken };
}

/** The least and the greatest code of some rows: those of one section are often near each other. */
function reach(codes: Codes, rows: Int32Array): { readonly least: number; readonly most: number } {
  let least = Infinity;
  let most = -1;
  for (let at = 0; at < rows.length; at++) {
    const code = codes[rows[at]];
    if (code < least) least = code;
    if (code > most) most = code;
  }
  return { least, most };
}

/** Some of the rows parted by their values, which all differ; those of a value in the order given, values as met. */
export function rowsByValue({ values, codes }: Coded<unknown>, rows: Int32Array): readonly Int32Array[] {
  const counts = new Int32Array(values.length);
  const order: number[] = [];
  for (let at = 0; at < rows.length; at++) {
    const code = codes[rows[at]];
    if (counts[code] === 0) order.push(code);
    counts[code] += 1;
  }
  const parts = Array.from(counts, (count) => new Int32Array(count));
  counts.fill(0);
  for (let at = 0; at < rows.length; at++) {
    const code = codes[rows[at]];
    parts[code][counts[code]] = rows[at];
    counts[code] += 1;
  }
  return order.map((code) => parts[code]);
}

/** How often each distinct value stands in the column. */
export function countValues({ values, codes }: Coded<unknown>): Int32Array {
  const counts = new Int32Array(values.length);
  for (let row = 0; row < codes.length; row++) counts[codes[row]] += 1;
  return counts;
}

/** A column of values that a `Map` tells apart. */
export function encode<T>(items: readonly T[]): Coded<T> {
  const known = new Map<T, number>();
  const codes = Int32Array.from(items, (item) => {
    const code = known.get(item) ?? known.size;
    known.set(item, code);
    return code;
  });
  const narrow = codesFor(known.size, codes.length);
  narrow.set(codes);
  return { values: [...known.keys()], codes: narrow };
}

/** Things given to rows as they are met. */
export interface Numbered<T> extends Coded<T> {
  readonly values: T[];
  readonly codes: Int32Array;
}

export const numbered = <T>(rows: number): Numbered<T> => ({ values: [], codes: new Int32Array(rows) });
