import { log } from "../numeric/elementary.ts";
import type { EffectiveRange } from "../ranges/pivot.ts";

/** The best way to let ranges end in K pulses. */
export interface PulseFit {
  /** ll_K = - sum m_i ln(theta_g(i) - b_i). */
  readonly logLikelihood: number;
  /** Levels of the pulses from below upward, in effective metres: each at a last find, the highest at M*. */
  readonly levels: readonly number[];
  /** For each range in the order given, the rank of its pulse from below. */
  readonly pulseOf: readonly number[];
}

/**
 * Largest likelihood of one pulse, two, and on to `most` (at most as many as ranges): each range ends in the lowest pulse at or
 * above its last find, so that groups are neighbours in the order of last finds and pulses sit on last finds; solved by
 * dynamic programming. Ranges must be informative. Cost most x k².
 *
 * The model is not regular: differences of these likelihoods are not chi-square, and information criteria split a single
 * pulse nearly always. Judge them by `pulsesBootstrap` alone.
 * After S. C. Wang & L. Zhong 2018, Paleobiology 44:199-218.
 */
export function fitPulses(ranges: readonly EffectiveRange[], most: number): readonly PulseFit[] {
  const order = [...ranges.keys()].toSorted((a, b) => ranges[a].last - ranges[b].last);
  const sorted = order.map((i) => ranges[i]);
  const costs = groupCosts(sorted);
  const k = sorted.length;
  const fits: PulseFit[] = [];
  let best = costs.map((row) => row[0]);
  const starts: number[][] = [best.map(() => 0)];
  for (let pulses = 1; pulses <= Math.min(most, k); pulses++) {
    if (pulses > 1) {
      const { values, from } = oneMore(best, costs);
      best = values;
      starts.push(from);
    }
    fits.push(traced({ logLikelihood: best[k - 1], starts, sorted, order }));
  }
  return fits;
}

/** costs[j][i]: log-likelihood of sorted ranges i to j ending together at the last find of j. */
function groupCosts(sorted: readonly EffectiveRange[]): number[][] {
  return sorted.map(({ last }, j) => {
    const row = Array<number>(j + 1).fill(0);
    let sum = 0;
    for (let i = j; i >= 0; i--) {
      sum -= sorted[i].exponent * log(last - sorted[i].base);
      row[i] = sum;
    }
    return row;
  });
}

/** From the best of `before` with one pulse fewer; a group never starts at 0. */
function oneMore(before: readonly number[], costs: readonly (readonly number[])[]) {
  const from = before.map(() => 0);
  const values = before.map((_, j) => {
    let best = Number.NEGATIVE_INFINITY;
    for (let i = 1; i <= j; i++) {
      const value = before[i - 1] + costs[j][i];
      if (value > best) [best, from[j]] = [value, i];
    }
    return best;
  });
  return { values, from };
}

interface Trace {
  readonly logLikelihood: number;
  readonly starts: readonly (readonly number[])[];
  readonly sorted: readonly EffectiveRange[];
  readonly order: readonly number[];
}

function traced({ logLikelihood, starts, sorted, order }: Trace): PulseFit {
  const levels: number[] = [];
  const pulseOf = Array<number>(order.length).fill(0);
  let end = order.length - 1;
  for (let pulse = starts.length - 1; pulse >= 0; pulse--) {
    const start = starts[pulse][end];
    levels.unshift(sorted[end].last);
    for (let i = start; i <= end; i++) pulseOf[order[i]] = pulse;
    end = start - 1;
  }
  return { logLikelihood, levels, pulseOf };
}
