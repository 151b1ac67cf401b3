import { exp, log, log1p } from "../numeric/elementary.ts";
import { irwinHallLogDensity } from "../numeric/irwin-hall.ts";
import { findRoot } from "../numeric/roots.ts";

/**
 * Could the taxon have lived to a level T above its last find, where finds thin out (or crowd) exponentially at an
 * unknown rate? p = F(t_n) / F(T): given n and the sum S of the t_i, the finds are uniform on the simplex of that sum
 * within [0, T], whatever the rate.
 *
 * F(x) is x^(n-1) f_n(S / x) up to a constant, f_n the density of a sum of n uniforms, by a recurrence of positive
 * terms: the usual alternating sum loses all digits near n = 25. Cost n^2.
 *
 * @param times distances of the n finds from the working base, in effective metres; 2 or more, the last above 0.
 * @param level T, at or above the last; throws below it.
 * After A. R. Solow 1993, Journal of Mathematical Biology 32:79-82.
 */
export function trendChance(times: readonly number[], level: number): number {
  const { last, sum } = summary(times);
  if (!(level >= last)) throw new RangeError(`trendChance: expected ${last} or more, got ${level} (level)`);
  if (level === last) return 1;
  const n = times.length;
  const logRatio = -(n - 1) * log1p((level - last) / last);
  return Math.min(
    1,
    exp(logRatio + irwinHallLogDensity(sum / last, n) - irwinHallLogDensity(sum / level, n)),
  );
}

/** The chance that `trendChance` never falls below, however high the level: F(t_n), F(T) being 1 from T = S. */
export function leastTrendChance(times: readonly number[]): number {
  const { sum, last } = summary(times);
  return trendChance(times, Math.max(sum, last));
}

/** The level at which `trendChance` falls to 1 - C; undefined where it never does: the record may just be thinning. */
export function trendBound(times: readonly number[], confidence: number): number | undefined {
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError(`trendBound: expected a level between 0 and 1, got ${confidence} (confidence)`);
  if (leastTrendChance(times) > 1 - confidence) return undefined;
  const { sum, last } = summary(times);
  const wanted = log(1 - confidence);
  return findRoot((level) => log(trendChance(times, level)) - wanted, last, Math.max(sum, last));
}

function summary(times: readonly number[]) {
  const last = times[times.length - 1];
  if (times.length < 2 || !(last > 0) || !(times[0] >= 0))
    throw new RangeError(`trendChance: expected 2 times or more above the base, got ${times.length} (times)`);
  return { last, sum: times.reduce((total, t) => total + t, 0) };
}
