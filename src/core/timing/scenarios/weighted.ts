import { exp } from "../../numeric/elementary.ts";

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
  const order = Uint32Array.from(values, (_, i) => i).toSorted((a, b) => values[a] - values[b] || a - b);
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

/** Gathers values in (0, longest) with masses given by their logarithms. */
export interface MassBins {
  readonly add: (value: number, logMass: number) => void;
  /** Undefined without mass. */
  readonly build: () => Weighted | undefined;
}

/** Bins are narrow near 0: their edges are longest (i / BINS)^2. */
const BINS = 1000;

/** Each bin keeps its mass and its mean value; masses are relative to the largest. */
export function massBins(longest: number): MassBins {
  const masses = new Float64Array(BINS);
  const moments = new Float64Array(BINS);
  let scale = Number.NEGATIVE_INFINITY;
  const add = (value: number, logMass: number) => {
    if (!(logMass > scale - NEGLIGIBLE)) return;
    if (logMass > scale + RESCALE) {
      const factor = exp(scale - logMass);
      for (let i = 0; i < BINS; i++) {
        masses[i] *= factor;
        moments[i] *= factor;
      }
      scale = logMass;
    }
    const bin = Math.min(BINS - 1, Math.floor(BINS * Math.sqrt(Math.max(0, value) / longest)));
    const mass = exp(logMass - scale);
    masses[bin] += mass;
    moments[bin] += mass * value;
  };
  const build = () => {
    const filled = Array.from(masses, (_, i) => i).filter((i) => masses[i] > 0);
    if (filled.length === 0) return undefined;
    return {
      values: Float64Array.from(filled, (i) => moments[i] / masses[i]),
      masses: Float64Array.from(filled, (i) => masses[i]),
    };
  };
  return { add, build };
}

/** Masses this far below the largest in ln are left out; a larger one by this much resets the scale. */
const NEGLIGIBLE = 40;
const RESCALE = 10;
