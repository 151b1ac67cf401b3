import { exp, log } from "../../numeric/elementary.ts";

/**
 * Is a taxon's highest find isolated, as a reworked or leaked one would be? Given its first and last find the others are
 * uniform between them, so P(x_(n-1) <= observed) = ((x_(n-1) - x_1) / (x_n - x_1))^(n - 2); small p: isolated.
 *
 * @param levels finds from below upward, in effective metres.
 * @returns undefined with fewer than three finds or a range without length.
 * Order statistics of uniform finds; ours.
 */
export function highestFindP(levels: readonly number[]): number | undefined {
  const n = levels.length;
  const range = levels[n - 1] - levels[0];
  if (n < 3 || !(range > 0)) return undefined;
  const share = (levels[n - 2] - levels[0]) / range;
  return share <= 0 ? 0 : exp((n - 2) * log(share));
}
