import { exp, log, log1p } from "../numeric/elementary.ts";
import { logGammaDifference } from "../numeric/gamma.ts";
import { minimiseOnInterval } from "../numeric/optimise.ts";

/** Counts of one taxon in the samples of its range that carry information, with the effort of each. */
export interface CountedSamples {
  readonly counts: readonly number[];
  /** One for each count, in the unit that kappa is per: scaled to a mean of 1 by the caller. */
  readonly efforts: readonly number[];
}

/** A shape from here on is as good as Poisson. */
export const POISSON_SHAPE = 1e4;
const LEAST_SHAPE = 1e-3;
/** The shapes that the posterior gives equal prior weight. */
const shapes: readonly number[] = [-4, -3, -2, -1, 0, 1, 2, 3, 4].map((power) => 2 ** power);

export interface FurtherEffort {
  /** Specimens counted in all. */
  readonly total: number;
  /** Effort inside the range, and further effort without a specimen. */
  readonly inside: number;
  readonly further: number;
}

/**
 * The chance, given the total count, that further effort inside the true range holds no specimen:
 * p = G(N + kS) G(k(S + s)) / (G(kS) G(N + k(S + s))), free of the mean; k infinite: (S / (S + s))^N.
 *
 * Assumes counts negative binomial, mean mu e and shape kappa e for effort e, so that a count over several samples is one
 * again, and that given their total they are Dirichlet-multinomial. Specimens are not independent finds: the smaller
 * kappa, the more they come in clumps and the weaker the evidence.
 *
 * @param shape kappa per unit of effort, above 0, or infinite; throws below.
 */
export function countsChance({ total, inside, further }: FurtherEffort, shape: number): number {
  if (!(shape > 0)) throw new RangeError(`countsChance: expected a shape above 0, got ${shape}`);
  if (shape === Number.POSITIVE_INFINITY) return exp(-total * log1p(further / inside));
  return exp(
    logGammaDifference(shape * inside, total) - logGammaDifference(shape * (inside + further), total),
  );
}

/** Log-likelihood of kappa given the total count, up to a constant: Dirichlet-multinomial with weights kappa e. */
function logLikelihood({ counts, efforts }: CountedSamples, shape: number): number {
  const total = counts.reduce((sum, count) => sum + count, 0);
  const effort = efforts.reduce((sum, e) => sum + e, 0);
  return (
    counts.reduce(
      (sum, count, i) => (count === 0 ? sum : sum + logGammaDifference(shape * efforts[i], count)),
      0,
    ) - logGammaDifference(shape * effort, total)
  );
}

/**
 * kappa of largest likelihood given the total count, between 0.001 and 10000: at the upper limit counts vary no more than
 * Poisson ones. Undefined with fewer than two samples or without two specimens, where nothing tells.
 */
export function countsShape(samples: CountedSamples): number | undefined {
  const total = samples.counts.reduce((sum, count) => sum + count, 0);
  if (samples.counts.length < 2 || total < 2) return undefined;
  const [low, high] = [log(LEAST_SHAPE), log(POISSON_SHAPE)];
  const { at } = minimiseOnInterval((x) => -logLikelihood(samples, exp(x)), low, high, { tolerance: 1e-7 });
  return high - at < 1e-3 ? POISSON_SHAPE : exp(at);
}

/**
 * Likelihood of j = 0..M_b barren samples above the last find lying inside the true range, kappa averaged over 2^-4, 2^-3,
 * ... 2^4 with equal prior weight, scaled to 1 at j = 0. @param above efforts of the barren samples, from below upward.
 */
export function countsLikelihood(samples: CountedSamples, above: readonly number[]): Float64Array {
  const total = samples.counts.reduce((sum, count) => sum + count, 0);
  const inside = samples.efforts.reduce((sum, effort) => sum + effort, 0);
  const logs = shapes.map((shape) => logLikelihood(samples, shape));
  const largest = Math.max(...logs);
  const weights = logs.map((value) => exp(value - largest));
  const all = weights.reduce((sum, weight) => sum + weight, 0);
  const likelihood = [1];
  let further = 0;
  for (const effort of above) {
    further += effort;
    const chance = shapes.reduce(
      (sum, shape, i) => sum + weights[i] * countsChance({ total, inside, further }, shape),
      0,
    );
    likelihood.push(chance / all);
  }
  return Float64Array.from(likelihood);
}
