import { findRoot } from "./roots.ts";

export interface NormalRule {
  /** Ascending. */
  readonly nodes: Float64Array;
  /** Positive, with sum 1. */
  readonly weights: Float64Array;
}

const rules = new Map<number, NormalRule>();
/** The step of the search for roots is this share of their smallest spacing, or less. */
const STEPS_PER_NODE = 40;

/** Hermite's polynomials from degree 0 to n at x, orthonormal under the standard normal. */
function hermite(n: number, x: number): Float64Array {
  const values = new Float64Array(n + 1);
  values[0] = 1;
  for (let j = 0; j < n; j++)
    values[j + 1] = (x * values[j] - Math.sqrt(j) * (j > 0 ? values[j - 1] : 0)) / Math.sqrt(j + 1);
  return values;
}

function makeRule(n: number): NormalRule {
  const atDegree = (x: number) => hermite(n, x)[n];
  const reach = 2 * Math.sqrt(n + 1);
  const steps = STEPS_PER_NODE * n;
  const above: number[] = [];
  for (let i = 0; i < steps; i++) {
    const [low, high] = [(reach * (i + 0.5)) / steps, (reach * (i + 1.5)) / steps];
    if (atDegree(low) < 0 !== atDegree(high) < 0) above.push(findRoot(atDegree, low, high));
  }
  const nodes = [...above.map((x) => -x).toReversed(), ...(n % 2 === 1 ? [0] : []), ...above];
  if (nodes.length !== n) throw new Error(`gaussHermite: expected ${n} roots, got ${nodes.length}`);
  const weights = nodes.map((x) => 1 / hermite(n - 1, x).reduce((sum, value) => sum + value * value, 0));
  return { nodes: Float64Array.from(nodes), weights: Float64Array.from(weights) };
}

/**
 * Nodes and weights of Gauss-Hermite quadrature for the mean over a standard normal: exact for polynomials up to degree
 * 2n - 1. Nodes are the roots of Hermite's polynomial, weights 1 / sum over j < n of its orthonormal values squared; kept
 * for each n once made.
 * @throws RangeError unless n is a whole number from 1 to 60.
 * Source: Abramowitz & Stegun 1964, 25.4.46 and 22.2.15.
 */
export function gaussHermite(n: number): NormalRule {
  if (!Number.isInteger(n) || n < 1 || n > 60)
    throw new RangeError(`gaussHermite: expected a whole n from 1 to 60, got ${n}`);
  const known = rules.get(n);
  if (known) return known;
  const rule = makeRule(n);
  rules.set(n, rule);
  return rule;
}
