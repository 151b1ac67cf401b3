import { exp } from "../numeric/elementary.ts";
import { countQuantile, poissonBinomial } from "../numeric/poisson-binomial.ts";
import { type EffectiveRange, logPivot } from "../ranges/pivot.ts";

/** How many last finds lie above a level if all ranges end together, and the bands that hold the observed number. */
export interface ExpectedLasts {
  readonly expected: number;
  /** Pointwise: the least counts whose cumulative chance reaches (1 - C) / 2 and (1 + C) / 2. */
  readonly low: number;
  readonly high: number;
  /** Simultaneous: the counts with both tails at least half the local level. */
  readonly lowAll: number;
  readonly highAll: number;
}

export interface BandLevels {
  readonly confidence: number;
  /** From `localLevel`. */
  readonly local: number;
}

/**
 * Number of last finds above a level x if every range ends at theta, given each taxon's number of finds:
 * P(M_i <= x) = ((U(x) - U(b_i)) / (U(theta) - U(b_i)))^m_i, so that the number is Poisson-binomial; its mean and exact quantiles.
 *
 * @param chances of each taxon's last find to lie above x, from `chancesAbove`.
 * The smearing of one end over many last finds: P. W. Signor & J. H. Lipps 1982, Geological Society of America Special
 * Paper 190:291-296, doi 10.1130/SPE190-p291.
 */
export function expectedLasts(chances: Float64Array, { confidence, local }: BandLevels): ExpectedLasts {
  const distribution = poissonBinomial(chances);
  const tail = 0.5 * (1 - confidence);
  return {
    expected: chances.reduce((sum, p) => sum + p, 0),
    low: countQuantile(distribution, tail),
    high: countQuantile(distribution, 1 - tail),
    lowAll: countQuantile(distribution, 0.5 * local),
    highAll: chances.length - countQuantile(distribution.toReversed(), 0.5 * local),
  };
}

/** Chance of each taxon's last find to lie above a level, both in effective metres, if its range ends at `end`. */
export function chancesAbove(ranges: readonly EffectiveRange[], level: number, end: number): Float64Array {
  return Float64Array.from(ranges, ({ base, exponent }) => {
    if (level >= end) return 0;
    if (level <= base) return 1;
    return 1 - exp(logPivot({ base, last: level, exponent }, end));
  });
}
