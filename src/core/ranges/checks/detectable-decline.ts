import { exp, log, log1p } from "../../numeric/elementary.ts";
import { gaussLegendre } from "../../numeric/gauss-legendre.ts";
import { normalCdf } from "../../numeric/normal.ts";
import { findRoot } from "../../numeric/roots.ts";

/** z of the one-sided 5% test. */
const CRITICAL = 1.6448536269514722;
const POWER = 0.8;
/** Steepest decline asked about: beyond it a taxon is all but gone in the upper half of its range. */
const STEEPEST = 20;

/**
 * The smallest decline of recovery that the centroid of these taxa would show at 5% with 80% power: mu, where the
 * density of finds falls as (1 - x)^mu over each range (1: linearly to nothing). Undefined where even mu = 20 would be
 * missed more often.
 *
 * @param horizons number of distinct horizons of each taxon; fewer than three tell nothing.
 */
export function detectableDecline(horizons: readonly number[]): number | undefined {
  const excess = (mu: number) => declinePower(horizons, mu) - POWER;
  if (!(excess(STEEPEST) > 0)) return undefined;
  return findRoot(excess, 0, STEEPEST, { tolerance: 1e-3 });
}

/**
 * Power of the one-sided 5% centroid test of these taxa against Beta(1, 1 + mu) finds, rescaled by each taxon's first
 * and last. Measured from its first find the family keeps its shape, so with M the highest of the other n - 1 finds on
 * (0, 1), the n - 2 interior ones are independent with density proportional to (1 - x)^mu below M. Their mean and
 * variance given M are averaged over M by quadrature, added over taxa, and the normal tail taken.
 *
 * The shift of the rescaled finds is a half to two thirds of that of the whole range, so that no formula for the whole range does.
 * The power is 0.05 at mu = 0. Ours; within 0.01 of simulation from four interior finds on.
 */
export function declinePower(horizons: readonly number[], mu: number): number {
  const counts = horizons.filter((n) => n >= 3);
  const finds = counts.reduce((sum, n) => sum + n - 2, 0);
  if (finds === 0) return 0;
  const byCount = new Map<number, Moments>();
  let [mean, variance] = [0, 0];
  for (const n of counts) {
    const moments = byCount.get(n) ?? interiorSum(n, mu);
    byCount.set(n, moments);
    mean += moments.mean;
    variance += moments.variance;
  }
  const limit = finds / 2 - CRITICAL * Math.sqrt(finds / 12);
  return normalCdf((limit - mean) / Math.sqrt(variance));
}

interface Moments {
  readonly mean: number;
  readonly variance: number;
}

/** Nodes over the highest find and below it: power to 1e-4. */
const NODES = 20;
const INNER_NODES = 12;

/** Mean and variance of the sum of the n - 2 rescaled interior finds of one taxon. */
function interiorSum(n: number, mu: number): Moments {
  const { nodes, weights } = gaussLegendre(NODES);
  const inside = n - 2;
  let [first, second, within] = [0, 0, 0];
  for (let i = 0; i < NODES; i++) {
    // The chance q = F(M)^(n - 1) is uniform on (0, 1).
    const chance = 0.5 * (1 + nodes[i]);
    const weight = 0.5 * weights[i];
    const highest = quantile(exp(log(chance) / (n - 1)), mu);
    const { mean, variance } = belowHighest(highest, mu);
    first += weight * mean;
    second += weight * mean * mean;
    within += weight * variance;
  }
  return { mean: inside * first, variance: inside * within + inside * inside * (second - first * first) };
}

/** x with F(x) = 1 - (1 - x)^(1 + mu) = share. */
function quantile(share: number, mu: number): number {
  return 1 - exp(log1p(-share) / (1 + mu));
}

/** Mean and variance of x / M for density proportional to (1 - x)^mu on (0, M). */
function belowHighest(highest: number, mu: number): Moments {
  const { nodes, weights } = gaussLegendre(INNER_NODES);
  let [total, first, second] = [0, 0, 0];
  for (let i = 0; i < INNER_NODES; i++) {
    const share = 0.5 * (1 + nodes[i]);
    const weight = weights[i] * exp(mu * log1p(-highest * share));
    total += weight;
    first += weight * share;
    second += weight * share * share;
  }
  const mean = first / total;
  return { mean, variance: second / total - mean * mean };
}
