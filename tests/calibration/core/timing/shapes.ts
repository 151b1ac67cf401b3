import type { Generator } from "../../../../src/core/numeric/streams.ts";

/** How the density of finds changes from the base of a true range to its end. */
export type Shape = "uniform" | "falling" | "rising";

/** Falling: Beta(1, 2), linearly to nothing. Rising: Beta(2, 1), linearly from nothing. */
const placeOf: Readonly<Record<Shape, (uniform: number) => number>> = {
  uniform: (u) => u,
  falling: (u) => 1 - Math.sqrt(u),
  rising: Math.sqrt,
};

/** Ranges of taxa that start at different levels and all end at one, with their finds from below upward. */
export interface DrawnRange {
  readonly levels: readonly number[];
  readonly base: number;
  readonly last: number;
  readonly lastM: number;
  readonly exponent: number;
}

export const END = 30;
const starts = [0, 3, 7, 1, 12, 5, 2, 9];

export function drawRanges(
  horizons: readonly number[],
  g: Generator,
  { shape = "uniform", ends, isBaseKnown = false, isStartShared = false }: DrawOptions = {},
): readonly DrawnRange[] {
  return horizons.map((n, i) => {
    const start = isStartShared ? 0 : starts[i % starts.length];
    const end = ends?.[i] ?? END;
    const levels = Array.from(
      { length: n },
      () => start + (end - start) * placeOf[shape](g.uniform()),
    ).toSorted((a, b) => a - b);
    const last = levels[n - 1];
    return isBaseKnown
      ? { levels, base: start, last, lastM: last, exponent: n }
      : { levels, base: levels[0], last, lastM: last, exponent: n - 1 };
  });
}

export interface DrawOptions {
  readonly shape?: Shape;
  /** True ends where they differ. */
  readonly ends?: readonly number[];
  readonly isBaseKnown?: boolean;
  /** All true ranges start at 0. */
  readonly isStartShared?: boolean;
}

/** Small and unequal numbers of horizons. */
export const samples: readonly { readonly name: string; readonly horizons: readonly number[] }[] = [
  { name: "3 horizons each", horizons: Array<number>(8).fill(3) },
  { name: "5 horizons each", horizons: Array<number>(8).fill(5) },
  { name: "10 horizons each", horizons: Array<number>(8).fill(10) },
  { name: "20 horizons each", horizons: Array<number>(8).fill(20) },
  { name: "25 to 3 horizons", horizons: [25, 18, 12, 9, 6, 5, 4, 3] },
];
