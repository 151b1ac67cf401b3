import { exp, expm1, log1p } from "../numeric/elementary.ts";

/**
 * What is thought of the end before the finds are seen: equally likely at every level (`flat`), or in proportion to 1
 * over the length of the range (`scale`). Both ends alike where the base is unknown.
 */
export type EndPrior = "scale" | "flat";

/**
 * e: the posterior density of the end theta falls as (theta - b)^(-e). For uniform finds e is m + 1 with the scale
 * prior (its bound is that of `uniform`), and m with flat ones; the unknown base is integrated out.
 *
 * @param exponent m: n - 1 with the first find as base, n with a known one.
 * After D. Strauss & P. M. Sadler 1989, Mathematical Geology 21:411-427, doi 10.1007/BF00897326.
 */
export function posteriorPower(exponent: number, prior: EndPrior): number {
  return prior === "scale" ? exponent + 1 : exponent;
}

export interface EndPosterior {
  /** e of `posteriorPower`. */
  readonly power: number;
  /** (H - M) / (M - b): the end is known to lie no higher than that; absent where nothing limits it. */
  readonly limit?: number;
}

/**
 * The quantile p of the end, as a multiple of M - b above the last find: (1 - p (1 - h^(1-e)))^(1/(1-e)) - 1, with
 * h = (H - b) / (M - b); h^p - 1 for e = 1.
 *
 * Undefined where the posterior has no total: no limit and e of 1 or less.
 *
 * @param p in (0, 1); throws otherwise.
 * After Strauss & Sadler 1989, doi 10.1007/BF00897326.
 */
export function bayesExtension({ power, limit }: EndPosterior, p: number): number | undefined {
  if (!(p > 0 && p < 1))
    throw new RangeError(`bayesExtension: expected a level between 0 and 1, got ${p} (p)`);
  if (limit === undefined) return power > 1 ? expm1(log1p(-p) / (1 - power)) : undefined;
  const logLimit = log1p(limit);
  if (power === 1) return expm1(p * logLimit);
  return expm1(log1p(p * expm1((1 - power) * logLimit)) / (1 - power));
}

/**
 * The share of the posterior without a limit that lies beyond `extension` times M - b above the last find:
 * (1 + a)^(1-e). 1 for e of 1 or less: nothing but the prior says where the end is.
 */
export function shareBeyond(power: number, extension: number): number {
  return power > 1 ? exp((1 - power) * log1p(extension)) : 1;
}

/**
 * What the bound with flat priors covers in repeated sampling of uniform finds: 1 - (1 - C)^(m / (m - 1)), more than
 * C. Throws for m below 2, where there is no bound.
 */
export function flatPriorCoverage(exponent: number, confidence: number): number {
  if (!(exponent >= 2))
    throw new RangeError(`flatPriorCoverage: expected 2 or more, got ${exponent} (exponent)`);
  return -expm1((exponent / (exponent - 1)) * log1p(-confidence));
}
