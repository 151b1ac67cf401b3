import { chiSquareQuantile } from "../numeric/chi-square.ts";
import { expm1, log, log1p } from "../numeric/elementary.ts";
import { findRoot } from "../numeric/roots.ts";
import { compensatedSum } from "../numeric/sums.ts";
import type { EffectiveRange } from "../ranges/pivot.ts";
import { type EndSet, highestLast } from "./common-end.ts";

/** A range with its finds, from below upward, in effective metres. */
export interface FoundRange extends EffectiveRange {
  readonly levels: readonly number[];
}

/** Taxa with two highest finds at two levels: those that this method can use. */
export function withTwoHighest<Range extends FoundRange>(ranges: readonly Range[]): readonly Range[] {
  return ranges.filter(({ levels: { length: n }, levels }) => n >= 2 && levels[n - 1] > levels[n - 2]);
}

/**
 * The common end from the two highest finds of each taxon: every theta from the highest last find with
 * -2 sum ln(1 - W_i(theta)) up to the C quantile of chi-square with 2 k degrees of freedom, where
 * W_i = ((theta - M_i) / (theta - x_(i, n - 1)))^beta are independent and uniform on (0, 1) at the true end. Empty where
 * no common end fits. Taxa with one find are left out of the sum; their finds still bound the end from below.
 *
 * Assumes only that near the end the density of finds falls as (theta - x)^(beta - 1): a decline of recovery lower down
 * does no harm, which makes it the bound to trust where recovery declines, with beta at least as steep as the decline.
 * Undefined without a usable taxon. Ours, after D. S. Robson & J. H. Whitlock 1964, Biometrika 51:33-39, doi
 * 10.1093/biomet/51.1-2.33, and A. R. Solow 2003, Paleobiology 29:181-185.
 *
 * @param tail beta, above 0; throws otherwise.
 */
export function twoHighestEnd(ranges: readonly FoundRange[], confidence: number, tail: number): EndSet {
  if (!(tail > 0)) throw new RangeError(`twoHighestEnd: expected a tail above 0, got ${tail}`);
  const kept = withTwoHighest(ranges);
  if (kept.length === 0) return { kind: "undefined" };
  const limit = chiSquareQuantile(1 - confidence, 2 * kept.length);
  const lowest = highestLast(ranges);
  const excess = (end: number) =>
    2 * compensatedSum(kept.map(({ levels }) => -logChance(levels, end, tail))) - limit;
  if (excess(lowest) > 0) return { kind: "empty" };
  let reach = Math.max(...kept.map(({ levels }) => topGap(levels)));
  while (excess(lowest + reach) <= 0) reach *= 2;
  const above = findRoot((x) => excess(lowest + x), 0, reach, { tolerance: 1e-13 * reach });
  return { kind: "interval", low: lowest, high: lowest + above };
}

/** ln(1 - W): 0 at the last find, falling as the end rises. */
function logChance(levels: readonly number[], end: number, tail: number): number {
  const above = end - levels[levels.length - 1];
  return above <= 0 ? 0 : log(-expm1(-tail * log1p(topGap(levels) / above)));
}

function topGap(levels: readonly number[]): number {
  return levels[levels.length - 1] - levels[levels.length - 2];
}
