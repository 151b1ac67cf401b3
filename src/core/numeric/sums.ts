import { exp, log } from "./elementary.ts";

/**
 * Sum with the lost low digits carried along, so that the error does not grow with the number of terms.
 * Source: Neumaier 1974, Z. Angew. Math. Mech. 54:39–51, doi 10.1002/zamm.19740540106.
 */
export function compensatedSum(values: Iterable<number>): number {
  let sum = 0;
  let lost = 0;
  for (const value of values) {
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  return Number.isFinite(sum) ? sum + lost : sum;
}

/** log Σ e^(xᵢ) without overflow; −Infinity for no terms. */
export function logSumExp(values: readonly number[] | Float64Array): number {
  let largest = Number.NEGATIVE_INFINITY;
  for (const value of values) if (value > largest) largest = value;
  if (!Number.isFinite(largest)) return largest;
  let sum = 0;
  for (const value of values) sum += exp(value - largest);
  return largest + log(sum);
}

function requireSome(name: string, values: readonly number[] | Float64Array): void {
  if (values.length === 0) throw new RangeError(`${name}: expected at least one value, got none`);
}

/** Arithmetic mean. @throws RangeError for no values. */
export function mean(values: readonly number[] | Float64Array): number {
  requireSome("mean", values);
  return compensatedSum(values) / values.length;
}

/**
 * Quantile by linear interpolation between order statistics, at position (n − 1)p: type 7 of Hyndman & Fan 1996,
 * The American Statistician 50:361–365, doi 10.1080/00031305.1996.10473566.
 * @throws RangeError for no values, or unless 0 ≤ p ≤ 1.
 */
export function quantile(values: readonly number[] | Float64Array, p: number): number {
  requireSome("quantile", values);
  if (!(p >= 0 && p <= 1)) throw new RangeError(`quantile: expected 0 ≤ p ≤ 1, got ${p}`);
  const sorted = Float64Array.from(values).toSorted();
  const position = (sorted.length - 1) * p;
  const below = Math.floor(position);
  const lower = sorted[below];
  const upper = sorted[Math.min(below + 1, sorted.length - 1)];
  return lower + (position - below) * (upper - lower);
}

/** The middle value, or the mean of the two middle values. @throws RangeError for no values. */
export function median(values: readonly number[] | Float64Array): number {
  requireSome("median", values);
  const sorted = Float64Array.from(values).toSorted();
  const half = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[half] : 0.5 * (sorted[half - 1] + sorted[half]);
}

/** Median of |xᵢ − median|, not scaled: 1.4826 times it estimates the standard deviation of normal data. */
export function medianAbsoluteDeviation(values: readonly number[] | Float64Array): number {
  const middle = median(values);
  return median(Float64Array.from(values, (value) => Math.abs(value - middle)));
}
