import { expm1, log1p } from "../numeric/elementary.ts";

/**
 * Chance to see a taxon in one sample by negative binomial counts: 1 - (1 + mu / kappa)^(-kappa e), where effort e scales
 * mean and shape alike.
 *
 * @param mean mu, mean count at effort 1, 0 or more.
 * @param shape kappa, above 0; small: clumped.
 */
export function detectionByCounts(mean: number, shape: number, effort: number): number {
  return -expm1(-shape * effort * log1p(mean / shape));
}

/**
 * Chance of each taxon's last find to lie in a sample above a level, from its chance to be seen in each sample up to its
 * end: 1 - prod over samples above the level of (1 - d_is). Not conditional on being found at all.
 *
 * @param detections for each taxon, its chance in each sample above the level and within its range.
 */
export function sampledChancesAbove(detections: readonly (readonly number[])[]): Float64Array {
  return Float64Array.from(
    detections,
    (ofTaxon) => 1 - ofTaxon.reduce((missed, chance) => missed * (1 - chance), 1),
  );
}
