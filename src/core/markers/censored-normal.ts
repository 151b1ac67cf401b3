import { exp, log } from "../numeric/elementary.ts";
import { logNormalCdf } from "../numeric/normal.ts";

export interface CensoredNormal {
  readonly mean: number;
  readonly sd: number;
  readonly logLikelihood: number;
}

const logSqrtTwoPi = 0.9189385332046727;
const maximumIterations = 200;
const tolerance = 1e-11;
const rounding = 1e-14;
const smallestShare = 1e-12;

/**
 * Maximum likelihood of a normal law where some values are only known to lie below a limit (left-censored).
 *
 * Maximises `sum_det [ln phi((y-mu)/s) - ln s] + sum_cens ln Phi((d-mu)/s)`. In `gamma = mu/s`, `eta = 1/s` it is
 * concave (Olsen 1978, Econometrica 46:1211-1215, doi:10.2307/1911969), so Newton's method with halved steps finds
 * the one maximum. `values` holds the value, or the limit where `isCensored`, on the scale where the law is normal.
 *
 * @throws RangeError without two distinct values measured; Error when it does not converge.
 */
export function fitCensoredNormal(values: readonly number[], isCensored: readonly boolean[]): CensoredNormal {
  const detects = values.filter((_, i) => !isCensored[i]);
  const centre = detects.reduce((a, y) => a + y, 0) / detects.length;
  const spread = Math.sqrt(detects.reduce((a, y) => a + (y - centre) ** 2, 0) / detects.length);
  if (detects.length < 2 || !(spread > 0))
    throw new RangeError(`fitCensoredNormal: expected two distinct measured values, got ${detects.length}`);
  const scaled = values.map((y) => (y - centre) / spread);
  let gamma = 0;
  let eta = 1;
  let state = derivatives(scaled, isCensored, [gamma, eta]);
  for (let pass = 0; pass < maximumIterations; pass++) {
    const [stepGamma, stepEta] = newtonStep(state);
    const near = rounding * (1 + Math.abs(state.value));
    let share = eta + stepEta > 0 ? 1 : (-0.5 * eta) / stepEta;
    let next = derivatives(scaled, isCensored, [gamma + share * stepGamma, eta + share * stepEta]);
    while (next.value < state.value - near && share > smallestShare) {
      share /= 2;
      next = derivatives(scaled, isCensored, [gamma + share * stepGamma, eta + share * stepEta]);
    }
    gamma += share * stepGamma;
    eta += share * stepEta;
    state = next;
    if (share * (Math.abs(stepGamma) + Math.abs(stepEta)) < tolerance * (1 + Math.abs(gamma) + eta)) {
      const logLikelihood = state.value - detects.length * log(spread);
      return { mean: centre + (spread * gamma) / eta, sd: spread / eta, logLikelihood };
    }
  }
  throw new Error(`fitCensoredNormal: expected convergence within ${maximumIterations} passes, got none`);
}

interface Derivatives {
  readonly value: number;
  readonly first: readonly [number, number];
  readonly second: readonly [number, number, number];
}

function derivatives(
  values: readonly number[],
  isCensored: readonly boolean[],
  [gamma, eta]: readonly [number, number],
): Derivatives {
  let value = 0;
  let g = 0;
  let e = 0;
  let gg = 0;
  let ge = 0;
  let ee = 0;
  values.forEach((y, i) => {
    const z = eta * y - gamma;
    if (!isCensored[i]) {
      value += log(eta) - 0.5 * z * z - logSqrtTwoPi;
      g += z;
      e += 1 / eta - z * y;
      gg -= 1;
      ge += y;
      ee -= 1 / (eta * eta) + y * y;
      return;
    }
    const logShare = logNormalCdf(z);
    const mills = exp(-0.5 * z * z - logSqrtTwoPi - logShare);
    const bend = mills * (mills + z);
    value += logShare;
    g -= mills;
    e += mills * y;
    gg -= bend;
    ge += bend * y;
    ee -= bend * y * y;
  });
  return { value, first: [g, e], second: [gg, ge, ee] };
}

function newtonStep({ first: [g, e], second: [gg, ge, ee] }: Derivatives): readonly [number, number] {
  const determinant = gg * ee - ge * ge;
  return [-(ee * g - ge * e) / determinant, -(gg * e - ge * g) / determinant];
}

/**
 * Mean of a lognormal concentration known to lie below its detection limit:
 * `E[C|C<DL] = exp(mu+s^2/2) Phi(u-s)/Phi(u)`, `u = (ln DL - mu)/s`, with `mu`, `s` of the natural logarithm.
 */
export function meanBelowLimit(limit: number, { mean, sd }: { mean: number; sd: number }): number {
  const u = (log(limit) - mean) / sd;
  return exp(mean + (sd * sd) / 2 + logNormalCdf(u - sd) - logNormalCdf(u));
}

/** Standard deviation of the same: from `E[C^2|C<DL] = exp(2mu+2s^2) Phi(u-2s)/Phi(u)`. */
export function sdBelowLimit(limit: number, { mean, sd }: { mean: number; sd: number }): number {
  const u = (log(limit) - mean) / sd;
  const second = exp(2 * mean + 2 * sd * sd + logNormalCdf(u - 2 * sd) - logNormalCdf(u));
  return Math.sqrt(Math.max(0, second - meanBelowLimit(limit, { mean, sd }) ** 2));
}
