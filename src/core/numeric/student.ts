import { logBeta, regularisedBetaOf } from "./beta.ts";
import { exp, log } from "./elementary.ts";
import { normalSurvival } from "./normal.ts";
import { findRoot } from "./roots.ts";

function requireDegrees(name: string, degreesOfFreedom: number): void {
  if (!(degreesOfFreedom > 0)) {
    throw new RangeError(`${name}: expected degrees of freedom above 0, got ${degreesOfFreedom}`);
  }
}

/** From here 1 + t²/ν equals t²/ν as a double. */
const NEGLIGIBLE_ONE = 1e17;
/** Logarithm of almost the largest double. */
const LARGEST_LOG = 709.78;

/** (ν/t²)^(ν/2) / (ν B(ν/2, ½)), in logs since t² itself may overflow. */
function powerTail(t: number, degreesOfFreedom: number): number {
  if (t === Number.POSITIVE_INFINITY) return 0;
  const half = 0.5 * degreesOfFreedom;
  return exp(half * (log(degreesOfFreedom) - 2 * log(t)) - logBeta(half, 0.5)) / degreesOfFreedom;
}

/**
 * Upper tail of Student's t, P(T > t) = ½ I_{ν/(ν+t²)}(ν/2, ½) for t ≥ 0; ν real and positive (Infinity: the normal).
 * @throws RangeError unless ν > 0.
 * Source: Abramowitz & Stegun 1964, 26.7.1.
 */
export function studentUpperTail(t: number, degreesOfFreedom: number): number {
  requireDegrees("studentUpperTail", degreesOfFreedom);
  if (degreesOfFreedom === Number.POSITIVE_INFINITY) return normalSurvival(t);
  if (t < 0) return 1 - studentUpperTail(-t, degreesOfFreedom);
  const ratio = (t / degreesOfFreedom) * t;
  if (ratio > NEGLIGIBLE_ONE) return powerTail(t, degreesOfFreedom);
  const share = { p: 1 / (1 + ratio), complement: ratio / (1 + ratio) };
  return 0.5 * regularisedBetaOf(share, 0.5 * degreesOfFreedom, 0.5);
}

/** t ≥ 0 with P(T > t) = q, for 0 < q < ½: the root in log t of the log of the tail. */
function upperQuantile(q: number, degreesOfFreedom: number): number {
  const target = log(q);
  const excess = (logT: number) => log(studentUpperTail(exp(logT), degreesOfFreedom)) - target;
  let low = -1;
  while (excess(low) < 0) low *= 2;
  if (excess(LARGEST_LOG) > 0) return Number.POSITIVE_INFINITY;
  let high = 1;
  while (excess(high) > 0) high = Math.min(2 * high, LARGEST_LOG);
  return exp(findRoot(excess, low, high, { tolerance: 1e-15 }));
}

/**
 * Quantile of Student's t: t with P(T ≤ t) = p; infinite where t would exceed the doubles (ν below 1, tails below
 * 1e-150).
 * @throws RangeError unless 0 < p < 1 and ν > 0.
 */
export function studentQuantile(p: number, degreesOfFreedom: number): number {
  requireDegrees("studentQuantile", degreesOfFreedom);
  if (!(p > 0 && p < 1)) throw new RangeError(`studentQuantile: expected 0 < p < 1, got ${p}`);
  if (p === 0.5) return 0;
  return p < 0.5 ? -upperQuantile(p, degreesOfFreedom) : upperQuantile(1 - p, degreesOfFreedom);
}
