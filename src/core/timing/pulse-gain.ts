import { log } from "../numeric/elementary.ts";

/** Last finds, bases and exponents side by side, from the lowest last find upward. */
export interface SortedRanges {
  readonly lasts: Float64Array;
  readonly bases: Float64Array;
  /** Whole numbers. */
  readonly exponents: Float64Array;
}

/** Products stay below this before their logarithm is taken. */
const LARGEST_PRODUCT = 1e140;

/**
 * Whether the gain in likelihood by a second pulse reaches `gain`: 2 (ll_2 - ll_1) =
 * 2 max over i < k of sum over l <= i of m_l ln((M* - b_l) / (M_(i) - b_l)). The same gain as from `fitPulses`, made for a
 * bootstrap that asks thousands of times: M_(i) replaced by M_(l) bounds each sum from above, so that most are never formed, and one
 * logarithm serves many factors.
 */
export function secondPulseReaches({ lasts, bases, exponents }: SortedRanges, gain: number): boolean {
  const needed = 0.5 * gain;
  if (needed <= 0) return true;
  const highest = lasts[lasts.length - 1];
  let bound = 0;
  for (let i = 0; i < lasts.length - 1; i++) {
    bound += exponents[i] * log((highest - bases[i]) / (lasts[i] - bases[i]));
    if (bound >= needed && gainAt(i, { lasts, bases, exponents }) >= needed) return true;
  }
  return false;
}

/** sum over l <= i of m_l ln((M* - b_l) / (M_(i) - b_l)) */
function gainAt(i: number, { lasts, bases, exponents }: SortedRanges): number {
  const highest = lasts[lasts.length - 1];
  let product = 1;
  let sum = 0;
  for (let l = 0; l <= i; l++) {
    const ratio = (highest - bases[l]) / (lasts[i] - bases[l]);
    const factor = wholePower(ratio, exponents[l]);
    if (factor < LARGEST_PRODUCT) product *= factor;
    else sum += exponents[l] * log(ratio);
    if (product > LARGEST_PRODUCT) {
      sum += log(product);
      product = 1;
    }
  }
  return sum + log(product);
}

function wholePower(base: number, exponent: number): number {
  let power = 1;
  let square = base;
  for (let rest = exponent; rest > 0; rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) power *= square;
    square *= square;
  }
  return power;
}
