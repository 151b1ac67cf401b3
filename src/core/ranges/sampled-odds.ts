import { exp, log } from "../numeric/elementary.ts";
import { findRoot } from "../numeric/roots.ts";

/** Sampled horizons of one taxon whose odds of a find differ, from below upward. */
export interface SampledOdds {
  /** Odds of the N' horizons of the range that carry information, up to a common factor. */
  readonly inRange: readonly number[];
  /** n': those of them with the taxon. */
  readonly finds: number;
  /** Odds of the barren horizons above the highest find. */
  readonly above: readonly number[];
}

/** Odds are taken between these factors of their mean when they are brought near n' finds. */
const WIDEST = 60;

/**
 * p(j) for j = 0..M_b where detection differs between horizons: the chance, given n' finds, that j further horizons
 * inside the true range would all be barren, e_n'(w_1..w_N') / e_n'(w_1..w_N'+j) with e the elementary symmetric
 * polynomial of the odds w_i = p_i / (1 - p_i), known up to a common factor. Equal odds give `barrenChances`.
 *
 * Assumes independent finds; given their number their places follow a conditional Bernoulli law, free of the common
 * factor. Computed as chances of n' finds at a factor that makes n' likely, so that nothing overflows: O(N n').
 *
 * Throws unless all odds are above 0.
 * After R. E. Weiss & C. R. Marshall 1999, Mathematical Geology 31:435-453; S. X. Chen & J. S. Liu 1997, Statistica
 * Sinica 7:875-892.
 */
export function oddsChances({ inRange, finds, above }: SampledOdds): Float64Array {
  if (![...inRange, ...above].every((odds) => odds > 0))
    throw new RangeError("oddsChances: expected odds above 0");
  const chances = new Float64Array(above.length + 1).fill(1);
  if (finds === 0) return chances;
  const factor = likelyFactor(inRange, finds);
  const found = new Float64Array(finds + 1);
  found[0] = 1;
  for (const odds of inRange) addHorizon(found, factor * odds);
  const inside = found[finds];
  let barren = 1;
  above.forEach((odds, j) => {
    addHorizon(found, factor * odds);
    barren /= 1 + factor * odds;
    chances[j + 1] = Math.min(chances[j], (inside * barren) / found[finds]);
  });
  return chances;
}

/** The largest j with p(j) > 1 - C, as `furthestBarren`; p within 1e-12 of 1 - C counts as rejected. */
export function furthestOfChances(chances: Float64Array, confidence: number): number {
  const alpha = (1 - confidence) * (1 + 1e-12);
  let furthest = 0;
  while (furthest + 1 < chances.length && chances[furthest + 1] > alpha) furthest++;
  return furthest;
}

/** The chances of 0..n' finds with one horizon more. */
function addHorizon(found: Float64Array, odds: number): void {
  const p = odds / (1 + odds);
  for (let k = found.length - 1; k > 0; k--) found[k] = found[k] * (1 - p) + found[k - 1] * p;
  found[0] *= 1 - p;
}

/** The common factor at which n' finds are expected in the range, half a find less where every horizon has one. */
function likelyFactor(inRange: readonly number[], finds: number): number {
  const target = Math.min(finds, inRange.length - 0.5);
  const mean = inRange.reduce((sum, odds) => sum + log(odds), 0) / inRange.length;
  const excess = (logFactor: number) => {
    const factor = exp(logFactor);
    return inRange.reduce((sum, odds) => sum + (factor * odds) / (1 + factor * odds), 0) - target;
  };
  return exp(findRoot(excess, -mean - WIDEST, -mean + WIDEST, { tolerance: 1e-6 }));
}
