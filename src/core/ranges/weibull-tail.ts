import { exp, log, pow } from "../numeric/elementary.ts";

/** Finds from above downward, T_1 > T_2 >= ... >= T_k, in effective metres. */
export type TopDown = readonly number[];

/** Why the tail of these finds has no shape; undefined where it has. */
export type WithoutTail = "too-few" | "tied-top" | "tied-below";

/** Fewer finds than 3, two at the top (v without limit), or all below the top at one level (v = 0): no shape. */
export function withoutTail(finds: TopDown): WithoutTail | undefined {
  if (finds.length < 3) return "too-few";
  if (!(finds[0] > finds[1])) return "tied-top";
  return finds[1] > finds[finds.length - 1] ? undefined : "tied-below";
}

/**
 * Shape of the tail, v = (1 / (k - 1)) sum over i = 1 ... k - 2 of ln((T_1 - T_k) / (T_1 - T_(i+1))): an estimate of
 * the a in a density of finds that goes as (theta - x)^(1/a - 1) near the end. 1: constant; below 1: thinning out to
 * nothing (1/2: in a straight line); above 1: crowding towards the end. Biased low for few finds.
 *
 * Throws where `withoutTail` gives a reason.
 * P. Hall 1982, Annals of Statistics 10:556-568; D. L. Roberts & A. R. Solow 2003, Nature 426:245,
 * doi 10.1038/426245a.
 */
export function tailShape(finds: TopDown): number {
  const reason = withoutTail(finds);
  if (reason !== undefined)
    throw new RangeError(`tailShape: expected 3 finds or more with two gaps, got ${reason} (finds)`);
  const [top] = finds;
  const span = top - finds[finds.length - 1];
  let sum = 0;
  for (const find of finds.slice(1, -1)) sum += log(span / (top - find));
  return sum / (finds.length - 1);
}

/**
 * Weights a_i, with sum 1, of the optimal linear estimate of the end: Lambda^-1 e / (e' Lambda^-1 e), Lambda_ij =
 * Gamma(2v + i) Gamma(v + j) / (Gamma(v + i) Gamma(j)) for j <= i.
 *
 * Lambda is s_max(i,j) t_min(i,j), whose inverse is tridiagonal; its row sums are g_1 (1 + v), g_i (1 - v) between,
 * and -g_k (v + k - 1), with g_1 = 1 and g_(i+1) = g_i i / (2v + i). No digit is lost, whatever v; cost k.
 * After P. Cooke 1980, Biometrika 67:257-258, doi 10.1093/biomet/67.1.257; Hall 1982; Roberts & Solow 2003,
 * doi 10.1038/426245a.
 */
export function tailWeights(shape: number, finds: number): Float64Array {
  const weights = new Float64Array(finds);
  let g = 1;
  for (let i = 1; i <= finds; i++) {
    weights[i - 1] = g * (i === 1 ? 1 + shape : i === finds ? -(shape + finds - 1) : 1 - shape);
    g *= i / (2 * shape + i);
  }
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return weights.map((weight) => weight / total);
}

/** The optimal linear estimate of the end, sum of a_i T_i. */
export function tailPoint(finds: TopDown): number {
  const weights = tailWeights(tailShape(finds), finds.length);
  // Differences from the top: the weights are large and of both signs.
  return finds[0] - finds.reduce((sum, find, i) => sum + weights[i] * (finds[0] - find), 0);
}

/**
 * The level that the end exceeds with chance alpha: T_1 + (T_1 - T_k) c / (1 - c), c = (-ln(alpha) / k)^v. An upper
 * bound at level 1 - alpha; with alpha = 1 - a/2 the lower end of a two-sided interval. Undefined where -ln(alpha) is
 * k or more: so few finds give no such bound.
 *
 * Assumes only that the highest finds follow a Weibull-type tail; holds in the limit of many finds and covers more or
 * less than its level with few.
 *
 * @param alpha in (0, 1); throws otherwise.
 * Roberts & Solow 2003, doi 10.1038/426245a; A. R. Solow 2005, Mathematical Biosciences 195:47-55.
 */
export function tailBound(finds: TopDown, alpha: number): number | undefined {
  if (!(alpha > 0 && alpha < 1))
    throw new RangeError(`tailBound: expected a chance between 0 and 1, got ${alpha} (alpha)`);
  const share = -log(alpha) / finds.length;
  if (share >= 1) return undefined;
  const c = pow(share, tailShape(finds));
  return finds[0] + ((finds[0] - finds[finds.length - 1]) * c) / (1 - c);
}

/** alpha of the bound that just reaches `level`: exp(-k c^(1/v)), c = (theta - T_1) / (theta - T_k). */
export function tailChance(finds: TopDown, level: number): number {
  if (level <= finds[0]) return 1;
  const c = (level - finds[0]) / (level - finds[finds.length - 1]);
  return exp(-finds.length * pow(c, 1 / tailShape(finds)));
}
