export interface RootOptions {
  /** Absolute tolerance of the root; by default 1e-12 of the larger of |low| and |high|. */
  readonly tolerance?: number;
  /** Default 200. */
  readonly maximumIterations?: number;
}

interface Bracket {
  /** The best point so far and its value. */
  b: number;
  fb: number;
  /** The point before it. */
  a: number;
  fa: number;
  /** The point on the other side of the root. */
  c: number;
  fc: number;
  step: number;
  stepBefore: number;
}

/** Inverse quadratic interpolation (secant with two points), or bisection where that would not shrink the bracket. */
function chooseStep(s: Bracket, tolerance: number): void {
  const half = 0.5 * (s.c - s.b);
  if (Math.abs(s.stepBefore) >= tolerance && Math.abs(s.fa) > Math.abs(s.fb)) {
    const ratio = s.fb / s.fa;
    const isSecant = s.a === s.c;
    const q0 = s.fa / s.fc;
    const r = s.fb / s.fc;
    let p = isSecant ? 2 * half * ratio : ratio * (2 * half * q0 * (q0 - r) - (s.b - s.a) * (r - 1));
    let q = isSecant ? 1 - ratio : (q0 - 1) * (r - 1) * (ratio - 1);
    if (p > 0) q = -q;
    else p = -p;
    if (2 * p < Math.min(3 * half * q - Math.abs(tolerance * q), Math.abs(s.stepBefore * q))) {
      s.stepBefore = s.step;
      s.step = p / q;
      return;
    }
  }
  s.step = half;
  s.stepBefore = half;
}

/** Keeps the root between b and c, with b the better of the two. */
function arrange(s: Bracket): void {
  if (s.fb > 0 === s.fc > 0) {
    s.c = s.a;
    s.fc = s.fa;
    s.step = s.b - s.a;
    s.stepBefore = s.step;
  }
  if (Math.abs(s.fc) < Math.abs(s.fb)) {
    [s.a, s.b, s.c] = [s.b, s.c, s.b];
    [s.fa, s.fb, s.fc] = [s.fb, s.fc, s.fb];
  }
}

/**
 * A root of f between two points where f has opposite signs (or is zero at one of them): bisection with secant and
 * inverse quadratic steps.
 * @returns x with a change of sign of f within the tolerance.
 * @throws RangeError when the signs agree; Error with the count when the iterations run out.
 * Source: Brent 1973, Algorithms for Minimization without Derivatives, Prentice-Hall, chapter 4.
 */
export function findRoot(
  f: (x: number) => number,
  low: number,
  high: number,
  options: RootOptions = {},
): number {
  const { tolerance = 1e-12 * Math.max(Math.abs(low), Math.abs(high)), maximumIterations = 200 } = options;
  const fLow = f(low);
  const fHigh = f(high);
  if (fLow === 0) return low;
  if (fHigh === 0) return high;
  if (!(fLow < 0 === fHigh > 0) || Number.isNaN(fLow + fHigh)) {
    throw new RangeError(
      `findRoot: expected opposite signs at the ends, got f(${low}) = ${fLow} and f(${high}) = ${fHigh}`,
    );
  }
  const s: Bracket = { a: low, fa: fLow, b: high, fb: fHigh, c: high, fc: fHigh, step: 0, stepBefore: 0 };
  for (let iteration = 0; iteration < maximumIterations; iteration++) {
    arrange(s);
    const near = 2 * Number.EPSILON * Math.abs(s.b) + 0.5 * tolerance;
    if (s.fb === 0 || Math.abs(0.5 * (s.c - s.b)) <= near) return s.b;
    chooseStep(s, near);
    s.a = s.b;
    s.fa = s.fb;
    s.b += Math.abs(s.step) > near ? s.step : s.c > s.b ? near : -near;
    s.fb = f(s.b);
  }
  throw new Error(
    `findRoot: expected a root within ${maximumIterations} iterations, got none (between ${low} and ${high})`,
  );
}
