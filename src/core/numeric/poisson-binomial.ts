/**
 * Chances of 0, 1, ..., k successes among k independent trials with chances p_i: exact, by adding one trial at a time;
 * all terms are positive. Cost k².
 */
export function poissonBinomial(chances: Float64Array): Float64Array {
  const distribution = new Float64Array(chances.length + 1);
  distribution[0] = 1;
  chances.forEach((p, i) => {
    for (let count = i + 1; count > 0; count--)
      distribution[count] = distribution[count] * (1 - p) + distribution[count - 1] * p;
    distribution[0] *= 1 - p;
  });
  return distribution;
}

/** Slack by which a sum of chances may miss its level and still reach it. */
const ROUNDING = 1e-12;

/** The smallest count whose cumulative chance is at least p. */
export function countQuantile(distribution: Float64Array, p: number): number {
  let sum = 0;
  for (let count = 0; count < distribution.length; count++) {
    sum += distribution[count];
    if (sum >= p - ROUNDING) return count;
  }
  return distribution.length - 1;
}
