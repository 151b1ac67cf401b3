import { kolmogorovUpperTail } from "../../numeric/kolmogorov.ts";

export interface Distance {
  /** D, the largest difference between the finds' and the uniform distribution function. */
  readonly statistic: number;
  /** Two-sided. */
  readonly p: number;
  /** Interior finds that entered. */
  readonly finds: number;
}

/**
 * Exact two-sided Kolmogorov-Smirnov test that rescaled interior finds are uniform on (0, 1), as they are where recovery
 * is constant in the coordinate, given each taxon's first and last find. The interior finds of several taxa may be
 * given together: they are independent.
 *
 * Undefined without an interior find.
 * Source: Marsaglia, Tsang & Wang 2003, J. Statistical Software 8(18), doi 10.18637/jss.v008.i18.
 */
export function distance(interior: readonly number[]): Distance | undefined {
  const finds = interior.length;
  if (finds === 0) return undefined;
  let statistic = 0;
  Float64Array.from(interior)
    .toSorted()
    .forEach((value, i) => {
      statistic = Math.max(statistic, (i + 1) / finds - value, value - i / finds);
    });
  return { statistic, p: kolmogorovUpperTail(statistic, finds), finds };
}
