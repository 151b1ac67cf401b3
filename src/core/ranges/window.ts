import { expm1, log1p } from "../numeric/elementary.ts";
import { type EffectiveRange, isUninformative, pivot } from "./pivot.ts";

export interface Persistence {
  /** Chance that the last find lies this low if the taxon persisted to the level. */
  readonly p: number;
  /** Evidence for persistence over an end before the level; absent where the level is the last find. */
  readonly evidenceRatio?: number;
}

/**
 * Could the taxon have lived to a level T above its last find? p = (t_n / T)^m, times measured from the working base;
 * evidence ratio persisting : ended, with a flat prior of the end on (0, T) in the coordinate of the range,
 * (m - 1) / ((T / t_n)^(m - 1) - 1), and 1 / ln(T / t_n) for m = 1.
 *
 * Assumes finds uniform over the true range. Undefined with no informative find, no length, or T below the last find.
 * After A. R. Solow 1993, Ecology 74:962-964; A. R. Solow 2005, Mathematical Biosciences 195:47-55.
 */
export function persistence(range: EffectiveRange, level: number): Persistence | undefined {
  if (isUninformative(range) || level < range.last) return undefined;
  const p = pivot(range, level);
  const logRatio = log1p((level - range.last) / (range.last - range.base));
  if (logRatio === 0) return { p };
  const e = range.exponent - 1;
  const evidenceRatio = e === 0 ? 1 / logRatio : e / expm1(e * logRatio);
  return { p, evidenceRatio };
}
