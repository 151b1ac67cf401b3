import { NotConverged } from "./not-converged.ts";
export interface Minimum {
  readonly point: readonly number[];
  readonly value: number;
  readonly iterations: number;
}

export interface SimplexOptions {
  /** First step along each axis; default 5 % of the start's size, or 0.1 at 0. */
  readonly steps?: readonly number[];
  /** Relative to 1 + |x|; default 1e-9. */
  readonly xTolerance?: number;
  /** Relative to 1 + |f|; default 1e-11. */
  readonly fTolerance?: number;
  /** For all restarts together; default 2000 for each dimension. */
  readonly maximumIterations?: number;
}

interface Vertex {
  readonly point: readonly number[];
  readonly value: number;
}

type Objective = (point: readonly number[]) => number;

/** Points where the objective is not a number count as infinitely bad. */
function vertexAt(f: Objective, point: readonly number[]): Vertex {
  const value = f(point);
  return { point, value: Number.isNaN(value) ? Number.POSITIVE_INFINITY : value };
}

function blend(from: readonly number[], to: readonly number[], share: number): number[] {
  return from.map((x, i) => x + share * (to[i] - x));
}

function firstSimplex(f: Objective, start: readonly number[], steps: readonly number[]): Vertex[] {
  const moved = steps.map((step, axis) =>
    vertexAt(
      f,
      start.map((x, i) => (i === axis ? x + step : x)),
    ),
  );
  return [vertexAt(f, start), ...moved].toSorted((a, b) => a.value - b.value);
}

function isSmall(simplex: readonly Vertex[], xTolerance: number, fTolerance: number): boolean {
  const best = simplex[0];
  return simplex.every(
    ({ point, value }) =>
      Math.abs(value - best.value) <= fTolerance * (1 + Math.abs(best.value)) &&
      point.every((x, i) => Math.abs(x - best.point[i]) <= xTolerance * (1 + Math.abs(best.point[i]))),
  );
}

/** A better vertex than the worst by reflection, expansion or contraction; none when the simplex must shrink. */
function replacement(f: Objective, simplex: readonly Vertex[]): Vertex | undefined {
  const worst = simplex.at(-1)!;
  const others = simplex.slice(0, -1);
  const centre = worst.point.map(
    (_, i) => others.reduce((sum, { point }) => sum + point[i], 0) / others.length,
  );
  const reflected = vertexAt(f, blend(centre, worst.point, -1));
  if (reflected.value < simplex[0].value) {
    const expanded = vertexAt(f, blend(centre, worst.point, -2));
    return expanded.value < reflected.value ? expanded : reflected;
  }
  if (reflected.value < others.at(-1)!.value) return reflected;
  const isOutside = reflected.value < worst.value;
  const contracted = vertexAt(f, blend(centre, worst.point, isOutside ? -0.5 : 0.5));
  return contracted.value < Math.min(reflected.value, worst.value) ? contracted : undefined;
}

function nextSimplex(f: Objective, simplex: readonly Vertex[]): Vertex[] {
  const better = replacement(f, simplex);
  const best = simplex[0];
  const next = better
    ? [...simplex.slice(0, -1), better]
    : [best, ...simplex.slice(1).map(({ point }) => vertexAt(f, blend(best.point, point, 0.5)))];
  return next.toSorted((a, b) => a.value - b.value);
}

/**
 * Least value of a function of several variables by the simplex of Nelder & Mead, started again from its own answer
 * until a restart no longer improves on it, since a simplex can collapse before it reaches the minimum.
 * @throws Error with the count when the iterations run out; RangeError for no variables.
 * Source: Nelder & Mead 1965, Computer Journal 7:308–313, doi 10.1093/comjnl/7.4.308.
 */
export function nelderMead(f: Objective, start: readonly number[], options: SimplexOptions = {}): Minimum {
  if (start.length === 0) throw new RangeError("nelderMead: expected at least one variable, got none");
  const { xTolerance = 1e-9, fTolerance = 1e-11, maximumIterations = 2000 * start.length } = options;
  const steps = options.steps ?? start.map((x) => (x === 0 ? 0.1 : 0.05 * x));
  let iterations = 0;
  const descend = (from: readonly number[]): Vertex => {
    let simplex = firstSimplex(f, from, steps);
    while (!isSmall(simplex, xTolerance, fTolerance)) {
      if (++iterations > maximumIterations) throw new NotConverged("nelderMead", maximumIterations);
      simplex = nextSimplex(f, simplex);
    }
    return simplex[0];
  };
  let best = descend(start);
  for (;;) {
    const again = descend(best.point);
    const gain = best.value - again.value;
    if (gain > 0) best = again;
    if (!(gain > fTolerance * (1 + Math.abs(best.value)))) return { ...best, iterations };
  }
}

export interface IntervalOptions {
  /** Absolute, in x; default 1e-9 of the larger of |low| and |high|. */
  readonly tolerance?: number;
  /** Default 200. */
  readonly maximumIterations?: number;
}

const GOLDEN = 0.3819660112501051;

/**
 * Least value of a function with one minimum on [low, high], by golden section; the tolerance is that of x.
 * @throws RangeError unless low < high; Error with the count when the iterations run out.
 * Source: Kiefer 1953, Proc. American Mathematical Society 4:502–506, doi 10.1090/S0002-9939-1953-0055639-3.
 */
export function minimiseOnInterval(
  f: (x: number) => number,
  low: number,
  high: number,
  options: IntervalOptions = {},
): { readonly at: number; readonly value: number } {
  if (!(low < high)) throw new RangeError(`minimiseOnInterval: expected low < high, got ${low} and ${high}`);
  const { tolerance = 1e-9 * Math.max(Math.abs(low), Math.abs(high)), maximumIterations = 200 } = options;
  let [left, right] = [low, high];
  let a = left + GOLDEN * (right - left);
  let b = right - GOLDEN * (right - left);
  let [fa, fb] = [f(a), f(b)];
  for (let iteration = 0; iteration < maximumIterations; iteration++) {
    if (right - left <= tolerance) return fa <= fb ? { at: a, value: fa } : { at: b, value: fb };
    if (fa <= fb) {
      [right, b, fb] = [b, a, fa];
      a = left + GOLDEN * (right - left);
      fa = f(a);
    } else {
      [left, a, fa] = [a, b, fb];
      b = right - GOLDEN * (right - left);
      fb = f(b);
    }
  }
  throw new Error(
    `minimiseOnInterval: expected convergence within ${maximumIterations} iterations, got none`,
  );
}
