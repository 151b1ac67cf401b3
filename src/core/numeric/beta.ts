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

/**
 * I_x(a, b) B(a, b) / (x^a (1 − x)^b) by the continued fraction of Didonato & Morris, whose leading term a − (a + b)x
 * is formed from the smaller of x and 1 − x, so that large a or b cost no digits.
 */
function betaFraction({ p: x, complement: y }: Share, a: number, b: number): number {
  const c = 1 + (x < y ? a - (a + b) * x : (a + b) * y - b);
  const c1 = 1 + 1 / a;
  let [before, value] = [0, 1];
  let [denominatorBefore, denominator] = [1, c / c1];
  let ratio = c1 / c;
  for (let n = 1; n < MAXIMUM_TERMS; n++) {
    const s = a + 2 * n - 1;
    const p = 1 + (n - 1) / a;
    const w = n * (b - n) * x;
    const alpha = p * (p + b / a) * (a / s) * (a / s) * (w * x);
    const beta = n + w / s + ((1 + n / a) / (c1 + (2 * n) / a)) * (c + n * (1 + y));
    [before, value] = [value, alpha * before + beta * value];
    [denominatorBefore, denominator] = [denominator, alpha * denominatorBefore + beta * denominator];
    const next = value / denominator;
    if (Math.abs(next - ratio) <= 2e-16 * next) return next;
    ratio = next;
    before /= denominator;
    denominatorBefore /= denominator;
    [value, denominator] = [ratio, 1];
  }
  throw new Error(
    `regularisedBeta: expected convergence within ${MAXIMUM_TERMS} terms (x ${x}, a ${a}, b ${b})`,
  );
}

/** x^a (1 − x)^b / B(a, b) times the fraction. */
function directBeta(share: Share, a: number, b: number): number {
  // Γ(a + b) / (Γ(a) Γ(b)) = ab/(a + b) · Γ(a + b + 1) / (Γ(a + 1) Γ(b + 1))
  const term = exp(logBinomialTerm(a, a + b, share));
  return term * (a / (a + b)) * b * betaFraction(share, a, b);
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
 * Source: Didonato & Morris 1992, algorithm 708, ACM Trans. Math. Software 18:360–373, doi 10.1145/131766.131776;
 * prefactor after Loader 2000.
 */
export function regularisedBeta(x: number, a: number, b: number): number {
  if (!(x >= 0 && x <= 1 && a > 0 && b > 0)) {
    throw new RangeError(`regularisedBeta: expected 0 ≤ x ≤ 1, a > 0 and b > 0, got x ${x}, a ${a}, b ${b}`);
  }
  return regularisedBetaOf({ p: x, complement: 1 - x }, a, b);
}
