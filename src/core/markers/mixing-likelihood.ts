import { exp, log } from "../numeric/elementary.ts";
import { logNormalCdf } from "../numeric/normal.ts";

/** One sample as the mixing models see it: lengths in cm, concentrations in ng/g, density in g/cm3. */
export interface MixingCell {
  readonly baseCm: number;
  readonly topCm: number;
  /** Measured value, or the detection limit where censored. */
  readonly value: number;
  readonly isCensored: boolean;
  /** Measurement error (one standard deviation) at that value. */
  readonly sigma: number;
  readonly density: number;
}

/** Best fluence and background for a given shape of the layer. */
export interface LinearFit {
  readonly logLikelihood: number;
  readonly fluence: number;
  readonly background: number;
}

export interface Likelihood {
  /** Cells and their standard deviations. */
  readonly cells: readonly MixingCell[];
  readonly sds: readonly number[];
  /** `response[i]` is the mean excess of cell i per unit fluence (g/cm2 inverted). */
  readonly fit: (response: readonly number[]) => LinearFit;
}

const halfLogTwoPi = 0.9189385332046727;
const logSqrtTwoPi = halfLogTwoPi;
const maximumIterations = 60;

/**
 * Likelihood of `C_i = F u_i + B` with fluence F >= 0 and background B: measured cells `N(C_i; model, s_i^2)`,
 * censored ones `Phi((DL - model)/s_i)`. It is concave in F and B, so for a given shape u the best pair is found
 * exactly (2 x 2 weighted least squares) or, with censored cells, by Newton's method.
 */
export function likelihoodOf(cells: readonly MixingCell[], sds: readonly number[]): Likelihood {
  const hasCensored = cells.some((cell) => cell.isCensored);
  const constant = cells.reduce(
    (sum, cell, i) => (cell.isCensored ? sum : sum - log(sds[i]) - halfLogTwoPi),
    0,
  );
  const backgroundOnly = () => {
    const zero = cells.map(() => 0);
    const start = { fluence: 0, background: weightedLine(cells, sds, zero).background };
    return hasCensored ? newton({ cells, sds, response: zero }, start, constant) : exact(zero, start);
  };
  const exact = (response: readonly number[], line: Line): LinearFit => ({
    ...line,
    logLikelihood: constant + misfit(cells, sds, { ...line, response }),
  });
  let withoutLayer: LinearFit | undefined;
  const fit = (response: readonly number[]): LinearFit => {
    const line = weightedLine(cells, sds, response);
    if (line.fluence > 0 || hasCensored) {
      const fitted = hasCensored
        ? newton({ cells, sds, response }, { ...line, fluence: Math.max(0, line.fluence) }, constant)
        : exact(response, line);
      if (fitted.fluence > 0) return fitted;
    }
    withoutLayer ??= backgroundOnly();
    return withoutLayer;
  };
  return { cells, sds, fit };
}

interface Line {
  readonly fluence: number;
  readonly background: number;
}

function misfit(
  cells: readonly MixingCell[],
  sds: readonly number[],
  { fluence, background, response }: Line & { response: readonly number[] },
): number {
  let sum = 0;
  for (let i = 0; i < cells.length; i++) {
    if (cells[i].isCensored) continue;
    const r = (cells[i].value - fluence * response[i] - background) / sds[i];
    sum -= 0.5 * r * r;
  }
  return sum;
}

/** Weighted least squares over the measured cells. */
function weightedLine(
  cells: readonly MixingCell[],
  sds: readonly number[],
  response: readonly number[],
): Line {
  let w = 0;
  let wu = 0;
  let wc = 0;
  for (let i = 0; i < cells.length; i++) {
    if (cells[i].isCensored) continue;
    const weight = 1 / (sds[i] * sds[i]);
    w += weight;
    wu += weight * response[i];
    wc += weight * cells[i].value;
  }
  if (w === 0) return { fluence: 0, background: 0 };
  const centreU = wu / w;
  const centreC = wc / w;
  let uu = 0;
  let uc = 0;
  for (let i = 0; i < cells.length; i++) {
    if (cells[i].isCensored) continue;
    const weight = 1 / (sds[i] * sds[i]);
    const u = response[i] - centreU;
    uu += weight * u * u;
    uc += weight * u * (cells[i].value - centreC);
  }
  if (!(uu > 0)) return { fluence: 0, background: centreC };
  const fluence = uc / uu;
  return { fluence, background: centreC - fluence * centreU };
}

interface Problem {
  readonly cells: readonly MixingCell[];
  readonly sds: readonly number[];
  readonly response: readonly number[];
}

function newton(problem: Problem, start: Line, constant: number): LinearFit {
  let { fluence, background } = start;
  let state = slopes(problem, fluence, background);
  for (let pass = 0; pass < maximumIterations; pass++) {
    const determinant = state.ff * state.bb - state.fb * state.fb;
    const isFlat = !(determinant > 1e-14 * state.ff * state.bb);
    const stepF = isFlat ? 0 : (state.bb * state.f - state.fb * state.b) / determinant;
    const stepB = isFlat ? state.b / state.bb : (state.ff * state.b - state.fb * state.f) / determinant;
    let share = 1;
    let next = slopes(problem, fluence + stepF, background + stepB);
    while (next.value < state.value && share > 1e-10) {
      share /= 2;
      next = slopes(problem, fluence + share * stepF, background + share * stepB);
    }
    if (next.value <= state.value) break;
    const gain = next.value - state.value;
    fluence += share * stepF;
    background += share * stepB;
    state = next;
    if (gain < 1e-11 * (1 + Math.abs(state.value))) break;
  }
  return { fluence, background, logLikelihood: constant + state.value };
}

/** Log-likelihood (without the constant), its first derivatives, and the negative second ones. */
function slopes({ cells, sds, response }: Problem, fluence: number, background: number) {
  let value = 0;
  let f = 0;
  let b = 0;
  let ff = 0;
  let fb = 0;
  let bb = 0;
  for (let i = 0; i < cells.length; i++) {
    const u = response[i];
    const z = (cells[i].value - fluence * u - background) / sds[i];
    let slope = z / sds[i];
    let bend = 1;
    if (cells[i].isCensored) {
      const logShare = logNormalCdf(z);
      const mills = exp(-0.5 * z * z - logSqrtTwoPi - logShare);
      value += logShare;
      slope = -mills / sds[i];
      bend = mills * (mills + z);
    } else value -= 0.5 * z * z;
    const curvature = bend / (sds[i] * sds[i]);
    f += slope * u;
    b += slope;
    ff += curvature * u * u;
    fb += curvature * u;
    bb += curvature;
  }
  return { value, f, b, ff, fb, bb: bb > 0 ? bb : Number.MIN_VALUE };
}
