import { irwinHallMeanCdf } from "../../numeric/irwin-hall.ts";
import { normalCdf } from "../../numeric/normal.ts";
import { compensatedSum } from "../../numeric/sums.ts";

export interface Centroid {
  /** z below 0: finds concentrated low in the ranges, recovery declines upward. */
  readonly z: number;
  /** One-sided, for decline upward. */
  readonly p: number;
  /** Interior finds that entered. */
  readonly finds: number;
}

/** Up to this number of interior finds p is exact (Irwin-Hall); beyond it normal. */
const EXACT_UP_TO = 60;

/**
 * Interior finds of one taxon rescaled by its first and last: (u_i - u_1) / (u_n - u_1), n - 2 of them. Given the two
 * ends they are uniform on (0, 1) where recovery is constant in the coordinate.
 */
export function rescaledInterior(levels: readonly number[]): readonly number[] {
  const first = levels[0];
  const span = levels[levels.length - 1] - first;
  if (levels.length < 3 || !(span > 0)) return [];
  return levels.slice(1, -1).map((level) => (level - first) / span);
}

/**
 * Centroid of rescaled interior finds: z = (mean - 1/2) sqrt(12 N), N the number of finds; exact one-sided p from the
 * sum of N uniforms. Given the finds of several taxa together, z is Stouffer's combination of the taxa's z with weights
 * sqrt(n_i - 2): the weights make it the centroid of all interior finds.
 *
 * Undefined without an interior find. Low power under ten finds: a large p is no evidence of constant recovery.
 * The centroid test of Laplace, as in D. R. Cox & P. A. W. Lewis 1966, The Statistical Analysis of Series of Events.
 */
export function centroid(interior: readonly number[]): Centroid | undefined {
  const finds = interior.length;
  if (finds === 0) return undefined;
  const mean = compensatedSum(interior) / finds;
  const z = (mean - 0.5) * Math.sqrt(12 * finds);
  return { z, p: finds <= EXACT_UP_TO ? irwinHallMeanCdf(mean, finds) : normalCdf(z), finds };
}
