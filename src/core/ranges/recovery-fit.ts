import { kolmogorovUpperTail } from "../numeric/kolmogorov.ts";
import { rescaledInterior } from "./checks/centroid.ts";

export interface RecoveryFit {
  /** Exact two-sided Kolmogorov-Smirnov p. */
  readonly p: number;
  readonly finds: number;
}

/**
 * Do finds fit the recovery that their coordinate is made of? Given the first and the last find of each taxon, the
 * others are uniform between them in the coordinate: exact Kolmogorov-Smirnov test of all of them together.
 * Undefined without such finds.
 *
 * @param levels each taxon's finds in effective metres, from below upward.
 * After C. R. Marshall 1997, Paleobiology 23:165-173.
 */
export function recoveryFit(levels: readonly (readonly number[])[]): RecoveryFit | undefined {
  const interior = levels.flatMap(rescaledInterior).toSorted((a, b) => a - b);
  const finds = interior.length;
  if (finds === 0) return undefined;
  const distance = Math.max(...interior.map((u, i) => Math.max((i + 1) / finds - u, u - i / finds)));
  return { p: kolmogorovUpperTail(distance, finds), finds };
}
