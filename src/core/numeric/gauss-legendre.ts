import { cos } from "./elementary.ts";

export interface Rule {
  /** Ascending, in (−1, 1). */
  readonly nodes: Float64Array;
  /** Positive, with sum 2. */
  readonly weights: Float64Array;
}

const MAXIMUM_STEPS = 100;
const rules = new Map<number, Rule>();

/** Legendre's polynomial of degree n at x, and its derivative. */
function legendre(n: number, x: number): { value: number; slope: number } {
  let before = 1;
  let value = x;
  for (let degree = 2; degree <= n; degree++) {
    [before, value] = [value, ((2 * degree - 1) * x * value - (degree - 1) * before) / degree];
  }
  return { value, slope: (n * (x * value - before)) / (x * x - 1) };
}

function newtonNode(n: number, guess: number): { x: number; slope: number } {
  let x = guess;
  for (let step = 0; step < MAXIMUM_STEPS; step++) {
    const { value, slope } = legendre(n, x);
    const change = value / slope;
    x -= change;
    if (Math.abs(change) < 1e-15) return { x, slope: legendre(n, x).slope };
  }
  throw new Error(
    `gaussLegendre: expected convergence within ${MAXIMUM_STEPS} steps (n ${n}, from ${guess})`,
  );
}

function makeRule(n: number): Rule {
  const nodes = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < Math.ceil(n / 2); i++) {
    const isCentre = 2 * i + 1 === n;
    const { x, slope } = newtonNode(n, isCentre ? 0 : cos((Math.PI * (i + 0.75)) / (n + 0.5)));
    const weight = 2 / ((1 - x * x) * slope * slope);
    nodes[i] = isCentre ? 0 : -x;
    nodes[n - 1 - i] = isCentre ? 0 : x;
    weights[i] = weight;
    weights[n - 1 - i] = weight;
  }
  return { nodes, weights };
}

/**
 * Nodes and weights of Gauss–Legendre quadrature on (−1, 1): exact for polynomials up to degree 2n − 1. Nodes are
 * the roots of Legendre's polynomial by Newton's method; kept for each n once made. Cost n².
 * @throws RangeError unless n is a whole number from 1.
 * Source: Abramowitz & Stegun 1964, 25.4.29.
 */
export function gaussLegendre(n: number): Rule {
  if (!Number.isInteger(n) || n < 1)
    throw new RangeError(`gaussLegendre: expected a whole n from 1, got ${n}`);
  const known = rules.get(n);
  if (known) return known;
  const rule = makeRule(n);
  rules.set(n, rule);
  return rule;
}

export interface IntegrateOptions {
  /** Nodes for each panel; default 40. */
  readonly nodes?: number;
  /** Where the integrand has a kink or jump: panels end there. Points outside (a, b) are ignored. */
  readonly breakpoints?: readonly number[];
}

function integratePanel(
  f: (x: number) => number,
  { nodes, weights }: Rule,
  [low, high]: [number, number],
): number {
  const centre = 0.5 * (low + high);
  const half = 0.5 * (high - low);
  let sum = 0;
  for (let i = 0; i < nodes.length; i++) sum += weights[i] * f(centre + half * nodes[i]);
  return half * sum;
}

/** ∫ f from a to b by Gauss–Legendre quadrature in panels between breakpoints; minus the integral when b < a. */
export function integrate(
  f: (x: number) => number,
  a: number,
  b: number,
  options: IntegrateOptions = {},
): number {
  if (b < a) return -integrate(f, b, a, options);
  const { nodes = 40, breakpoints = [] } = options;
  const rule = gaussLegendre(nodes);
  const ends = [a, ...breakpoints.filter((x) => x > a && x < b).toSorted((x, y) => x - y), b];
  let sum = 0;
  for (let i = 1; i < ends.length; i++) sum += integratePanel(f, rule, [ends[i - 1], ends[i]]);
  return sum;
}
