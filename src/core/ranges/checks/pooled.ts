import { chiSquareUpperTail } from "../../numeric/chi-square.ts";
import { log } from "../../numeric/elementary.ts";

export interface Pooled {
  /** -2 sum ln p, chi-square with 2 k degrees of freedom. */
  readonly statistic: number;
  readonly df: number;
  readonly p: number;
}

/**
 * Fisher's combination of independent p values of several taxa: -2 sum ln p_i is chi-square with 2 k degrees of
 * freedom where each p_i is uniform; where they are discrete it rejects less often than it says.
 *
 * Undefined without a value.
 * Source: R. A. Fisher 1932, Statistical Methods for Research Workers, 4th edition, section 21.1 (Oliver & Boyd).
 */
export function fisherPooled(values: readonly number[]): Pooled | undefined {
  if (values.length === 0) return undefined;
  const statistic = -2 * values.reduce((sum, p) => sum + log(p), 0);
  const df = 2 * values.length;
  return { statistic, df, p: chiSquareUpperTail(statistic, df) };
}
