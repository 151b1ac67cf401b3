/** Values with masses. */
export interface Weighted {
  readonly values: Float64Array;
  readonly masses: Float64Array;
}

/**
 * Quantiles of weighted values, each value standing for its mass half below and half above it, linear between values.
 * @param probabilities ascending not needed; each in (0, 1).
 * @throws RangeError without mass.
 */
export function weightedQuantiles(
  { values, masses }: Weighted,
  probabilities: readonly number[],
): readonly number[] {
  const order = Uint32Array.from(values, (_, i) => i).sort((a, b) => values[a] - values[b] || a - b);
  const below = new Float64Array(order.length);
  let total = 0;
  order.forEach((index, rank) => {
    below[rank] = total + 0.5 * masses[index];
    total += masses[index];
  });
  if (!(total > 0)) throw new RangeError(`weightedQuantiles: expected mass above 0, got ${total}`);
  return probabilities.map((p) => {
    const target = p * total;
    const after = below.findIndex((mass) => mass >= target);
    if (after <= 0) return values[order[after === 0 ? 0 : order.length - 1]];
    const [a, c] = [order[after - 1], order[after]];
    const step = below[after] - below[after - 1];
    const share = step > 0 ? (target - below[after - 1]) / step : 1;
    return values[a] + share * (values[c] - values[a]);
  });
}
