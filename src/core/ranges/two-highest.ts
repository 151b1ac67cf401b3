import { expm1, log } from "../numeric/elementary.ts";

/**
 * How many times the distance between the two highest finds the true end lies above the highest, at most:
 * c = 1 / (C^(-1/beta) - 1).
 *
 * Assumes that near the end the density of finds falls as (theta - x)^(beta - 1); needs no base and no model of the
 * rest of the range. (theta - x_n) / (theta - x_(n-1)) is then W^(1/beta), W uniform on (0, 1): exactly where that
 * law holds for the whole range (beta = 1: uniform finds), in the limit of many finds elsewhere.
 *
 * @param confidence C, in (0, 1).
 * @param tail beta, above 0; throws otherwise.
 * @example twoHighestFactor(0.95, 1) is 19.
 * After D. S. Robson & J. H. Whitlock 1964, Biometrika 51:33-39, doi 10.1093/biomet/51.1-2.33; A. R. Solow 2003,
 * Paleobiology 29:181-185.
 */
export function twoHighestFactor(confidence: number, tail: number): number {
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError(
      `twoHighestFactor: expected a level between 0 and 1, got ${confidence} (confidence)`,
    );
  if (!(tail > 0)) throw new RangeError(`twoHighestFactor: expected more than 0, got ${tail} (tail)`);
  return 1 / expm1(-log(confidence) / tail);
}
