import { exp, log, log1p } from "./elementary.ts";
import { logGamma, logGammaDifference, stirlingRest } from "./log-gamma.ts";
import { logBinomialTerm, type Share } from "./saddle-point.ts";

const MAXIMUM_TERMS = 100_000;
const HALF_LOG_TWO_PI = 0.9189385332046728;

/** log B(a, b) = log Γ(a) + log Γ(b) − log Γ(a + b) for a, b > 0, without cancellation of large values. */
export function logBeta(a: number, b: number): number {
  const small = Math.min(a, b);
  const large = Math.max(a, b);
  if (large < 10) return logGamma(small) + logGamma(large) - logGamma(small + large);
  if (small < 10) return logGamma(small) - logGammaDifference(large, small);
  const rests = stirlingRest(small) + stirlingRest(large) - stirlingRest(small + large);
  return (
    HALF_LOG_TWO_PI -
    0.5 * log(small) -
    (large - 0.5) * log1p(small / large) -
    small * log1p(large / small) +
    rests
  );
}

/** The continued fraction of I_x(a, b) by Lentz's evaluation; wants x < (a + 1)/(a + b + 2). */
function betaFraction(x: number, a: number, b: number): number {
  let c = 1;
  let d = 1 / (1 - ((a + b) * x) / (a + 1));
  let product = d;
  for (let m = 1; m < MAXIMUM_TERMS; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / (1 + even * d);
    c = 1 + even / c;
    product *= c * d;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / (1 + odd * d);
    c = 1 + odd / c;
    product *= c * d;
    if (Math.abs(c * d - 1) < 2e-16) return product;
  }
  throw new Error(
    `regularisedBeta: expected convergence within ${MAXIMUM_TERMS} terms (x ${x}, a ${a}, b ${b})`,
  );
}

/** x^a (1 − x)^b / (a B(a, b)) times the fraction. */
function directBeta(share: Share, a: number, b: number): number {
  // Γ(a + b) / (Γ(a) Γ(b)) = ab/(a + b) · Γ(a + b + 1) / (Γ(a + 1) Γ(b + 1))
  const term = exp(logBinomialTerm(a, a + b, share));
  return ((term * b) / (a + b)) * betaFraction(share.p, a, b);
}

/** I_x(a, b) with x and 1 − x given apart, so that neither end loses digits. */
export function regularisedBetaOf(share: Share, a: number, b: number): number {
  const { p, complement } = share;
  if (p === 0) return 0;
  if (complement === 0) return 1;
  if (p < (a + 1) / (a + b + 2)) return directBeta(share, a, b);
  return 1 - directBeta({ p: complement, complement: p }, b, a);
}

/**
 * Regularised incomplete beta function, I_x(a, b) = ∫₀ˣ t^(a−1) (1 − t)^(b−1) dt / B(a, b), in [0, 1].
 * The lower tail keeps its relative precision; the upper one is I_{1−x}(b, a).
 * @throws RangeError unless 0 ≤ x ≤ 1 and a, b > 0; Error when the fraction does not converge.
 * Source: continued fraction, NIST Digital Library of Mathematical Functions 8.17.22; prefactor after Loader 2000.
 */
export function regularisedBeta(x: number, a: number, b: number): number {
  if (!(x >= 0 && x <= 1 && a > 0 && b > 0)) {
    throw new RangeError(`regularisedBeta: expected 0 ≤ x ≤ 1, a > 0 and b > 0, got x ${x}, a ${a}, b ${b}`);
  }
  return regularisedBetaOf({ p: x, complement: 1 - x }, a, b);
}
