import { logChoose } from "../../numeric/binomial.ts";
import { exp, log, log1p } from "../../numeric/elementary.ts";
import { irwinHallDensity } from "../../numeric/irwin-hall.ts";
import { logGamma } from "../../numeric/log-gamma.ts";

export interface LargestGap {
  /** The longest gap as a share of the range. */
  readonly share: number;
  /** One-sided, for a gap as long as this or longer. */
  readonly p: number;
}

/** Below this first term the alternating sum keeps twelve digits or more. */
const SAFE_FIRST_TERM = 5;

/**
 * Is the longest gap inside a range longer than constant recovery allows? With s gaps that share a range uniformly,
 * P(longest >= g) = sum over i >= 1 of (-1)^(i + 1) C(s, i) (1 - i g)^(s - 1) over the i with i g < 1. Where its terms
 * would cancel, P(longest <= g) = (s - 1)! g^(s - 1) f_s(1 / g) instead, f_s the density of a sum of s uniforms.
 *
 * Undefined with fewer than two gaps or a range without length.
 * Source: R. A. Fisher 1929, Proceedings of the Royal Society A 125:54-59, doi 10.1098/rspa.1929.0151.
 */
export function largestGap(gaps: readonly number[]): LargestGap | undefined {
  const range = gaps.reduce((sum, gap) => sum + gap, 0);
  if (gaps.length < 2 || !(range > 0)) return undefined;
  const share = Math.max(...gaps) / range;
  return { share, p: largestGapUpperTail(share, gaps.length) };
}

/** P(the longest of `count` gaps takes at least this share of the range). */
export function largestGapUpperTail(share: number, count: number): number {
  if (share >= 1) return 0;
  if (share * count <= 1) return 1;
  const term = (i: number) => exp(logChoose(count, i) + (count - 1) * log1p(-i * share));
  if (term(1) > SAFE_FIRST_TERM) return Math.min(1, 1 - noneLonger(share, count));
  let sum = 0;
  for (let i = 1; i <= count && i * share < 1; i++) sum += i % 2 === 1 ? term(i) : -term(i);
  return Math.min(1, Math.max(0, sum));
}

function noneLonger(share: number, count: number): number {
  const density = irwinHallDensity(1 / share, count);
  return density === 0 ? 0 : exp(logGamma(count) + (count - 1) * log(share) + log(density));
}
