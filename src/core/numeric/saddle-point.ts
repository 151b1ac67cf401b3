import { exp, log, log1p } from "./elementary.ts";
import { logGamma, stirlingRest } from "./log-gamma.ts";

// Loader 2000, "Fast and accurate computation of binomial probabilities", manuscript, Lucent Technologies.
const HALF_LOG_TWO_PI = 0.9189385332046728;
const TWO_PI = 6.283185307179586;

/** δ(n) = log Γ(n + 1) − (n + ½) log n + n − ½ log 2π for n > 0. */
function stirlingError(n: number): number {
  return n >= 10 ? stirlingRest(n) : logGamma(n + 1) - (n + 0.5) * log(n) + n - HALF_LOG_TWO_PI;
}

/** Deviance n log(n/m) + m − n, summed as a series where n and m are close; their difference n − m counts most. */
function deviance(n: number, m: number, difference: number): number {
  if (Math.abs(difference) >= 0.1 * (n + m)) return n * log(n / m) - difference;
  const v = difference / (n + m);
  let sum = difference * v;
  let power = 2 * n * v;
  for (let odd = 3; odd < 100; odd += 2) {
    power *= v * v;
    const next = sum + power / odd;
    if (next === sum) return sum;
    sum = next;
  }
  return sum;
}

/** x^a e^(−x) / Γ(a + 1): the Poisson probability of a (not only whole) at mean x, for a ≥ 0 and x > 0. */
export function poissonTerm(a: number, x: number): number {
  if (a === 0) return exp(-x);
  if (a < 1e-8) return exp(a * log(x) - x - logGamma(a + 1));
  return exp(-stirlingError(a) - deviance(a, x, a - x)) / Math.sqrt(TWO_PI * a);
}

export interface Share {
  readonly p: number;
  /** 1 − p, given apart so that a p near 1 keeps its digits. */
  readonly complement: number;
}

/** log of Γ(n + 1)/(Γ(k + 1) Γ(n − k + 1)) p^k (1 − p)^(n − k), for 0 ≤ k ≤ n, not only whole. */
export function logBinomialTerm(k: number, n: number, { p, complement }: Share): number {
  const rest = n - k;
  if (k === 0) return n * (p < 0.1 ? log1p(-p) : log(complement));
  if (rest === 0) return n * (complement < 0.1 ? log1p(-complement) : log(p));
  if (Math.min(k, rest) < 1e-8) {
    return k * log(p) + rest * log(complement) + logGamma(n + 1) - logGamma(k + 1) - logGamma(rest + 1);
  }
  const errors = stirlingError(n) - stirlingError(k) - stirlingError(rest);
  // The smaller of p and 1 − p carries the difference more exactly.
  const difference = p < complement ? k - n * p : n * complement - rest;
  const deviances = deviance(k, n * p, difference) + deviance(rest, n * complement, -difference);
  return errors - deviances - 0.5 * log((TWO_PI * k * rest) / n);
}
