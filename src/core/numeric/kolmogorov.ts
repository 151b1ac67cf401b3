import { logChoose } from "./binomial.ts";
import { exp, log, log1p } from "./elementary.ts";

/** Where n d² exceeds this, both one-sided tails overlap by less than 1e-13 of the whole. */
const ONE_SIDED_FROM = 5;

/** A square matrix times 10^exponent, row by row. */
interface Scaled {
  readonly values: Float64Array;
  readonly exponent: number;
}

function multiply(a: Scaled, b: Scaled, size: number): Scaled {
  const values = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let k = 0; k < size; k++) {
      const factor = a.values[i * size + k];
      if (factor === 0) continue;
      for (let j = 0; j < size; j++) values[i * size + j] += factor * b.values[k * size + j];
    }
  }
  const middle = values[(size >> 1) * size + (size >> 1)];
  if (middle < 1e140) return { values, exponent: a.exponent + b.exponent };
  return { values: values.map((value) => value * 1e-140), exponent: a.exponent + b.exponent + 140 };
}

function power(matrix: Scaled, n: number, size: number): Scaled {
  if (n === 1) return matrix;
  const half = power(matrix, n >> 1, size);
  const square = multiply(half, half, size);
  return n % 2 === 1 ? multiply(square, matrix, size) : square;
}

/** The matrix H of Marsaglia, Tsang & Wang: ones below the second diagonal, corners by powers of h, rows over factorials. */
function transition(h: number, size: number): Float64Array {
  const values = new Float64Array(size * size);
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) values[i * size + j] = i - j + 1 < 0 ? 0 : 1;
  let powerOfH = 1;
  for (let i = 0; i < size; i++) {
    powerOfH *= h;
    values[i * size] -= powerOfH;
    values[(size - 1) * size + (size - 1 - i)] -= powerOfH;
  }
  if (2 * h - 1 > 0) {
    let corner = 1;
    for (let i = 0; i < size; i++) corner *= 2 * h - 1;
    values[(size - 1) * size] += corner;
  }
  for (let i = 0; i < size; i++) {
    let factorial = 1;
    for (let j = i; j >= 0; j--) {
      factorial *= i - j + 1;
      values[i * size + j] /= factorial;
    }
  }
  return values;
}

/** P(D_n < d) as n!/n^n times the k-th diagonal entry of H^n. */
function lowerByMatrix(d: number, n: number): number {
  const k = Math.floor(n * d) + 1;
  const size = 2 * k - 1;
  const h = k - n * d;
  const raised = power({ values: transition(h, size), exponent: 0 }, n, size);
  let value = raised.values[(k - 1) * size + (k - 1)];
  let exponent = raised.exponent;
  for (let i = 1; i <= n; i++) {
    value *= i / n;
    if (value < 1e-140) {
      value *= 1e140;
      exponent -= 140;
    }
  }
  return exponent === 0 ? value : value * exp(exponent * Math.LN10);
}

/**
 * Upper tail of the one-sided Kolmogorov–Smirnov statistic, P(D⁺_n ≥ d), exact:
 * d Σ_{j ≤ n(1−d)} C(n, j) (1 − d − j/n)^(n−j) (d + j/n)^(j−1), all terms positive.
 * Source: Birnbaum & Tingey 1951, Annals of Mathematical Statistics 22:592–596, doi 10.1214/aoms/1177729550.
 */
export function kolmogorovOneSidedUpperTail(d: number, n: number): number {
  if (d <= 0) return 1;
  if (d >= 1) return 0;
  let sum = exp(n * log1p(-d));
  for (let j = 1; j < n * (1 - d); j++) {
    const below = 1 - d - j / n;
    if (below <= 0) break;
    sum += d * exp(logChoose(n, j) + (n - j) * log(below) + (j - 1) * log(d + j / n));
  }
  return Math.min(1, sum);
}

/**
 * Upper tail of the two-sided Kolmogorov–Smirnov statistic of n values against a continuous distribution known in
 * advance, P(D_n ≥ d), exact for finite n. Cost (n d)³ log n.
 * @throws RangeError unless n is a whole number from 1.
 * Sources: Marsaglia, Tsang & Wang 2003, J. Statistical Software 8(18), doi 10.18637/jss.v008.i18; where n d² ≥ 5
 * twice the one-sided tail, Simard & L'Ecuyer 2011, J. Statistical Software 39(11), doi 10.18637/jss.v039.i11.
 */
export function kolmogorovUpperTail(d: number, n: number): number {
  if (!Number.isInteger(n) || n < 1 || Number.isNaN(d)) {
    throw new RangeError(`kolmogorovUpperTail: expected d and a whole n from 1, got d ${d}, n ${n}`);
  }
  if (n * d <= 0.5) return 1;
  if (d >= 1) return 0;
  if (d >= 0.5 || n * d * d >= ONE_SIDED_FROM) return 2 * kolmogorovOneSidedUpperTail(d, n);
  return Math.max(0, 1 - lowerByMatrix(d, n));
}
