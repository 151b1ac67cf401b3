import { exp, expm1, log } from "../numeric/elementary.ts";

/** Efforts at the sampled horizons of one taxon, from below upward, in any unit. */
export interface SampledEfforts {
  /** Of the horizons of the range that carry information, those with the taxon. */
  readonly withTaxon: readonly number[];
  /** The barren ones among them, added. */
  readonly barrenInRange: number;
  /** N': all of them. */
  readonly inRange: number;
  readonly above: readonly number[];
}

/** Logarithms of likelihood this far below the largest are left out. */
const NEGLIGIBLE = 45;

/**
 * Likelihood of j = 0..M_b barren horizons above the last find lying inside the true range, detection the same at every
 * horizon, p ~ U(0, 1) integrated out: B(1 + n', 1 + N' - n' + j), scaled to 1 at j = 0.
 *
 * After R. E. Weiss & C. R. Marshall 1999, Mathematical Geology 31:435-453.
 */
export function barrenLikelihood(inRange: number, finds: number, barrenAbove: number): Float64Array {
  const likelihood = new Float64Array(barrenAbove + 1).fill(1);
  for (let j = 1; j <= barrenAbove; j++)
    likelihood[j] = (likelihood[j - 1] * (inRange - finds + j)) / (1 + inRange + j);
  return likelihood;
}

/**
 * The same where effort e differs: p_i = 1 - exp(-lambda e_i), efforts scaled to a mean of 1 over the horizons used,
 * lambda ~ Exp(1), which is p ~ U(0, 1) for equal efforts: the integral over lambda of
 * prod (1 - exp(-lambda e_i)) over finds times exp(-lambda (barren effort inside)), by the trapezoid rule in ln lambda,
 * where the integrand is analytic and dies away at both ends. Scaled to 1 at j = 0.
 */
export function effortLikelihood(given: SampledEfforts): Float64Array {
  const { withTaxon, barrenInRange, above } = scaled(given);
  const finds = withTaxon.length;
  const upTo = [0];
  for (const effort of above) upTo.push(upTo[upTo.length - 1] + effort);
  const distinct = [...countsOf(withTaxon)];
  const shared = (x: number) => {
    const lambda = exp(x);
    return (
      distinct.reduce((sum, [effort, count]) => sum + count * log(-expm1(-lambda * effort)), 0) -
      lambda * (1 + barrenInRange) +
      x
    );
  };
  const step = 0.3 / Math.sqrt(finds + 1);
  const { low, high, largest } = spanOf(shared, upTo[upTo.length - 1], step);
  const likelihood = new Float64Array(upTo.length);
  for (let x = low; x <= high; x += step) {
    const weight = exp(shared(x) - largest);
    const lambda = exp(x);
    upTo.forEach((effort, j) => {
      likelihood[j] += weight * exp(-lambda * effort);
    });
  }
  return likelihood.map((value) => value / likelihood[0]);
}

/** How often each effort occurs: many samples are of one size. */
function countsOf(efforts: readonly number[]): ReadonlyMap<number, number> {
  const counts = new Map<number, number>();
  for (const effort of efforts) counts.set(effort, (counts.get(effort) ?? 0) + 1);
  return counts;
}

/** From where the integrand of j = M_b rises to where that of j = 0 has died away, in ln lambda. */
function spanOf(shared: (x: number) => number, allAbove: number, step: number) {
  const withAll = (x: number) => shared(x) - exp(x) * allAbove;
  const high = edgeOf(shared, 0, step);
  const low = edgeOf(withAll, peakOf(withAll, step), -step);
  return { low, high, largest: shared(peakOf(shared, step)) };
}

/** Walks from a starting point, over the maximum if it lies ahead, to where f is negligible. */
function edgeOf(f: (x: number) => number, start: number, step: number): number {
  let x = start;
  let largest = f(x);
  for (;;) {
    x += step;
    const value = f(x);
    if (value > largest) largest = value;
    else if (value < largest - NEGLIGIBLE) return x;
  }
}

function peakOf(f: (x: number) => number, step: number): number {
  let x = 0;
  const up = f(step) > f(0) ? step : -step;
  while (f(x + up) > f(x)) x += up;
  return x;
}

function scaled({ withTaxon, barrenInRange, inRange, above }: SampledEfforts): SampledEfforts {
  const total = [...withTaxon, ...above].reduce((sum, effort) => sum + effort, barrenInRange);
  const mean = total / (inRange + above.length);
  return {
    withTaxon: withTaxon.map((effort) => effort / mean),
    barrenInRange: barrenInRange / mean,
    inRange,
    above: above.map((effort) => effort / mean),
  };
}

/** Stretches that the end may lie in: above barren horizon j, from edges[j] to edges[j + 1]. */
export interface EndPosterior {
  readonly edgesM: readonly number[];
  /** Chance of each stretch; adds to 1. */
  readonly chances: readonly number[];
}

/** A prior of the end flat in height, or giving every stretch between sampled horizons the same weight. */
export type EndPrior = "height" | "count";

/**
 * Posterior of the end by stretch: the last find to the first barren horizon, each barren horizon to the next, the
 * highest to the top of what is thought possible (a stretch without thickness has no chance under either prior).
 * Undefined where no stretch has thickness.
 *
 * @param likelihood of j = 0..M_b. @param edgesM last find, barren horizons and that top, from below upward.
 */
export function endPosterior(
  likelihood: Float64Array,
  edgesM: readonly number[],
  prior: EndPrior,
): EndPosterior | undefined {
  const weights = Array.from(likelihood, (value, j) => {
    const thicknessM = edgesM[j + 1] - edgesM[j];
    return thicknessM > 0 ? value * (prior === "height" ? thicknessM : 1) : 0;
  });
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return total > 0 ? { edgesM, chances: weights.map((weight) => weight / total) } : undefined;
}

/** The height below which the end lies with a chance; the end is spread evenly inside each stretch. */
export function endQuantile({ edgesM, chances }: EndPosterior, chance: number): number {
  let below = 0;
  for (let j = 0; j < chances.length; j++) {
    if (chances[j] > 0 && below + chances[j] >= chance)
      return edgesM[j] + (edgesM[j + 1] - edgesM[j]) * Math.min(1, (chance - below) / chances[j]);
    below += chances[j];
  }
  return edgesM[edgesM.length - 1];
}
