import { chiSquareQuantile } from "../numeric/chi-square.ts";
import { exp, log } from "../numeric/elementary.ts";
import { findRoot } from "../numeric/roots.ts";
import { compensatedSum } from "../numeric/sums.ts";
import type { Coordinate } from "../ranges/coordinate.ts";
import { type EffectiveRange, isUninformative, logPivot } from "../ranges/pivot.ts";
import { uniformBound } from "../ranges/uniform.ts";

/** A range in the recovery-weighted coordinate, with its highest find as a height. */
export interface PlacedRange extends EffectiveRange {
  readonly lastM: number;
}

export interface DurationBox {
  /** Level of each taxon's own interval: C^(1/k). */
  readonly perTaxonLevel: number;
  /** One-ended upper bounds as heights; undefined beyond the declared recovery. */
  readonly boundsM: readonly (number | undefined)[];
  readonly lowM: number;
  /** Undefined where a taxon's bound lies beyond the declared recovery. */
  readonly highM?: number;
  /** Index of the taxon whose bound decides the upper limit. */
  readonly widest?: number;
}

/**
 * Lower bound, in metres, of the duration: the height between the lowest and the highest true end.
 * T(D) = 2 sum over M_i < M* - D of m_i ln[(U(M* - D) - U(b_i)) / (U(M_i) - U(b_i))]; the bound is the least D >= 0
 * with T(D) at most the C quantile of chi-square with 2 (k - 1) degrees of freedom. Heights are shifted, then mapped:
 * a difference of effective metres is no duration. At D = 0 it is the common-end test.
 *
 * Covers with at least C in every arrangement of true ends, uninformative taxa included (they are dropped from T and
 * df). Undefined with fewer than two informative taxa.
 * After S. C. Wang, A. E. Zimmerman, B. S. McVeigh, P. J. Everson & H. Wong 2012, Paleobiology 38:265-277.
 */
export function durationLowerBound(
  ranges: readonly PlacedRange[],
  coordinate: Coordinate,
  confidence: number,
): number | undefined {
  const kept = ranges.filter((range) => !isUninformative(range));
  if (kept.length < 2) return undefined;
  const highestM = Math.max(...kept.map((range) => range.lastM));
  const spreadM = highestM - Math.min(...kept.map((range) => range.lastM));
  const limit = chiSquareQuantile(1 - confidence, 2 * (kept.length - 1));
  const excess = (durationM: number) => durationStatistic(kept, coordinate, highestM - durationM) - limit;
  return spreadM === 0 || excess(0) <= 0 ? 0 : findRoot(excess, 0, spreadM);
}

function durationStatistic(kept: readonly PlacedRange[], coordinate: Coordinate, levelM: number): number {
  const level = coordinate.toEffective(levelM);
  return 2 * compensatedSum(kept.map((range) => (range.lastM < levelM ? -logPivot(range, level) : 0)));
}

/**
 * Box of the duration, in metres: with u_i the upper bound of each true end at level C^(1/k), as a height, all true
 * ends lie in the box of (M_i, u_i] with C; the duration is then at most max over i != j of u_i - M_j, and at least
 * max M_i - min u_i. Wide, and decided by the rarest taxa; it speaks of the taxa given alone.
 *
 * Undefined with fewer than two informative taxa.
 * After S. C. Wang et al. 2012, Paleobiology 38:265-277; the box is ours.
 */
export function durationBox(
  ranges: readonly PlacedRange[],
  coordinate: Coordinate,
  confidence: number,
): DurationBox | undefined {
  const kept = ranges.filter((range) => !isUninformative(range));
  if (kept.length < 2) return undefined;
  const perTaxonLevel = exp(log(confidence) / kept.length);
  const boundsM = kept.map((range) => {
    const bound = uniformBound(range, perTaxonLevel);
    return bound === undefined ? undefined : coordinate.toHeight(bound, "upper");
  });
  const finite = boundsM.filter((bound) => bound !== undefined);
  const highestM = Math.max(...kept.map((range) => range.lastM));
  const lowM = finite.length === 0 ? 0 : Math.max(0, highestM - Math.min(...finite));
  if (finite.length < kept.length) return { perTaxonLevel, boundsM, lowM };
  const spans = finite.map((bound, i) => bound - lowestOther(kept, i));
  const highM = Math.max(...spans);
  return { perTaxonLevel, boundsM, lowM, highM: Math.max(0, highM), widest: spans.indexOf(highM) };
}

function lowestOther(kept: readonly PlacedRange[], index: number): number {
  return Math.min(...kept.filter((_, i) => i !== index).map((range) => range.lastM));
}
