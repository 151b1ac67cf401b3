import { log } from "./elementary.ts";
import { regularisedGammaQ } from "./gamma.ts";
import { findRoot } from "./roots.ts";
import { poissonTerm } from "./saddle-point.ts";

/** Terms below this share of the largest can no longer change the sum. */
const NEGLIGIBLE = 1e-18;

/**
 * e^(−h) Σ_{i<v} h^i/i! from its largest term outward by ratios: neither e^(−h) nor a power over a factorial is
 * ever formed alone, so nothing leaves the range of the doubles on the way.
 */
function evenUpperTail(half: number, v: number): number {
  if (half === 0) return 1;
  const largest = Math.min(v - 1, Math.floor(half));
  let sum = 1;
  for (let i = largest, term = 1; i > 0 && term > NEGLIGIBLE; i--) {
    term *= i / half;
    sum += term;
  }
  for (let i = largest + 1, term = 1; i < v && term > NEGLIGIBLE; i++) {
    term *= half / i;
    sum += term;
  }
  return Math.min(1, poissonTerm(largest, half) * sum);
}

/**
 * Upper tail of the chi-square distribution, P(χ²_ν > x). For even ν = 2v it is the finite sum
 * e^(−x/2) Σ_{i<v} (x/2)^i / i!; for odd ν the incomplete gamma function Q(ν/2, x/2). Cost at most linear in ν when even.
 * @throws RangeError unless x ≥ 0 and ν is a whole number from 1.
 * Source: Abramowitz & Stegun 1964, 26.4.5.
 */
export function chiSquareUpperTail(x: number, degreesOfFreedom: number): number {
  if (!(x >= 0)) throw new RangeError(`chiSquareUpperTail: expected x ≥ 0, got ${x}`);
  requireDegrees("chiSquareUpperTail", degreesOfFreedom);
  if (x === Number.POSITIVE_INFINITY) return 0;
  if (degreesOfFreedom % 2 === 0) return evenUpperTail(0.5 * x, degreesOfFreedom / 2);
  return regularisedGammaQ(0.5 * degreesOfFreedom, 0.5 * x);
}

function requireDegrees(name: string, degreesOfFreedom: number): void {
  if (!Number.isInteger(degreesOfFreedom) || degreesOfFreedom < 1) {
    throw new RangeError(`${name}: expected whole degrees of freedom from 1, got ${degreesOfFreedom}`);
  }
}

/**
 * The x whose **upper** tail is the given probability: P(χ²_ν > x) = q. A level C wants q = 1 − C.
 * @throws RangeError unless 0 < q ≤ 1 and ν is a whole number from 1.
 */
export function chiSquareQuantile(upperTail: number, degreesOfFreedom: number): number {
  requireDegrees("chiSquareQuantile", degreesOfFreedom);
  if (!(upperTail > 0 && upperTail <= 1)) {
    throw new RangeError(`chiSquareQuantile: expected an upper tail in (0, 1], got ${upperTail}`);
  }
  if (upperTail === 1) return 0;
  const target = log(upperTail);
  const excess = (x: number) => log(chiSquareUpperTail(x, degreesOfFreedom)) - target;
  let high = degreesOfFreedom;
  while (excess(high) > 0) high *= 2;
  return findRoot(excess, 0, high);
}
