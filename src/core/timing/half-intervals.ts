import { binomialLowerTail, binomialUpperTail } from "../numeric/binomial.ts";
import type { EffectiveRange } from "../ranges/pivot.ts";
import { uniformBound } from "../ranges/uniform.ts";
import { type EndSet, highestLast, informative } from "./common-end.ts";

export interface HalfIntervals {
  /** Upper ends e_(1) <= ... <= e_(k) of the taxa's one-ended 50% intervals. */
  readonly ends: readonly number[];
  /** Exact coverage of `set`: P(r <= Binomial(k, 1/2) <= k - r). */
  readonly coverage: number;
  readonly set: EndSet;
}

export interface HalfTest {
  /** 50% intervals that end below the level. */
  readonly below: number;
  readonly p: number;
}

export interface LargestHalf extends HalfTest {
  /** Where in the interval p is largest, in effective metres. */
  readonly at: number;
}

/**
 * The common end from 50% intervals: if all ranges end at theta, half of the one-ended 50% intervals end below it, each
 * independently of the others. The set is [max(M*, e_(r)), e_(k + 1 - r)] with r the largest rank whose coverage
 * P(r <= Binomial(k, 1/2) <= k - r) is at least the confidence; empty where e_(k + 1 - r) lies below the highest last
 * find. Undefined without an informative taxon, or with too few for the confidence (six for 95%).
 *
 * Assumes uniform recovery in the coordinate of the ranges. After C. R. Marshall 1995, Geology 23:731-734, and C. R. Marshall
 * & P. D. Ward 1996, Science 274:1360-1363.
 */
export function halfIntervals(
  ranges: readonly EffectiveRange[],
  confidence: number,
): HalfIntervals | undefined {
  const ends = halfEnds(ranges);
  const k = ends.length;
  const coverageOf = (rank: number) =>
    binomialLowerTail(k - rank, k, 0.5) - binomialLowerTail(rank - 1, k, 0.5);
  let rank = Math.floor(k / 2);
  while (rank >= 1 && coverageOf(rank) < confidence) rank--;
  if (rank < 1) return undefined;
  const low = Math.max(highestLast(ranges), ends[rank - 1]);
  const high = ends[k - rank];
  const set: EndSet = high < low ? { kind: "empty" } : { kind: "interval", low, high };
  return { ends, coverage: coverageOf(rank), set };
}

/**
 * Two-sided binomial test that half of the 50% intervals end below a level: p = min(1, twice the smaller tail). Below the
 * highest find of any range p is 0. Undefined without an informative taxon.
 */
export function halfTest(ranges: readonly EffectiveRange[], end: number): HalfTest | undefined {
  const ends = halfEnds(ranges);
  if (ends.length === 0) return undefined;
  const below = ends.filter((e) => e < end).length;
  return { below, p: end < highestLast(ranges) ? 0 : twoSided(below, ends.length) };
}

/** The largest p of `halfTest` over an interval of levels, and where: its count changes at the ends of intervals alone. */
export function largestHalfP(
  ranges: readonly EffectiveRange[],
  low: number,
  high: number,
): LargestHalf | undefined {
  const ends = halfEnds(ranges);
  if (ends.length === 0) return undefined;
  const lowest = Math.max(low, highestLast(ranges));
  if (lowest > high) return { below: ends.filter((e) => e < high).length, p: 0, at: high };
  let best: LargestHalf | undefined;
  const steps = [lowest, ...ends.filter((e) => e >= lowest && e < high)];
  steps.forEach((at, i) => {
    const below = ends.filter((e) => (i === 0 ? e < at : e <= at)).length;
    const p = twoSided(below, ends.length);
    if (best === undefined || p > best.p) best = { below, p, at };
  });
  return best;
}

function halfEnds(ranges: readonly EffectiveRange[]): number[] {
  return informative(ranges)
    .map((range) => uniformBound(range, 0.5) ?? range.last)
    .toSorted((a, b) => a - b);
}

function twoSided(count: number, of: number): number {
  return Math.min(1, 2 * Math.min(binomialLowerTail(count, of, 0.5), binomialUpperTail(count, of, 0.5)));
}
