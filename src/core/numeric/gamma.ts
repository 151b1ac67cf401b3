import { poissonTerm } from "./saddle-point.ts";

export { logGamma, logGammaDifference } from "./log-gamma.ts";

const MAXIMUM_TERMS = 100_000;

/** P(a, x) / (x^a e^(−x) / Γ(a + 1)) = 1 + x/(a + 1) + x²/((a + 1)(a + 2)) + … */
function lowerSeries(a: number, x: number): number {
  let term = 1;
  let sum = 1;
  for (let n = 1; n < MAXIMUM_TERMS; n++) {
    term *= x / (a + n);
    sum += term;
    if (term < sum * 1e-17) return sum;
  }
  throw new Error(
    `regularisedGamma: expected the series to converge within ${MAXIMUM_TERMS} terms (a ${a}, x ${x})`,
  );
}

/** Q(a, x) / (x^a e^(−x) / Γ(a)) by Lentz's evaluation of Legendre's continued fraction. */
function upperFraction(a: number, x: number): number {
  let b = x + 1 - a;
  let c = 1e300;
  let d = 1 / b;
  let product = d;
  for (let n = 1; n < MAXIMUM_TERMS; n++) {
    const numerator = -n * (n - a);
    b += 2;
    d = 1 / (numerator * d + b);
    c = b + numerator / c;
    const factor = c * d;
    product *= factor;
    if (Math.abs(factor - 1) < 2e-16) return product;
  }
  throw new Error(
    `regularisedGamma: expected the fraction to converge within ${MAXIMUM_TERMS} terms (a ${a}, x ${x})`,
  );
}

function requireDomain(name: string, a: number, x: number): void {
  if (!(a > 0 && x >= 0)) throw new RangeError(`${name}: expected a > 0 and x ≥ 0, got a ${a}, x ${x}`);
}

/**
 * Lower regularised incomplete gamma function, P(a, x) = ∫₀ˣ t^(a−1) e^(−t) dt / Γ(a), in [0, 1].
 * @throws RangeError unless a > 0 and x ≥ 0; Error when it does not converge.
 * Source: series and continued fraction, NIST Digital Library of Mathematical Functions 8.11.4 and 8.9.2.
 */
export function regularisedGammaP(a: number, x: number): number {
  requireDomain("regularisedGammaP", a, x);
  if (x === 0) return 0;
  if (x === Number.POSITIVE_INFINITY) return 1;
  return x < a + 1 ? poissonTerm(a, x) * lowerSeries(a, x) : 1 - poissonTerm(a, x) * a * upperFraction(a, x);
}

/** Upper regularised incomplete gamma function, Q(a, x) = 1 − P(a, x), its tail computed directly. */
export function regularisedGammaQ(a: number, x: number): number {
  requireDomain("regularisedGammaQ", a, x);
  if (x === 0) return 1;
  if (x === Number.POSITIVE_INFINITY) return 0;
  return x < a + 1 ? 1 - poissonTerm(a, x) * lowerSeries(a, x) : poissonTerm(a, x) * a * upperFraction(a, x);
}
