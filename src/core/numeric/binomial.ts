import { logBeta } from "./beta.ts";
import { exp, log } from "./elementary.ts";
import { logGamma } from "./log-gamma.ts";
import { logBinomialTerm } from "./saddle-point.ts";

/** log of n!/(k!(n − k)!), for whole 0 ≤ k ≤ n. @throws RangeError otherwise. */
export function logChoose(n: number, k: number): number {
  if (!Number.isInteger(n) || !Number.isInteger(k) || k < 0 || k > n) {
    throw new RangeError(`logChoose: expected whole 0 ≤ k ≤ n, got n ${n}, k ${k}`);
  }
  if (k === 0 || k === n) return 0;
  if (n < 50) return logGamma(n + 1) - logGamma(k + 1) - logGamma(n - k + 1);
  return -log(n + 1) - logBeta(k + 1, n - k + 1);
}

function requireDomain(name: string, k: number, n: number, p: number): void {
  if (!Number.isInteger(n) || n < 0 || !Number.isInteger(k) || !(p >= 0 && p <= 1)) {
    throw new RangeError(`${name}: expected whole k, whole n ≥ 0 and 0 ≤ p ≤ 1, got k ${k}, n ${n}, p ${p}`);
  }
}

/** Σ_{i ≥ k} of the binomial terms by their ratios, from the largest down; wants k above the mean. */
function farTail(k: number, n: number, p: number, complement: number): number {
  let term = 1;
  let sum = 1;
  for (let i = k; i < n && term > sum * 1e-18; i++) {
    term *= ((n - i) / (i + 1)) * (p / complement);
    sum += term;
  }
  return Math.min(1, exp(logBinomialTerm(k, n, { p, complement })) * sum);
}

/**
 * P(X ≥ k) for X ~ Binomial(n, p), with full relative precision in the far tail.
 * @throws RangeError unless k and n are whole, n ≥ 0 and 0 ≤ p ≤ 1.
 */
export function binomialUpperTail(k: number, n: number, p: number): number {
  requireDomain("binomialUpperTail", k, n, p);
  if (k <= 0) return 1;
  if (k > n || p === 0) return 0;
  if (p === 1) return 1;
  return k > n * p ? farTail(k, n, p, 1 - p) : 1 - farTail(n - k + 1, n, 1 - p, p);
}

/**
 * P(X ≤ k) for X ~ Binomial(n, p), with full relative precision in the far tail.
 * @throws RangeError unless k and n are whole, n ≥ 0 and 0 ≤ p ≤ 1.
 */
export function binomialLowerTail(k: number, n: number, p: number): number {
  requireDomain("binomialLowerTail", k, n, p);
  if (k >= n) return 1;
  if (k < 0 || p === 1) return 0;
  if (p === 0) return 1;
  return k < n * p ? farTail(n - k, n, 1 - p, p) : 1 - farTail(k + 1, n, p, 1 - p);
}
