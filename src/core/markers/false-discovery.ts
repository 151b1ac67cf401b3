import { expm1, log1p } from "../numeric/elementary.ts";
import { normalCdf, normalQuantile } from "../numeric/normal.ts";

export interface Discoveries {
  readonly isFlagged: readonly boolean[];
  /** p adjusted for the number of tests: flagged where at or below the level. */
  readonly adjusted: readonly number[];
}

/**
 * Benjamini & Hochberg's step-up procedure: with sorted p, the largest k with `p_(k) <= q k/N`, the k smallest are
 * flagged. Controls the expected share of false flags at `q` for independent or positively dependent tests.
 * Benjamini & Hochberg 1995, J. R. Stat. Soc. B 57:289-300, doi:10.1111/j.2517-6161.1995.tb02031.x.
 */
export function benjaminiHochberg(p: readonly number[], q: number): Discoveries {
  const order = ranked(p);
  const adjusted = p.map(() => 1);
  let least = 1;
  for (let k = order.length; k >= 1; k--) {
    least = Math.min(least, (p[order[k - 1]] * p.length) / k);
    adjusted[order[k - 1]] = least;
  }
  return {
    isFlagged: flagSmallest(
      order,
      lastWithin(order, p, (k) => (q * k) / p.length),
    ),
    adjusted,
  };
}

/**
 * Holm's step-down procedure: controls the chance of any false flag at `level`, under any dependence.
 * Holm 1979, Scand. J. Stat. 6:65-70.
 */
export function holm(p: readonly number[], level: number): Discoveries {
  const order = ranked(p);
  const adjusted = p.map(() => 1);
  let largest = 0;
  order.forEach((i, rank) => {
    largest = Math.max(largest, Math.min(1, (p.length - rank) * p[i]));
    adjusted[i] = largest;
  });
  const firstMiss = order.findIndex((i, rank) => p[i] > level / (p.length - rank));
  return { isFlagged: flagSmallest(order, firstMiss < 0 ? order.length : firstMiss), adjusted };
}

/** Chance of at least one false flag among N samples by a one-sided 3-sigma rule, `1 - Phi(3)^N`. */
export function falseThreeSigmaChance(samples: number): number {
  return -expm1(samples * log1p(-normalCdf(-3)));
}

/** One-sided normal quantile that holds the family's level over N independent tests: `Phi^-1((1-level)^(1/N))`. */
export function sidakQuantile(samples: number, level: number): number {
  return -normalQuantile(-expm1(log1p(-level) / samples));
}

function ranked(p: readonly number[]): readonly number[] {
  return p.map((_, i) => i).toSorted((a, b) => p[a] - p[b] || a - b);
}

function lastWithin(order: readonly number[], p: readonly number[], limit: (k: number) => number): number {
  for (let k = order.length; k >= 1; k--) if (p[order[k - 1]] <= limit(k)) return k;
  return 0;
}

function flagSmallest(order: readonly number[], count: number): readonly boolean[] {
  const flagged = order.map(() => false);
  for (const i of order.slice(0, count)) flagged[i] = true;
  return flagged;
}
