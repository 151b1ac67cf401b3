import { log } from "./elementary.ts";

function requireDomain(name: string, mean: number, n: number): void {
  if (!Number.isInteger(n) || n < 1 || Number.isNaN(mean)) {
    throw new RangeError(`${name}: expected a mean and a whole n from 1, got mean ${mean}, n ${n}`);
  }
}

/** Densities f_{n+1}(x − j), j = 0 … ⌊x⌋, of the sum of n + 1 uniforms, by a recurrence of positive terms only. */
function shiftedDensities(x: number, n: number): Float64Array {
  const whole = Math.floor(x);
  const densities = new Float64Array(whole + 2);
  densities[whole] = 1;
  for (let m = 2; m <= n + 1; m++) {
    for (let j = 0; j <= whole; j++) {
      const at = x - j;
      densities[j] = (at * densities[j] + (m - at) * densities[j + 1]) / (m - 1);
    }
  }
  return densities;
}

/**
 * P(mean of n independent uniforms on (0, 1) ≤ mean), the Irwin–Hall distribution, exact for every n.
 * From f_{m}(x) = [x f_{m−1}(x) + (m − x) f_{m−1}(x − 1)]/(m − 1) and F_n(x) = Σ_j f_{n+1}(x − j), whose terms are
 * all positive, so that tails keep their relative precision; the usual alternating sum loses all digits near n = 25.
 * Cost n².
 * @throws RangeError unless n is a whole number from 1.
 * Source: Hall 1927, Biometrika 19:240–244, doi 10.1093/biomet/19.3-4.240; recurrence of de Boor 1972, J. Approx.
 * Theory 6:50–62, doi 10.1016/0021-9045(72)90080-9.
 */
export function irwinHallMeanCdf(mean: number, n: number): number {
  requireDomain("irwinHallMeanCdf", mean, n);
  if (mean <= 0) return 0;
  if (mean >= 1) return 1;
  if (mean > 0.5) return 1 - irwinHallMeanCdf(1 - mean, n);
  return shiftedDensities(mean * n, n).reduceRight((sum, density) => sum + density, 0);
}

/** P(mean of n independent uniforms ≥ mean), the upper tail computed directly; domain as {@link irwinHallMeanCdf}. */
export function irwinHallMeanSurvival(mean: number, n: number): number {
  requireDomain("irwinHallMeanSurvival", mean, n);
  return irwinHallMeanCdf(1 - mean, n);
}

/**
 * Density of the sum of n independent uniforms on (0, 1) at x, by the recurrence of positive terms of
 * {@link irwinHallMeanCdf}. Cost n².
 * @throws RangeError unless n is a whole number from 1.
 */
export function irwinHallDensity(x: number, n: number): number {
  requireDomain("irwinHallDensity", x, n);
  if (x < 0 || x > n) return 0;
  if (n === 1) return 1;
  const lower = x > n / 2 ? n - x : x;
  return shiftedDensities(lower, n - 1)[0];
}

/** Densities are kept between this and 1 on the way, their scale apart. */
const LEAST_DENSITY = 1e-100;

/**
 * log f_n(sum), the density of a sum of n independent uniforms on (0, 1), by the same recurrence of positive terms;
 * -Infinity outside (0, n), 0 for n = 1 inside. Never underflows. Cost n min(sum, n - sum).
 * @throws RangeError unless n is a whole number from 1.
 * Source: de Boor 1972, J. Approx. Theory 6:50–62, doi 10.1016/0021-9045(72)90080-9.
 */
export function irwinHallLogDensity(sum: number, n: number): number {
  requireDomain("irwinHallLogDensity", sum, n);
  if (sum <= 0 || sum >= n) return Number.NEGATIVE_INFINITY;
  if (sum > n / 2) return irwinHallLogDensity(n - sum, n);
  const whole = Math.floor(sum);
  const densities = new Float64Array(whole + 2);
  densities[whole] = 1;
  let logScale = 0;
  for (let m = 2; m <= n; m++) {
    let largest = 0;
    for (let j = 0; j <= whole; j++) {
      const at = sum - j;
      densities[j] = (at * densities[j] + (m - at) * densities[j + 1]) / (m - 1);
      largest = Math.max(largest, densities[j]);
    }
    if (largest < LEAST_DENSITY) {
      logScale += log(largest);
      for (let j = 0; j <= whole; j++) densities[j] /= largest;
    }
  }
  return log(densities[0]) + logScale;
}
