import { exp, log1p } from "../numeric/elementary.ts";
import { type EffectiveRange, isUninformative } from "./pivot.ts";

/**
 * Upper bound of the true end where the rate of finds is taken as known: M + (M - b) (-ln(1 - C)) / m.
 *
 * Assumes a Poisson process of finds whose rate is exactly m / (M - b): the error of that rate is left out, so the
 * bound covers less than its level (`sightingRateCoverage`). The form without a counting step, so that it does not
 * depend on the unit of height. Undefined with no informative find or no length.
 *
 * @param confidence C, in (0, 1).
 * After G. J. McInerny, D. L. Roberts, A. J. Davy & P. J. Cribb 2006, Conservation Biology 20:562-567,
 * doi 10.1111/j.1523-1739.2006.00377.x.
 */
export function sightingRateBound(range: EffectiveRange, confidence: number): number | undefined {
  requireLevel("sightingRateBound", confidence);
  if (isUninformative(range)) return undefined;
  return range.last - ((range.last - range.base) * log1p(-confidence)) / range.exponent;
}

/** Chance of no find from the last one up to `level`, the rate taken as known: exp(-m (T - t_n) / t_n). */
export function sightingRateChance(range: EffectiveRange, level: number): number | undefined {
  if (isUninformative(range) || level < range.last) return undefined;
  return exp((-range.exponent * (level - range.last)) / (range.last - range.base));
}

/** What the bound of `sightingRateBound` really covers where finds are uniform: 1 - (1 - ln(1 - C) / m)^(-m). */
export function sightingRateCoverage(exponent: number, confidence: number): number {
  requireLevel("sightingRateCoverage", confidence);
  return 1 - exp(-exponent * log1p(-log1p(-confidence) / exponent));
}

/** Times counted in steps from the first sighting, which is not counted itself. */
export interface SteppedRecord {
  readonly sightings: number;
  readonly lastStep: number;
}

/**
 * The same counted in steps, one chance of a sighting each: (1 - n / t_n)^(T - t_n); 0 where every step has one.
 * Throws where T lies before the last sighting. McInerny et al. 2006, doi 10.1111/j.1523-1739.2006.00377.x.
 */
export function steppedSightingChance({ sightings, lastStep }: SteppedRecord, step: number): number {
  if (!(step >= lastStep))
    throw new RangeError(`steppedSightingChance: expected ${lastStep} or later, got ${step} (step)`);
  if (step === lastStep) return 1;
  return sightings >= lastStep ? 0 : exp((step - lastStep) * log1p(-sightings / lastStep));
}

/** The step at which `steppedSightingChance` falls to 1 - C: t_n + ln(1 - C) / ln(1 - n / t_n). */
export function steppedSightingBound({ sightings, lastStep }: SteppedRecord, confidence: number): number {
  requireLevel("steppedSightingBound", confidence);
  return sightings >= lastStep ? lastStep : lastStep + log1p(-confidence) / log1p(-sightings / lastStep);
}

function requireLevel(name: string, confidence: number): void {
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError(`${name}: expected a level between 0 and 1, got ${confidence} (confidence)`);
}
